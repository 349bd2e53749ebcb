import type { Conditions, Options } from '../domain/conditions.ts'
import { impossible } from '../domain/fault.ts'
import type { Segment, Station } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'
import { atDraught } from '../domain/vessel-of.ts'
import { bandsOf, type Bands } from '../hydro/bands.ts'
import { shallowWaterWaveSpeed } from '../hydro/froude.ts'
import { correctionShare } from '../hydro/flow-ratio.ts'
import { eccentricityFactors, type SideFactors } from '../hydro/primary-wave.ts'
import { lowerLimitFroude, upperLimitFroude } from '../hydro/schijf.ts'
import type { Setting } from '../hydro/setting.ts'
import { SQUAT_METHODS } from '../hydro/squat/all.ts'
import { WAVE_METHODS } from '../hydro/waves/all.ts'
import { impossibleItems } from './possible.ts'
import { sectionOf, type StationSection } from './section-of.ts'
import { waveFactorsOf, type WaveFactors } from './wave-factors.ts'

/** Half the strip beside the hull that takes part in the return flow, in beams: half of the 12 B it is documented to. */
const STRIP_BEAMS = 6

/** A vessel at a station in the conditions of the moment: everything that does not depend on speed. */
export interface Situation {
  readonly segment: Segment
  readonly station: Station
  /** with the draught that was used */
  readonly vessel: Vessel
  /** draught before the permitted draught of the segment capped it, m */
  readonly uncappedDraught: number
  readonly conditions: Conditions
  readonly options: Options
  readonly section: StationSection
  /** index of the nearer bank */
  readonly nearer: 0 | 1
  /** whether the strip of 6 beams is less than the water on a side */
  readonly isStripShort: boolean
  /** growth of drawdown and return current by bank */
  readonly sideFactors: readonly [SideFactors, SideFactors]
  readonly setting: Setting
  /** √(g h), m/s */
  readonly shallowWaveSpeed: number
  /** critical speed when meeting a vessel like this one, m/s; NaN where two do not fit */
  readonly meetingCriticalSpeed: number
  readonly waveBands: Bands
  readonly squatBands: Bands
  readonly waveFactors: WaveFactors
}

const midshipSection = (vessel: Vessel): number => vessel.midshipCoefficient * vessel.beam * vessel.draught

/** V_L: Schijf's limit on the mean depth, never above √(g h). */
function criticalSpeedOf(blockage: number, meanDepth: number, depth: number): number {
  const shallow = shallowWaterWaveSpeed(depth)
  return Math.min(lowerLimitFroude(blockage) * shallowWaterWaveSpeed(meanDepth), shallow)
}

/** Effective strip for one-dimensional flow: at most six beams to each side. */
interface Strip {
  readonly width: number
  readonly area: number
  /** y_e, half the difference of the two sides, m */
  readonly offset: number
  readonly isShort: boolean
}

function stripOf(section: StationSection, meanDepth: number, beam: number): Strip {
  const reach = STRIP_BEAMS * beam
  const [a, b] = section.distances
  const width = Math.min(a, reach) + Math.min(b, reach)
  return {
    width,
    area: meanDepth * width,
    offset: Math.abs(Math.min(a, reach) - Math.min(b, reach)) / 2,
    isShort: Math.max(a, b) > reach,
  }
}

function settingOf(
  vessel: Vessel,
  section: StationSection,
  strip: Strip,
  blockage: number,
  isConfined: boolean,
): Setting {
  const meanDepth = section.area / section.width
  const { depth } = section
  const criticalSpeed = isConfined
    ? criticalSpeedOf(blockage, meanDepth, depth)
    : shallowWaterWaveSpeed(depth)
  const hasCorrection = isConfined && vessel.trade === 'inland-cargo'
  return {
    depth,
    meanDepth,
    blockage,
    effectiveWidth: isConfined ? strip.width : Infinity,
    isConfined,
    criticalSpeed,
    supercriticalOnset: isConfined
      ? upperLimitFroude(blockage) * shallowWaterWaveSpeed(meanDepth)
      : criticalSpeed,
    correctionShare: hasCorrection ? correctionShare(section.width / vessel.beam, blockage) : 0,
    hull: vessel.hull,
    isInland: vessel.trade !== 'sea-going',
    length: vessel.length,
    beam: vessel.beam,
    draught: vessel.draught,
    blockCoefficient: vessel.blockCoefficient,
    volume: vessel.volume,
    entranceLength: vessel.entranceLength,
    envelopeCoefficient: vessel.envelopeCoefficient ?? NaN,
    centralCoefficient: vessel.centralCoefficient ?? NaN,
  }
}

/** Bits of the wave methods asked for; none when every method that applies counts. */
function preferredBits(options: Options): number {
  let bits = 0
  if (!options.waveMethods) return bits
  WAVE_METHODS.forEach((method, i) => {
    if (options.waveMethods?.includes(method.id)) bits |= 1 << i
  })
  return bits
}

const NO_GROWTH: SideFactors = { drawdown: 1, returnCurrent: 1 }

/**
 * Places a vessel at a station in the conditions of the moment.
 *
 * @param segment     the water
 * @param station     one of its stations
 * @param vessel      as described or as its class has it
 * @param conditions  level, current, traffic
 * @param options     how the advisory is made
 * @throws Fault `impossible-input` when the figures cannot hold together, with all that clash
 */
export function situationOf(
  segment: Segment,
  station: Station,
  vessel: Vessel,
  conditions: Conditions,
  options: Options,
): Situation {
  const isCapped = vessel.basis.draught !== 'given' && (segment.maxDraught ?? Infinity) < vessel.draught
  const used = isCapped && segment.maxDraught !== undefined ? atDraught(vessel, segment.maxDraught) : vessel
  const section = sectionOf(segment, station, conditions.waterLevel)
  const isConfined = segment.confinement === 'confined'
  const meanDepth = section.area / section.width
  const strip = stripOf(section, meanDepth, used.beam)
  const own = midshipSection(used)
  const meeting = conditions.meetingVessel ? midshipSection(conditions.meetingVessel) : 0
  const blockage = isConfined ? (own + meeting) / strip.area : 0
  const clashes = impossibleItems({ segment, vessel: used, conditions, section, blockage })
  if (clashes.length > 0) throw impossible(clashes)

  const waveFactors = waveFactorsOf(options, used.hull)
  const setting = settingOf(used, section, strip, blockage, isConfined)
  const eccentricity = isConfined ? (strip.offset * section.depth) / strip.area : 0
  const near = eccentricityFactors(eccentricity, section.width / used.length)
  const nearer = section.distances[0] <= section.distances[1] ? 0 : 1
  const likeBlockage = (own + Math.max(own, meeting)) / strip.area
  return {
    segment,
    station,
    vessel: used,
    uncappedDraught: vessel.draught,
    conditions,
    options,
    section,
    nearer,
    isStripShort: strip.isShort,
    sideFactors: nearer === 0 ? [near, NO_GROWTH] : [NO_GROWTH, near],
    setting,
    shallowWaveSpeed: shallowWaterWaveSpeed(section.depth),
    meetingCriticalSpeed:
      isConfined && likeBlockage < 1 ? criticalSpeedOf(likeBlockage, meanDepth, section.depth) : NaN,
    waveBands: bandsOf(WAVE_METHODS, setting, preferredBits(options), waveFactors.without),
    squatBands: bandsOf(SQUAT_METHODS, setting, 0),
    waveFactors,
  }
}
