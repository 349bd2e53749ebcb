import fc from 'fast-check'
import { evenly } from './arbitraries.ts'
import type { Json } from './service.ts'

/** A request for an advisory as a caller writes it. */
export interface Request extends Json {
  readonly segment: Json
  readonly vessel: Json
  readonly conditions?: Json
  readonly options?: Json
}

/** A canal 60 m wide and 4 m deep, sailed in the middle. */
export const CANAL = { depth_m: 4, width_m: 60, bank_distance_m: 30 }
export const MOTOR_VESSEL = { class: 'cemt-iv' }
export const PLAIN: Request = { segment: CANAL, vessel: MOTOR_VESSEL }

const DESCRIBED = { length_m: 60, beam_m: 7, draught_m: 2.2, hull: 'displacement' }
const LAUNCH = { length_m: 7, beam_m: 2.4, draught_m: 0.5, hull: 'planing', max_speed_kmh: 50 }

/** Valid requests with an answer, one for each part of the contract. */
export const REQUESTS: Readonly<Record<string, Request>> = {
  'a canal and a class': PLAIN,
  'an empty vessel of a class': { segment: CANAL, vessel: { class: 'cemt-iv', loading: 'empty' } },
  'a described vessel': { segment: CANAL, vessel: DESCRIBED },
  'a planing boat on a river': {
    segment: { depth_m: 3, width_m: 80, bank_distance_m: 35, bank_kind: 'reed' },
    vessel: LAUNCH,
  },
  'every figure of a vessel': {
    segment: CANAL,
    vessel: {
      ...DESCRIBED,
      block_coefficient: 0.8,
      midship_coefficient: 0.97,
      entrance_length_m: 11,
      displacement_m3: 730,
      max_speed_kn: 9,
      min_steerage_speed_mps: 1.2,
    },
  },
  'both banks': {
    segment: {
      depth_m: 4.2,
      banks: {
        left: { distance_m: 25, kind: 'riprap', stone_d50_m: 0.2, slope_h_per_v: 2, toe_depth_m: 1.5 },
        right: { distance_m: 30, kind: 'wall', max_wave_height_m: 0.5, max_drawdown_m: 0.4 },
      },
    },
    vessel: MOTOR_VESSEL,
  },
  'one bank and the width': {
    segment: { depth_m: 4.2, width_m: 50, banks: { left: {}, right: { distance_m: 20 } } },
    vessel: MOTOR_VESSEL,
  },
  'a bottom width': { segment: { ...CANAL, cross_section: { bottom_width_m: 40 } }, vessel: MOTOR_VESSEL },
  'a side slope': { segment: { ...CANAL, cross_section: { slope_h_per_v: 2 } }, vessel: MOTOR_VESSEL },
  'a surveyed profile': {
    segment: { cross_section: { profile: [[-30, -1], [-24, 1], [-8, 4], [0, 4.5], [12, 4], [26, 0.5], [30, -1]] } }, // prettier-ignore
    vessel: MOTOR_VESSEL,
  },
  'open water': {
    segment: { depth_m: 9, width_m: 3000, bank_distance_m: 900, confinement: 'open' },
    vessel: { class: 'coaster' },
  },
  receptors: {
    segment: {
      ...CANAL,
      receptors: [
        { kind: 'moored-small-craft', side: 'nearer', distance_m: 20 },
        { name: 'steps', kind: 'bathing-place', side: 'farther', distance_m: 25, max_wave_height_m: 0.1 },
      ],
    },
    vessel: MOTOR_VESSEL,
  },
  'posted limits': {
    segment: { ...CANAL, posted_limits: [{ speed_kmh: 7 }, { speed_kn: 3, reference: 'through-water' }] },
    vessel: MOTOR_VESSEL,
  },
  'a bed and a permitted draught': {
    segment: { ...CANAL, bed_kind: 'loess', max_draught_m: 2, min_under_keel_clearance_m: 0.5 },
    vessel: MOTOR_VESSEL,
  },
  'a current with no direction': { ...PLAIN, conditions: { current_mps: 0.6 } },
  'a current and a direction': { ...PLAIN, conditions: { current_mps: -0.6, direction: 'upstream' } },
  'low water': { ...PLAIN, conditions: { water_level_m: -0.7 } },
  'a vessel that is met': { ...PLAIN, conditions: { meeting_vessel: { class: 'cemt-iii' } } },
  'every limit': {
    ...PLAIN,
    options: {
      limits: {
        max_critical_ratio: 0.8,
        max_depth_froude_number: 0.6,
        min_under_keel_clearance_ratio: 0.2,
        max_bank_wave_height_m: 0.25,
        max_receptor_wave_height_m: 0.2,
        max_drawdown_m: 0.3,
        max_return_current_mps: 0.8,
        wake_wash: 'always',
      },
    },
  },
  'chosen methods': {
    ...PLAIN,
    options: { wave_methods: ['blaauw-1984', 'kriebel-seelig-2005'], combine: 'median' },
  },
  'a wave factor': { ...PLAIN, options: { wave_factor: 1.6 } },
  'a curve': { ...PLAIN, options: { curve: true } },
  'a sign in knots': { ...PLAIN, options: { sign_unit: 'kn', sign_step: 0.5 } },
  'a posted limit set aside': {
    segment: { ...CANAL, posted_limits: [{ speed_kmh: 6 }] },
    vessel: MOTOR_VESSEL,
    options: { apply_posted_limit: false },
  },
  'no safe speed': {
    segment: { ...CANAL, bank_distance_m: 10 },
    vessel: MOTOR_VESSEL,
    options: { limits: { max_bank_wave_height_m: 0.01 } },
  },
  'a segment of the registry': { segment: { id: 'harrow-long-pound' }, vessel: MOTOR_VESSEL },
  'a segment with stations': { segment: { id: 'harrow-lower-cut' }, vessel: MOTOR_VESSEL },
  'a segment with a profile': {
    segment: { id: 'harrow-tideway' },
    vessel: { class: 'coaster', draught_m: 3 },
    conditions: { water_level_m: 2 },
  },
  'a segment of the registry with figures of its own': {
    segment: { id: 'harrow-head-cut', depth_m: 3, bank_kind: 'wall', posted_limits: [] },
    vessel: { class: 'cemt-ii' },
  },
  'labels in every object': {
    label: 'request',
    segment: {
      label: 'segment',
      depth_m: 4,
      banks: {
        label: 'banks',
        left: { label: 'left', distance_m: 30 },
        right: { label: 'right', distance_m: 30 },
      },
      cross_section: { label: 'section', slope_h_per_v: 3 },
      receptors: [{ label: 'receptor', kind: 'moored-small-craft', side: 'left', distance_m: 20 }],
      posted_limits: [{ label: 'limit', speed_kmh: 9, applies_to: { label: 'group' } }],
    },
    vessel: { label: 'vessel', class: 'cemt-iv' },
    conditions: { label: 'conditions' },
    options: { label: 'options', limits: { label: 'limits' } },
  },
}

