import { type Cell, nameOf, numberOf, REFUSED, textOf } from './cells.ts'
import { type Figure, figureOf, FIGURES, type FigureField, WRAPPED_COURSE } from './figures.ts'
import { eniOf, mmsiOf, readOf, UNREADABLE } from './identity.ts'
import type { Layout } from './layout.ts'
import type { RejectedRow } from './position-report.ts'
import { epochOf, lacksZone } from './time.ts'

/** Why a row is not a report. */
export const REJECTION_REASONS = [
  'time-missing',
  'time-unreadable',
  'time-without-zone',
  'vessel-not-identified',
  'mmsi-unreadable',
  'eni-unreadable',
  'number-unreadable',
  'figure-out-of-range',
  'loading-unknown',
  'speed-not-available',
  'cells-missing',
  'cells-too-many',
  'quote-unreadable',
  'line-too-long',
  'not-json',
  'not-utf-8',
  'field-twice',
] as const
export type RejectionReason = (typeof REJECTION_REASONS)[number]

export interface Refusal {
  readonly reason: RejectionReason
  readonly detail: string
}

/** A row of which nothing can be read. */
export function unreadableRow(line: number, refusal: Refusal): RejectedRow {
  return { line, ...refusal, time: NaN, mmsi: undefined, eni: undefined, name: undefined }
}

/** The cell at an index of a layout; empty where the log does not have it. */
export const cellAt = (cells: readonly Cell[], index: number): Cell => (index < 0 ? '' : (cells[index] ?? ''))

/** Time of a cell, s; NaN when it cannot be read. */
export function timeOf(cell: Cell, layout: Layout): number {
  if (typeof cell === 'number') return NaN
  const time = epochOf(cell, layout)
  return Number.isNaN(time) ? epochOf(cell.trim(), layout) : time
}

/** A row that is not a report, with what can be read of it. */
export function rejectedRow(
  cells: readonly Cell[],
  layout: Layout,
  line: number,
  refusal: Refusal,
): RejectedRow {
  const { columns } = layout
  return {
    line,
    ...refusal,
    time: timeOf(cellAt(cells, columns.time), layout),
    mmsi: readOf(mmsiOf(cellAt(cells, columns.mmsi))),
    eni: readOf(eniOf(cellAt(cells, columns.eni))),
    name: nameOf(cellAt(cells, columns.vessel_name)),
  }
}

const LONGEST_QUOTED = 40

/** What stands in a cell, as it may be shown. */
const quoted = (cell: Cell): string => JSON.stringify(String(cell).slice(0, LONGEST_QUOTED))

const nameOfColumn = ({ names }: Layout, index: number, field: string): string =>
  (names[index] ?? field).slice(0, LONGEST_QUOTED)

function timeRefusal(cell: Cell, layout: Layout): Refusal | undefined {
  const text = textOf(cell)
  const column = nameOfColumn(layout, layout.columns.time, 'time')
  if (text === undefined) return { reason: 'time-missing', detail: `${column} is empty: give the time` }
  if (!Number.isNaN(timeOf(cell, layout))) return undefined
  if (lacksZone(text)) {
    return {
      reason: 'time-without-zone',
      detail: `${column} ${quoted(cell)} has no zone: end it with Z, or with its offset from UTC`,
    }
  }
  const also = layout.isDayFirst ? ' or DD/MM/YYYY HH:MM:SS' : ''
  return {
    reason: 'time-unreadable',
    detail: `${column} ${quoted(cell)} is not a time: write it like 2026-01-31T08:30:00Z${also}`,
  }
}

function vesselRefusal(cells: readonly Cell[], { columns }: Layout): Refusal | undefined {
  const mmsi = cellAt(cells, columns.mmsi)
  const eni = cellAt(cells, columns.eni)
  if (mmsiOf(mmsi) === UNREADABLE) {
    return { reason: 'mmsi-unreadable', detail: `${quoted(mmsi)} is not an MMSI: it has nine digits` }
  }
  if (mmsiOf(mmsi) !== undefined) return undefined
  if (eniOf(eni) === UNREADABLE) {
    return { reason: 'eni-unreadable', detail: `${quoted(eni)} is not an ENI: it has eight digits` }
  }
  if (eniOf(eni) !== undefined) return undefined
  return {
    reason: 'vessel-not-identified',
    detail: 'The row has neither an MMSI nor an ENI: give one of them',
  }
}

function figureRefusal(cells: readonly Cell[], layout: Layout): Refusal | undefined {
  for (const field of Object.keys(FIGURES) as FigureField[]) {
    const index = layout.columns[field]
    const cell = cellAt(cells, index)
    const figure: Figure = field === 'cog_deg' ? courseFigure(layout) : FIGURES[field]
    if (figureOf(cell, figure) !== REFUSED) continue
    const column = nameOfColumn(layout, index, field)
    if (numberOf(cell) === REFUSED) {
      return {
        reason: 'number-unreadable',
        detail: `${column} ${quoted(cell)} is not a number: write it in decimal, with a point`,
      }
    }
    return {
      reason: 'figure-out-of-range',
      detail: `${column} ${quoted(cell)} is out of its range: it is ${rangeText(figure)}`,
    }
  }
  return undefined
}

const rangeText = ({ least, most }: Figure): string =>
  most === Infinity ? `${least} or more` : `${least} to ${most}`

/** How courses are read: some rows of one publication hold negative ones. */
export const courseFigure = ({ publication }: Layout): Figure =>
  publication === 'marinecadastre' ? WRAPPED_COURSE : FIGURES.cog_deg

/** Whether a cell is a loading, or empty. */
export function isLoadingKnown(cell: Cell): boolean {
  const text = textOf(cell)?.toLowerCase()
  return text === undefined || text === 'laden' || text === 'empty'
}

/**
 * The first reason for which a row is not a report: time, vessel, figures, loading, speed.
 * Called for rows that are known to have one, so that the usual row does not pay for it.
 */
export function refusalOf(cells: readonly Cell[], layout: Layout): Refusal {
  const { columns } = layout
  const earlier =
    timeRefusal(cellAt(cells, columns.time), layout) ??
    vesselRefusal(cells, layout) ??
    figureRefusal(cells, layout)
  if (earlier) return earlier
  const loading = cellAt(cells, columns.loading)
  if (!isLoadingKnown(loading)) {
    return { reason: 'loading-unknown', detail: `loading ${quoted(loading)} is neither laden nor empty` }
  }
  return {
    reason: 'speed-not-available',
    detail: 'The speed over ground is empty or marked as not available',
  }
}
