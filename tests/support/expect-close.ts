import { expect } from 'vitest'

/** Asserts a number within an absolute or a relative tolerance, and says by how much it misses. */
export function expectClose(
  actual: number,
  expected: number,
  tolerance: { abs: number } | { rel: number },
): void {
  const allowed = 'abs' in tolerance ? tolerance.abs : tolerance.rel * Math.abs(expected)
  const miss = Math.abs(actual - expected)
  expect(miss <= allowed, `${actual} is ${miss} from ${expected}; allowed ${allowed}`).toBe(true)
}
