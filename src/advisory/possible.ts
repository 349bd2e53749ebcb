import type { Conditions } from '../domain/conditions.ts'
import type { FaultItem } from '../domain/fault.ts'
import type { Segment } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'
import type { StationSection } from './section-of.ts'

interface Placed {
  readonly segment: Segment
  readonly vessel: Vessel
  readonly conditions: Conditions
  readonly section: StationSection
  readonly blockage: number
}

/** A figure for a sentence, to a tenth of a millimetre; `facts` hold it whole. */
const shown = (figure: number): number => Number(figure.toFixed(4))

/** Figures that are valid one by one and cannot hold together: each pair that clashes, with both figures. */
export function impossibleItems(placed: Placed): FaultItem[] {
  const { vessel, conditions, section } = placed
  if (!(section.depth > 0)) return [dry(placed)]
  const items = [...draughtItems(vessel, section.depth, '#/vessel')]
  if (vessel.beam >= section.width) {
    items.push({
      pointer: '#/vessel/beam_m',
      code: 'clash',
      detail: `The hull is as wide as the water: beam ${shown(vessel.beam)} m, water surface ${shown(section.width)} m`,
      facts: { beam_m: vessel.beam, width_m: section.width },
    })
  } else items.push(...hullSideItems(placed))
  if (conditions.meetingVessel) items.push(...meetingItems(placed, conditions.meetingVessel))
  if (vessel.volume > vessel.length * vessel.beam * vessel.draught) {
    items.push({
      pointer: '#/vessel/displacement_m3',
      code: 'clash',
      detail: 'The displaced volume is larger than length times beam times draught',
      facts: { displacement_m3: vessel.volume, box_m3: vessel.length * vessel.beam * vessel.draught },
    })
  }
  if (items.length === 0 && placed.blockage >= 1) {
    items.push({
      pointer: '#/vessel',
      code: 'clash',
      detail: 'The hull, with the vessel it meets, fills the whole section of the water',
      facts: { blockage_ratio: placed.blockage },
    })
  }
  return items
}

function dry({ conditions, section }: Placed): FaultItem {
  return {
    pointer: '#/conditions/water_level_m',
    code: 'clash',
    detail: 'The sailing line is dry at this water level: the level is as far below the datum as the bed',
    facts: { water_level_m: conditions.waterLevel, depth_m: section.depth },
  }
}

function draughtItems(vessel: Vessel, depth: number, pointer: string): FaultItem[] {
  if (vessel.draught < depth) return []
  const isGiven = vessel.basis.draught === 'given'
  return [
    {
      pointer: `${pointer}/draught_m`,
      code: 'clash',
      detail: isGiven
        ? `The vessel is aground: draught ${shown(vessel.draught)} m, depth ${shown(depth)} m`
        : `The draught of the class, ${shown(vessel.draught)} m, is not below the depth, ${shown(depth)} m: give draught_m`,
      facts: { draught_m: vessel.draught, depth_m: depth },
    },
  ]
}

function hullSideItems({ segment, vessel, section }: Placed): FaultItem[] {
  const half = vessel.beam / 2
  const items: FaultItem[] = []
  segment.banks.forEach((bank, i) => {
    const distance = section.distances[i as 0 | 1]
    if (distance > half) return
    items.push({
      pointer:
        bank.side === 'nearer' ? '#/segment/bank_distance_m' : `#/segment/banks/${bank.side}/distance_m`,
      code: 'clash',
      detail: `The hull reaches over the ${bank.side} waterline: ${shown(distance)} m from the sailing line, half the beam is ${shown(half)} m`,
      facts: { distance_m: distance, half_beam_m: half },
    })
  })
  segment.receptors.forEach((receptor, i) => {
    if (receptor.distance > half) return
    items.push({
      pointer: `#/segment/receptors/${i}/distance_m`,
      code: 'clash',
      detail: `The receptor lies under the hull: ${shown(receptor.distance)} m from the sailing line, half the beam is ${shown(half)} m`,
      facts: { distance_m: receptor.distance, half_beam_m: half },
    })
  })
  return items
}

function meetingItems({ vessel, section }: Placed, meeting: Vessel): FaultItem[] {
  const items = draughtItems(meeting, section.depth, '#/conditions/meeting_vessel')
  if (vessel.beam + meeting.beam >= section.width) {
    items.push({
      pointer: '#/conditions/meeting_vessel/beam_m',
      code: 'clash',
      detail: 'The two vessels are together as wide as the water',
      facts: { beams_m: vessel.beam + meeting.beam, width_m: section.width },
    })
  }
  return items
}
