import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { QUANTITIES, type QuantityName } from '../../src/hydro/quantity.ts'
import type { Setting } from '../../src/hydro/setting.ts'
import { expectClose } from '../support/expect-close.ts'
import { anySetting, aSetting, between, G } from '../support/setting.ts'

const SETTING = aSetting({
  depth: 6,
  meanDepth: 5,
  blockage: 0.1,
  criticalSpeed: 4,
  volume: 343,
  length: 60,
  beam: 8,
  draught: 2.5,
  blockCoefficient: 0.7,
})

// By the definitions, by hand: quantity, value at 3 m/s.
const VALUES: readonly (readonly [QuantityName, number])[] = [
  ['depth_froude_number', 3 / Math.sqrt(G * 6)],
  ['volume_froude_number', 3 / Math.sqrt(G * 7)], // 343^(1/3) = 7
  ['effective_relative_depth', 9 / (0.42 * 0.42 * G) / 7], // 5.2 m of the 6
  ['critical_ratio', 0.75],
  ['romisch_speed_ratio', 3 / (0.62281 * Math.sqrt(G * 5))], // F_L at m = 0.1, computed independently, 5 decimals
  ['length_m', 60],
  ['draught_m', 2.5],
  ['block_coefficient', 0.7],
  ['depth_to_draught_ratio', 2.4],
  ['beam_to_draught_ratio', 3.2],
  ['length_to_beam_ratio', 7.5],
  ['blockage_ratio', 0.1],
]

describe('QUANTITIES', () => {
  it('are twelve, each with the value of its definition', () => {
    expect(Object.keys(QUANTITIES).sort()).toEqual(VALUES.map(([name]) => name).sort())
    for (const [name, value] of VALUES) expectClose(QUANTITIES[name].at(SETTING, 3), value, { rel: 1e-5 })
  })

  it('give the speed at which they reach a value, where speed plays a part', () => {
    const moving = VALUES.map(([name]) => name).filter((name) => 'speedAt' in QUANTITIES[name])
    expect(moving).toEqual([
      'depth_froude_number',
      'volume_froude_number',
      'effective_relative_depth',
      'critical_ratio',
      'romisch_speed_ratio',
    ])
    fc.assert(
      fc.property(anySetting, between(0.05, 3), (open: Setting, value) => {
        for (const setting of [open, { ...open, isConfined: true, blockage: 0.2 }]) {
          for (const name of moving) {
            const speed = QUANTITIES[name].speedAt!(setting, value)
            if (speed === Infinity) continue
            expectClose(QUANTITIES[name].at(setting, speed), value, { rel: 1e-14 })
            expect(QUANTITIES[name].at(setting, speed * 0.999)).toBeLessThan(value)
          }
        }
      }),
    )
  })

  it('cap the effective depth by the depth itself, from a depth Froude number of 0.42 on', () => {
    const at = (V: number): number => QUANTITIES.effective_relative_depth.at(SETTING, V)
    // 0.42 √(9.80665·6) = 3.2217 m/s
    for (const V of [3.2218, 4, 9, Infinity]) expectClose(at(V), 6 / 7, { rel: 1e-15 })
    expect(at(3.2216)).toBeLessThan(6 / 7)
    expectClose(at(3.2216), 6 / 7, { rel: 1e-4 })
  })

  it('reach a relative depth at the cap when it is that of the whole depth, and never a greater one', () => {
    const speedAt = (setting: Setting, value: number): number =>
      QUANTITIES.effective_relative_depth.speedAt!(setting, value)
    const setting = { ...SETTING, depth: 4, volume: 1000 } // 4 m over 10 m: 0.4
    expectClose(speedAt(setting, 0.4), 0.42 * Math.sqrt(G * 4), { rel: 1e-14 })
    expectClose(speedAt(setting, 0.2), 0.42 * Math.sqrt(G * 2), { rel: 1e-14 })
    expect(speedAt(setting, 0.4001)).toBe(Infinity)
  })
})
