import type { LonLat } from '../domain/position.ts'
import type { BankLine } from './bank-station.ts'
import { footOf, type Axis, type Foot } from './chainage.ts'
import { crossingsOf } from './crossings.ts'
import { densify } from './densify.ts'
import { hasFault, type GeometryFinding } from './finding.ts'
import { lineTree } from './line-tree.ts'
import { edgeLength } from './plane.ts'

export type SideName = 'left' | 'right'

/** A given bank line against the sailing line. */
interface Bank {
  readonly name: SideName
  readonly line: readonly LonLat[]
  readonly bank: BankLine
  /** side on which more of its length lies */
  readonly side: SideName
  /** least distance from the sailing line, m */
  readonly least: number
}

type FaultOf = Extract<GeometryFinding, { level: 'fault' }>

function fault(code: FaultOf['code'], pointer: string, detail: string, facts?: FaultOf['facts']): FaultOf {
  return { level: 'fault', code, kind: 'clash', pointer, detail, ...(facts && { facts }) }
}

/** Length that a vertex stands for, m. */
function weightOf(line: readonly LonLat[], i: number): number {
  const [before, position, after] = [line[i - 1], line[i], line[i + 1]]
  if (!position) return 0
  return (before ? edgeLength(before, position) : 0) + (after ? edgeLength(position, after) : 0)
}

/**
 * Slack of the ends of a bank line: m, and share of its distance. A bank cut off square to a bend ends short of the
 * normal of the last chord of the sailing line by half of that chord's turn.
 */
const END_SLACK = 0.5
const END_SLACK_SHARE = 0.1

/** How far the sailing line runs on at its start and its end without a bank beside it, m; 0 within the slack. */
function missingLengths(bank: Omit<BankLine, 'missing'>, length: number): readonly [number, number] {
  const beyondSlack = (missing: number, offset: number) =>
    missing > Math.max(END_SLACK, END_SLACK_SHARE * offset) ? missing : 0
  return [beyondSlack(bank.from, bank.offsetAtFrom), beyondSlack(length - bank.to, bank.offsetAtTo)]
}

/** Where the bank lies: the part of the sailing line beside it, and the side of most of its length. */
function placeBank(axis: Axis, name: SideName, line: readonly LonLat[]): Bank {
  const feet = line.map((position): Foot => footOf(axis, position))
  const beside = feet.some(({ isBeyond }) => !isBeyond)
  let [first, last] = [feet[0], feet[0]]
  let [rightLength, least] = [0, Infinity]
  feet.forEach((foot, i) => {
    if (!first || foot.along < first.along) first = foot
    if (!last || foot.along > last.along) last = foot
    least = Math.min(least, Math.abs(foot.offset))
    // what lies before or after the sailing line has no side, unless all of it does
    if (!foot.isBeyond || !beside) rightLength += Math.sign(foot.offset) * weightOf(line, i)
  })
  const bank = {
    tree: lineTree(line),
    from: first?.along ?? 0,
    to: last?.along ?? 0,
    offsetAtFrom: Math.abs(first?.offset ?? 0),
    offsetAtTo: Math.abs(last?.offset ?? 0),
  }
  return {
    name,
    line,
    bank: { ...bank, missing: missingLengths(bank, axis.length) },
    side: rightLength > 0 ? 'right' : 'left',
    least,
  }
}

const at = ([lon, lat]: LonLat): string => `${lon.toFixed(5)}, ${lat.toFixed(5)}`

function faultsOfBank(axis: Axis, { name, line, bank, least }: Bank, reach: number): FaultOf[] {
  const crossings = crossingsOf(bank.tree, axis.tree)
  const [crossing] = crossings
  if (crossing) {
    const { along } = footOf(axis, crossing.position)
    const times = crossings.length === 1 ? 'once' : `${crossings.length} times, first`
    return [
      fault(
        'bank-crosses-line',
        `/${name}/line/coordinates/${crossing.edge}`,
        `The ${name} bank crosses the sailing line ${times} at ${at(crossing.position)}, ${along.toFixed(0)} m along it: the sailing line must lie between the banks`,
        { crossings: crossings.length, along_m: along },
      ),
    ]
  }
  if (least > reach && line.length > 0) {
    const detail = `The ${name} bank is nowhere within ${reach} m of the sailing line, its nearest vertex is ${least.toFixed(0)} m away: does it belong to another segment?`
    return [fault('bank-out-of-reach', `/${name}/line`, detail, { nearest_m: least })]
  }
  return []
}

