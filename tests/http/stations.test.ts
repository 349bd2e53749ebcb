import { describe, expect, test } from 'vitest'
import { makeChannel } from '../support/geodesic.ts'
import { registryService, type RegistryService } from '../support/registry-service.ts'
import { expectProblem, faultsOf, type Json } from '../support/service.ts'

const IMPORT = '/v1/segments/import'

// 1500 m straight, banks at 20 and 40 m, made by geodesics alone
const CHANNEL = makeChannel([3, 54], 60, [{ length: 1500 }], () => [20, 40])
const lineString = (coordinates: unknown) => ({ type: 'LineString', coordinates })

const segment = (properties: Json) => ({
  type: 'Feature',
  geometry: lineString(CHANNEL.axis),
  properties,
})

interface Answer {
  readonly outcome: string
  readonly governing_criterion: string
  readonly station: { readonly index: number; readonly chainage_m?: number }
  readonly recommended_max_speed: { readonly through_water: { readonly mps: number } }
  readonly at_recommended_speed: {
    readonly banks: { readonly side: string; readonly distance_m: number }[]
  }
  readonly criteria: { readonly at: string }[]
  readonly reproducibility: { readonly input_hash: string }
}

const speedOf = ({ recommended_max_speed }: Answer) => recommended_max_speed.through_water.mps

async function answerOf(service: RegistryService, vesselClass = 'cemt-iii'): Promise<Answer> {
  const reply = await service.get(`/v1/segments/a/advisory?vessel_class=${vesselClass}`)
  expect(reply.statusCode, reply.body).toBe(200)
  return reply.json()
}

async function answer(properties: Json, vesselClass?: string): Promise<Answer> {
  const service = registryService()
  const reply = await service.put('/v1/segments/a', segment(properties))
  expect(reply.statusCode, reply.body).toBe(201)
  return answerOf(service, vesselClass)
}

async function remarksOf(properties: Json): Promise<string[]> {
  const feature = { ...segment(properties), id: 'a' }
  const reply = await registryService().post(IMPORT, { type: 'FeatureCollection', features: [feature] })
  expect(reply.statusCode, reply.body).toBe(200)
  return reply
    .json<{ remarks: { pointer: string; code: string }[] }>()
    .remarks.map(({ pointer, code }) => `${pointer.replace('#/features/0/properties', '')} ${code}`)
}

async function refusalOf(properties: Json) {
  const reply = await registryService().put('/v1/segments/a', segment(properties))
  return expectProblem(reply, reply.statusCode, reply.json<{ code: string }>().code)
}

const station = (chainage_m: number, depth_m: number, width_m: number) => ({
  chainage_m,
  depth_m,
  width_m,
  bank_distance_m: width_m / 2,
})

