import { bankDrawdown, bankReturnCurrent, drawdownFirstSpeed, returnCurrentFirstSpeed } from '../primary.ts'
import type { Situation } from '../situation.ts'
import { atMost, type Criterion } from './criterion.ts'

interface Law {
  readonly id: 'drawdown' | 'return-current'
  readonly unit: 'm' | 'm/s'
  readonly requested: number | undefined
  readonly ofBank: number | undefined
  readonly value: (situation: Situation, bank: 0 | 1, speed: number) => number
  readonly first: (situation: Situation, bank: 0 | 1, limit: number, from: number) => number
}

function criterionOf(situation: Situation, bank: 0 | 1, law: Law): Criterion | undefined {
  const limit = law.requested ?? law.ofBank
  // open water has no primary wave to bound
  if (limit === undefined || !situation.setting.isConfined) return undefined
  return {
    id: law.id,
    place: `${situation.segment.banks[bank].side}-bank`,
    sense: 'at-most',
    unit: law.unit,
    origin: law.requested === undefined ? 'segment' : 'request',
    firstSpeed: (from, to) => {
      const first = law.first(situation, bank, limit, from)
      return first < to ? first : Infinity
    },
    evaluate: (speed) => atMost(law.value(situation, bank, speed), limit),
  }
}

/** Drawdown at a bank, where the request or the bank gives a limit. */
export function drawdownCriterion(situation: Situation, bank: 0 | 1): Criterion | undefined {
  return criterionOf(situation, bank, {
    id: 'drawdown',
    unit: 'm',
    requested: situation.options.limits.maxDrawdown,
    ofBank: situation.segment.banks[bank].maxDrawdown,
    value: bankDrawdown,
    first: drawdownFirstSpeed,
  })
}

/** Return current at a bank, where the request or the bank gives a limit. */
export function returnCurrentCriterion(situation: Situation, bank: 0 | 1): Criterion | undefined {
  return criterionOf(situation, bank, {
    id: 'return-current',
    unit: 'm/s',
    requested: situation.options.limits.maxReturnCurrent,
    ofBank: situation.segment.banks[bank].maxReturnCurrent,
    value: bankReturnCurrent,
    first: returnCurrentFirstSpeed,
  })
}