export const SEGMENT_IDS = [
  'harrow-alder-bend',
  'harrow-aqueduct',
  'harrow-docks',
  'harrow-head-cut',
  'harrow-long-pound',
  'harrow-lower-cut',
  'harrow-mere-channel',
  'harrow-mere-open',
  'harrow-sea-reach',
  'harrow-tideway',
  'harrow-town-reach',
  'harrow-upper-reach',
] as const

/** An advisory request that every form can carry, by the columns of the CSV. */
export type Cells = Record<string, string | number>

const rounded = (low: number, high: number) => evenly(low, high).map((value) => Number(value.toFixed(4)))
const sometimes = <T>(arbitrary: fc.Arbitrary<T>) => fc.option(arbitrary, { nil: undefined })

const known = fc.record({ segment_id: fc.constantFrom(...SEGMENT_IDS) })
/** Without those of which a bottom width would take the place of the surveyed profile, and so of the depth. */
const reshapable = known.filter(({ segment_id }) => segment_id !== 'harrow-tideway')
const nearerBank = fc.record({
  depth_m: rounded(1.5, 9),
  width_m: rounded(60, 200),
  bank_distance_m: rounded(15, 30),
})
const bothBanks = fc.record({
  depth_m: rounded(1.5, 9),
  left_distance_m: rounded(15, 90),
  right_distance_m: rounded(15, 90),
})

