import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { activeAt, type Bands, bandsOf, outsideAt, speedInterval } from '../../src/hydro/bands.ts'
import type { MethodDescription, RangeRule } from '../../src/hydro/method.ts'
import type { Setting } from '../../src/hydro/setting.ts'
import { SQUAT_METHODS } from '../../src/hydro/squat/all.ts'
import { WAVE_METHODS } from '../../src/hydro/waves/all.ts'
import { expectClose } from '../support/expect-close.ts'
import { anySetting, aSetting, between, G, neighbour } from '../support/setting.ts'

type Method = MethodDescription & {
  hasCoefficients?(setting: Setting): boolean
  stepSpeed?(setting: Setting): number
}

/** A method that exists for its range alone. */
function ranged(range: readonly RangeRule[], own: Partial<Method> = {}): Method {
  return {
    id: 'made-for-the-test',
    kind: 'squat',
    name: '',
    law: '',
    quantities: [],
    range,
    hulls: ['displacement', 'semi-displacement', 'planing'],
    nature: 'central',
    reference: '',
    isFromMemory: false,
    version: '1',
    ...own,
  }
}

/** V/V_L with a critical speed of 1 m/s is the speed itself. */
const UNIT = aSetting({ criticalSpeed: 1 })
const speedRule = (min?: number, max?: number): RangeRule => ({
  quantity: 'critical_ratio',
  ...(min !== undefined && { min }),
  ...(max !== undefined && { max }),
})

/** Any setting, open or confined. */
const anyWater = fc
  .tuple(anySetting, fc.boolean(), between(0.001, 0.6), fc.boolean())
  .map(([setting, isConfined, blockage, isInland]): Setting =>
    isConfined ? { ...setting, isConfined, blockage, isInland } : { ...setting, isInland },
  )

/** Speeds at and beside every edge of the bands, and some between. */
function tellingSpeeds(bands: Bands): number[] {
  const speeds = [1e-6, 0.5, 1, 2, 3, 5, 8, 13, 21, 60]
  for (const { from, to } of bands.list) {
    for (const edge of [from, to]) {
      if (edge > 0 && edge < Infinity) {
        for (let x = edge, i = 0; i < 3; i += 1, x = neighbour(x, 1)) speeds.push(x)
        for (let x = edge, i = 0; i < 3; i += 1, x = neighbour(x, -1)) speeds.push(x)
      }
    }
    if (to < Infinity) speeds.push((from + to) / 2)
  }
  return speeds
}

