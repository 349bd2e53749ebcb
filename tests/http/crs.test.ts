import { describe, expect, test } from 'vitest'
import { canal, collection, registryService } from '../support/registry-service.ts'
import { expectProblem, faultsOf } from '../support/service.ts'

const IMPORT = '/v1/segments/import'
const named = (name: unknown) => ({ crs: { type: 'name', properties: { name } } })

describe('a crs member', () => {
  test.each([
    'urn:ogc:def:crs:OGC:1.3:CRS84',
    'urn:ogc:def:crs:OGC::CRS84',
    'OGC:CRS84',
    'http://www.opengis.net/def/crs/OGC/1.3/CRS84',
  ])('that names %s says what GeoJSON means anyway', async (name) => {
    const { post, put, get } = registryService()
    const reply = await post(IMPORT, { ...collection({ ...canal('a'), ...named(name) }), ...named(name) })
    expect(reply.statusCode, reply.body).toBe(200)
    expect((await put('/v1/segments/b', { ...canal('b'), ...named(name) })).statusCode).toBe(201)
    expect((await get('/v1/segments/a')).json()).not.toHaveProperty('crs')
  })

  test.each([
    ['EPSG:4326', 'latitude first'],
    ['urn:ogc:def:crs:EPSG::4326', 'latitude first'],
    ['urn:ogc:def:crs:EPSG:6.6:4326', 'latitude first'],
    ['http://www.opengis.net/def/crs/EPSG/0/4326', 'latitude first'],
    ['EPSG:28992', 'transform the positions'],
    ['EPSG:43260', 'transform the positions'],
    [7, 'no longer part of GeoJSON'],
  ])('that names %s is refused in words that say what to do', async (name, words) => {
    const { post } = registryService()
    const problem = expectProblem(
      await post(IMPORT, { ...collection(canal('a')), ...named(name) }),
      400,
      'invalid-request',
    )
    expect(faultsOf(problem)).toEqual(['#/crs not-in-list'])
    expect(problem.errors?.[0]?.detail).toContain(words)
    expect(problem.errors?.[0]?.allowed).toEqual(['urn:ogc:def:crs:OGC:1.3:CRS84'])
  })

  test('is looked for in collections, features and geometries, and null is none that is known', async () => {
    const { post, put } = registryService()
    const wrong = named('EPSG:3857')
    const { geometry } = canal('a')
    const features = [
      { ...canal('a'), ...wrong },
      { ...canal('b'), geometry: { ...geometry, ...wrong } },
    ]
    const problem = expectProblem(
      await post(IMPORT, { ...collection(...features), crs: null }),
      400,
      'invalid-request',
    )
    expect(faultsOf(problem)).toEqual([
      '#/crs not-in-list',
      '#/features/0/crs not-in-list',
      '#/features/1/geometry/crs not-in-list',
    ])
    expect(problem.errors?.map(({ feature_id }) => feature_id)).toEqual([undefined, 'a', 'b'])
    const put_ = expectProblem(
      await put('/v1/segments/a', { ...canal('a'), ...wrong }),
      400,
      'invalid-request',
    )
    expect(faultsOf(put_)).toEqual(['#/crs not-in-list'])
  })
})
