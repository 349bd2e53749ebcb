import { expect, test } from 'vitest'
import { columnOf, COLUMNS, FIELDS, publicationOf } from '../../src/passages/columns.ts'

test('fields are those of the contract, in its order, each once', () => {
  expect(COLUMNS.map(({ field }) => field).join(' ')).toBe(
    'time mmsi eni vessel_name lat lon sog_kn cog_deg heading_deg nav_status ship_type length_m beam_m draught_m type_of_mobile vessel_class loading convoy_length_m convoy_beam_m convoy_draught_m water_level_m current_mps',
  )
  expect(FIELDS).toHaveLength(22)
})

test('every field is recognised by its own name first, and no name belongs to two', () => {
  for (const { field, names } of COLUMNS) expect(names[0]).toBe(field)
  const names = COLUMNS.flatMap((column) => column.names)
  expect(new Set(names).size).toBe(names.length)
  expect(names).toEqual(names.map((name) => name.toLowerCase()))
})

test('what a log must have is time, position and speed; a number for the vessel is told apart', () => {
  expect(COLUMNS.filter(({ required }) => required).map(({ field }) => field)).toEqual([
    'time',
    'lat',
    'lon',
    'sog_kn',
  ])
})

test.each([
  ['BaseDateTime', 'time'],
  ['base_date_time', 'time'],
  ['# Timestamp', 'time'],
  ['date_time_utc', 'time'],
  [' LAT ', 'lat'],
  ['Longitude', 'lon'],
  ['Width', 'beam_m'],
  ['Draft', 'draught_m'],
  ['Draught', 'draught_m'],
  ['VesselType', 'ship_type'],
  ['Ship type', 'ship_type'],
  ['TranscieverClass', 'type_of_mobile'],
  ['Type of mobile', 'type_of_mobile'],
  ['true_heading', 'heading_deg'],
])('%s is %s', (name, field) => {
  expect(columnOf(name)?.field).toBe(field)
})

// a speed without a unit may be in anything; the transmitted code is not what the vessel file says
test.each([
  'speed',
  'Cargo',
  'Cargo type',
  'course',
  'beam',
  'IMO',
  'A',
  '',
  '__proto__',
  'constructor',
  'x'.repeat(70_000),
])('a column %s is not taken for anything', (name) => {
  expect(columnOf(name)).toBeUndefined()
})

test('only names of publications make times without a zone UTC', () => {
  const publications = [
    'BaseDateTime',
    'base_date_time',
    '# Timestamp',
    'date_time_utc',
    'time',
    'Timestamp',
  ].map((name) => publicationOf(columnOf(name)!, name))
  expect(publications).toEqual([
    'marinecadastre',
    'marinecadastre',
    'danish',
    'norwegian',
    undefined,
    undefined,
  ])
})
