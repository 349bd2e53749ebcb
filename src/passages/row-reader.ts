import type { Loading } from '../domain/vessel.ts'
import { mobileInWords, navigationStatusOf, shipTypeOf } from './ais-values.ts'
import { type Cell, detachedText, nameOf, REFUSED, textOf } from './cells.ts'
import { columnOf, FIELDS, type Field, type Publication, publicationOf } from './columns.ts'
import { type Figure, figureOf, FIGURES } from './figures.ts'
import { eniOf, mmsiOf, mobileOfMmsi, readOf } from './identity.ts'
import { type Layout, layoutWith } from './layout.ts'
import type { LogRow, Mobile, PositionReport } from './position-report.ts'
import {
  cellAt,
  courseFigure,
  isLoadingKnown,
  type Refusal,
  refusalOf,
  rejectedRow,
  timeOf,
  unreadableRow,
} from './rejection.ts'

function figureAt(cells: readonly Cell[], index: number, figure: Figure): number {
  return index < 0 ? NaN : figureOf(cells[index] ?? '', figure)
}

function loadingOf(cell: Cell): Loading | undefined {
  const text = textOf(cell)?.toLowerCase()
  return text === 'laden' || text === 'empty' ? text : undefined
}

/** Keys by MMSI, so that rows of a vessel share one: what is looked up by it need not read its letters each time. */
const KEYS = new Map<string, string>()
const MOST_KEYS = 20_000

function keyOfMmsi(mmsi: string): string {
  const known = KEYS.get(mmsi)
  if (known !== undefined) return known
  if (KEYS.size >= MOST_KEYS) KEYS.clear()
  const key = `mmsi:${mmsi}`
  KEYS.set(detachedText(mmsi), key)
  return key
}

/** What tells vessels apart; empty when neither number can be used. */
function keyOf(mmsi: string | undefined, eni: string | undefined): string {
  if (mmsi) return keyOfMmsi(mmsi)
  return eni ? `eni:${eni}` : ''
}

/** What the words of the row, else the MMSI, say to have sent it. */
function mobileOf(words: Cell, mmsi: string | undefined): Mobile {
  const mobile = mobileInWords(words)
  return mobile === 'vessel' && mmsi ? mobileOfMmsi(mmsi) : mobile
}

function vesselClassOf(cell: Cell): string | undefined {
  const text = textOf(cell)
  return text === undefined ? undefined : detachedText(text)
}

/** The report of a row, with `REFUSED` in place of figures that cannot be read. */
function reportOf(cells: readonly Cell[], layout: Layout, line: number): PositionReport {
  const { columns } = layout
  const mmsi = mmsiOf(cellAt(cells, columns.mmsi))
  const eni = columns.eni < 0 ? undefined : eniOf(cellAt(cells, columns.eni))
  const lon = figureAt(cells, columns.lon, FIGURES.lon)
  const lat = figureAt(cells, columns.lat, FIGURES.lat)
  // a position of zeros is what a receiver without a fix sends, not a place in the Gulf of Guinea
  const isNowhere = lon === 0 && lat === 0
  return {
    line,
    time: timeOf(cellAt(cells, columns.time), layout),
    vesselKey: keyOf(mmsi, eni),
    mmsi: readOf(mmsi),
    eni: readOf(eni),
    name: nameOf(cellAt(cells, columns.vessel_name)),
    lon: isNowhere ? NaN : lon,
    lat: isNowhere ? NaN : lat,
    speed: figureAt(cells, columns.sog_kn, FIGURES.sog_kn),
    course: figureAt(cells, columns.cog_deg, courseFigure(layout)),
    heading: figureAt(cells, columns.heading_deg, FIGURES.heading_deg),
    navigationStatus: navigationStatusOf(cellAt(cells, columns.nav_status)),
    shipType: shipTypeOf(cellAt(cells, columns.ship_type)),
    length: figureAt(cells, columns.length_m, FIGURES.length_m),
    beam: figureAt(cells, columns.beam_m, FIGURES.beam_m),
    draught: figureAt(cells, columns.draught_m, FIGURES.draught_m),
    mobile: mobileOf(cellAt(cells, columns.type_of_mobile), mmsi),
    vesselClass: vesselClassOf(cellAt(cells, columns.vessel_class)),
    loading: loadingOf(cellAt(cells, columns.loading)),
    convoyLength: figureAt(cells, columns.convoy_length_m, FIGURES.convoy_length_m),
    convoyBeam: figureAt(cells, columns.convoy_beam_m, FIGURES.convoy_beam_m),
    convoyDraught: figureAt(cells, columns.convoy_draught_m, FIGURES.convoy_draught_m),
    waterLevel: figureAt(cells, columns.water_level_m, FIGURES.water_level_m),
    current: figureAt(cells, columns.current_mps, FIGURES.current_mps),
  }
}

