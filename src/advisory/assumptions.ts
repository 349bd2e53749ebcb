import type { Basis, VesselField } from '../domain/vessel.ts'
import { slopeOf } from './section-of.ts'
import type { Assumption } from './caution.ts'
import type { Situation } from './situation.ts'

const PRACTICE = 'common practice, no source'
const OWN_CHOICE = 'own choice'

const BASIS_TEXT: Readonly<Record<Exclude<Basis, 'given' | 'derived'>, string>> = {
  standard: 'Standard figure of the class',
  typical: 'Typical figure',
}

/** Figures of a vessel as they are named at the edge. */
const VESSEL_FIELDS: readonly { readonly field: VesselField; readonly name: string }[] = [
  { field: 'length', name: 'vessel.length_m' },
  { field: 'beam', name: 'vessel.beam_m' },
  { field: 'draught', name: 'vessel.draught_m' },
  { field: 'blockCoefficient', name: 'vessel.block_coefficient' },
  { field: 'midshipCoefficient', name: 'vessel.midship_coefficient' },
  { field: 'entranceLength', name: 'vessel.entrance_length_m' },
  { field: 'volume', name: 'vessel.displacement_m3' },
  { field: 'maxSpeed', name: 'vessel.max_speed_mps' },
  { field: 'minSteerageSpeed', name: 'vessel.min_steerage_speed_mps' },
  { field: 'envelopeCoefficient', name: 'vessel.rock_manual_coefficient' },
  { field: 'centralCoefficient', name: 'vessel.blaauw_coefficient' },
]

function vesselAssumptions({ vessel, segment, uncappedDraught }: Situation): Assumption[] {
  const found: Assumption[] = []
  const owner = vessel.className ?? 'described vessel of this size and hull'
  for (const { field, name } of VESSEL_FIELDS) {
    const value = vessel[field]
    const basis = vessel.basis[field]
    if (value === undefined || basis === 'given') continue
    if (field === 'draught' && uncappedDraught !== vessel.draught) {
      found.push({
        field: name,
        value,
        text: 'Permitted draught of the segment, below the draught of the class',
        source: segment.id ?? 'segment.max_draught_m',
      })
    } else if (basis === 'derived') {
      found.push({
        field: name,
        value,
        text:
          field === 'volume'
            ? 'Block coefficient times length, beam and draught'
            : 'From the displaced volume',
        source: 'definition',
      })
    } else {
      found.push({
        field: name,
        value,
        text: `${BASIS_TEXT[basis]} (${owner})`,
        source: basis === 'standard' ? 'ECMT Resolution 92/2 (1992)' : PRACTICE,
      })
    }
  }
  return found
}

function bankAssumptions({ segment, station, section, setting }: Situation): Assumption[] {
  const found: Assumption[] = []
  segment.banks.forEach((bank, i) => {
    if (!bank.isKindGiven) {
      found.push({
        field: `segment.${bank.side}_bank.kind`,
        value: bank.kind,
        text: 'Bank kind not given: taken as unprotected soil',
        source: 'the most easily harmed of the common kinds; own choice',
      })
    }
    const isGiven = bank.slope !== undefined || station.shape.kind === 'profile' || hasShape(station.shape)
    if (!isGiven && setting.isConfined) {
      found.push({
        field: `segment.${bank.side}_bank.slope_h_per_v`,
        value: section.slopes?.[i as 0 | 1] ?? slopeOf(bank, station),
        text: section.isSlopeReduced
          ? 'Side slope by bank kind, reduced so that the bottom keeps a quarter of the width'
          : 'Side slope by bank kind: 3 on natural banks and riprap, 0 on walls',
        source: PRACTICE,
      })
    }
  })
  return found
}

const hasShape = (shape: Situation['station']['shape']): boolean =>
  shape.kind === 'trapezoid' && (shape.slope !== undefined || shape.bottomWidth !== undefined)

const SINGLE_VESSEL: Assumption = {
  field: 'conditions.meeting_vessel',
  value: 'none',
  text: 'One vessel alone: no meeting or overtaking traffic',
  source: 'request',
}

const OPEN_WATER: Assumption = {
  field: 'segment.confinement',
  value: 'open',
  text: 'Open water: no walls, no return current, no drawdown; the critical speed is that of the longest wave',
  source: 'request',
}

const WAVES_AT_BANK: Assumption = {
  field: 'bank_wave_height',
  value: 'undisturbed',
  text: 'Refraction, shoaling and reflection between the sailing line and the bank are ignored',
  source:
    'own choice; shoaling and refraction together lower ship waves by 15 to 20 % up to the toe, a wall doubles them',
}

const STERN_WAVE: Assumption = {
  field: 'stern_wave_height',
  value: 'judged as bank wave',
  text: 'The wave height limit of a bank is applied to the stern wave too',
  source: `${OWN_CHOICE}, on the safe side`,
}

const FROM_MEMORY: Assumption = {
  field: 'wave_methods',
  value: 'recalled coefficients',
  text: 'Coefficients of the wave and squat methods are those recalled from the publications named; no method is better than about 50 % either way on a water it was not fitted to',
  source: 'see wave_methods[].reference and /v1/methods',
}

const WATER_LEVEL: Assumption = {
  field: 'conditions.water_level_m',
  value: 0,
  text: 'Water at the level of the datum',
  source: 'default of the service',
}

const CURRENT: Assumption = {
  field: 'conditions.current_mps',
  value: 0,
  text: 'Still water: speed through the water and over the ground are the same',
  source: 'default of the service',
}

/** Values that the request did not give and the answer rests on, each with where it comes from. */
export function assumptionsOf(situation: Situation): Assumption[] {
  const { setting, conditions, isStripShort } = situation
  return [
    ...vesselAssumptions(situation),
    ...bankAssumptions(situation),
    ...(conditions.isWaterLevelGiven ? [] : [WATER_LEVEL]),
    ...(conditions.isCurrentGiven ? [] : [CURRENT]),
    ...(conditions.meetingVessel ? [] : [SINGLE_VESSEL]),
    ...(setting.isConfined ? [] : [OPEN_WATER]),
    ...(setting.isConfined && isStripShort
      ? [
          {
            field: 'effective_width_m',
            value: setting.effectiveWidth,
            text: 'The return flow is spread over at most six beams to each side of the sailing line',
            source: `${OWN_CHOICE}: at most the 12 beams to which the method is documented`,
          },
        ]
      : []),
    ...(setting.correctionShare > 0
      ? [
          {
            field: 'alpha_s_share',
            value: setting.correctionShare,
            text: 'Share of the alpha_s correction for inland hulls that applies; it fades outside its published range',
            source: 'Rock Manual C683 (2007), 4.3.4, from memory; fading: own choice',
          },
        ]
      : []),
    WAVES_AT_BANK,
    STERN_WAVE,
    FROM_MEMORY,
  ]
}
