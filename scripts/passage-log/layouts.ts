import type { Mobile } from '../../src/passages/position-report.ts'
import { NOT_AVAILABLE, type Row } from './row.ts'

type Cell = string | number | undefined
type Column = readonly [name: string, cell: (row: Row) => Cell]

const NO_TIME = 'yesterday noon'

/** ISO 8601 in UTC, with this between date and time and this at the end. */
const timeOf =
  (separator: string, zone: string) =>
  ({ time }: Row): string =>
    time === undefined
      ? NO_TIME
      : `${new Date(time * 1000).toISOString().slice(0, 19).replace('T', separator)}${zone}`

/** `DD/MM/YYYY HH:MM:SS` in UTC. */
function danishTime(row: Row): string {
  const [date = '', time = ''] = timeOf(' ', '')(row).split(' ')
  return row.time === undefined ? NO_TIME : `${date.split('-').reverse().join('/')} ${time}`
}

const isVessel = ({ mobile }: Row): boolean => mobile === 'vessel'

const fixed =
  (digits: number, value: (row: Row) => number | undefined) =>
  (row: Row): Cell =>
    value(row)?.toFixed(digits)

/** Of a vessel only; 0 is sent for what is not known and left out here. */
const ofVessel =
  (value: (row: Row) => Cell) =>
  (row: Row): Cell =>
    isVessel(row) ? value(row) : undefined

const mmsi = ({ ship }: Row): string => ship.mmsi
const name = ({ ship }: Row): string => ship.name
const shipType = ofVessel(({ ship }) => ship.type)
const length = ofVessel(({ ship }) => ship.length)
const beam = ofVessel(({ ship }) => ship.beam)
const draught = ofVessel(({ ship }) => ship.draught?.toFixed(1))
const status = ofVessel(({ navigationStatus }) => navigationStatus)
const transceiver = ofVessel(({ ship }) => ship.transceiver)
const nothing = (): undefined => undefined
// a base station and a buoy have a position and no motion
const lat = fixed(5, (row) => row.lat)
const lon = fixed(5, (row) => row.lon)
const speed = ofVessel(fixed(1, (row) => row.speed))
const course = ofVessel(fixed(1, (row) => row.course))
const heading = ofVessel((row) => row.heading)

/** Columns of the service's own, which any layout may have at its end. */
const OWN: readonly Column[] = [
  ['convoy_length_m', ({ ship }) => ship.convoy?.length],
  ['convoy_beam_m', ({ ship }) => ship.convoy?.beam],
  ['convoy_draught_m', ({ ship }) => ship.convoy?.draught],
  ['current_mps', ({ current }) => current],
]

const DANISH_MOBILE: Readonly<Record<Mobile, string>> = {
  vessel: 'Class A',
  'base-station': 'Base Station',
  'aid-to-navigation': 'AtoN',
  aircraft: 'SAR Airborne',
  'distress-beacon': 'Search and Rescue Transponder',
}
const mobile = ({ mobile: kind, ship }: Row): string =>
  kind === 'vessel' ? `Class ${ship.transceiver}` : DANISH_MOBILE[kind]

const DANISH_STATUS: Readonly<Record<number, string>> = {
  0: 'Under way using engine',
  1: 'At anchor',
  5: 'Moored',
}
const DANISH_TYPE: Readonly<Record<number, string>> = {
  31: 'Towing',
  37: 'Pleasure',
  52: 'Tug',
  60: 'Passenger',
  70: 'Cargo',
  79: 'Cargo',
  80: 'Tanker',
}

/** An empty cell where the sentinel of AIS stands for a course or a heading that is not known, as Denmark publishes it. */
const unlessAbsent =
  (sentinel: number, value: (row: Row) => number) =>
  (row: Row): Cell =>
    value(row) === sentinel ? undefined : value(row)

const danishText = (table: Readonly<Record<number, string>>, value: number | undefined, otherwise: string) =>
  value === undefined ? otherwise : (table[value] ?? otherwise)

