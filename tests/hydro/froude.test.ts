import { describe, it } from 'vitest'
import { depthFroudeNumber, lengthFroudeNumber, shallowWaterWaveSpeed } from '../../src/hydro/froude.ts'
import { expectClose } from '../support/expect-close.ts'
import { FROM_981 } from '../support/setting.ts'

describe('depthFroudeNumber', () => {
  it('is 1 at the speed of the longest wave: 6.263114 m/s in 4 m', () => {
    expectClose(depthFroudeNumber(6.263114, 4), 1, { rel: 1e-7 }) // √(9.80665·4), 6 decimals
  })

  it('gives the depth Froude numbers of the check cases', () => {
    // computed independently with 9.81 m/s², 4 decimals: V, h, F
    for (const [V, h, F] of [
      [3, 4, 0.4789],
      [4, 5, 0.5711],
      [5, 6, 0.6517],
      [3.5, 3.5, 0.5973],
      [3, 3.5, 0.512],
    ] as const) {
      expectClose(depthFroudeNumber(V * FROM_981, h), F, { abs: 5.1e-5 })
    }
  })

  it('reproduces CEM Example II-7-6: 6 kn in 15 m is 0.26', () => {
    // printed with two digits
    expectClose(depthFroudeNumber((6 * 1852) / 3600, 15), 0.26, { abs: 0.006 })
  })

  it('does not move when lengths grow by k and speeds by √k', () => {
    expectClose(depthFroudeNumber(9, 36), depthFroudeNumber(3, 4), { rel: 1e-15 })
    expectClose(lengthFroudeNumber(9, 180), lengthFroudeNumber(3, 20), { rel: 1e-15 })
  })
})

describe('lengthFroudeNumber', () => {
  it('gives the length Froude numbers of the check cases', () => {
    // computed independently with 9.81 m/s², 4 decimals: V, L, F_L
    for (const [V, L, F] of [
      [5, 100, 0.1596],
      [4, 20, 0.2856],
      [6, 60, 0.2473],
      [3.5, 85, 0.1212],
    ] as const) {
      expectClose(lengthFroudeNumber(V * FROM_981, L), F, { abs: 5.1e-5 })
    }
  })
})

describe('shallowWaterWaveSpeed', () => {
  it('is 13 % higher on the depth than on the mean depth of a trapezoid of 55 x 4 m, 1:3', () => {
    // computed independently with 9.81 m/s²: 6.26 and 5.54 m/s
    expectClose(shallowWaterWaveSpeed(4), 6.26, { abs: 0.006 })
    expectClose(shallowWaterWaveSpeed(172 / 55), 5.54, { abs: 0.006 })
    expectClose(shallowWaterWaveSpeed(4) / shallowWaterWaveSpeed(172 / 55), 1.13, { abs: 0.005 })
  })

  it('is √(9.80665 h) to six decimals', () => {
    expectClose(shallowWaterWaveSpeed(4), 6.263114, { abs: 5.1e-7 })
    expectClose(shallowWaterWaveSpeed(1), 3.131557, { abs: 5.1e-7 })
  })
})
