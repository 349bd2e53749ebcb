import fc from 'fast-check'
import { expect, test } from 'vitest'
import { bestLimits, isTooShort } from '../../src/limits/limit-choice.ts'
import type { LengthRule, Place } from '../../src/limits/limit-levels.ts'

const free = (length: number, level: number): Place => ({ length, level, proposal: level, isKept: false })
const kept = (length: number, level: number): Place => ({
  length,
  level,
  proposal: Math.floor(level),
  isKept: true,
})
const rule = (minRunLength: number, smallest = 1): LengthRule => ({ minRunLength, smallest, step: 1 })

/** 2³ · 3² · 5 · 7 · 11: every level up to 12 divides it, so that times are whole numbers. */
const TIME = 27_720

/** How good limits are: stretches that break the rule, time, changes of limit, limits from upstream. */
function worthOf(places: readonly Place[], limits: readonly number[], minRunLength: number): number[] {
  let broken = 0
  let stretches = 0
  for (let from = 0; from < limits.length;) {
    let to = from + 1
    while (to < limits.length && limits[to] === limits[from]) to += 1
    const members = places.slice(from, to)
    const length = members.reduce((sum, place) => sum + place.length, 0)
    const isHigher =
      (from > 0 && limits[from - 1]! < limits[from]!) || (to < limits.length && limits[to]! < limits[from]!)
    if (isHigher && length < minRunLength && members.some(({ isKept }) => !isKept)) broken += 1
    stretches += 1
    from = to
  }
  const time = places.reduce(
    (sum, place, i) => sum + (place.isKept ? 0 : (place.length * TIME) / limits[i]!),
    0,
  )
  return [broken, time, stretches, ...limits.map((limit) => -limit)]
}

const isBetter = (a: readonly number[], b: readonly number[]): boolean => {
  const i = a.findIndex((value, at) => value !== b[at])
  return i >= 0 && a[i]! < b[i]!
}

/** Tries every whole limit from the smallest to the level of each place, not only those that the search takes. */
function byTrial(places: readonly Place[], { minRunLength, smallest }: LengthRule): number[] {
  let best: number[] = []
  let bestWorth: number[] | undefined
  const limits: number[] = []
  const go = (i: number): void => {
    const place = places[i]
    if (!place) {
      const worth = worthOf(places, limits, minRunLength)
      if (!bestWorth || isBetter(worth, bestWorth)) {
        best = [...limits]
        bestWorth = worth
      }
      return
    }
    for (let level = place.isKept ? place.level : smallest; level <= place.level; level += 1) {
      limits[i] = level
      go(i + 1)
    }
  }
  go(0)
  return best
}

/** Numbers that scatter, the same every time (Park and Miller 1988: x ← 16807 x mod 2³¹ − 1). */
function scatter(seed: number): (below: number) => number {
  let x = seed
  return (below) => {
    x = (x * 16_807) % 2_147_483_647
    return x % below
  }
}

function randomCase(next: (below: number) => number, hasKept: boolean) {
  const smallest = 1 + next(3)
  const highest = smallest + 1 + next(4)
  // few different lengths, so that many plans take the same time
  const lengths = next(2) === 0 ? [100] : [50, 100, 150, 230]
  const places = Array.from({ length: 1 + next(7) }, () => {
    const length = lengths[next(lengths.length)]!
    if (hasKept && next(4) === 0) {
      // now and then below the smallest, or between two steps
      const level = 1 + next(highest) + (next(3) === 0 ? 0.5 : 0)
      return kept(length, level)
    }
    return free(length, smallest + next(highest - smallest + 1))
  })
  return { places, rule: rule(next(6) * 60, smallest) }
}

test.each([
  ['without kept limits', false, 16],
  ['with kept limits', true, 61],
])('bestLimits finds what trying every assignment finds, %s', (_, hasKept, seed) => {
  const next = scatter(seed)
  let changed = 0
  let broken = 0
  for (let i = 0; i < 400; i += 1) {
    const { places, rule } = randomCase(next, hasKept)
    const expected = byTrial(places, rule)
    expect(bestLimits(places, rule), JSON.stringify({ places, rule })).toEqual(expected)
    if (places.some(({ isKept, level }, j) => !isKept && expected[j]! < level)) changed += 1
    if (worthOf(places, expected, rule.minRunLength)[0]! > 0) broken += 1
  }
  // the rule has to bite for the comparison to say anything
  expect(changed).toBeGreaterThan(100)
  expect(broken > 0).toBe(hasKept)
})