const LOOKING = 'Left and right are seen looking downstream, along the vertices of the sailing line'

/** Sides of the banks against their names. */
function sideFindings(banks: readonly Bank[]): GeometryFinding[] {
  const [a, b] = banks
  if (a && b && a.side === b.side) {
    const wrong = a.side === a.name ? b : a
    return [
      fault(
        'banks-on-one-side',
        `/${wrong.name}/line`,
        `Both banks lie to the ${wrong.side} of the sailing line, the ${wrong.name} one as well. ${LOOKING}`,
      ),
    ]
  }
  if (banks.every(({ name, side }) => name === side)) return []
  if (a && b) {
    return [
      {
        level: 'remark',
        code: 'banks-swapped',
        pointer: '',
        detail: `The left bank lies to the right of the sailing line and the right one to the left: their lines were swapped. ${LOOKING}: is it drawn upstream?`,
      },
    ]
  }
  if (!a) return []
  const detail = `The ${a.name} bank lies to the ${a.side} of the sailing line. ${LOOKING}: is it drawn upstream, or is this the ${a.side} bank?`
  return [fault('bank-on-wrong-side', `/${a.name}/line`, detail)]
}

function shortFindings({ name, bank }: Bank): GeometryFinding[] {
  const [before, after] = bank.missing
  if (before === 0 && after === 0) return []
  const parts = [
    ...(before > 0 ? [`the first ${before.toFixed(0)} m`] : []),
    ...(after > 0 ? [`the last ${after.toFixed(0)} m`] : []),
  ]
  return [
    {
      level: 'remark',
      code: 'bank-too-short',
      pointer: `/${name}/line`,
      detail: `The line of the ${name} bank does not reach along ${parts.join(' and ')} of the sailing line: its distance at its end is held there`,
      facts: { missing_at_start_m: before, missing_at_end_m: after },
    },
  ]
}

const STRAIGHT = { left: 'left', right: 'right' } as const
const SWAPPED = { left: 'right', right: 'left' } as const

export interface PlacedBanks {
  /** left and right as they lie, null where no line is given */
  readonly banks: readonly [BankLine | null, BankLine | null]
  /** under which name each of them was given */
  readonly names: Readonly<Record<SideName, SideName>>
  readonly findings: readonly GeometryFinding[]
}

/**
 * Places bank lines beside a sailing line: the vertex order of a bank does not matter, swapped ones are swapped back.
 *
 * @param lines  n positions each, n ≥ 2, no two consecutive ones equal
 * @param reach  m; a bank that is nowhere nearer is a fault
 */
export function placeBanks(
  axis: Axis,
  lines: Readonly<Partial<Record<SideName, readonly LonLat[]>>>,
  reach: number,
): PlacedBanks {
  const placed = (['left', 'right'] as const).flatMap((name) => {
    const line = lines[name]
    return line ? [placeBank(axis, name, densify(line))] : []
  })
  const isSwapped = placed.some(({ name, side }) => name !== side)
  const names = isSwapped ? SWAPPED : STRAIGHT
  const faults = placed.flatMap((bank) => faultsOfBank(axis, bank, reach))
  if (faults.length > 0) return { banks: [null, null], names, findings: faults }
  const findings = [...sideFindings(placed), ...placed.flatMap((bank) => shortFindings(bank))]
  if (hasFault(findings)) return { banks: [null, null], names, findings }
  const bankOn = (side: SideName) => placed.find((bank) => bank.side === side)?.bank ?? null
  return { banks: [bankOn('left'), bankOn('right')], names, findings }
}
