import { createHash } from 'node:crypto'
import canonicalize from 'canonicalize'
import type { Inputs } from '../advisory/uncertainty.ts'
import type { Segment, Station } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'

function stationContent({ chainage, depth, width, distances, shape }: Station) {
  return { chainage, depth, width, distances, shape }
}

/** A segment without its names: what its figures follow from. */
function segmentContent(segment: Segment) {
  return {
    stations: segment.stations.map(stationContent),
    banks: segment.banks.map(({ isKindGiven: _, ...bank }) => bank),
    receptors: segment.receptors.map(({ name: _, ...receptor }) => receptor),
    postedLimits: segment.postedLimits,
    confinement: segment.confinement,
    bedKind: segment.bedKind,
    minUnderKeelClearance: segment.minUnderKeelClearance,
    maxDraught: segment.maxDraught,
  }
}

/** A vessel by its figures, whatever they rest on. */
function vesselContent({ basis: _, className: _name, ...vessel }: Vessel) {
  return vessel
}

/** Whether a draught is the vessel's own matters only where a permitted draught caps those that are not. */
function draughtContent(vessel: Vessel, segment: Segment) {
  return segment.maxDraught === undefined ? {} : { isDraughtGiven: vessel.basis.draught === 'given' }
}

/**
 * Hash of everything an advisory follows from, with every default filled in and ids replaced by content: SHA-256 over
 * the canonical JSON of RFC 8785. Names, labels and attributes are not in it.
 */
export function inputHash({ segment, vessel, conditions, options }: Inputs): string {
  const { waterLevel, current, direction, meetingVessel } = conditions
  const content = {
    segment: segmentContent(segment),
    vessel: { ...vesselContent(vessel), ...draughtContent(vessel, segment) },
    conditions: {
      waterLevel,
      current,
      direction,
      meetingVessel: meetingVessel && vesselContent(meetingVessel),
    },
    options: { ...options, limits: { wakeWash: 'when-long', ...options.limits } },
  }
  return `sha256:${createHash('sha256')
    .update(canonicalize(content) ?? '')
    .digest('hex')}`
}