const classed = fc.record({
  vessel_class: fc.constantFrom('cemt-ii', 'cemt-iv', 'cemt-va', 'recreational-rb', 'planing-boat', 'coaster', 'tug'), // prettier-ignore
  loading: sometimes(fc.constantFrom('laden', 'empty')),
  draught_m: sometimes(rounded(0.4, 2)),
})
const described = fc.record({
  length_m: rounded(20, 110),
  beam_m: rounded(4, 12),
  draught_m: rounded(0.5, 3),
  hull: fc.constantFrom('displacement', 'semi-displacement', 'planing'),
  block_coefficient: sometimes(rounded(0.4, 0.9)),
})

const shared = fc.record({
  water_level_m: sometimes(rounded(-0.5, 2)),
  current_mps: sometimes(rounded(-1.5, 1.5)),
  direction: sometimes(fc.constantFrom('upstream', 'downstream')),
  sign_unit: sometimes(fc.constantFrom('km/h', 'kn', 'mph')),
  sign_step: sometimes(fc.constantFrom(0.1, 0.5, 1, 2)),
})
const own = fc.record({
  bank_kind: sometimes(fc.constantFrom('unprotected', 'reed', 'riprap', 'wall')),
  bottom_width_m: sometimes(rounded(10, 40)),
  max_wave_height_m: sometimes(rounded(0.05, 0.6)),
  min_under_keel_clearance_m: sometimes(rounded(0, 1)),
  confinement: sometimes(fc.constantFrom('confined', 'open')),
  label: sometimes(fc.constantFrom('a', 'b, "c"', 'näher')),
  max_speed_kmh: sometimes(rounded(8, 40)),
})

const present = (...parts: readonly object[]): Cells =>
  Object.fromEntries(
    parts
      .flatMap((part) => Object.entries(part) as [string, string | number | undefined][])
      .flatMap(([name, value]) => (value === undefined ? [] : [[name, value]])),
  )

/** Requests with nothing but what the address of a registry advisory can say. */
export const addressable: fc.Arbitrary<Cells> = fc
  .tuple(known, classed, shared)
  .map((parts) => present(...parts))

/** Requests that a row of CSV can hold. */
export const rows: fc.Arbitrary<Cells> = fc.oneof(
  addressable,
  fc
    .tuple(fc.oneof(nearerBank, bothBanks, reshapable), fc.oneof(classed, described), shared, own)
    .map((parts) => present(...parts)),
)

const group = (cells: Cells, fields: Readonly<Record<string, string>>): Json =>
  Object.fromEntries(
    Object.entries(fields).flatMap(([column, field]) =>
      cells[column] === undefined ? [] : [[field, cells[column]]],
    ),
  )

const same = (...names: readonly string[]) => Object.fromEntries(names.map((name) => [name, name]))

/** The request that a row stands for. */
export function requestOf(cells: Cells): Request {
  const banks = {
    left: group(cells, { left_distance_m: 'distance_m' }),
    right: group(cells, { right_distance_m: 'distance_m' }),
  }
  const section = group(cells, same('bottom_width_m', 'slope_h_per_v'))
  const limits = group(cells, { max_wave_height_m: 'max_bank_wave_height_m' })
  return {
    ...group(cells, same('label')),
    segment: {
      ...group(cells, { segment_id: 'id' }),
      ...group(cells, same('depth_m', 'width_m', 'bank_distance_m', 'bank_kind', 'confinement')),
      ...group(cells, same('min_under_keel_clearance_m')),
      ...('left_distance_m' in cells && { banks }),
      ...(Object.keys(section).length > 0 && { cross_section: section }),
    },
    vessel: {
      ...group(cells, { vessel_class: 'class' }),
      ...group(cells, same('loading', 'length_m', 'beam_m', 'draught_m', 'block_coefficient', 'hull')),
      ...group(cells, same('max_speed_kmh')),
    },
    conditions: group(cells, same('water_level_m', 'current_mps', 'direction')),
    options: { ...group(cells, same('sign_unit', 'sign_step')), limits },
  }
}