export const LAYOUTS = {
  plain: [
    ['time', timeOf('T', 'Z')],
    ['mmsi', mmsi],
    ['vessel_name', name],
    ['lat', lat],
    ['lon', lon],
    ['sog_kn', speed],
    ['cog_deg', course],
    ['heading_deg', heading],
    ['nav_status', status],
    ['ship_type', shipType],
    ['length_m', length],
    ['beam_m', beam],
    ['draught_m', draught],
    ['type_of_mobile', mobile],
    ...OWN,
  ],
  // MarineCadastre up to 2024: times in UTC without a zone
  'us-legacy': [
    ['MMSI', mmsi],
    ['BaseDateTime', timeOf('T', '')],
    ['LAT', lat],
    ['LON', lon],
    ['SOG', speed],
    ['COG', course],
    ['Heading', heading],
    ['VesselName', name],
    ['IMO', nothing],
    ['CallSign', nothing],
    ['VesselType', shipType],
    ['Status', status],
    ['Length', length],
    ['Width', beam],
    ['Draft', draught],
    ['Cargo', shipType],
    ['TransceiverClass', transceiver],
    ...OWN,
  ],
  // MarineCadastre from 2024 on: longitude first
  'us-newer': [
    ['mmsi', mmsi],
    ['base_date_time', timeOf(' ', '')],
    ['longitude', lon],
    ['latitude', lat],
    ['sog', speed],
    ['cog', course],
    ['heading', heading],
    ['vessel_name', name],
    ['imo', nothing],
    ['call_sign', nothing],
    ['vessel_type', shipType],
    ['status', status],
    ['length', length],
    ['width', beam],
    ['draft', draught],
    ['cargo', shipType],
    ['transceiver', transceiver],
    ...OWN,
  ],
  // Danish Maritime Authority: texts for codes, the width before the length
  danish: [
    ['# Timestamp', danishTime],
    ['Type of mobile', mobile],
    ['MMSI', mmsi],
    ['Latitude', lat],
    ['Longitude', lon],
    [
      'Navigational status',
      (row) => danishText(DANISH_STATUS, isVessel(row) ? row.navigationStatus : undefined, 'Unknown value'),
    ],
    ['ROT', nothing],
    ['SOG', speed],
    ['COG', ofVessel(unlessAbsent(NOT_AVAILABLE.course, (row) => row.course))],
    ['Heading', ofVessel(unlessAbsent(NOT_AVAILABLE.heading, (row) => row.heading))],
    ['IMO', () => 'Unknown'],
    ['Callsign', () => 'Unknown'],
    ['Name', name],
    ['Ship type', (row) => danishText(DANISH_TYPE, isVessel(row) ? row.ship.type : undefined, 'Undefined')],
    ['Cargo type', nothing],
    ['Width', beam],
    ['Length', length],
    ['Type of position fixing device', () => 'GPS'],
    ['Draught', draught],
    ['Destination', () => 'Unknown'],
    ['ETA', nothing],
    ['Data source type', () => 'AIS'],
    ['A', nothing],
    ['B', nothing],
    ['C', nothing],
    ['D', nothing],
    ...OWN,
  ],
} as const satisfies Readonly<Record<string, readonly Column[]>>

export type Layout = keyof typeof LAYOUTS

/** A log as CSV; nothing in it needs quotes. */
export function csvOf(rows: readonly Row[], layout: Layout): string {
  const columns: readonly Column[] = LAYOUTS[layout]
  const lines = rows.map((row) => columns.map(([, cell]) => cell(row) ?? '').join(','))
  return [columns.map(([head]) => head).join(','), ...lines, ''].join('\n')
}

const TEXTS = new Set(['time', 'mmsi', 'vessel_name', 'type_of_mobile'])

/** A log as lines of JSON, in the names of the plain layout: numbers as numbers, nothing where a cell is empty. */
export function ndjsonOf(rows: readonly Row[]): string {
  const columns: readonly Column[] = LAYOUTS.plain
  return rows
    .map((row) => {
      const given = columns.flatMap(([head, cell]) => {
        const value = cell(row)
        return value === undefined ? [] : [[head, TEXTS.has(head) ? String(value) : Number(value)] as const]
      })
      return `${JSON.stringify(Object.fromEntries(given))}\n`
    })
    .join('')
}
