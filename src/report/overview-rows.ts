import type { Brief } from '../advisory/advise.ts'
import type { LonLat } from '../domain/position.ts'
import { SIGN_UNITS, type SignUnit } from '../domain/units.ts'
import type { SegmentRecord } from '../store/registry.ts'
import { atMostFigure } from './format.ts'
import { criterionName } from './words.ts'

/** A segment with its answer, or with why there is none. */
export interface Answered {
  readonly record: SegmentRecord
  readonly answer: Brief | { readonly problem: string }
}

/** A segment as the overview shows it. */
export interface OverviewRow {
  readonly id: string
  readonly name: string
  readonly waterway: string
  readonly chainage: number
  readonly line: readonly LonLat[]
  readonly kind: 'speed' | 'no-safe-speed' | 'no-answer'
  /** recommended maximum over ground in the unit of the signs */
  readonly speed?: number
  /** beside the line: the value of the sign, or what stands for it */
  readonly shortText: string
  /** in words */
  readonly answerText: string
  readonly governing: string
}

const textOf = (record: SegmentRecord, field: string): string | undefined => {
  const value = record.properties[field]
  return typeof value === 'string' && value !== '' ? value : undefined
}

function rowOf({ record, answer }: Answered, unit: SignUnit): OverviewRow {
  const from = record.properties.chainage_from_m
  const place = {
    id: record.id,
    name: textOf(record, 'name') ?? record.id,
    waterway: textOf(record, 'waterway') ?? '',
    chainage: typeof from === 'number' ? from : 0,
    line: record.line,
  }
  if ('problem' in answer) {
    return { ...place, kind: 'no-answer', shortText: '?', answerText: 'no answer', governing: answer.problem }
  }
  const { decision, sign } = answer
  const governing = criterionName(decision.governing.criterion, decision.situation.segment)
  if (decision.outcome === 'no-safe-speed') {
    return { ...place, kind: 'no-safe-speed', shortText: '×', answerText: 'no safe speed', governing }
  }
  const speed = decision.overGround / SIGN_UNITS[unit]
  const value = sign ? String(sign.value) : 'no sign'
  return {
    ...place,
    kind: 'speed',
    speed,
    shortText: sign ? value : atMostFigure(speed, 1),
    answerText: `${atMostFigure(speed, 2)} ${unit}${sign ? `, sign ${value}` : ', no sign'}`,
    governing,
  }
}

/** Rows in the order of the water: by waterway, then downstream. */
export function rowsOf(answered: readonly Answered[], unit: SignUnit): OverviewRow[] {
  return answered
    .map((own) => rowOf(own, unit))
    .sort((a, b) => order(a.waterway, b.waterway) || a.chainage - b.chainage || order(a.id, b.id))
}

const order = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0)
