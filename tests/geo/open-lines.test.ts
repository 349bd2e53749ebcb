import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import type { LonLat } from '../../src/domain/position.ts'
import { axisOf } from '../../src/geo/chainage.ts'
import { chainageScale } from '../../src/geo/chainage-scale.ts'
import { checkLine } from '../../src/geo/line.ts'
import { boundingBox } from '../../src/geo/measure.ts'
import { geodesicLength } from '../support/geodesic.ts'

/** Open centre lines beside the repository; absent elsewhere. */
const FOLDER = new URL('../../../shared/data/', import.meta.url)

interface Feature {
  readonly id: string
  readonly geometry: { readonly type: string; readonly coordinates: readonly LonLat[] }
  readonly properties: {
    readonly mile_from: number
    readonly mile_to: number
    readonly chainage_from_m: number
    readonly chainage_to_m: number
  }
}

const files = existsSync(FOLDER) ? readdirSync(FOLDER).filter((name) => name.endsWith('.geojson')) : []
const features = files.flatMap((name) => {
  const collection = JSON.parse(readFileSync(new URL(name, FOLDER), 'utf8')) as { features: Feature[] }
  return collection.features
})

describe.skipIf(features.length === 0)('centre lines of an open publication', () => {
  test('there are 55 of them', () => {
    expect(features).toHaveLength(55)
  })

  test('all pass the checks of a sailing line without a remark', () => {
    for (const { id, geometry } of features) {
      expect(checkLine(geometry).findings, id).toEqual([])
    }
  })

  test('their measured length is that of the geodesics within 1e-6, and no piece is over 1 km', () => {
    for (const { id, geometry } of features) {
      const { coordinates } = geometry
      const geodesic = coordinates.slice(1).reduce((sum, b, i) => sum + geodesicLength(coordinates[i]!, b), 0)
      const { length, along } = axisOf(coordinates)
      expect(Math.abs(length / geodesic - 1), id).toBeLessThan(1e-6)
      along.slice(1).forEach((to, i) => {
        expect(to - along[i]!).toBeLessThanOrEqual(1000)
      })
    }
  })

  test('their length agrees with their own statute miles', () => {
    const ratios = features.map(({ geometry, properties }) => {
      const miles = Math.abs(properties.mile_to - properties.mile_from) * 1609.344
      return { miles, ratio: axisOf(geometry.coordinates).length / miles }
    })
    // one vertex a mile cuts corners, and the miles of the links are rounded to a tenth: 161 m
    for (const { miles, ratio } of ratios) {
      if (miles > 10_000) expect(Math.abs(ratio - 1)).toBeLessThan(0.02)
      expect(Math.abs(ratio - 1)).toBeLessThan(0.15)
    }
    const total = ratios.reduce((sum, { miles }) => sum + miles, 0)
    const measured = ratios.reduce((sum, { miles, ratio }) => sum + ratio * miles, 0)
    expect(measured / total).toBeGreaterThan(0.985)
    expect(measured / total).toBeLessThan(1.005)
  })

  test('their chainages map onto the line and back', () => {
    for (const { id, geometry, properties } of features) {
      const { length } = axisOf(geometry.coordinates)
      const { chainage_from_m: from, chainage_to_m: to } = properties
      const scale = chainageScale(length, from, to)
      expect(scale.chainageAt(length), id).toBeCloseTo(to, 6)
      expect(scale.distanceAt((from + to) / 2), id).toBeCloseTo(length / 2, 6)
      expect(scale.findings.every(({ code }) => code === 'chainage-differs-from-length')).toBe(true)
    }
  })

  test('their boxes lie on the Gulf coast', () => {
    for (const { geometry } of features) {
      const [west, south, east, north] = boundingBox(geometry.coordinates)
      expect(west).toBeGreaterThan(-98)
      expect(east).toBeLessThan(-90)
      expect(south).toBeGreaterThan(26)
      expect(north).toBeLessThan(31)
    }
  })
})
