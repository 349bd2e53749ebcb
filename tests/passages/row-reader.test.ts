import { expect, test } from 'vitest'
import { layoutOf } from '../../src/passages/layout.ts'
import type { LogRow, PositionReport, RejectedRow } from '../../src/passages/position-report.ts'
import { reportOfCells, reportOfObject } from '../../src/passages/row-reader.ts'

const KNOT = 1852 / 3600 // m/s, BIPM

function rowOf(header: string, row: string, delimiter = ','): LogRow {
  const { layout } = layoutOf(header.split(delimiter), 1)
  return reportOfCells(row.split(delimiter), layout!, 7)
}

const report = (header: string, row: string, delimiter?: string): PositionReport => {
  const { report: found, rejected } = rowOf(header, row, delimiter)
  expect(rejected).toBeUndefined()
  return found!
}

const US =
  'MMSI,BaseDateTime,LAT,LON,SOG,COG,Heading,VesselName,IMO,CallSign,VesselType,Status,Length,Width,Draft,Cargo,TransceiverClass'

test('a row of the older US layout', () => {
  const row =
    '299000009,2022-01-03T00:00:03,29.57679,-90.60568,6.6,159.2,157.0,SAINT EXAMPLE,IMO0000000,WDX0001,31.0,12.0,26.0,10.0,3.1,52.0,A'
  expect(report(US, row)).toEqual({
    line: 7,
    time: 1641168003,
    vesselKey: 'mmsi:299000009',
    mmsi: '299000009',
    eni: undefined,
    name: 'SAINT EXAMPLE',
    lon: -90.60568,
    lat: 29.57679,
    speed: 6.6 * KNOT,
    course: 159.2,
    heading: 157,
    navigationStatus: 12,
    shipType: 31,
    length: 26,
    beam: 10,
    draught: 3.1,
    mobile: 'vessel',
    vesselClass: undefined,
    loading: undefined,
    convoyLength: NaN,
    convoyBeam: NaN,
    convoyDraught: NaN,
    waterLevel: NaN,
    current: NaN,
  })
})

test('a row of the newer US layout, and one of 2017 with a status in words', () => {
  const newer =
    'mmsi,base_date_time,longitude,latitude,sog,cog,heading,vessel_name,imo,call_sign,vessel_type,status,length,width,draft,cargo,transceiver'
  expect(report(newer, '299000009,2024-07-12 00:00:03,-90.6,29.5,0.0,360.0,511,,,,,,0,0,0,,B')).toMatchObject(
    { time: 1720742403, lon: -90.6, lat: 29.5, speed: 0, course: NaN, heading: NaN, length: NaN },
  )
  const old = US.replace(',TransceiverClass', '')
  expect(
    report(old, '299000009,2017-01-03T00:00:03,29.5,-90.6,3.5,-55.4,358.0,X,,,1004,moored,,,,'),
  ).toMatchObject({ shipType: 70, navigationStatus: 5, course: -55.4 + 409.6 })
})

test('a row of the Danish layout, and a buoy that has no speed', () => {
  const header =
    '# Timestamp,Type of mobile,MMSI,Latitude,Longitude,Navigational status,ROT,SOG,COG,Heading,IMO,Callsign,Name,Ship type,Cargo type,Width,Length,Type of position fixing device,Draught,Destination,ETA,Data source type'
  expect(
    report(
      header,
      '29/02/2024 12:34:56,Class A,219000001,55.921028,17.320418,Constrained by her draught,0.0,12.5,255.5,256,Unknown,Unknown,EXEMPEL,Tanker,,20,130,GPS,8.6,,,AIS',
    ),
  ).toMatchObject({
    time: 1709210096,
    lat: 55.921028,
    lon: 17.320418,
    speed: 12.5 * KNOT,
    navigationStatus: 4,
    shipType: 80,
    beam: 20,
    length: 130,
    draught: 8.6,
    name: 'EXEMPEL',
    mobile: 'vessel',
  })
  expect(
    report(
      header,
      '01/06/2018 00:00:00,AtoN,992190001,91.0,181.0,Unknown value,,,,,,,,Undefined,,,,Surveyed, ,, ,AIS',
    ),
  ).toMatchObject({
    mobile: 'aid-to-navigation',
    speed: NaN,
    lat: NaN,
    lon: NaN,
    draught: NaN,
    shipType: NaN,
  })
})