test('a peak that is too short is lowered to its higher neighbour, and the valley beside it stays short', () => {
  // 100 m at 12 among 9 and 6 with 250 m: at 9 it joins the 300 m before it; 50 m at 6 is lower than both and may stay
  const places = [free(300, 9), free(100, 12), free(50, 6), free(400, 10)]
  expect(bestLimits(places, rule(250))).toEqual([9, 9, 6, 10])
})

test('two short peaks join where that takes less time than lowering each to what surrounds them', () => {
  // 8 | 10 | 8 around: 100 m at 10 and 100 m at 12 make 200 m at 10, which is long enough; at 8 they would take longer
  const places = [free(500, 8), free(100, 10), free(100, 12), free(500, 8)]
  expect(bestLimits(places, rule(200))).toEqual([8, 10, 10, 8])
})

test('a longer lower plateau is taken where the higher one alone would be too short', () => {
  // 150 m at 10 alone is too short for 300 m; with the 9 beside it 9 | 9 makes 300 m: 150/9 + 150/9 = 33.3,
  // as against both at the 6 around them: 300/6 = 50
  const places = [free(500, 6), free(150, 10), free(150, 9), free(500, 6)]
  expect(bestLimits(places, rule(300))).toEqual([6, 9, 9, 6])
})

test('of plans that take the same time the one with fewer stretches is taken', () => {
  // 100 m may not be at 9 beside 6, being under 150 m. Either it goes down to 6, or 200 m of 12 come down to it:
  // 200/12 + 100/6 = 33⅓ = 300/9. The first makes 9 | 12 | 6, the second 9 | 6
  // at any scale: a tie that rounding breaks would show at some
  for (let k = 1; k <= 60; k += 1) {
    const places = [free(500, 9), free(200 * k, 12), free(100 * k, 9), free(500, 6)]
    expect(bestLimits(places, rule(150 * k))).toEqual([9, 9, 9, 6])
  }
})

test('of plans alike in time and number the one with the higher limits upstream is taken', () => {
  // as before without the 9 upstream: 12 | 6 and 9 | 6 are two stretches each
  const places = [free(200, 12), free(100, 9), free(500, 6)]
  expect(bestLimits(places, rule(150))).toEqual([12, 6, 6])
  // seen the other way: 6 | 9 is higher than 6 | 12 where they first differ
  expect(bestLimits(places.toReversed(), rule(150))).toEqual([6, 9, 9])
})

test('a kept peak stays however short, and what is proposed beside it still has to be long enough', () => {
  // the kept 12 is exempt; 100 m at 12 beside it would make a stretch of 150 m with a proposal in it
  expect(bestLimits([free(300, 8), kept(50, 12), free(100, 12), free(300, 8)], rule(200))).toEqual([
    8, 12, 8, 8,
  ])
  // with 150 m the two make 200 m together
  expect(bestLimits([free(300, 8), kept(50, 12), free(150, 12), free(300, 8)], rule(200))).toEqual([
    8, 12, 12, 8,
  ])
})

test('a short place between kept limits off the step is a valley at the step below them', () => {
  // at 9 it is lower than both; at 10 it would be higher, over 50 m of the 200 m asked for
  expect(bestLimits([kept(300, 9.26), free(50, 12), kept(300, 9.26)], rule(200))).toEqual([9.26, 9, 9.26])
})

test('where a kept limit is lower than the smallest the rule gives way, as seldom as can be', () => {
  const places = [kept(300, 4), free(100, 8), free(300, 12), kept(300, 4)]
  // 8 for 100 m would be higher than the 4: both at 8 make 400 m, which holds
  expect(bestLimits(places, rule(300, 6))).toEqual([4, 8, 8, 4])
  expect(isTooShort(places, [4, 8, 8, 4], 300)).toEqual([false, false, false, false])
  // alone, 100 m above 4 cannot hold: it takes its ceiling
  const alone = [kept(300, 4), free(100, 8), kept(300, 4)]
  expect(bestLimits(alone, rule(300, 6))).toEqual([4, 8, 4])
  expect(isTooShort(alone, [4, 8, 4], 300)).toEqual([false, true, false])
})

