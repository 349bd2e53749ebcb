import { describe, expect, it } from 'vitest'
import { gatesHerbich1977, gatesHerbichWaveHeight } from '../../../src/hydro/waves/gates-herbich-1977.ts'
import { expectClose } from '../../support/expect-close.ts'
import { aSetting, FROM_981, G } from '../../support/setting.ts'
import {
  decayExponent,
  itAnswersAtTheEnds,
  itDeclares,
  itRisesAndIsInverted,
  itScales,
} from '../../support/wave-method.ts'

// Formula of Gates & Herbich (1977) after Saunders (1957), from memory; rows computed independently, 5 decimals, with
// 9.81 m/s²: V, B, Le, y, y_0, N, H.
const ROWS = [
  [5, 20, 40, 50, 4.6223, 7.3628, 0.32639],
  [6, 30, 60, 100, 6.6561, 10.5178, 0.42125],
] as const

describe('gatesHerbichWaveHeight', () => {
  it('gives both rows', () => {
    expect(ROWS).toHaveLength(2)
    for (const [V, B, Le, y, , , H] of ROWS) {
      expectClose(gatesHerbichWaveHeight(V * FROM_981, B, Le, y), H, { abs: 6e-6 })
    }
  })

  it('agrees with the decay by the number of the cusp', () => {
    for (const [V, B, Le, y, first, N] of ROWS) {
      const bow = gatesHerbichWaveHeight(V * FROM_981, B, Le, 0.1)
      expectClose(gatesHerbichWaveHeight(V * FROM_981, B, Le, y) / bow, (1.5 / (2 * N + 1.5)) ** (1 / 3), {
        rel: 1e-5,
      })
      expectClose(gatesHerbichWaveHeight(V * FROM_981, B, Le, 8 * first) / bow, 0.5, { rel: 1e-5 })
    }
  })

  it('is the bow wave, 1.133 (B/Le) V²/2g, up to the first cusp and never above it', () => {
    const bow = (1.133 * 0.5 * 25) / (2 * G)
    for (const y of [0.1, 1, 4.6]) expectClose(gatesHerbichWaveHeight(5, 20, 40, y), bow, { rel: 1e-14 })
    // the first cusp lies at π/√3 V²/g = 1.81380 · 25/9.80665 = 4.6239 m
    expect(gatesHerbichWaveHeight(5, 20, 40, 4.625)).toBeLessThan(bow)
    expectClose(gatesHerbichWaveHeight(5, 20, 40, 4.625), bow, { rel: 1e-4 })
    expectClose(
      decayExponent((y) => gatesHerbichWaveHeight(5, 20, 40, y), 10, 80),
      -1 / 3,
      { abs: 1e-13 },
    )
  })
})

describe('gates-herbich-1977', () => {
  itDeclares(gatesHerbich1977, {
    id: 'gates-herbich-1977',
    range: [
      { quantity: 'depth_froude_number', max: 0.7 },
      { quantity: 'length_m', min: 130 },
      { quantity: 'draught_m', min: 7 },
    ],
    hulls: ['displacement'],
    distanceFrom: 'sailing-line',
    nature: 'central',
    symbols: ['y', 'B', 'Le'],
  })
  itRisesAndIsInverted(gatesHerbich1977, () => 0)
  itScales(gatesHerbich1977)
  itAnswersAtTheEnds(gatesHerbich1977, aSetting(), 40)

  it('is inverted on both sides of the first cusp', () => {
    const setting = aSetting({ beam: 20, entranceLength: 40 })
    // near: below 0.36 m/s... at 1.5 m/s the first cusp lies at 0.416 m; far: the row of 5 m/s
    for (const [V, y] of [
      [1.5, 0.3],
      [1.5, 0.416],
      [1.5, 0.42],
      [5 * FROM_981, 50],
    ] as const) {
      const height = gatesHerbich1977.height(setting, V, y)
      expectClose(gatesHerbich1977.firstSpeed(setting, height, y, 0, 20), V, { rel: 1e-14 })
    }
    expectClose(gatesHerbich1977.firstSpeed(setting, 0.32639, 50, 0, 20), 5 * FROM_981, { rel: 8e-6 })
  })

  it('can be computed for every vessel', () => {
    expect(
      gatesHerbich1977.hasCoefficients(aSetting({ envelopeCoefficient: NaN, centralCoefficient: NaN })),
    ).toBe(true)
  })
})
