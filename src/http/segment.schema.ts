import { z } from 'zod'
import { BANK_KINDS, BED_KINDS, DIRECTIONS, RECEPTOR_KINDS } from '../domain/segment.ts'
import { crossCheck, type Report } from './cross-check.ts'
import { CrossSectionFields, Slope } from './cross-section.schema.ts'
import { checkSpeed, figure, Id, Label, speedFields, Text } from './fields.ts'
import { GroupFields } from './group.schema.ts'

const Distance = figure(0.1, 20000, 'sailing line to the waterline at the datum, m')

const BANK = {
  label: Label,
  distance_m: Distance.optional(),
  kind: z.enum(BANK_KINDS).optional().describe('default unprotected'),
  max_wave_height_m: figure(0.01, 10, 'in place of the default for the kind, m').optional(),
  max_drawdown_m: figure(0.01, 10, 'm').optional(),
  max_return_current_mps: figure(0.01, 10, 'm/s').optional(),
  stone_d50_m: figure(0.005, 3, 'median stone size of riprap, m').optional(),
  stone_relative_density: figure(0.5, 3, '(rho_s - rho)/rho of the stone, default 1.65').optional(),
  slope_h_per_v: Slope.optional(),
  toe_depth_m: figure(0, 100, 'depth below the datum at the toe, m; limits waves by breaking').optional(),
} as const

export const BankFields = z.strictObject(BANK).meta({ id: 'Bank', description: 'One bank of a segment.' })

const Position = z.array(z.number()).min(2).max(4)

/** A waterline as GeoJSON has it; what it holds is checked with the sailing line. */
const BankLine = z
  .strictObject({ type: z.string(), coordinates: z.array(z.union([Position, z.unknown()])).max(100_000) })
  .describe('waterline as a LineString, [lon, lat], in either order of vertices')

const RegistryBankFields = z
  .strictObject({ ...BANK, line: BankLine.optional() })
  .meta({ id: 'RegistryBank', description: 'One bank of a registry segment, by its line or by a distance.' })

export const ReceptorFields = z
  .strictObject({
    label: Label,
    name: Text.optional(),
    kind: z.enum(RECEPTOR_KINDS),
    side: z
      .enum(['left', 'right', 'nearer', 'farther'])
      .describe('looking downstream, or as the banks are given'),
    distance_m: figure(0.1, 20000, 'from the sailing line, m'),
    chainage_m: figure(
      -1e7,
      1e7,
      'of a registry segment: it counts at this place alone, where a station is put for it; left out, or where one section describes the whole segment, it counts all along, m',
    ).optional(),
    max_wave_height_m: figure(0.01, 10, 'm; required except for moored small craft').optional(),
  })
  .check(
    crossCheck((receptor, report) => {
      if (receptor.max_wave_height_m !== undefined || receptor.kind === 'moored-small-craft') return
      report(['max_wave_height_m'], 'required', 'is required: only moored small craft have a default')
    }),
  )
  .meta({ id: 'Receptor', description: 'Something at the water that waves must not harm.' })

export const PostedLimitFields = z
  .strictObject({
    label: Label,
    ...speedFields('speed', 0.1, 40, 'posted limit'),
    reference: z.enum(['over-ground', 'through-water']).optional().describe('default over-ground'),
    direction: z
      .enum(['both', ...DIRECTIONS])
      .optional()
      .describe('default both'),
    applies_to: GroupFields.optional(),
  })
  .check(
    crossCheck((limit, report) => {
      checkSpeed(limit, 'speed', true, report)
    }),
  )
  .meta({ id: 'PostedLimit', description: 'A limit that is in force; the lowest that applies counts.' })

export const StationFields = z
  .strictObject({
    label: Label,
    chainage_m: figure(-1e7, 1e7, 'm'),
    depth_m: figure(0.3, 100, 'bed below the datum at the sailing line, m'),
    width_m: figure(2, 20000, 'water surface at the datum, m'),
    bank_distance_m: Distance.optional(),
    left_distance_m: Distance.optional(),
    right_distance_m: Distance.optional(),
    cross_section: CrossSectionFields.optional(),
  })
  .check(
    crossCheck((station, report) => {
      const hasNearer = station.bank_distance_m !== undefined
      const hasSides = station.left_distance_m !== undefined || station.right_distance_m !== undefined
      if (hasNearer === hasSides) {
        report(['bank_distance_m'], 'one-of', 'give bank_distance_m, or left_distance_m and right_distance_m')
      } else if (
        hasSides &&
        (station.left_distance_m === undefined || station.right_distance_m === undefined)
      ) {
        report(['left_distance_m'], 'required', 'give the distance to both banks')
      }
    }),
  )
  .meta({
    id: 'Station',
    description:
      'Depth and width at a place along a segment; both are interpolated by chainage between stations.',
  })

