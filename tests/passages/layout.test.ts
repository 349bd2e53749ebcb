import { expect, test } from 'vitest'
import type { Field } from '../../src/passages/columns.ts'
import { type Layout, layoutOf } from '../../src/passages/layout.ts'

const LEGACY_US =
  'MMSI,BaseDateTime,LAT,LON,SOG,COG,Heading,VesselName,IMO,CallSign,VesselType,Status,Length,Width,Draft,Cargo,TransceiverClass'
const NEWER_US =
  'mmsi,base_date_time,longitude,latitude,sog,cog,heading,vessel_name,imo,call_sign,vessel_type,status,length,width,draft,cargo,transceiver'
const DANISH =
  '# Timestamp,Type of mobile,MMSI,Latitude,Longitude,Navigational status,ROT,SOG,COG,Heading,IMO,Callsign,Name,Ship type,Cargo type,Width,Length,Type of position fixing device,Draught,Destination,ETA,Data source type,A,B,C,D'
const NORWEGIAN = 'mmsi;lon;lat;date_time_utc;sog;cog;true_heading;nav_status;rot;message_nr;source'

function read(header: string, delimiter = ','): Layout {
  const { layout, errors } = layoutOf(header.split(delimiter), 1)
  expect(errors).toBeUndefined()
  return layout!
}

const found = ({ columns }: Layout) =>
  Object.fromEntries(Object.entries(columns).filter(([, index]) => index >= 0))

const US = {
  mmsi: 0,
  time: 1,
  lat: 2,
  lon: 3,
  sog_kn: 4,
  cog_deg: 5,
  heading_deg: 6,
  vessel_name: 7,
  ship_type: 10,
  nav_status: 11,
  length_m: 12,
  beam_m: 13,
  draught_m: 14,
  type_of_mobile: 16,
}

test('the older US layout: the ship type is the vessel type, not the cargo', () => {
  const layout = read(LEGACY_US)
  expect(found(layout)).toEqual(US)
  expect(layout.ignoredColumns).toEqual(['IMO', 'CallSign', 'Cargo'])
  expect(layout).toMatchObject({ isZoneless: true, isDayFirst: false, publication: 'marinecadastre' })
})

test('the newer US layout has the longitude first', () => {
  const layout = read(NEWER_US)
  expect(found(layout)).toEqual({ ...US, lon: 2, lat: 3 })
  expect(layout).toMatchObject({ isZoneless: true, isDayFirst: false })
})

test('files before 2018 have no transceiver class, and some misspell it', () => {
  expect(read(LEGACY_US.replace(',TransceiverClass', '')).columns.type_of_mobile).toBe(-1)
  expect(read(LEGACY_US.replace('Transceiver', 'Transciever')).columns.type_of_mobile).toBe(16)
})

test('the Danish layout has the width first, and days before months', () => {
  const layout = read(DANISH)
  expect(found(layout)).toEqual({
    time: 0,
    type_of_mobile: 1,
    mmsi: 2,
    lat: 3,
    lon: 4,
    nav_status: 5,
    sog_kn: 7,
    cog_deg: 8,
    heading_deg: 9,
    vessel_name: 12,
    ship_type: 13,
    beam_m: 15,
    length_m: 16,
    draught_m: 18,
  })
  expect(layout).toMatchObject({ isZoneless: true, isDayFirst: true })
  expect(layout.ignoredColumns).toContain('Cargo type')
})

test('the Norwegian layout', () => {
  const layout = read(NORWEGIAN, ';')
  expect(found(layout)).toEqual({
    mmsi: 0,
    lon: 1,
    lat: 2,
    time: 3,
    sog_kn: 4,
    cog_deg: 5,
    heading_deg: 6,
    nav_status: 7,
  })
  expect(layout).toMatchObject({ isZoneless: true, isDayFirst: false })
  expect(layout.ignoredColumns).toEqual(['rot', 'message_nr', 'source'])
})

test('our own names, with an ENI in place of an MMSI; times need a zone', () => {
  const layout = read('time,eni,lat,lon,sog_kn,vessel_class,loading,current_mps')
  expect(layout).toMatchObject({ isZoneless: false, isDayFirst: false, publication: undefined })
  expect(layout.columns).toMatchObject({ eni: 1, mmsi: -1, vessel_class: 5, loading: 6, current_mps: 7 })
})

test('ignored columns are listed in order, once, without empty names', () => {
  expect(read('b,time,a,mmsi,lat,lon,sog,b,,__proto__,constructor').ignoredColumns).toEqual([
    'b',
    'a',
    '__proto__',
    'constructor',
  ])
})

const faults = (header: string, line = 1) =>
  layoutOf(header.split(','), line).errors?.map(({ parameter, code, line: at }) => [parameter, code, at])

test('everything that a header lacks is told at once, with the names that would do', () => {
  expect(faults('a,b', 3)).toEqual([
    ['time', 'required', 3],
    ['lat', 'required', 3],
    ['lon', 'required', 3],
    ['sog_kn', 'required', 3],
    ['mmsi', 'required', 3],
  ])
  const [speed] = layoutOf(['time', 'mmsi', 'lat', 'lon', 'speed'], 1).errors!
  expect(speed).toMatchObject({ parameter: 'sog_kn', code: 'required', line: 1 })
  expect(speed!.allowed).toContain('sog')
  expect(speed!.detail).toContain('sog_knots')
})

test('two columns for one field clash, whatever they are called', () => {
  expect(faults('time,mmsi,lat,latitude,lon,sog,SOG,Timestamp')).toEqual([
    ['latitude', 'clash', 1],
    ['SOG', 'clash', 1],
    ['Timestamp', 'clash', 1],
  ])
})

test('a field cannot be named after what every object has', () => {
  const columns: Partial<Record<Field, number>> = read('__proto__,time,mmsi,lat,lon,sog').columns
  expect(Object.keys(columns)).toHaveLength(22)
  expect(({} as Record<string, unknown>)['0']).toBeUndefined()
})
