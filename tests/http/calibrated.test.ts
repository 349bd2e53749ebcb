import { readFileSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import type { App } from '../../src/http/app-type.ts'
import { buildService, linesOf, post, stream, type Json } from '../support/service.ts'

const EXAMPLE = readFileSync(
  new URL('../../openapi/examples/createCalibration.request.json', import.meta.url),
  'utf8',
)
const BOAT = { class: 'recreational-rc' }
const POUND = '/v1/segments/harrow-long-pound'

async function calibrate(app: App): Promise<string> {
  const reply = await post(app, '/v1/calibrations', EXAMPLE)
  expect(reply.statusCode, reply.body).toBe(201)
  return reply.json<{ id: string }>().id
}

const get = (app: App, url: string, headers: Record<string, string> = {}) =>
  app.inject({ method: 'GET', url, headers })

interface Answer {
  readonly recommended_max_speed: { readonly over_ground: { readonly mps: number; readonly kn: number } }
  readonly uncalibrated?: Answer
  readonly wave_methods: readonly {
    readonly id: string
    readonly factor?: number
    readonly outside: Json[]
  }[]
  readonly reproducibility: { readonly calibration_id?: string; readonly input_hash: string }
}

async function advised(app: App, segment: Json, options?: Json): Promise<Answer> {
  const reply = await post(app, '/v1/advisories', { segment, vessel: BOAT, ...(options && { options }) })
  expect(reply.statusCode, reply.body).toBe(200)
  return reply.json<Answer>()
}

/** Makes the Long Pound name a calibration. */
async function name(app: App, id: string): Promise<void> {
  const feature = (await get(app, POUND)).json<{ properties: Json }>()
  const reply = await app.inject({
    method: 'PUT',
    url: POUND,
    headers: { 'content-type': 'application/geo+json', 'if-match': '*' },
    payload: JSON.stringify({ ...feature, properties: { ...feature.properties, calibration_id: id } }),
  })
  expect(reply.statusCode, reply.body).toBe(200)
}

const LIMIT_FREE = { apply_posted_limit: false }

describe('a calibration', () => {
  test('that a request names multiplies what each method computes, and shows both figures', async () => {
    const { app } = buildService()
    const id = await calibrate(app)
    const segment = { id: 'harrow-long-pound' }
    const plain = await advised(app, segment, LIMIT_FREE)
    const own = await advised(app, segment, { ...LIMIT_FREE, calibration_id: id })
    expect(own.reproducibility.calibration_id).toBe(id)
    expect(own.reproducibility.input_hash).not.toBe(plain.reproducibility.input_hash)
    expect(own.uncalibrated?.recommended_max_speed.over_ground).toEqual(
      plain.recommended_max_speed.over_ground,
    )
    expect(plain.uncalibrated).toBeUndefined()
    const { methods } = (await get(app, `/v1/calibrations/${id}`)).json<{ methods: Json[] }>()
    expect(methods.length).toBeGreaterThan(1)
    for (const { id: method, factor, outside } of own.wave_methods) {
      const fitted = methods.find((item) => item['id'] === method)
      expect([method, factor]).toEqual([method, fitted?.['factor']])
      const isLeftOut = outside.some(({ quantity }) => quantity === 'calibration')
      expect(isLeftOut).toBe(fitted === undefined)
    }
  })

  test('gives way to null and to a factor of the call', async () => {
    const { app } = buildService()
    await name(app, await calibrate(app))
    const segment = { id: 'harrow-long-pound' }
    const plain = await advised(app, segment, { ...LIMIT_FREE, calibration_id: null })
    expect(plain.reproducibility.calibration_id).toBeUndefined()
    expect(plain.wave_methods.every(({ factor }) => factor === undefined)).toBe(true)
    const given = await advised(app, segment, { ...LIMIT_FREE, wave_factor: 1 })
    expect(given.recommended_max_speed).toEqual(plain.recommended_max_speed)
    expect(given.reproducibility.calibration_id).toBeUndefined()
  })

  test('that a segment names is used by every call on it, to the same digits', async () => {
    const { app } = buildService()
    const before = await get(app, `${POUND}/advisory?vessel_class=recreational-rc`)
    const id = await calibrate(app)
    await name(app, id)
    const after = await get(app, `${POUND}/advisory?vessel_class=recreational-rc`, {
      'if-none-match': String(before.headers.etag),
    })
    expect(after.statusCode).toBe(200)
    const { recommended_max_speed, reproducibility } = after.json<Answer>()
    expect(reproducibility.calibration_id).toBe(id)
    const { mps, kn } = recommended_max_speed.over_ground
    expect(mps).toBeLessThan(before.json<Answer>().recommended_max_speed.over_ground.mps)

    const segment = { id: 'harrow-long-pound' }
    expect((await advised(app, segment)).recommended_max_speed.over_ground.mps).toBe(mps)
    const [line] = await stream(app, '?detail=compact', [{ segment, vessel: BOAT }])
    expect(line?.['max_over_ground_mps']).toBe(mps)
    const matrix = await post(app, '/v1/advisories/matrix', {
      segments: ['harrow-long-pound'],
      vessels: [BOAT],
    })
    expect(linesOf(matrix.body)[0]?.['max_over_ground_mps']).toBe(mps)
    const all = await post(app, '/v1/advisories/matrix', { segments: 'all', vessels: [BOAT] })
    const [row] = linesOf(all.body).filter(({ segment_id }) => segment_id === 'harrow-long-pound')
    expect(row?.['max_over_ground_mps']).toBe(mps)
    const layer = (await get(app, '/v1/advisories.geojson?vessel_class=recreational-rc')).json<{
      features: { id: string; properties: Json }[]
    }>()
    const feature = layer.features.find((item) => item.id === 'harrow-long-pound')
    expect(feature?.properties['max_over_ground_kn']).toBe(kn)
    const curve = await get(app, `${POUND}/speed-curve?vessel_class=recreational-rc`)
    expect(curve.json<Answer>().reproducibility.calibration_id).toBe(id)
    const log =
      'time,mmsi,lat,lon,sog_kn,cog_deg,vessel_class\n2026-05-04T06:00:00Z,299000001,54.088417,3.538887,4,110,recreational-rc\n'
    const checked = await post(app, '/v1/passages/check?detail=reports', log, { 'content-type': 'text/csv' })
    const [report] = linesOf(checked.body)
    expect(report?.['sailing_line_max_over_ground_kn']).toBeCloseTo(kn, 9)
  })

  test('that does not exist is 404, in a request of its own and as a row of a matrix', async () => {
    const { app } = buildService()
    const reply = await post(app, '/v1/advisories', {
      segment: { id: 'harrow-long-pound' },
      vessel: BOAT,
      options: { calibration_id: 'cal-none' },
    })
    expect([reply.statusCode, reply.json<Json>()['code']]).toEqual([404, 'calibration-not-found'])
  })

  test('says when a speed is beyond those that were measured', async () => {
    const { app } = buildService()
    const id = await calibrate(app)
    const codesAt = async (speed: number) => {
      const reply = await post(app, '/v1/effects', {
        segment: { id: 'harrow-long-pound' },
        vessel: BOAT,
        options: { calibration_id: id },
        speed_kmh: speed,
        speed_reference: 'through-water',
      })
      return reply.json<{ cautions: { code: string }[] }>().cautions.map(({ code }) => code)
    }
    // measured from 7.6 to 12.5 km/h
    expect(await codesAt(10)).not.toContain('beyond-calibration')
    expect(await codesAt(7)).toContain('beyond-calibration')
    expect(await codesAt(13)).toContain('beyond-calibration')
  })

  test('says when depth or distance is far from what was measured', async () => {
    const { app } = buildService()
    const id = await calibrate(app)
    const beyond = async (segment: Json): Promise<unknown> => {
      const reply = await post(app, '/v1/effects', {
        segment,
        vessel: BOAT,
        options: { calibration_id: id },
        speed_kmh: 10,
        speed_reference: 'through-water',
      })
      const { cautions } = reply.json<{ cautions: { code: string; facts?: Json }[] }>()
      return cautions.find(({ code }) => code === 'beyond-calibration')?.facts?.['beyond']
    }
    // measured 3.91 to 4.17 m deep and 20 to 24.7 m off
    expect(await beyond({ depth_m: 4, width_m: 50, bank_distance_m: 22 })).toBeUndefined()
    expect(await beyond({ depth_m: 9, width_m: 50, bank_distance_m: 22 })).toEqual(['depth'])
    expect(await beyond({ depth_m: 4, width_m: 900, bank_distance_m: 300 })).toEqual(['distance'])
  })

  test('stands on the sheet of its segment, with its factors and what it would be without', async () => {
    const { app } = buildService()
    const url = `${POUND}/sheet?vessel_class=recreational-rc`
    expect((await get(app, url)).body).not.toContain('corrected by')
    const id = await calibrate(app)
    await name(app, id)
    const page = (await get(app, url)).body
    expect(page).toContain(`Heights are corrected by calibration ${id}`)
    // the posted limit of the Long Pound governs this boat without it
    expect(page).toMatch(/without it the recommended maximum would be 1[0-9.]+\s*km\/h/)
    expect(page).toMatch(/in range, times \d\.\d\d</)
  })
})
