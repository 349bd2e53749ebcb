import { describe, expect, it } from 'vitest'
import { romisch1989, romischCriticalSpeed } from '../../../src/hydro/squat/romisch-1989.ts'
import { expectClose } from '../../support/expect-close.ts'
import {
  KNOT,
  S1_CANAL,
  S1_OPEN,
  S2,
  S3,
  TO_OUR_GRAVITY,
  itIsASquatMethod,
  unconfined,
} from '../../support/squat.ts'

const knot = KNOT * TO_OUR_GRAVITY

describe('romisch-1989', () => {
  itIsASquatMethod(romisch1989, {
    id: 'romisch-1989',
    range: [
      { quantity: 'depth_to_draught_ratio', min: 1.19, max: 2.25 },
      { quantity: 'romisch_speed_ratio', max: 1 },
    ],
    scaleExponent: 1,
  })

  it('gives the greater of bow and stern (formula from memory, values computed independently in Python)', () => {
    expectClose(romisch1989.squat(S1_OPEN, 6 * knot), 0.1759, { abs: 6e-5 })
    expectClose(romisch1989.squat(S1_OPEN, 8 * knot), 0.3097, { abs: 6e-5 })
    expectClose(romisch1989.squat(S1_OPEN, 10 * knot), 0.4841, { abs: 6e-5 })
    expectClose(romisch1989.squat(S1_CANAL, 8 * knot), 0.7052, { abs: 6e-5 })
    // fine and slender hulls: the stern, 0.5067 against 0.2721 and 0.1987 against 0.1653 at the bow
    expectClose(romisch1989.squat(S2, 8 * knot), 0.5067, { abs: 6e-5 })
    expectClose(romisch1989.squat(S3, (8 / 3.6) * TO_OUR_GRAVITY), 0.1987, { abs: 6e-5 })
  })

  it('has the critical speeds 8.9904 m/s open and 6.0124 m/s in the canal', () => {
    // computed independently in Python with 9.81 m/s²
    expectClose(romischCriticalSpeed(S1_OPEN) / TO_OUR_GRAVITY, 8.9904, { abs: 6e-5 })
    expectClose(romischCriticalSpeed(S1_CANAL) / TO_OUR_GRAVITY, 6.0124, { abs: 6e-5 })
  })

  it('takes the mean depth in a canal and the depth in open water', () => {
    const shallow = { ...S3, meanDepth: 1 }
    expectClose(romischCriticalSpeed(shallow), romischCriticalSpeed(S3) / Math.sqrt(172 / 55), { rel: 1e-14 })
    expect(romischCriticalSpeed(unconfined(shallow))).toBe(romischCriticalSpeed(unconfined(S3)))
  })

  it('scales in a canal by the limit Froude numbers of Schijf', () => {
    // closed form of Schijf's limit, computed independently in Python: m, F_L
    const rows = [
      [0.01, 0.87841],
      [0.1, 0.62281],
      [0.2, 0.47455],
      [0.5, 0.20467],
    ] as const
    for (const [blockage, F] of rows) {
      const V = romischCriticalSpeed({ ...S1_CANAL, blockage })
      expectClose(V / Math.sqrt(9.80665 * 14.4), F, { abs: 6e-6 })
    }
  })

  it('has the intermediate C_V of 0.10478 open and 0.23862 in the canal at 8 kn', () => {
    // bow squat over C_F K_dT T = 1.45052 · 0.16979 · 12 m, all computed independently in Python
    expectClose(romisch1989.squat(S1_OPEN, 8 * knot) / (1.45052 * 0.16979 * 12), 0.10478, { abs: 1.1e-5 })
    expectClose(romisch1989.squat(S1_CANAL, 8 * knot) / (1.45052 * 0.16979 * 12), 0.23862, { abs: 1.1e-5 })
  })

  it('is C_F K_dT T at the critical speed, where C_V is 1', () => {
    expectClose(romisch1989.squat(S1_OPEN, romischCriticalSpeed(S1_OPEN)), 1.45052 * 0.16979 * 12, {
      rel: 4e-5,
    })
  })

  it('is inverted from creeping to twice the critical speed', () => {
    for (const setting of [S1_OPEN, S3]) {
      const critical = romischCriticalSpeed(setting)
      for (let r = 0.001; r < 2; r += 0.0137) {
        const squat = romisch1989.squat(setting, r * critical)
        expectClose(romisch1989.firstSpeed(setting, squat, 0, 1000), r * critical, { rel: 2e-15 })
      }
      const atCritical = romisch1989.squat(setting, critical)
      expectClose(romisch1989.firstSpeed(setting, atCritical, 0, 1000), critical, { rel: 2e-15 })
    }
  })

  it('finds a speed that is just within the end, and none just beyond it', () => {
    for (const setting of [S1_OPEN, S3]) {
      const critical = romischCriticalSpeed(setting)
      for (let r = 0.01; r < 2; r += 0.0337) {
        const squat = romisch1989.squat(setting, r * critical)
        const found = romisch1989.firstSpeed(setting, squat, 0, 1000)
        expect(romisch1989.firstSpeed(setting, squat, 0, found * (1 + 1e-12))).toBe(found)
        expect(romisch1989.firstSpeed(setting, squat, 0, found * (1 - 1e-6))).toBe(Infinity)
        expect(romisch1989.firstSpeed(setting, squat, 0, found)).toBe(Infinity)
      }
    }
  })
})
