import fc from 'fast-check'
import type { Setting } from '../../src/hydro/setting.ts'

/** g of the service, m/s², restated. */
export const G = 9.80665

/** Rows were computed with 9.81 m/s²: at speeds times this the Froude numbers, and so the heights, are the same. */
export const FROM_981 = Math.sqrt(9.80665 / 9.81)

/** A loaded motor vessel of 110 m in the German standard trapezoid; what a test does not say, this says. */
export function aSetting(own: Partial<Setting> = {}): Setting {
  return {
    depth: 4,
    meanDepth: 172 / 55,
    blockage: 31.92 / 172,
    effectiveWidth: 55,
    isConfined: true,
    criticalSpeed: 2.729,
    supercriticalOnset: 8.516,
    correctionShare: 0,
    hull: 'displacement',
    isInland: true,
    length: 110,
    beam: 11.4,
    draught: 2.8,
    blockCoefficient: 0.88,
    volume: 0.88 * 110 * 11.4 * 2.8,
    entranceLength: 22,
    envelopeCoefficient: 1,
    centralCoefficient: 0.25,
    ...own,
  }
}

/** All lengths times k, speeds times √k. */
export function scaledSetting(setting: Setting, k: number): Setting {
  return {
    ...setting,
    depth: setting.depth * k,
    meanDepth: setting.meanDepth * k,
    effectiveWidth: setting.effectiveWidth * k,
    criticalSpeed: setting.criticalSpeed * Math.sqrt(k),
    supercriticalOnset: setting.supercriticalOnset * Math.sqrt(k),
    length: setting.length * k,
    beam: setting.beam * k,
    draught: setting.draught * k,
    volume: setting.volume * k ** 3,
    entranceLength: setting.entranceLength * k,
  }
}

/** Numbers evenly between two bounds; the arbitrary for doubles would draw most of them within 1e-10 of zero. */
export function between(low: number, high: number): fc.Arbitrary<number> {
  return fc.integer({ min: 0, max: 2 ** 30 }).map((i) => low + ((high - low) * i) / 2 ** 30)
}

/** Numbers between two positive bounds, even in their logarithm. */
export function spread(low: number, high: number): fc.Arbitrary<number> {
  return between(0, 1).map((t) => low * (high / low) ** t)
}

/** A vessel of any size and hull in water of any depth, with both coefficients, in open water. */
export const anySetting: fc.Arbitrary<Setting> = fc
  .record({
    length: spread(4, 400),
    lengthToBeam: between(2.5, 10),
    beamToDraught: between(2, 12),
    depthToDraught: spread(1.1, 20),
    blockCoefficient: between(0.35, 0.98),
    entranceShare: between(0.05, 0.6),
    envelopeCoefficient: between(0.35, 1),
    centralCoefficient: between(0.25, 0.8),
    hull: fc.constantFrom<Setting['hull']>('displacement', 'semi-displacement', 'planing'),
  })
  .map(({ length, lengthToBeam, beamToDraught, depthToDraught, entranceShare, ...rest }) => {
    const beam = length / lengthToBeam
    const draught = beam / beamToDraught
    const depth = draught * depthToDraught
    const criticalSpeed = Math.sqrt(G * depth)
    return {
      ...rest,
      depth,
      meanDepth: depth,
      blockage: 0,
      effectiveWidth: Infinity,
      isConfined: false,
      criticalSpeed,
      supercriticalOnset: criticalSpeed,
      correctionShare: 0,
      isInland: true,
      length,
      beam,
      draught,
      volume: rest.blockCoefficient * length * beam * draught,
      entranceLength: entranceShare * length,
    }
  })

/** The double next above (direction 1) or below (direction -1) a positive one. */
export function neighbour(x: number, direction: -1 | 1): number {
  const view = new DataView(new ArrayBuffer(8))
  view.setFloat64(0, x)
  view.setBigInt64(0, view.getBigInt64(0) + BigInt(direction))
  return view.getFloat64(0)
}