const isMotionRead = ({ lon, lat, speed, course, heading }: PositionReport): boolean =>
  lon !== REFUSED && lat !== REFUSED && speed !== REFUSED && course !== REFUSED && heading !== REFUSED

const areSizesRead = ({ length, beam, draught }: PositionReport): boolean =>
  length !== REFUSED && beam !== REFUSED && draught !== REFUSED

const areOursRead = (report: PositionReport): boolean =>
  report.convoyLength !== REFUSED &&
  report.convoyBeam !== REFUSED &&
  report.convoyDraught !== REFUSED &&
  report.waterLevel !== REFUSED &&
  report.current !== REFUSED

/** Whether nothing is wrong with a report. What is no vessel need not have a speed. */
function isSound(report: PositionReport): boolean {
  const { time, vesselKey, speed, mobile } = report
  if (Number.isNaN(time) || vesselKey === '') return false
  if (Number.isNaN(speed) && mobile === 'vessel') return false
  return isMotionRead(report) && areSizesRead(report) && areOursRead(report)
}

function rowOf(cells: readonly Cell[], layout: Layout, line: number): LogRow {
  const report = reportOf(cells, layout, line)
  const { loading } = layout.columns
  if (isSound(report) && (loading < 0 || isLoadingKnown(cellAt(cells, loading)))) return { report }
  return { rejected: rejectedRow(cells, layout, line, refusalOf(cells, layout)) }
}

/** What is wrong with the number of cells; nothing when those beyond the header are empty. */
function widthRefusal(cells: readonly Cell[], { names }: Layout): Refusal | undefined {
  const detail = `The row has ${cells.length} cells where the header has ${names.length}`
  if (cells.length < names.length) return { reason: 'cells-missing', detail }
  const isPadded = cells.slice(names.length).every((cell) => textOf(cell) === undefined)
  return isPadded ? undefined : { reason: 'cells-too-many', detail }
}

/**
 * The report in a row of a log, or why it is none.
 *
 * @param cells  in the order of the header
 * @param line  physical line of the log, from 1
 */
export function reportOfCells(cells: readonly Cell[], layout: Layout, line: number): LogRow {
  if (cells.length !== layout.names.length) {
    const refusal = widthRefusal(cells, layout)
    if (refusal) return { rejected: rejectedRow(cells, layout, line, refusal) }
  }
  return rowOf(cells, layout, line)
}

const FIELD_INDEX = Object.fromEntries(FIELDS.map((field, index) => [field, index])) as Record<Field, number>

const objectLayout = (publication: Publication | undefined): Layout =>
  layoutWith(FIELD_INDEX, FIELDS, [], publication)

/** Layouts of objects: one for each way in which a key may say that times are written. */
const OBJECT_LAYOUT = objectLayout(undefined)
const PUBLISHED_LAYOUTS: Readonly<Record<Publication, Layout>> = {
  marinecadastre: objectLayout('marinecadastre'),
  danish: objectLayout('danish'),
  norwegian: objectLayout('norwegian'),
}

function cellOf(value: unknown): Cell {
  if (typeof value === 'string' || typeof value === 'number') return value
  return JSON.stringify(value)
}

/**
 * The report in an object with the names of a log as keys, or why it is none. A null is a missing value.
 *
 * @param value  as parsed from JSON
 * @param line  physical line of the log, from 1
 * @param onUnknownKey  told of each key that is not recognised
 */
export function reportOfObject(value: unknown, line: number, onUnknownKey: (key: string) => void): LogRow {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    return {
      rejected: unreadableRow(line, { reason: 'not-json', detail: 'The line is not a JSON object' }),
    }
  }
  const cells: Cell[] = FIELDS.map(() => '')
  let layout = OBJECT_LAYOUT
  let twice: Refusal | undefined
  for (const [key, item] of Object.entries(value) as [string, unknown][]) {
    const column = columnOf(key)
    if (!column) {
      onUnknownKey(key)
      continue
    }
    if (item === null) continue
    const index = FIELD_INDEX[column.field]
    if (cells[index] !== '') {
      twice ??= {
        reason: 'field-twice',
        detail: `${key} is a second key for ${column.field}; keep one of them`,
      }
    }
    cells[index] = cellOf(item)
    const publication = column.publications && publicationOf(column, key)
    if (publication) layout = PUBLISHED_LAYOUTS[publication]
  }
  return twice ? { rejected: rejectedRow(cells, layout, line, twice) } : rowOf(cells, layout, line)
}
