import { describe, it } from 'vitest'
import { waveEnergy } from '../../src/hydro/energy.ts'
import { expectClose } from '../support/expect-close.ts'

/** The values were computed with 9.81 m/s²; energy goes with g². */
const RATIO = (9.80665 / 9.81) ** 2

describe('waveEnergy', () => {
  it('is 1962.42 H² T² J/m in sea water and 1914.56 H² T² in fresh water', () => {
    // computed independently in Python
    expectClose(waveEnergy(1, 1, 1025), 1962.42 * RATIO, { rel: 4e-6 })
    expectClose(waveEnergy(1, 1, 1000), 1914.56 * RATIO, { rel: 4e-6 })
  })

  it('is 2462 J/m at 0.28 m and 4 s, which is Stumbo’s pair 0.28 m and 2450 J/m (1999, from memory)', () => {
    expectClose(waveEnergy(0.28, 4, 1025), 2462 * RATIO, { abs: 0.6 })
    expectClose(waveEnergy(0.28, 4, 1025), 2450, { rel: 0.01 })
  })

  it('gives the rows in sea water to the printed joule', () => {
    // computed independently in Python
    expectClose(waveEnergy(0.2, 2, 1025), 314 * RATIO, { abs: 0.5 })
    expectClose(waveEnergy(0.15, 2.5, 1025), 276 * RATIO, { abs: 0.5 })
    expectClose(waveEnergy(0.1, 1.5, 1025), 44 * RATIO, { abs: 0.5 })
  })

  it('is the energy per square metre times the deep-water length (Sorensen 2006, eq. 2.36)', () => {
    // computed independently in Python, fresh water: H, T, E L
    expectClose(waveEnergy(0.1, 1.5, 1000), 43.08 * RATIO, { abs: 6e-3 })
    expectClose(waveEnergy(0.2, 2, 1000), 306.33 * RATIO, { abs: 6e-3 })
    expectClose(waveEnergy(0.3, 2.5, 1000), 1076.94 * RATIO, { abs: 6e-3 })
  })

  it('grows by k³ when height grows by k and period by √k (Froude)', () => {
    expectClose(waveEnergy(0.4, 4, 1000), 64 * waveEnergy(0.1, 2, 1000), { rel: 1e-14 })
  })
})
