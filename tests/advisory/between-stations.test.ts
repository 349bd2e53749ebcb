import { expect, test } from 'vitest'
import { decide } from '../../src/advisory/decide.ts'
import { VESSEL_CLASSES } from '../../src/domain/vessel-classes.ts'
import { vesselOfClass } from '../../src/domain/vessel-of.ts'
import type { Vessel } from '../../src/domain/vessel.ts'
import { rowsBetween } from '../../src/geo/between.ts'
import type { Row } from '../../src/geo/thin.ts'
import { atRest, canal } from '../support/places.ts'
import { plainOptions } from '../support/sheets.ts'

type Figures = Row['figures']

/** Largest safe speed, m/s; 0 where none is. */
function speedAt([depth, ...distances]: Figures, vessel: Vessel): number {
  const { main } = decide(canal({ depth, distances }), vessel, atRest, plainOptions)
  return main.outcome === 'no-safe-speed' ? 0 : main.speed
}

/** Numbers between 0 and 1, the same in each run (Numerical Recipes, a linear congruential generator). */
function* shares(): Generator<number, never> {
  let state = 20
  for (;;) {
    state = (state * 1_664_525 + 1_013_904_223) % 2 ** 32
    yield state / 2 ** 32
  }
}

const DIVISIONS = 200
const PAIRS = 250
const LARGEST_CHANGE = 2.5

const divided = (a: Figures, b: Figures, share: number): Figures => [
  a[0] + share * (b[0] - a[0]),
  a[1] + share * (b[1] - a[1]),
  a[2] + share * (b[2] - a[2]),
]

/** Shares by which the lowest of the stations lies above the lowest of the divisions: the pair, and with those between. */
function losses(): { pair: number[]; between: number[] } {
  const random = shares()
  const spread = (low: number, high: number) => low * (high / low) ** random.next().value
  const changed = (figure: number, least: number) =>
    Math.max(least, figure * spread(1 / LARGEST_CHANGE, LARGEST_CHANGE))
  const found = { pair: [] as number[], between: [] as number[] }
  while (found.pair.length < PAIRS) {
    const vesselClass = VESSEL_CLASSES[Math.floor(random.next().value * VESSEL_CLASSES.length)]!
    const vessel = vesselOfClass(vesselClass, 'laden', {})
    const { draught, beam } = vessel
    const a: Figures = [draught * spread(1.1, 6), beam * spread(0.8, 15), beam * spread(0.8, 15)]
    const b: Figures = [changed(a[0], 1.08 * draught), changed(a[1], 0.7 * beam), changed(a[2], 0.7 * beam)]
    const rows = rowsBetween([[{ along: 0, figures: a }, { along: 1, figures: b }]]) // prettier-ignore
    const ends = Math.min(speedAt(a, vessel), speedAt(b, vessel))
    const all = Math.min(ends, ...rows.map(({ figures }) => speedAt(figures, vessel)))
    const everywhere = Array.from({ length: DIVISIONS - 1 }, (_, i) =>
      speedAt(divided(a, b, (i + 1) / DIVISIONS), vessel),
    )
    const least = Math.min(ends, ...everywhere)
    found.pair.push(ends === 0 ? 0 : 1 - least / ends)
    found.between.push(all === 0 ? 0 : 1 - Math.min(least, all) / all)
  }
  return found
}

const percentile = (values: readonly number[], share: number): number =>
  values.toSorted((a, b) => a - b)[Math.floor(share * values.length)]!

test('the stations between two find the strictest place, which the two alone often miss', () => {
  const { pair, between } = losses()
  expect(percentile(between, 0.95)).toBeLessThan(0.001)
  expect(percentile(between, 0.98)).toBeLessThan(0.005)
  expect(Math.max(...between)).toBeLessThan(0.01)
  expect(percentile(pair, 0.95)).toBeGreaterThan(0.005)
  expect(percentile(pair, 0.98)).toBeGreaterThan(0.02)
  expect(Math.max(...pair)).toBeGreaterThan(0.08)
})