describe('stations', () => {
  const SPAN = { chainage_from_m: 0, chainage_to_m: 1500 }

  test('are interpolated: a place between two may allow less than both, and is named', async () => {
    const stations = [station(0, 5, 50), station(1500, 4, 60)]
    const single = (depth_m: number, width_m: number) =>
      answer({ depth_m, width_m, bank_distance_m: width_m / 2 }, 'tug')
    // four fifths of the way the tug is allowed a fifth less than at either end: a squat method that counts has its range there
    const [first, between, last] = await Promise.all([single(5, 50), single(4.2, 58), single(4, 60)])
    expect(speedOf(between)).toBeLessThan(0.83 * Math.min(speedOf(first), speedOf(last)))
    const found = await answer({ ...SPAN, stations }, 'tug')
    expect(speedOf(found)).toBeLessThan(0.87 * Math.min(speedOf(first), speedOf(last)))
    expect(found.governing_criterion).toBe(between.governing_criterion)
    expect(found.station.chainage_m).toBeGreaterThan(1100)
    expect(found.station.chainage_m).toBeLessThan(1300)
  })

  test('that agree answer as one section does, whichever is given first', async () => {
    const expected = await answer({ depth_m: 4, width_m: 60, bank_distance_m: 30 })
    const found = await answer({ ...SPAN, stations: [station(1500, 4, 60), station(0, 4, 60)] })
    expect(found.station).toEqual({ index: 0, chainage_m: 0 })
    expect(expected.station).toEqual({ index: 0 })
    expect(speedOf(found)).toBe(speedOf(expected))
  })

  test('outside the segment and chainages that differ from its length are remarks, without bank lines too', async () => {
    const stations = [station(0, 4, 60), station(9000, 4, 60)]
    expect(await remarksOf({ ...SPAN, stations })).toEqual(['/stations station-outside'])
    expect(await remarksOf({ chainage_from_m: 0, chainage_to_m: 9000, stations })).toEqual([
      '/chainage_to_m chainage-differs-from-length',
    ])
    const one = { depth_m: 4, width_m: 60, bank_distance_m: 30 }
    expect(await remarksOf({ ...one, chainage_from_m: 9000, chainage_to_m: 0 })).toEqual([
      '/chainage_to_m chainage-differs-from-length',
    ])
    const problem = await refusalOf({ ...one, chainage_from_m: 700, chainage_to_m: 700 })
    expect(faultsOf(problem)).toEqual(['#/properties/chainage_to_m clash'])
    expect(problem.status).toBe(422)
  })

  test('with their own cross-section keep it beside one of the segment, until a request gives another', async () => {
    const service = registryService()
    const wide = { cross_section: { bottom_width_m: 50 } }
    const stations = [
      { ...station(0, 4, 60), ...wide },
      { ...station(1500, 4, 60), ...wide },
    ]
    const properties = { ...SPAN, stations, cross_section: { bottom_width_m: 10 } }
    expect((await service.put('/v1/segments/a', segment(properties))).statusCode).toBe(201)
    const asked = async (cross_section?: Json) => {
      const body = {
        segment: { id: 'a', ...(cross_section && { cross_section }) },
        vessel: { class: 'cemt-iii' },
      }
      const reply = await service.post('/v1/advisories', body)
      expect(reply.statusCode, reply.body).toBe(200)
      return speedOf(reply.json())
    }
    const ofSection = async (bottom_width_m: number) =>
      speedOf(
        await answer({ depth_m: 4, width_m: 60, bank_distance_m: 30, cross_section: { bottom_width_m } }),
      )
    expect(await asked()).toBe(await ofSection(50))
    expect(await asked({ bottom_width_m: 20 })).toBe(await ofSection(20))
    expect(await ofSection(20)).toBeLessThan(await ofSection(50))
  })
})

describe('a receptor', () => {
  const WIDE = {
    chainage_from_m: 0,
    chainage_to_m: 1500,
    stations: [station(0, 6, 200), station(1500, 3, 200)],
  }
  const reeds = (more: Json = {}) => ({
    receptors: [{ kind: 'reed-bed', side: 'nearer', distance_m: 20, max_wave_height_m: 0.05, ...more }],
  })

  test('with a chainage counts there alone, at a station of its own', async () => {
    const found = await answer({ ...WIDE, ...reeds({ chainage_m: 333 }) })
    expect(found.governing_criterion).toBe('receptor-wave-height')
    expect(found.station.chainage_m).toBeCloseTo(333, 6)
    const alone = await answer({ depth_m: 5.334, width_m: 200, bank_distance_m: 100, ...reeds() })
    expect(Math.abs(speedOf(found) / speedOf(alone) - 1)).toBeLessThan(1e-9)
  })

  test('without one counts all along, and with another has another answer', async () => {
    const everywhere = await answer({ ...WIDE, ...reeds() })
    const [shallow, deep] = await Promise.all([
      answer({ ...WIDE, ...reeds({ chainage_m: 1500 }) }),
      answer({ ...WIDE, ...reeds({ chainage_m: 0 }) }),
    ])
    expect(speedOf(shallow)).not.toBe(speedOf(deep))
    expect(speedOf(everywhere)).toBeLessThanOrEqual(Math.min(speedOf(shallow), speedOf(deep)))
    expect(shallow.reproducibility.input_hash).not.toBe(deep.reproducibility.input_hash)
  })

  test('is not a criterion of another place', async () => {
    const harmless = reeds({ chainage_m: 0, distance_m: 99, max_wave_height_m: 5 })
    const found = await answer({ ...WIDE, ...harmless })
    expect(found.station.chainage_m).toBe(1500)
    expect(found.criteria.map(({ at }) => at)).not.toContain('receptor-0')
  })

  test('counts where one section describes the whole segment, with a chainage or without', async () => {
    const section = { depth_m: 4, width_m: 200, bank_distance_m: 100 }
    const [with_, without] = await Promise.all([
      answer({ ...section, ...reeds({ chainage_m: 900 }) }),
      answer({ ...section, ...reeds() }),
    ])
    expect(with_.governing_criterion).toBe('receptor-wave-height')
    expect(speedOf(with_)).toBe(speedOf(without))
  })

  test('more than a metre outside the segment is 422 with both ends', async () => {
    const problem = await refusalOf({ ...WIDE, ...reeds({ chainage_m: 1502 }) })
    expect(problem.status).toBe(422)
    expect(faultsOf(problem)).toEqual(['#/properties/receptors/0/chainage_m clash'])
    expect(problem.errors?.[0]?.facts).toMatchObject({
      chainage_m: 1502,
      chainage_from_m: 0,
      chainage_to_m: 1500,
    })
    const found = await answer({ ...WIDE, ...reeds({ chainage_m: 1500.9 }) })
    expect(found.station.chainage_m).toBe(1500)
  })
})