describe('bandsOf', () => {
  it('covers every speed above rest without a hole or an overlap', () => {
    fc.assert(
      fc.property(anyWater, fc.integer({ min: 0, max: 127 }), (setting, preferred) => {
        for (const methods of [WAVE_METHODS, SQUAT_METHODS]) {
          const { list } = bandsOf(methods, setting, preferred)
          expect(list[0]!.from).toBe(0)
          expect(list.at(-1)!.to).toBe(Infinity)
          for (const [i, band] of list.entries()) {
            expect(band.from).toBeLessThan(band.to)
            if (i > 0) expect(band.from).toBe(list[i - 1]!.to)
          }
        }
      }),
    )
  })

  it('includes both bounds, and leaves out the next doubles beyond them', () => {
    fc.assert(
      fc.property(between(0.1, 3), between(0.1, 5), (min, width) => {
        const max = min + width
        const bands = bandsOf([ranged([speedRule(min, max)])], UNIT, 0)
        expect(activeAt(bands, min)).toBe(1)
        expect(activeAt(bands, max)).toBe(1)
        expect(activeAt(bands, neighbour(min, -1))).toBe(0)
        expect(activeAt(bands, neighbour(max, 1))).toBe(0)
        expect(activeAt(bands, neighbour(min, 1))).toBe(1)
        expect(activeAt(bands, neighbour(max, -1))).toBe(1)
      }),
    )
    // at a power of two the doubles below are twice as dense
    for (const min of [0.5, 1, 2, 4]) {
      const bands = bandsOf([ranged([speedRule(min)])], UNIT, 0)
      expect(activeAt(bands, min)).toBe(1)
      expect(activeAt(bands, neighbour(min, -1))).toBe(0)
    }
  })

  it('joins the ranges of several methods, bit by bit', () => {
    const methods = [ranged([speedRule(undefined, 2)]), ranged([speedRule(1, 3)]), ranged([speedRule(2.5)])]
    const bands = bandsOf(methods, UNIT, 0)
    expect(bands.isOutOfRange).toBe(false)
    const active = [0.5, 1.5, 2, 2.2, 2.7, 3, 3.1, 99].map((V) => activeAt(bands, V))
    expect(active).toEqual([0b001, 0b011, 0b011, 0b010, 0b110, 0b110, 0b100, 0b100])
  })

  it('has a band of none where a gap is left', () => {
    const bands = bandsOf([ranged([speedRule(undefined, 1)]), ranged([speedRule(2)])], UNIT, 0)
    expect([0.5, 1.5, 2.5].map((V) => activeAt(bands, V))).toEqual([1, 0, 2])
  })

  it('counts only the methods asked for where one of them is in range, and the others elsewhere', () => {
    const methods = [ranged([speedRule(undefined, 2)]), ranged([speedRule(1, 3)]), ranged([])]
    const bands = bandsOf(methods, UNIT, 0b010)
    expect([0.5, 1.5, 2.5, 3.5].map((V) => activeAt(bands, V))).toEqual([0b101, 0b010, 0b010, 0b100])
    const two = bandsOf(methods, UNIT, 0b110)
    expect([0.5, 1.5, 3.5].map((V) => activeAt(two, V))).toEqual([0b100, 0b110, 0b100])
  })

  it('lets the methods out of range count when none is ever in range, those made for hull and channel before the rest', () => {
    const short: RangeRule = { quantity: 'length_m', max: 5 }
    const made = ranged([short])
    const otherHull = ranged([short], { hulls: ['planing'] })
    const open = ranged([short], { channels: ['open'] })
    const none = ranged([short], { hasCoefficients: () => false })
    const fitting = bandsOf([otherHull, made, none, open], UNIT, 0b1000)
    expect(fitting.list).toEqual([{ from: 0, to: Infinity, active: 0b0010 }])
    expect(fitting.isOutOfRange).toBe(true)
    const all = bandsOf([otherHull, none, open], UNIT, 0)
    expect(all.list).toEqual([{ from: 0, to: Infinity, active: 0b101 }])
    expect(all.isOutOfRange).toBe(true)
    expect(bandsOf([none], UNIT, 0).list[0]!.active).toBe(0)
    expect(activeAt(fitting, 1e-9)).toBe(0b0010)
    expect(activeAt(fitting, 1e9)).toBe(0b0010)
  })

  it('collects the speeds at which a law steps down', () => {
    const steps = (V: number): Partial<Method> => ({ stepSpeed: () => V })
    const bands = bandsOf(
      [ranged([], steps(2)), ranged([]), ranged([speedRule(undefined, 1)], steps(3))],
      UNIT,
      0,
    )
    expect(bands.steps).toEqual([2, 3])
    expect(bandsOf([ranged([])], UNIT, 0).steps ?? []).toEqual([])
    const out = bandsOf([ranged([{ quantity: 'length_m', max: 5 }], steps(4))], UNIT, 0)
    expect(out.steps).toEqual([4])
  })

  it('takes thirty-one methods', () => {
    const bands = bandsOf(
      Array.from({ length: 31 }, () => ranged([])),
      UNIT,
      0,
    )
    expect(activeAt(bands, 3)).toBe(2 ** 31 - 1)
  })

  it('has the bounds of the documentation for a planing boat of 1 m³ in 4 m', () => {
    const boat = aSetting({
      hull: 'planing',
      volume: 1,
      depth: 4,
      isConfined: false,
      centralCoefficient: NaN,
    })
    const bands = bandsOf(WAVE_METHODS, boat, 0)
    // F ≤ 0.8: 5.0105 m/s; F_vol from 2.0: 6.2631 m/s; d_e* from 0.4 (the whole depth is 4): 0.42 √(0.4 g) = 0.8318 m/s
    const edges = bands.list.map(({ to }) => to)
    expect(edges).toHaveLength(4)
    expectClose(edges[0]!, 0.42 * Math.sqrt(0.4 * G), { rel: 1e-14 })
    expectClose(edges[1]!, 0.8 * Math.sqrt(4 * G), { rel: 1e-14 })
    expectClose(edges[2]!, 2 * Math.sqrt(G), { rel: 1e-14 })
    // Rock Manual and Kriebel & Seelig, then Weggel & Sorensen too, then none, then Bhowmik and Maynord
    expect(bands.list.map(({ active }) => active)).toEqual([0b0001001, 0b0001101, 0, 0b1100000])
  })
})

describe('activeAt', () => {
  it('is 0 for no number', () => {
    expect(activeAt(bandsOf([ranged([])], UNIT, 0), NaN)).toBe(0)
  })
})

