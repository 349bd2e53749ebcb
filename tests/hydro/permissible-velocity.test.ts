import { describe, expect, it } from 'vitest'
import { permissibleVelocity } from '../../src/hydro/permissible-velocity.ts'
import { expectClose } from '../support/expect-close.ts'

// Keown et al. (1977), reprinted in a river-engineering manual of the US FHWA in ft/s; m/s at 0.4, 1, 2 and 3 m.
const ROWS = {
  'fine-sand': [0.3, 0.4, 0.49, 0.55],
  'medium-sand': [0.37, 0.46, 0.55, 0.61],
  'coarse-sand': [0.46, 0.55, 0.64, 0.7],
  'very-coarse-sand': [0.55, 0.64, 0.73, 0.82],
  'very-fine-gravel': [0.67, 0.76, 0.85, 0.94],
  'fine-gravel': [0.79, 0.91, 1.01, 1.16],
  'medium-gravel': [1.01, 1.13, 1.25, 1.4],
  'coarse-gravel': [1.25, 1.43, 1.65, 1.86],
  'very-coarse-gravel': [1.58, 1.89, 2.19, 2.5],
  'small-cobbles': [2.29, 2.71, 3.11, 3.41],
  'sandy-loam': [0.94, 1.19, 1.4, 1.49],
  loess: [0.79, 1.01, 1.19, 1.31],
} as const

const MATERIALS = Object.keys(ROWS) as (keyof typeof ROWS)[]

describe('permissibleVelocity', () => {
  it('gives the 48 cells of the table', () => {
    expect(MATERIALS).toHaveLength(12)
    for (const material of MATERIALS) {
      for (const [column, depth] of [0.4, 1, 2, 3].entries()) {
        expectClose(permissibleVelocity(material, depth), ROWS[material][column]!, { rel: 1e-15 })
      }
    }
  })

  it('is linear between the columns', () => {
    expectClose(permissibleVelocity('fine-sand', 0.7), 0.35, { rel: 1e-14 })
    expectClose(permissibleVelocity('small-cobbles', 1.25), 2.81, { rel: 1e-14 })
    expectClose(permissibleVelocity('loess', 2.5), 1.25, { rel: 1e-14 })
  })

  it('holds the end values outside the table', () => {
    for (const material of MATERIALS) {
      expect(permissibleVelocity(material, 0.05)).toBe(permissibleVelocity(material, 0.4))
      expect(permissibleVelocity(material, 12)).toBe(permissibleVelocity(material, 3))
    }
  })

  it('never falls with depth', () => {
    for (const material of MATERIALS) {
      for (let d = 0; d < 4; d += 0.05) {
        expect(permissibleVelocity(material, d + 0.05)).toBeGreaterThanOrEqual(
          permissibleVelocity(material, d),
        )
      }
    }
  })
})
