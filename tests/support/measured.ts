import type { Json } from './service.ts'

/** Speeds, m/s, and 0.25 (V⁸/(g⁴ s))^(1/3) of Blaauw et al. 30 m from the side of a tug, by hand, m. */
const BY_HAND = [
  [2, 0.024338],
  [2.2, 0.031381],
  [2.4, 0.039576],
  [2.6, 0.048993],
  [2.8, 0.059698],
  [3, 0.071757],
  [3.2, 0.085233],
] as const

/** Measured over computed height by Blaauw et al.: median 1.25, geometric mean 1.239876. */
const RATIOS = [1.25, 1.1, 1.2, 1.25, 1.3, 1.4, 1.2]

/** Passages of a tug, 9 m wide, on water 4 m deep, with waves as high as Blaauw et al. compute, times the ratios. */
export const tugs = (ratios: readonly number[] = RATIOS): Json[] =>
  BY_HAND.map(([speed, height], i) => ({
    label: `tug ${i}`,
    speed_mps: speed,
    speed_reference: 'through-water',
    distance_m: 34.5,
    depth_m: 4,
    vessel_class: 'tug',
    draught_m: 2,
    max_wave_height_m: (ratios[i] ?? 1) * height,
  }))

/** A request for the factor of Blaauw et al. alone. */
export const calibrationOf = (passages: readonly Json[], more: Json = {}): Json => ({
  name: 'Trial',
  method_ids: ['blaauw-1984'],
  passages,
  ...more,
})

const cellOf = (value: unknown): string =>
  typeof value === 'string' || typeof value === 'number' ? String(value) : ''

/** Rows as CSV with all columns that any of them has. */
export function csvOf(rows: readonly Json[]): string {
  const columns = [...new Set(rows.flatMap((row) => Object.keys(row)))]
  const lines = rows.map((row) => columns.map((column) => cellOf(row[column])).join(','))
  return [columns.join(','), ...lines].map((line) => `${line}\r\n`).join('')
}

export const ndjsonOf = (rows: readonly Json[]): string =>
  rows.map((row) => `${JSON.stringify(row)}\n`).join('')

export const NDJSON = { 'content-type': 'application/x-ndjson' }
export const CSV = { 'content-type': 'text/csv' }
