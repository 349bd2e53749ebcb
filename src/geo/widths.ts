import type { GeometryFinding } from './finding.ts'
import { interpolate } from './interpolate.ts'
import type { Placed, StationSources } from './station-figures.ts'

/** Difference between a given distance and that to a bank line that is worth a remark: m and share. */
const SLACK = 5
const SLACK_SHARE = 0.1

/** A distance that is given beside a bank line, m. */
interface Pair {
  readonly side: 'left' | 'right'
  readonly along: number
  readonly given: number
  readonly line: number
}

/** The distance that a station gives to a bank; where its sides are not known, that of the two which fits the line. */
function givenDistance(
  { distances, hasSides }: Pick<Placed, 'distances' | 'hasSides'>,
  bank: 0 | 1,
  line: number,
) {
  if (hasSides !== false) return distances[bank]
  const [a, b] = distances
  return Math.abs(a - line) <= Math.abs(b - line) ? a : b
}

/** A remark where given distances and those to the bank lines differ; the lines count. */
export function widthFindings(
  { banks, single, scale }: StationSources,
  inside: readonly Placed[],
): GeometryFinding[] {
  const pairs = (['left', 'right'] as const).flatMap((side): Pair[] => {
    const bank = side === 'left' ? 0 : 1
    const lines = banks.flatMap(({ along, ...station }) => {
      const found = station[side]
      return found ? [{ along, value: found.distance }] : []
    })
    if (lines.length === 0) return []
    const constant = single.distances?.[bank]
    if (constant !== undefined) {
      return lines.map(({ along, value }) => ({ side, along, given: constant, line: value }))
    }
    return inside.map((station) => {
      const line = interpolate(lines, station.along)
      return { side, along: station.along, given: givenDistance(station, bank, line), line }
    })
  })
  const apart = ({ given, line }: Pair) => Math.abs(given - line)
  const differing = pairs.filter((pair) => apart(pair) > Math.max(SLACK, SLACK_SHARE * pair.line))
  const worst = differing.toSorted((a, b) => apart(b) - apart(a))[0]
  if (!worst) return []
  const chainage = scale.chainageAt(worst.along)
  return [
    {
      level: 'remark',
      code: 'widths-differ',
      pointer: '/banks',
      detail: `The given distance to the ${worst.side} bank is ${worst.given.toFixed(0)} m at chainage ${chainage.toFixed(0)} m, its line lies ${worst.line.toFixed(0)} m away: the lines were taken`,
      facts: { given_m: worst.given, line_m: worst.line, chainage_m: chainage, places: differing.length },
    },
  ]
}