test('a row of the Norwegian layout', () => {
  const header = 'mmsi;lon;lat;date_time_utc;sog;cog;true_heading;nav_status;rot;message_nr;source'
  expect(report(header, '257000001;10.5;59.1;2024-07-12 00:00:03;7.2;180.5;181;0;0;1;g', ';')).toMatchObject({
    time: 1720742403,
    lon: 10.5,
    lat: 59.1,
    heading: 181,
  })
})

const OWN =
  'time,mmsi,eni,lat,lon,sog_kn,cog_deg,vessel_class,loading,convoy_length_m,convoy_beam_m,convoy_draught_m,water_level_m,current_mps'
const OWN_ROW = [
  '2022-01-03T00:00:03Z',
  '',
  '2325678',
  '52.1',
  '5.1',
  '9',
  '10',
  'cemt-va',
  'laden',
  '110',
  '11.4',
  '2.8',
  '-0.5',
  '0.7',
]

/** A row of ours with other cells in place of some. */
function own(changes: Readonly<Record<string, string>> = {}): LogRow {
  const names = OWN.split(',')
  const row = OWN_ROW.map((cell, index) => changes[names[index]!] ?? cell)
  return reportOfCells(row, layoutOf(names, 1).layout!, 7)
}

test('a row of our own layout, by its ENI', () => {
  expect(own().report).toMatchObject({
    vesselKey: 'eni:02325678',
    mmsi: undefined,
    eni: '02325678',
    vesselClass: 'cemt-va',
    loading: 'laden',
    convoyLength: 110,
    convoyBeam: 11.4,
    convoyDraught: 2.8,
    waterLevel: -0.5,
    current: 0.7,
  })
  expect(own({ mmsi: '299000001' }).report).toMatchObject({ vesselKey: 'mmsi:299000001', eni: '02325678' })
  expect(own({ mmsi: '12345' }).report).toMatchObject({ vesselKey: 'eni:02325678', mmsi: undefined })
  expect(own({ mmsi: '299000001', eni: 'x' }).report).toMatchObject({ mmsi: '299000001', eni: undefined })
})

test('a convoy of zeros is none', () => {
  const found = own({ convoy_length_m: '0', convoy_beam_m: '0.0', convoy_draught_m: '' }).report
  expect(found).toMatchObject({ convoyLength: NaN, convoyBeam: NaN, convoyDraught: NaN })
})

test('a position of zeros is none, one on the equator is one', () => {
  expect(own({ lat: '0', lon: '0.0' }).report).toMatchObject({ lat: NaN, lon: NaN })
  expect(own({ lat: '0', lon: '9' }).report).toMatchObject({ lat: 0, lon: 9 })
  expect(own({ lat: '120' }).report).toMatchObject({ lat: NaN, lon: 5.1 })
})

test.each([
  [{ time: '' }, 'time-missing'],
  [{ time: 'Unknown' }, 'time-missing'],
  [{ time: 'yesterday' }, 'time-unreadable'],
  [{ time: '2022-02-30T00:00:03Z' }, 'time-unreadable'],
  [{ time: '2022-01-03T00:00:03' }, 'time-without-zone'],
  [{ eni: '' }, 'vessel-not-identified'],
  [{ eni: '12' }, 'eni-unreadable'],
  [{ mmsi: '12345678', eni: '' }, 'mmsi-unreadable'],
  [{ lat: '52,1' }, 'number-unreadable'],
  [{ lon: '5°6' }, 'number-unreadable'],
  [{ sog_kn: '0x10' }, 'number-unreadable'],
  [{ sog_kn: 'Infinity' }, 'number-unreadable'],
  [{ sog_kn: '-0.1' }, 'figure-out-of-range'],
  [{ sog_kn: '' }, 'speed-not-available'],
  [{ sog_kn: '102.3' }, 'speed-not-available'],
  [{ sog_kn: '1e308' }, 'speed-not-available'],
  [{ cog_deg: '-55.4' }, 'figure-out-of-range'],
  [{ loading: 'half' }, 'loading-unknown'],
  [{ convoy_length_m: '501' }, 'figure-out-of-range'],
  [{ convoy_length_m: '-1' }, 'figure-out-of-range'],
  [{ convoy_beam_m: '100.5' }, 'figure-out-of-range'],
  [{ convoy_draught_m: '31' }, 'figure-out-of-range'],
  [{ convoy_draught_m: 'x' }, 'number-unreadable'],
  [{ water_level_m: '50.1' }, 'figure-out-of-range'],
  [{ water_level_m: '-51' }, 'figure-out-of-range'],
  [{ current_mps: '5.1' }, 'figure-out-of-range'],
  [{ current_mps: '1\0' }, 'number-unreadable'],
])('a row with %j is rejected as %s', (changes, reason) => {
  expect(own(changes as Record<string, string>).rejected?.reason).toBe(reason)
})

