import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { lineString, point, pointToLineDistance } from '@turf/turf'
import { parse } from 'csv-parse/sync'
import { expect, test } from 'vitest'
import { buildService, linesOf, post, type Json } from '../support/service.ts'

/**
 * Open data: NOAA/USCG vessel traffic data, CC0; centre line of the U.S. Army Corps of Engineers, public domain; data from
 * the Danish Maritime Authority, used in accordance with the conditions for the use of Danish public data.
 */
const DATA = new URL('../../../shared/data/', import.meta.url)
const NAMES = existsSync(DATA) ? readdirSync(DATA) : []
const read = (name: string): string => readFileSync(new URL(name, DATA), 'utf8')

const FOOT = 0.3048 // m
/** Project width of this canal, 125 feet. */
const WIDTH = 125 * FOOT
/** A position is within the fairway up to one and a half times the distance to the bank and 25 m. */
const INSIDE = 1.5 * (WIDTH / 2) + 25
const KNOT = 1852 / 3600

interface CentreLine {
  readonly type: 'Feature'
  readonly id: string
  readonly geometry: { readonly coordinates: number[][] }
  readonly properties: Json & { readonly ctrl_depth_ft: number }
}

const centreLines = (): CentreLine[] =>
  NAMES.filter((name) => name.endsWith('.geojson')).flatMap(
    (name) => (JSON.parse(read(name)) as { features: CentreLine[] }).features,
  )

/** The service with the canal in its registry: what the data lack is its project width. */
async function withCanal() {
  const { app } = buildService()
  const features = centreLines().map((line) => ({
    ...line,
    properties: {
      ...line.properties,
      depth_m: line.properties.ctrl_depth_ft * FOOT,
      width_m: WIDTH,
      bank_distance_m: WIDTH / 2,
    },
  }))
  const reply = await post(app, '/v1/segments/import?unknown=keep', { type: 'FeatureCollection', features })
  expect(reply.statusCode).toBe(200)
  return app
}

async function checked(
  app: Awaited<ReturnType<typeof withCanal>>,
  name: string,
  query = '',
): Promise<Json[]> {
  const reply = await post(app, `/v1/passages/check?detail=reports${query}`, read(name), {
    'content-type': 'text/csv',
  })
  expect(reply.statusCode).toBe(200)
  return linesOf(reply.body)
}

const CANAL_DAY = 'ais_us_2022-01-03_giww_west.csv'

test.skipIf(!NAMES.includes(CANAL_DAY))(
  'a real day on a canal is placed as its distances say, and counts add up',
  async () => {
    const app = await withCanal()
    const lines = await checked(app, CANAL_DAY)
    const reports = lines.filter(({ type }) => type === 'report')
    const summary = lines.at(-1) as {
      reports: { read: number; by_status: Record<string, number> }
      vessels: number
    }
    const log = parse<Record<string, string>>(read(CANAL_DAY), { columns: true })
    expect(log).toHaveLength(4095)
    expect(reports).toHaveLength(4095)
    expect(summary.reports.read).toBe(4095)
    const { by_status } = summary.reports
    console.info('canal day', by_status)
    expect(Object.values(by_status).reduce((sum, count) => sum + count, 0)).toBe(4095)
    // nothing in this log is repeated, late or out of place, and every row has a position and a speed
    for (const status of [
      'rejected',
      'duplicate',
      'late',
      'invalid-position',
      'not-a-vessel',
      'implausible-jump',
    ])
      expect([status, by_status[status]]).toEqual([status, 0])

    const axes = centreLines().map(({ geometry }) => lineString(geometry.coordinates))
    let compared = 0
    for (let i = 0; i < log.length; i += 8) {
      const row = log[i]
      const report = reports[i]
      if (!row || !report) continue
      const place = point([Number(row['LON']), Number(row['LAT'])])
      const distance = Math.min(...axes.map((axis) => pointToLineDistance(place, axis, { units: 'meters' })))
      // the sphere of Turf is half a per cent off; the status is only clear some metres from the bound
      if (Math.abs(distance - INSIDE) < 3) continue
      compared += 1
      const isMoving = Number(row['SOG']) >= 0.5
      const expected =
        distance > INSIDE ? ['outside-fairway'] : isMoving ? ['matched', 'ambiguous'] : ['stationary']
      const isMoored = ['1', '5', '6'].includes(row['Status'] ?? '') && Number(row['SOG']) < 2
      expect(isMoored && distance < INSIDE ? ['stationary'] : expected).toContain(report['status'])
      if (report['status'] === 'matched')
        expect(Math.abs(Math.abs(Number(report['offset_m'])) - distance)).toBeLessThan(1)
    }
    expect(compared).toBeGreaterThan(450)
  },
)

test.skipIf(!NAMES.includes(CANAL_DAY))('towboats of a real day are told from their convoys', async () => {
  const app = await withCanal()
  const alone = (await checked(app, CANAL_DAY)).filter(({ status }) => status === 'matched')
  const query = '&tow_length_m=180&tow_beam_m=16.5&tow_draught_m=2.7'
  const pushed = (await checked(app, CANAL_DAY, query)).filter(({ status }) => status === 'matched')
  const ofBasis = (reports: readonly Json[], basis: string) =>
    reports.filter(({ vessel_basis }) => vessel_basis === basis).length
  expect(ofBasis(alone, 'tow-hull-only')).toBeGreaterThan(300)
  expect(ofBasis(pushed, 'tow-override')).toBe(ofBasis(alone, 'tow-hull-only'))
  // no convoy is told to go as fast as the longest wave that 12 ft of water carries
  for (const report of pushed.filter(({ vessel_basis }) => vessel_basis === 'tow-override')) {
    const max = report['max_over_ground_kn']
    if (typeof max === 'number') expect(max).toBeLessThan(Math.sqrt(9.80665 * 12 * FOOT) / KNOT)
  }
})

test.skipIf(!NAMES.includes('ais_dk_2018-06-01_head.csv'))(
  'a log of a far country is read whole, and lies outside',
  async () => {
    const app = await withCanal()
    for (const [name, rows] of [
      ['ais_dk_2018-06-01_head.csv', 138],
      ['ais_us_2023-01-11_raw_sentinels.csv', 1000],
    ] as const) {
      const lines = await checked(app, name)
      const { by_status } = (lines.at(-1) as { reports: { by_status: Record<string, number> } }).reports
      console.info(name, by_status)
      expect(lines.filter(({ type }) => type === 'report')).toHaveLength(rows)
      expect(by_status['no-segment']).toBeGreaterThan(rows * 0.8)
    }
  },
)
