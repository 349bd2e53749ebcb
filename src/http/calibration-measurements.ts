import { WAVE_METHOD_IDS } from '../advisory/catalogue.ts'
import { heightByMethod } from '../advisory/secondary-wave.ts'
import { situationOf, type Situation } from '../advisory/situation.ts'
import type { Measurement } from '../calibration/measurement.ts'
import type { Conditions } from '../domain/conditions.ts'
import { Fault, type FaultItem, impossible } from '../domain/fault.ts'
import type { Bank, Segment, Station } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'
import type { RowWire } from './calibration-row.schema.ts'
import type { PointWire } from './calibrations.schema.ts'
import { speedOf } from './fields.ts'
import { DEFAULT_OPTIONS } from './options.schema.ts'
import { refused } from './validation.ts'
import { type Classes, findAnyClass, nearestClasses, toVessel } from './vessel.schema.ts'

/** What every row of a calibration is measured against. */
export interface Water {
  readonly segment?: Segment | undefined
  readonly registry: Classes
  readonly methodIds: readonly string[]
}

interface Place {
  readonly segment: Segment
  readonly station: Station
  /** above the datum of the station, m */
  readonly waterLevel: number
}

/** Half the width of open water, m: far enough for its edge not to matter. */
const OPEN_HALF_WIDTH = 10_000

const bank = (side: Bank['side']): Bank => ({
  side,
  kind: 'unprotected',
  isKindGiven: false,
  stoneRelativeDensity: 1.65,
})

function ownPlace(confinement: Segment['confinement'], station: Omit<Station, 'index'>): Place {
  const first: Station = { index: 0, ...station }
  const segment: Segment = {
    stations: [first],
    banks: [bank('nearer'), bank('farther')],
    receptors: [],
    postedLimits: [],
    confinement,
  }
  return { segment, station: first, waterLevel: 0 }
}

/** Water that only the row describes: mid-channel, unless the gauge stands farther off than that allows. */
function describedPlace({ depth_m: depth, width_m: width, distance_m: distance }: RowWire): Place {
  if (width === undefined) {
    return ownPlace('open', {
      depth,
      width: 2 * OPEN_HALF_WIDTH,
      distances: [OPEN_HALF_WIDTH, OPEN_HALF_WIDTH],
      shape: { kind: 'trapezoid', slope: 0 },
    })
  }
  // a gauge beyond the water is told as such later
  const farther = distance < width ? Math.max(distance, width / 2) : width / 2
  return ownPlace('confined', {
    depth,
    width,
    distances: [width - farther, farther],
    shape: { kind: 'trapezoid' },
  })
}

/** The station whose depth is nearest, at the water level that gives the depth of the row. */
function placeOn(segment: Segment, { depth_m: depth, width_m: width }: RowWire): Place {
  const away = (station: Station): number => Math.abs(station.depth - depth)
  const station = segment.stations.reduce((found, next) => (away(next) < away(found) ? next : found))
  if (width === undefined) return { segment, station, waterLevel: depth - station.depth }
  const [a, b] = station.distances
  const share = width / (a + b)
  const measured: Station = {
    ...station,
    depth,
    width,
    distances: [a * share, b * share],
    shape: { kind: 'trapezoid' },
  }
  return { segment, station: measured, waterLevel: 0 }
}

/** Speed through the water, m/s. */
function throughWater(wire: RowWire): number {
  const speed = speedOf(wire, 'speed') ?? NaN
  const { current_mps: current = 0, direction, speed_reference: reference } = wire
  if (reference === 'through-water' || current === 0) return speed
  const through = direction === 'upstream' ? speed + current : speed - current
  if (through > 0) return through
  const item: FaultItem = {
    pointer: '#/current_mps',
    code: 'clash',
    detail: `The current alone is faster than the vessel over ground: nothing is left of its speed through the water`,
    facts: { speed_over_ground_mps: speed, current_mps: current },
  }
  throw impossible([item])
}

