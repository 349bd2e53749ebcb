import type { GeometryFinding } from './finding.ts'

/** Difference between the chainage and the measured length that is worth a remark, m and share. */
const LENGTH_SLACK = 50
const LENGTH_SLACK_SHARE = 0.05

/** Chainages of a waterway along one of its lines. */
export interface ChainageScale {
  /** chainage at a distance along the line, m */
  readonly chainageAt: (distance: number) => number
  /** distance along the line at a chainage, m; below 0 and above the length outside the line */
  readonly distanceAt: (chainage: number) => number
  readonly findings: readonly GeometryFinding[]
}

/**
 * Maps distances along a line to chainages of its waterway and back, linearly: the chainage may fall, and it may count
 * other metres than the line has, as official ones along a former course do.
 *
 * @param length  of the line, m, > 0
 * @param from    chainage at its first vertex, m
 * @param to      chainage at its last vertex, m
 * @returns faults: `chainage-without-span`; remarks: `chainage-differs-from-length`
 */
export function chainageScale(length: number, from = 0, to = from + length): ChainageScale {
  const span = to - from
  const findings: GeometryFinding[] = []
  if (span === 0) {
    findings.push({
      level: 'fault',
      code: 'chainage-without-span',
      kind: 'clash',
      pointer: '/chainage_to_m',
      detail: `The segment begins and ends at chainage ${from} m: give two chainages, or neither`,
      facts: { chainage_from_m: from, chainage_to_m: to },
    })
  } else if (Math.abs(Math.abs(span) - length) > Math.max(LENGTH_SLACK, LENGTH_SLACK_SHARE * length)) {
    findings.push({
      level: 'remark',
      code: 'chainage-differs-from-length',
      pointer: '/chainage_to_m',
      detail: `The chainages are ${Math.abs(span).toFixed(0)} m apart, the line is ${length.toFixed(0)} m long: chainages along it are scaled`,
      facts: { chainage_span_m: Math.abs(span), length_m: length },
    })
  }
  return {
    chainageAt: (distance) => from + (distance / length) * span,
    distanceAt: (chainage) => (span === 0 ? 0 : ((chainage - from) / span) * length),
    findings,
  }
}