describe('speedInterval', () => {
  it('is undefined where hull, channel, trade, coefficients or a fixed quantity are against it', () => {
    for (const [range, own] of [
      [[], { hulls: ['planing'] }],
      [[], { channels: ['open'] }],
      [[], { hasCoefficients: (): boolean => false }],
      [[{ quantity: 'length_m', min: 110.0001 }], {}],
      [[{ quantity: 'length_m', max: 109.9999 }], {}],
      [[speedRule(2, 1)], {}],
    ] as const) {
      expect(speedInterval(ranged(range, own), UNIT)).toBeUndefined()
    }
    expect(speedInterval(ranged([], { isInlandOnly: true }), { ...UNIT, isInland: false })).toBeUndefined()
    expect(
      speedInterval(ranged([], { channels: ['confined'] }), { ...UNIT, isConfined: false }),
    ).toBeUndefined()
  })

  it('is every speed where nothing is against it, bounds on fixed quantities included', () => {
    for (const [range, own] of [
      [[], {}],
      [[], { channels: ['confined'] }],
      [[], { isInlandOnly: true }],
      [[], { hasCoefficients: (): boolean => true }],
      [[{ quantity: 'length_m', min: 110 }], {}],
      [[{ quantity: 'length_m', max: 110 }], {}],
    ] as const) {
      expect(speedInterval(ranged(range, own), UNIT)).toEqual({ from: 0, to: Infinity })
    }
  })

  it('binds a rule to the hulls that it names', () => {
    const range: RangeRule[] = [{ ...speedRule(undefined, 2), hulls: ['planing'] }]
    expect(speedInterval(ranged(range), UNIT)).toEqual({ from: 0, to: Infinity })
    expect(speedInterval(ranged(range), { ...UNIT, hull: 'planing' })).toEqual({ from: 0, to: 2 })
  })

  it('includes a bound on the effective relative depth that the whole depth just meets', () => {
    // 4 m over 1000^(1/3) = 10 m is 0.4, the least of Weggel & Sorensen; 8 m over 1 m is 8, the most
    const least = ranged([{ quantity: 'effective_relative_depth', min: 0.4 }])
    const most = ranged([{ quantity: 'effective_relative_depth', max: 8 }])
    const shallow = aSetting({ depth: 4, volume: 1000 })
    const deep = aSetting({ depth: 8, volume: 1 })
    expectClose(speedInterval(least, shallow)!.from, 0.42 * Math.sqrt(4 * G), { rel: 1e-14 })
    expect(outsideAt(least, shallow, 3)).toEqual([])
    expect(speedInterval(most, deep)).toEqual({ from: 0, to: Infinity })
    expect(outsideAt(most, deep, 9)).toEqual([])
    expect(speedInterval(least, aSetting({ depth: 3.99, volume: 1000 }))).toBeUndefined()
    expectClose(speedInterval(most, aSetting({ depth: 8.01, volume: 1 }))!.to, 0.42 * Math.sqrt(8 * G), {
      rel: 1e-14,
    })
  })
})

describe('outsideAt', () => {
  it('agrees with the bands at every edge, the doubles beside it and random speeds', () => {
    fc.assert(
      fc.property(anyWater, (setting) => {
        for (const methods of [WAVE_METHODS, SQUAT_METHODS] as readonly (readonly Method[])[]) {
          const bands = bandsOf(methods, setting, 0)
          for (const speed of tellingSpeeds(bands)) {
            const active = bands.isOutOfRange ? 0 : activeAt(bands, speed)
            for (const [i, method] of methods.entries()) {
              const isInRange = outsideAt(method, setting, speed).length === 0
              expect(isInRange, `${method.id} at ${speed}`).toBe((active & (1 << i)) !== 0)
            }
          }
        }
      }),
      { numRuns: 200 },
    )
  })

  it('names each quantity with its value and its bounds', () => {
    const method = ranged([
      { quantity: 'length_m', min: 130 },
      speedRule(undefined, 0.5),
      speedRule(0.1, 0.7),
    ])
    expect(outsideAt(method, UNIT, 0.6)).toEqual([
      { quantity: 'length_m', value: 110, min: 130 },
      { quantity: 'critical_ratio', value: 0.6, max: 0.5 },
    ])
    expect(outsideAt(method, { ...UNIT, length: 130 }, 0.05)).toEqual([
      { quantity: 'critical_ratio', value: 0.05, min: 0.1, max: 0.7 },
    ])
    expect(outsideAt(method, { ...UNIT, length: 130 }, 0.5)).toEqual([])
  })

  it('names hull, channel, trade and missing coefficients', () => {
    const method = ranged([], {
      hulls: ['planing'],
      channels: ['open'],
      isInlandOnly: true,
      hasCoefficients: () => false,
    })
    expect(outsideAt(method, { ...UNIT, isInland: false }, 1)).toEqual([
      { quantity: 'hull', value: 'displacement' },
      { quantity: 'confinement', value: 'confined' },
      { quantity: 'trade', value: 'sea-going' },
      { quantity: 'vessel_coefficient', value: 'none' },
    ])
  })
})