test('a refusal names the column and what stands there, cut short, and keeps what could be read', () => {
  const { rejected } = own({ mmsi: '299000001', water_level_m: `"${'x'.repeat(60_000)}` })
  expect(rejected).toEqual({
    line: 7,
    reason: 'number-unreadable',
    detail: `water_level_m "\\"${'x'.repeat(39)}" is not a number: write it in decimal, with a point`,
    time: 1641168003,
    mmsi: '299000001',
    eni: '02325678',
    name: undefined,
  } satisfies RejectedRow)
  expect(own({ current_mps: '9' }).rejected?.detail).toBe(
    'current_mps "9" is out of its range: it is -5 to 5',
  )
})

test('a row needs as many cells as the header; empty ones beyond it are let pass', () => {
  const header = 'time,mmsi,lat,lon,sog_kn,vessel_name'
  const row = '2022-01-03T00:00:03Z,299000001,52.1,5.1,9,A'
  expect(report(header, `${row},, `).name).toBe('A')
  expect(rowOf(header, `${row},,B`).rejected).toMatchObject({ reason: 'cells-too-many', mmsi: '299000001' })
  expect(rowOf(header, '2022-01-03T00:00:03Z,299000001,52.1').rejected).toMatchObject({
    reason: 'cells-missing',
    detail: 'The row has 3 cells where the header has 6',
    time: 1641168003,
    mmsi: '299000001',
  })
})

function object(value: unknown): { row: LogRow; unknown: string[] } {
  const unknown: string[] = []
  return { row: reportOfObject(value, 4, (key) => unknown.push(key)), unknown }
}

const PLAIN = { time: '2022-01-03T00:00:03Z', mmsi: '299000001', lat: 52.1, lon: 5.1, sog_kn: 9 }

test('an object has the same names, in either letter case, with numbers or their text', () => {
  const expected = { line: 4, time: 1641168003, mmsi: '299000001', lat: 52.1, lon: 5.1, speed: 9 * KNOT }
  expect(object(PLAIN).row.report).toMatchObject(expected)
  const { row, unknown } = object({
    MMSI: 299000001,
    BaseDateTime: '2022-01-03T00:00:03',
    LAT: '52.1',
    Longitude: 5.1,
    sog: '9.0',
    rot: null,
    length_m: null,
    Length: 110,
  })
  expect(row.report).toMatchObject({ ...expected, length: 110 })
  expect(unknown).toEqual(['rot'])
})

test('objects and rows make reports of the same fields in the same order', () => {
  expect(Object.keys(object(PLAIN).row.report!)).toEqual(Object.keys(own().report!))
})

test.each([
  [{ ...PLAIN, time: '2022-01-03T00:00:03' }, 'time-without-zone'],
  [{ ...PLAIN, time: 1641168003 }, 'time-unreadable'],
  [{ ...PLAIN, time: null }, 'time-missing'],
  [{ ...PLAIN, mmsi: undefined }, 'vessel-not-identified'],
  [{ ...PLAIN, mmsi: 0 }, 'vessel-not-identified'],
  [{ ...PLAIN, mmsi: [299000001] }, 'mmsi-unreadable'],
  [{ ...PLAIN, sog_kn: true }, 'number-unreadable'],
  [{ ...PLAIN, sog_kn: [9] }, 'number-unreadable'],
  [{ ...PLAIN, sog_kn: {} }, 'number-unreadable'],
  [{ ...PLAIN, sog_kn: null }, 'speed-not-available'],
  [{ ...PLAIN, lat: '52,1' }, 'number-unreadable'],
  [{ ...PLAIN, SOG: 9 }, 'field-twice'],
  [{}, 'time-missing'],
  [[PLAIN], 'not-json'],
  ['text', 'not-json'],
  [5, 'not-json'],
  [null, 'not-json'],
])('%j is rejected as %s', (value, reason) => {
  expect(object(JSON.parse(JSON.stringify(value))).row.rejected?.reason).toBe(reason)
})

test('keys that every object has are unknown ones', () => {
  const text = `{"__proto__":{"mmsi":"1"},"constructor":1,"toString":2,${JSON.stringify(PLAIN).slice(1)}`
  const { row, unknown } = object(JSON.parse(text))
  expect(row.report?.mmsi).toBe('299000001')
  expect(unknown).toEqual(['__proto__', 'constructor', 'toString'])
  expect(({} as Record<string, unknown>)['mmsi']).toBeUndefined()
})
