import { hash } from 'node:crypto'
import type { Inputs } from '../advisory/uncertainty.ts'
import type { Calibration } from '../domain/calibration.ts'
import type { Conditions, Options } from '../domain/conditions.ts'
import type { Bank, Group, PostedLimit, Receptor, SectionShape, Segment, Station } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'
import { DEFAULT_OPTIONS } from './options.schema.ts'

// Canonical JSON (RFC 8785) sorts the names of fields and writes numbers as JavaScript does. Every object below names its
// fields in that order, so that JSON.stringify gives the canonical form at once; fields left out are not written.

const shapeContent = (shape: SectionShape) =>
  shape.kind === 'profile'
    ? { bedDepths: shape.bedDepths, kind: shape.kind, offsets: shape.offsets }
    : { bottomWidth: shape.bottomWidth, kind: shape.kind, slope: shape.slope }

const stationContent = (station: Station) => ({
  chainage: station.chainage,
  depth: station.depth,
  distances: station.distances,
  shape: shapeContent(station.shape),
  width: station.width,
})

const bankContent = (bank: Bank) => ({
  kind: bank.kind,
  maxDrawdown: bank.maxDrawdown,
  maxReturnCurrent: bank.maxReturnCurrent,
  maxWaveHeight: bank.maxWaveHeight,
  side: bank.side,
  slope: bank.slope,
  stoneD50: bank.stoneD50,
  stoneRelativeDensity: bank.stoneRelativeDensity,
  toeDepth: bank.toeDepth,
})

const receptorContent = (receptor: Receptor) => ({
  chainage: receptor.chainage,
  distance: receptor.distance,
  kind: receptor.kind,
  maxWaveHeight: receptor.maxWaveHeight,
  side: receptor.side,
})

const groupContent = (group: Group) => ({
  hull: group.hull,
  loading: group.loading,
  maxDraught: group.maxDraught,
  minDraught: group.minDraught,
  minLength: group.minLength,
  vesselClasses: group.vesselClasses,
})

const postedContent = (limit: PostedLimit) => ({
  appliesTo: groupContent(limit.appliesTo),
  direction: limit.direction,
  reference: limit.reference,
  speed: limit.speed,
})

/** A segment without its names: what its figures follow from. */
const segmentContent = (segment: Segment) => ({
  banks: segment.banks.map(bankContent),
  bedKind: segment.bedKind,
  confinement: segment.confinement,
  maxDraught: segment.maxDraught,
  minUnderKeelClearance: segment.minUnderKeelClearance,
  postedLimits: segment.postedLimits.map(postedContent),
  receptors: segment.receptors.map(receptorContent),
  stations: segment.stations.map(stationContent),
})

/** A vessel by its figures. Where a permitted draught may cap them, it matters too which of them are its own. */
const vesselContent = (vessel: Vessel, isCapped: boolean) => ({
  beam: vessel.beam,
  blockCoefficient: vessel.blockCoefficient,
  centralCoefficient: vessel.centralCoefficient,
  classId: vessel.classId,
  draught: vessel.draught,
  entranceLength: vessel.entranceLength,
  envelopeCoefficient: vessel.envelopeCoefficient,
  hull: vessel.hull,
  isDraughtGiven: isCapped ? vessel.basis.draught === 'given' : undefined,
  isInlandMotorVessel: vessel.isInlandMotorVessel,
  isVolumeGiven: isCapped ? vessel.basis.volume === 'given' : undefined,
  length: vessel.length,
  loading: vessel.loading,
  maxSpeed: vessel.maxSpeed,
  midshipCoefficient: vessel.midshipCoefficient,
  minSteerageSpeed: vessel.minSteerageSpeed,
  trade: vessel.trade,
  volume: vessel.volume,
})

const conditionsContent = (conditions: Conditions) => ({
  current: conditions.current,
  direction: conditions.direction,
  meetingVessel: conditions.meetingVessel && vesselContent(conditions.meetingVessel, false),
  waterLevel: conditions.waterLevel,
})

/** Factors and what they were measured over; a calibration of another name with the same is the same. */
const calibrationContent = ({ coverage, methods }: Calibration) => ({
  coverage: {
    depth: coverage.depth,
    depthFroudeNumber: coverage.depthFroudeNumber,
    distance: coverage.distance,
    speed: coverage.speed,
  },
  methods: methods.map(({ factor, factorByHull, id }) => ({
    factor,
    factorByHull: {
      displacement: factorByHull.displacement,
      planing: factorByHull.planing,
      'semi-displacement': factorByHull['semi-displacement'],
    },
    id,
  })),
})

const optionsContent = ({ limits, ...options }: Options) => ({
  applyPostedLimit: options.applyPostedLimit,
  calibration: options.calibration && calibrationContent(options.calibration),
  combine: options.combine,
  hasCurve: options.hasCurve,
  limits: {
    maxBankWaveHeight: limits.maxBankWaveHeight,
    maxCriticalRatio: limits.maxCriticalRatio,
    maxDepthFroudeNumber: limits.maxDepthFroudeNumber,
    maxDrawdown: limits.maxDrawdown,
    maxReceptorWaveHeight: limits.maxReceptorWaveHeight,
    maxReturnCurrent: limits.maxReturnCurrent,
    minUnderKeelClearanceRatio: limits.minUnderKeelClearanceRatio,
    wakeWash: limits.wakeWash ?? 'when-long',
  },
  signStep: options.signStep,
  signUnit: options.signUnit,
  waveFactor: options.waveFactor,
  waveMethods: options.waveMethods,
})

/** Everything an advisory follows from, with every default filled in and ids replaced by content. */
export const inputContent = ({ segment, vessel, conditions, options }: Inputs) => ({
  conditions: conditionsContent(conditions),
  options: optionsContent(options),
  segment: segmentContent(segment),
  vessel: vesselContent(vessel, segment.maxDraught !== undefined),
})

/** Canonical JSON of what many requests share: segments of the registry, and options that no one gave. */
const shared = new WeakMap<object, string>()

function sharedText<Item extends object>(
  item: Item,
  isShared: boolean,
  content: (item: Item) => object,
): string {
  if (!isShared) return JSON.stringify(content(item))
  const known = shared.get(item)
  if (known !== undefined) return known
  const text = JSON.stringify(content(item))
  shared.set(item, text)
  return text
}

/** The canonical JSON of `inputContent`. */
function inputText({ segment, vessel, conditions, options }: Inputs): string {
  const conditionsText = JSON.stringify(conditionsContent(conditions))
  const optionsText = sharedText(options, options === DEFAULT_OPTIONS, optionsContent)
  const segmentText = sharedText(segment, segment.revision !== undefined, segmentContent)
  const vesselText = JSON.stringify(vesselContent(vessel, segment.maxDraught !== undefined))
  return `{"conditions":${conditionsText},"options":${optionsText},"segment":${segmentText},"vessel":${vesselText}}`
}

/** SHA-256 over the canonical JSON of `inputContent`. Names, labels and attributes are not in it. */
export function inputHash(inputs: Inputs): string {
  return `sha256:${hash('sha256', inputText(inputs))}`
}