function vesselOf(wire: RowWire, registry: Classes): Vessel {
  const { vessel_class: id } = wire
  if (id !== undefined && !findAnyClass(id, registry)) {
    const allowed = nearestClasses(id, registry).slice(0, 20)
    const detail = `There is no vessel class ${id}; the nearest is ${allowed[0] ?? ''}`
    throw refused([{ pointer: '#/vessel_class', code: 'not-in-list', detail, allowed }])
  }
  return toVessel(
    {
      ...(id !== undefined && { class: id }),
      loading: wire.loading,
      length_m: wire.length_m,
      beam_m: wire.beam_m,
      draught_m: wire.draught_m,
      hull: wire.hull,
      block_coefficient: wire.block_coefficient,
      midship_coefficient: wire.midship_coefficient,
      entrance_length_m: wire.entrance_length_m,
      displacement_m3: wire.displacement_m3,
    },
    registry,
  )
}

/** Where a figure of the situation stands in a row. */
function pointerInRow(pointer: string): string {
  if (pointer.startsWith('#/vessel/')) return pointer.replace('#/vessel', '#')
  return pointer.startsWith('#/conditions') ? '#/depth_m' : '#/width_m'
}

function situated({ segment, station, waterLevel }: Place, vessel: Vessel): Situation {
  const conditions: Conditions = { waterLevel, current: 0, isWaterLevelGiven: true, isCurrentGiven: true }
  try {
    return situationOf({ ...segment, receptors: [] }, station, vessel, conditions, DEFAULT_OPTIONS)
  } catch (error) {
    if (!(error instanceof Fault) || !error.parts.errors) throw error
    throw impossible(
      error.parts.errors.map((item) => ({ ...item, pointer: pointerInRow(item.pointer ?? '') })),
    )
  }
}

/** The gauge stands in the water, and not under the hull. */
function refuseGauge({ distance_m: distance }: RowWire, { vessel, section, segment }: Situation): void {
  const half = vessel.beam / 2
  const clash = (detail: string, facts: FaultItem['facts'] & object): Fault =>
    impossible([{ pointer: '#/distance_m', code: 'clash', detail, facts }])
  if (distance <= half) {
    throw clash(`The gauge lies under the hull: ${distance} m off, half the beam is ${half} m`, {
      distance_m: distance,
      half_beam_m: half,
    })
  }
  if (segment.confinement === 'confined' && distance >= section.width) {
    throw clash(`The gauge stands beyond the water: ${distance} m off, width ${section.width} m`, {
      distance_m: distance,
      width_m: section.width,
    })
  }
}

/**
 * What a measured passage is by each method.
 *
 * @param index  of the row, from 0
 * @throws Fault with pointers into the row
 */
export function measurementOf(wire: RowWire, index: number, water: Water): Measurement {
  const vessel = vesselOf(wire, water.registry)
  const speed = throughWater(wire)
  const place = water.segment ? placeOn(water.segment, wire) : describedPlace(wire)
  const situation = situated(place, vessel)
  refuseGauge(wire, situation)
  const methods = water.methodIds.map((id) => WAVE_METHOD_IDS.indexOf(id))
  const computed = methods.map((method) => {
    const height = heightByMethod(situation, method, speed, wire.distance_m)
    return height > 0 && Number.isFinite(height) ? height : NaN
  })
  const isInRange = methods.map((method, i) => {
    const interval = situation.waveBands.intervals[method]
    return interval !== undefined && speed > interval.from && speed <= interval.to && (computed[i] ?? 0) > 0
  })
  return {
    index,
    label: wire.label,
    hull: vessel.hull,
    speed,
    distance: wire.distance_m,
    depth: situation.section.depth,
    depthFroudeNumber: speed / situation.shallowWaveSpeed,
    height: wire.max_wave_height_m,
    computed,
    isInRange,
  }
}

/** A measurement as it goes out. */
export function toPoint(measurement: Measurement, methodIds: readonly string[]): PointWire {
  const { index, label, hull, speed, distance, depth, depthFroudeNumber, height } = measurement
  const computed = methodIds.map((id, i) => [id, measurement.computed[i] ?? NaN] as const)
  return {
    index,
    ...(label !== undefined && { label }),
    hull,
    speed_mps: speed,
    distance_m: distance,
    depth_m: depth,
    depth_froude_number: depthFroudeNumber,
    max_wave_height_m: height,
    computed_height_m: Object.fromEntries(computed.filter(([, own]) => Number.isFinite(own))),
    in_range: methodIds.filter((_, i) => measurement.isInRange[i] === true),
  }
}