test('a run shorter than the run length is one stretch', () => {
  expect(bestLimits([free(100, 9), free(100, 7)], rule(1000))).toEqual([7, 7])
  expect(bestLimits([free(10, 7)], rule(1000))).toEqual([7])
})

test('a stretch of exactly the run length is long enough, whatever its lengths add up to in binary', () => {
  // 0.1 + 0.2 is above 0.3 in doubles and 0.7 + 0.1 below 0.8
  expect(bestLimits([free(9, 5), free(0.7, 8), free(0.1, 8), free(9, 5)], rule(0.8))).toEqual([5, 8, 8, 5])
})

test('kept limits alone stay as they are', () => {
  expect(bestLimits([kept(10, 9.26), kept(10, 5), kept(10, 9.26)], rule(100))).toEqual([9.26, 5, 9.26])
})

/** A way without search: peaks that are too short come down to the higher of their neighbours until none is left. */
function byLowering(places: readonly Place[], { minRunLength }: LengthRule): number[] {
  const limits = places.map(({ level }) => level)
  for (;;) {
    const peak = isTooShort(places, limits, minRunLength).indexOf(true)
    if (peak < 0) return limits
    let end = peak
    while (limits[end + 1] === limits[peak]) end += 1
    const lower = [limits[peak - 1], limits[end + 1]].filter((limit) => (limit ?? Infinity) < limits[peak]!)
    limits.fill(Math.max(...lower.map((limit) => limit ?? 0)), peak, end + 1)
  }
}

const anyPlace = fc
  .record({ length: fc.integer({ min: 1, max: 40 }), level: fc.integer({ min: 4, max: 12 }) })
  .map(({ length, level }) => free(length * 10, level))

test('along long runs no limit is above its place, no proposed rise is short, and lowering peaks is never better', () => {
  let better = 0
  fc.assert(
    fc.property(
      fc.array(anyPlace, { minLength: 1, maxLength: 80 }),
      fc.integer({ min: 0, max: 150 }),
      (places, tens) => {
        const limits = bestLimits(places, rule(tens * 10))
        expect(limits).toHaveLength(places.length)
        expect(limits.every((limit, i) => limit <= places[i]!.level)).toBe(true)
        expect(worthOf(places, limits, tens * 10)[0]).toBe(0)
        const lowered = byLowering(places, rule(tens * 10))
        const [, time] = worthOf(places, limits, tens * 10)
        const [, timeOfLowered] = worthOf(places, lowered, tens * 10)
        expect(time).toBeLessThanOrEqual(timeOfLowered!)
        if (time! < timeOfLowered!) better += 1
      },
    ),
    { numRuns: 300, seed: 8 },
  )
  // were it never better, lowering would do
  expect(better).toBeGreaterThan(30)
})

test('places at one level split in two give the same limits', () => {
  fc.assert(
    fc.property(fc.array(anyPlace, { minLength: 1, maxLength: 40 }), (places) => {
      const halves = places.flatMap((place) => [
        { ...place, length: place.length / 2 },
        { ...place, length: place.length / 2 },
      ])
      const whole = bestLimits(places, rule(400))
      expect(worthOf(halves, bestLimits(halves, rule(400)), 400)[1]).toBeLessThanOrEqual(
        worthOf(places, whole, 400)[1]!,
      )
    }),
    { numRuns: 100, seed: 3 },
  )
})

test('20,000 places with 40 levels and a run length of the whole run or none are worked out', () => {
  const next = scatter(5)
  const places = Array.from({ length: 20_000 }, () => free(20 + next(400), 1 + next(40)))
  expect(bestLimits(places, rule(0))).toEqual(places.map(({ level }) => level))
  expect(new Set(bestLimits(places, rule(1e8)))).toEqual(new Set([1]))
})
