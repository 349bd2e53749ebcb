import { z } from 'zod'
import { DIRECTIONS } from '../domain/segment.ts'
import { crossCheck } from './cross-check.ts'
import { checkSpeed, figure, Id, Label, speedFields } from './fields.ts'
import { VesselFields } from './vessel.schema.ts'

const VESSEL = VesselFields.shape

/** Fields without which a vessel that names no class is not known. */
const DESCRIPTION = ['length_m', 'beam_m', 'draught_m', 'hull'] as const

const FIELDS = {
  label: Label,
  time: z.iso.datetime({ offset: true }).optional().describe('of the passage, RFC 3339; kept as it comes'),
  ...speedFields('speed', 0.1, 40, 'speed of the vessel'),
  speed_reference: z.enum(['through-water', 'over-ground']),
  distance_m: figure(0.5, 20000, 'gauge to sailing line, m'),
  depth_m: figure(0.3, 100, 'of the water at the sailing line during the passage, m'),
  width_m: figure(2, 20000, "of the water surface during the passage, m; default the segment's").optional(),
  current_mps: figure(-5, 5, 'along the waterway, positive downstream, m/s; default 0').optional(),
  direction: z
    .enum(DIRECTIONS)
    .optional()
    .describe('of the vessel; required with a current and a speed over ground'),
  vessel_class: Id.optional().describe('id of a vessel class; its figures count where none is given here'),
  loading: VESSEL.loading,
  length_m: VESSEL.length_m,
  beam_m: VESSEL.beam_m,
  draught_m: VESSEL.draught_m,
  hull: VESSEL.hull,
  block_coefficient: VESSEL.block_coefficient,
  midship_coefficient: VESSEL.midship_coefficient,
  entrance_length_m: VESSEL.entrance_length_m,
  displacement_m3: VESSEL.displacement_m3,
  max_wave_height_m: figure(0.001, 20, 'highest wave of the passage at the gauge, crest to trough, m'),
  period_s: figure(0.1, 60, 'of that wave, s; kept and not used').optional(),
  drawdown_m: figure(0, 10, 'at the gauge, m; kept and not used').optional(),
} as const

/** Columns of a CSV of passages. */
export const ROW_COLUMNS: readonly string[] = Object.keys(FIELDS)

export const PassageRow = z
  .strictObject(FIELDS)
  .check(
    crossCheck((row, report) => {
      checkSpeed(row, 'speed', true, report)
      const hasCurrent = typeof row.current_mps === 'number' && row.current_mps !== 0
      if (hasCurrent && row.speed_reference === 'over-ground' && row.direction === undefined) {
        report(['direction'], 'required', 'is required with a current and a speed over ground')
      }
      if (row.vessel_class !== undefined) return
      for (const field of DESCRIPTION) {
        if (row[field] === undefined) report([field], 'required', 'is required without a vessel_class')
      }
      if (row.loading !== undefined)
        report(['loading'], 'clash', 'belongs to a class: give a vessel_class or leave it out')
    }),
  )
  .meta({
    id: 'MeasuredPassage',
    description: 'A passage whose highest wave was measured: a vessel by class or by description.',
  })

export type RowWire = z.output<typeof PassageRow>

const TEXT_COLUMNS = new Set([
  'label',
  'time',
  'speed_reference',
  'direction',
  'vessel_class',
  'loading',
  'hull',
])
const NUMBER = /^[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?$/

/** A row of CSV as a passage; empty cells are fields left out, and text that is no number is refused as such. */
export function passageOfCells(fields: Readonly<Record<string, string>>): unknown {
  const cells = Object.entries(fields).map(([column, cell]) => [column, cell.trim()] as const)
  return Object.fromEntries(
    cells
      .filter(([, cell]) => cell !== '')
      .map(([column, cell]) => [
        column,
        !TEXT_COLUMNS.has(column) && NUMBER.test(cell) ? Number(cell) : cell,
      ]),
  )
}
