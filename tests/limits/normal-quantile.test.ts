import { expect, test } from 'vitest'
import { normalQuantile } from '../../src/limits/normal-quantile.ts'
import { expectClose } from '../support/expect-close.ts'

// root of Φ(z) = p at the double nearest to p, in 60 digits by mpmath; those to three digits are in any table
const QUANTILES = [
  [0.6, 0.25334710313579974132],
  [0.75, 0.6744897501960817432],
  [0.3, -0.52440051270804081597],
  [0.9, 1.2815515655446005935],
  [0.925, 1.4395314709384562291],
  [0.95, 1.6448536269514722843],
  [0.975, 1.9599639845400538556],
  [0.99, 2.3263478740408407676],
  [0.995, 2.5758293035489004539],
  [0.999, 3.0902323061678132778],
  [0.05, -1.644853626951472688],
  [0.01, -2.3263478740408410931],
  [0.001, -3.0902323061678135354],
  [1e-5, -4.2648907939228246102],
  [1e-10, -6.3613409024040561991],
  [2 ** -33, -6.3379577545537892525],
  [1e-12, -7.0344838253011319326],
  [1e-20, -9.2623400897984075796],
] as const

test.each(QUANTILES)('the quantile at %d is %d', (p, z) => {
  // some units in the last place of the sums and the logarithm
  expectClose(normalQuantile(p), z, { rel: 2e-15 })
})

test('the quantile at one half is 0', () => {
  expect(normalQuantile(0.5)).toBe(0)
})

test('the quantile is odd about one half, to the last digit', () => {
  for (let i = 1; i < 2 ** 12; i += 1) {
    const p = i / 2 ** 13
    expect(normalQuantile(1 - p)).toBe(-normalQuantile(p))
  }
})

test('the quantile rises, also from one part of its range to the next', () => {
  // parts meet at 0.075, 0.925 and, beyond e⁻²⁵, at 1.4e-11
  for (const seam of [0.075, 0.925, Math.exp(-25)]) {
    for (const step of [1e-4, 1e-7, 1e-10]) {
      const [below, at, above] = [seam * (1 - step), seam, seam * (1 + step)].map(normalQuantile)
      expect(below! < at! && at! < above!, `${seam} ${step}`).toBe(true)
      // slopes on both sides are alike: a step between the parts would be seen
      expectClose((above! - at!) / (at! - below!), 1, { rel: 1e-3 + 1e-14 / step })
    }
  }
})

test('what is no probability inside (0, 1) is refused', () => {
  for (const p of [0, 1, -0.1, 1.1, NaN, Infinity]) expect(() => normalQuantile(p)).toThrow(RangeError)
})