describe('a bank line on one side', () => {
  const left = { line: lineString(CHANNEL.left) }

  test('with a distance on the other answers as both distances do', async () => {
    const found = await answer({ depth_m: 4, banks: { left, right: { distance_m: 40 } } })
    const expected = await answer({
      depth_m: 4,
      banks: { left: { distance_m: 20 }, right: { distance_m: 40 } },
    })
    expect(found.at_recommended_speed.banks.map(({ side }) => side)).toEqual(['left', 'right'])
    expect(Math.abs(speedOf(found) / speedOf(expected) - 1)).toBeLessThan(1e-3)
  })

  test('takes the other from stations that know their sides, else it is 422', async () => {
    const sided = { chainage_m: 0, depth_m: 4, width_m: 60, left_distance_m: 20, right_distance_m: 40 }
    const found = await answer({ stations: [sided], banks: { left, right: {} } })
    expect(found.at_recommended_speed.banks[1]?.distance_m).toBeCloseTo(40, 9)
    const problem = await refusalOf({ stations: [station(0, 4, 60)], banks: { left, right: {} } })
    expect(problem.status).toBe(422)
    expect(faultsOf(problem)).toEqual(['#/properties/banks/right/distance_m clash'])
  })

  test('on the wrong side is 422', async () => {
    const wrong = { left: { line: lineString(CHANNEL.right) }, right: { distance_m: 40 } }
    const problem = await refusalOf({ depth_m: 4, banks: wrong })
    expect(faultsOf(problem)).toEqual(['#/properties/banks/left/line clash'])
    expect(problem.errors?.[0]?.detail).toContain('drawn upstream')
  })

  test('is held against a distance that is given beside it', async () => {
    const banks = { left: { ...left, distance_m: 35 }, right: { distance_m: 40 } }
    expect(await remarksOf({ depth_m: 4, banks })).toEqual(['/banks widths-differ'])
  })
})

test('a nearer distance beside bank lines is no other width, whichever side is nearer', async () => {
  const both = { left: { line: lineString(CHANNEL.right) }, right: { line: lineString(CHANNEL.left) } }
  const axis = CHANNEL.axis.toReversed()
  const feature = {
    ...segment({ stations: [{ ...station(0, 4, 60), bank_distance_m: 20 }], banks: both }),
    geometry: lineString(axis),
    id: 'a',
  }
  const reply = await registryService().post(IMPORT, { type: 'FeatureCollection', features: [feature] })
  expect(reply.json<{ remarks: unknown }>().remarks).toEqual([])
})

test('a surveyed profile beside bank lines is the section all along', async () => {
  const cross_section = {
    profile: [
      [-22, 0],
      [-10, 4],
      [0, 4],
      [30, 4],
      [38, 0],
    ],
  }
  const lines = { left: { line: lineString(CHANNEL.left) }, right: { line: lineString(CHANNEL.right) } }
  const [found, expected] = await Promise.all([
    answer({ cross_section, banks: lines }),
    answer({ cross_section }),
  ])
  expect(speedOf(found)).toBe(speedOf(expected))
})
