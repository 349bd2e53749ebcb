import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { risingRoot } from '../../src/hydro/root.ts'
import { expectClose } from '../support/expect-close.ts'
import { between, spread } from '../support/setting.ts'

/** The same with the number of evaluations. */
function counted(f: (x: number) => number, low: number, high: number): { root: number; calls: number } {
  let calls = 0
  const root = risingRoot(
    (x) => {
      calls += 1
      return f(x)
    },
    low,
    high,
  )
  return { root, calls }
}

/** Functions with a root known without the code: f, root, low, high, most evaluations. */
const KNOWN: readonly (readonly [(x: number) => number, number, number, number, number])[] = [
  [(x) => x * x - 2, Math.SQRT2, 1, 2, 12],
  [(x) => x - 0.3, 0.3, 0, 1, 8],
  [(x) => Math.exp(x) - 5, Math.log(5), 0, 4, 12],
  [(x) => Math.log(x), 1, 0.001, 50, 16],
  [(x) => x ** 9 - 1, 1, 0, 2, 20],
  [(x) => Math.atan(1e4 * (x - 0.7)), 0.7, 0, 1, 40],
  [(x) => (x < 1 / 3 ? -1 : 1), 1 / 3, 0, 1, 60],
  [(x) => (x - 0.5) ** 3, 0.5, 0, 1.7, 120],
  [(x) => Math.sqrt(x) - 1e-3, 1e-6, 0, 1, 60],
]

describe('risingRoot', () => {
  it('finds the roots that are known, within 4 units in the last place', () => {
    for (const [f, root, low, high] of KNOWN) {
      expectClose(risingRoot(f, low, high), root, { rel: 8 * Number.EPSILON })
    }
  })

  it('needs few evaluations of a smooth function, and no more than halving a broken one', () => {
    for (const [f, root, low, high, most] of KNOWN) {
      const { calls } = counted(f, low, high)
      expect(calls, `root ${root}`).toBeLessThanOrEqual(most)
    }
  })

  it('answers on the lower side: f is not positive there, and positive 4 units in the last place above', () => {
    fc.assert(
      fc.property(spread(1e-3, 1e3), between(0.2, 5), between(0, 0.999), (root, power, share) => {
        const f = (x: number): number => x ** power - root ** power
        const x = risingRoot(f, share * root, root * 7)
        expect(f(x) <= 0).toBe(true)
        expect(f(x * (1 + 5 * Number.EPSILON)) > 0 || Math.abs(x / root - 1) < 1e-13).toBe(true)
        // rounding of x^power blurs the root itself by a few units over the power
        expectClose(x, root, { rel: 1e-13 })
      }),
    )
  })

  it('takes a root at the lower end, and a function that is 0 up to a point', () => {
    expect(risingRoot((x) => x - 1, 1, 2)).toBe(1)
    expectClose(
      risingRoot((x) => Math.max(0, x - 1), 0.2, 2),
      1,
      { rel: 1e-15 },
    )
  })

  it('finds one of several roots', () => {
    const x = risingRoot((v) => Math.sin(v), Math.PI * 1.1, Math.PI * 6.5)
    expect(Math.abs(Math.sin(x))).toBeLessThan(1e-14)
  })

  it('brackets a step to the last digits', () => {
    const x = risingRoot((v) => (v <= 2.3 ? -1 : 1e12), 0.1, 1e3)
    expect(x).toBeLessThanOrEqual(2.3)
    expectClose(x, 2.3, { rel: 5 * Number.EPSILON })
  })

  it('finds the root where the function grows beyond all bounds', () => {
    expectClose(
      risingRoot((x) => 10 ** (x ** 3) - 10, 0.1, 1e4),
      1,
      { rel: 1e-15 },
    )
  })
})