const COMMON = {
  name: Text.optional(),
  waterway: Text.optional().describe('name of the waterway; a filter of lists'),
  gauge_id: Text.optional().describe('gauge that gives the level; a filter of lists'),
  datum: Text.optional(),
  survey_date: Text.optional(),
  source: Text.optional(),
  depth_m: figure(0.3, 100, 'bed below the datum at the sailing line, m').optional(),
  width_m: figure(2, 20000, 'water surface at the datum, m').optional(),
  bank_distance_m: Distance.optional().describe('to the nearer bank; the farther one is the width less this'),
  banks: z
    .strictObject({ label: Label, left: BankFields, right: BankFields })
    .optional()
    .describe('in place of bank_distance_m; left and right looking downstream'),
  bank_kind: z.enum(BANK_KINDS).optional().describe('of both banks, default unprotected'),
  cross_section: CrossSectionFields.optional(),
  chainage_from_m: figure(-1e7, 1e7, 'at the upstream end, m').optional(),
  chainage_to_m: figure(-1e7, 1e7, 'at the downstream end, m').optional(),
  receptors: z.array(ReceptorFields).max(100).optional(),
  bed_kind: z.enum(BED_KINDS).optional().describe('for the permissible velocity'),
  min_under_keel_clearance_m: figure(0, 20, 'beside the policy; the stricter counts, m').optional(),
  max_draught_m: figure(0.05, 30, 'permitted draught, m').optional(),
  posted_limits: z.array(PostedLimitFields).max(100).optional(),
  confinement: z.enum(['confined', 'open']).optional().describe('default confined'),
  calibration_id: Id.optional(),
  attributes: z
    .record(z.string().max(100), z.union([z.string().max(10000), z.number(), z.boolean()]))
    .optional()
    .describe("the caller's own values, never read"),
} as const

type Checked = Partial<Record<keyof typeof COMMON | 'id' | 'stations', unknown>>

/** Geometry that is needed, and the fields that stand for one another. */
export function checkGeometry(segment: Checked, report: Report): void {
  if (segment.bank_distance_m !== undefined && segment.banks !== undefined) {
    report(['bank_distance_m'], 'clash', 'is given beside banks, which hold the distances: give one of them')
  }
  const hasProfile =
    typeof segment.cross_section === 'object' &&
    segment.cross_section !== null &&
    'profile' in segment.cross_section
  if (segment.id !== undefined || segment.stations !== undefined || hasProfile) return
  if (segment.depth_m === undefined) report(['depth_m'], 'required', 'is required, m')
  if (segment.banks === undefined) {
    for (const field of ['width_m', 'bank_distance_m'] as const) {
      if (segment[field] === undefined) report([field], 'required', 'is required without banks, m')
    }
  } else checkBankDistances(segment, report)
}

/** A line or a distance on each side, or one distance and the width, give the section. */
function checkBankDistances(segment: Checked, report: Report): void {
  const { left, right } = { left: {}, right: {}, ...(segment.banks as object) } as Record<
    'left' | 'right',
    { distance_m?: unknown; line?: unknown }
  >
  if (left.line !== undefined || right.line !== undefined) {
    for (const [side, bank] of Object.entries({ left, right })) {
      if (bank.line !== undefined || bank.distance_m !== undefined) continue
      report(
        ['banks', side, 'distance_m'],
        'required',
        'is required: the other bank has a line, this one has none',
      )
    }
    return
  }
  const given = [left, right].filter((bank) => bank.distance_m !== undefined).length
  if (given === 2 || (given === 1 && segment.width_m !== undefined)) return
  const missing = left.distance_m === undefined ? 'left' : 'right'
  report(['banks', missing, 'distance_m'], 'required', 'is required: two distances, or one and width_m')
}

export const SegmentFields = z
  .strictObject({ label: Label, id: Id.optional().describe('take this registry segment'), ...COMMON })
  .check(
    crossCheck((segment, report) => {
      checkGeometry(segment, report)
    }),
  )
  .meta({
    id: 'Segment',
    description:
      'The water: a registry segment by id, with fields that replace stored ones for this call, or a description.',
  })

export type SegmentWire = z.output<typeof SegmentFields>

/** A segment as the registry holds it: the properties of a GeoJSON feature. */
export const RegistrySegmentFields = z
  .strictObject({
    ...COMMON,
    banks: z
      .strictObject({ label: Label, left: RegistryBankFields, right: RegistryBankFields })
      .optional()
      .describe(
        'in place of bank_distance_m; left and right looking downstream, each by its line or its distance',
      ),
    stations: z
      .array(StationFields)
      .min(1)
      .max(5000)
      .optional()
      .describe(
        'in any order. Where figures differ by more than 2 % between neighbours, others are put between',
      ),
  })
  .check(
    crossCheck((segment, report) => {
      checkGeometry(segment, report)
    }),
  )
  .meta({ id: 'RegistrySegment', description: 'The properties of a registry segment.' })

export type RegistrySegmentWire = z.output<typeof RegistrySegmentFields>
