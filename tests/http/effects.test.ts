import { afterAll, describe, expect, test } from 'vitest'
import { CANAL, MOTOR_VESSEL, PLAIN, REQUESTS } from '../support/requests.ts'
import { buildService, expectProblem, expectReply, faultsOf, post, type Json } from '../support/service.ts'

const { app, replyTo } = buildService(afterAll)

const WATER = { speed_reference: 'through-water' }
const GROUND = { speed_reference: 'over-ground' }

async function effects(request: object): Promise<Json> {
  return expectReply(await post(app, '/v1/effects', request), replyTo('POST', '/v1/effects'))
}

const speedsOf = (reply: Json) =>
  (reply['effects'] as { speed: Record<'through_water' | 'over_ground', { mps: number }> }).speed

test.each(Object.entries(REQUESTS))(
  'the effects for %s are of documented fields, with units that agree and no null',
  async (_name, request) => {
    for (const speed of [0.4, 1.5, 3, 12]) {
      const reply = await effects({ ...request, ...WATER, speed_mps: speed })
      expect(speedsOf(reply).through_water.mps).toBe(speed)
      expect(['within', 'exceeds', 'no-safe-speed']).toContain(reply['verdict'])
      expect((reply['cautions'] as { code: string }[])[0]?.code).toBe('local-rules-apply')
    }
  },
)

test('a label is echoed', async () => {
  expect(await effects({ ...PLAIN, ...WATER, speed_mps: 2, label: 'run 7' })).toMatchObject({
    label: 'run 7',
  })
})

test.each([
  [{ speed_kmh: 7.2 }, 2],
  [{ speed_mps: 2 }, 2],
  [{ speed_kn: 4 }, (4 * 1852) / 3600],
])('the speed may be given as %j', async (given, mps) => {
  expect(speedsOf(await effects({ ...PLAIN, ...WATER, ...given })).through_water.mps).toBe(mps)
})

test('the same speed in three units has the same answer to the last digit', async () => {
  const { reproducibility: _, ...inMps } = await effects({ ...PLAIN, ...WATER, speed_mps: 2.5 })
  const { reproducibility: __, ...inKmh } = await effects({ ...PLAIN, ...WATER, speed_kmh: 9 })
  expect(inKmh).toEqual(inMps)
})

test('a speed that is faster than advised exceeds what governs, and one below keeps within', async () => {
  const fast = await effects({ ...PLAIN, ...WATER, speed_mps: 3 })
  expect(fast).toMatchObject({ verdict: 'exceeds' })
  expect(fast['exceeded']).toContain('bank-wave-height')
  const slow = await effects({ ...PLAIN, ...WATER, speed_mps: 2 })
  expect(slow).toMatchObject({ verdict: 'within', exceeded: [] })
})

test('below steerage is a caution, and what is within stays so', async () => {
  const reply = await effects({ ...PLAIN, ...WATER, speed_mps: 1.3 })
  expect(reply['verdict']).toBe('within')
  expect(reply['cautions']).toContainEqual(
    expect.objectContaining({ code: 'below-steerage', severity: 'warning' }),
  )
})

test('where no speed is safe the verdict says so', async () => {
  const reply = await effects({ ...REQUESTS['no safe speed'], ...WATER, speed_mps: 2 })
  expect(reply['verdict']).toBe('no-safe-speed')
})

describe('with a current of 0.5 m/s', () => {
  const conditions = { current_mps: 0.5 }

  test('a speed over ground with a direction is taken through the water in that direction', async () => {
    const up = await effects({ ...PLAIN, ...GROUND, speed_mps: 2, conditions: { ...conditions, direction: 'upstream' } }) // prettier-ignore
    expect(speedsOf(up)).toMatchObject({ through_water: { mps: 2.5 }, over_ground: { mps: 2 } })
    const down = await effects({ ...PLAIN, ...GROUND, speed_mps: 2, conditions: { ...conditions, direction: 'downstream' } }) // prettier-ignore
    expect(speedsOf(down)).toMatchObject({ through_water: { mps: 1.5 }, over_ground: { mps: 2 } })
  })

  test('a speed over ground without a direction takes the higher speed through the water', async () => {
    const reply = await effects({ ...PLAIN, ...GROUND, speed_mps: 2, conditions })
    expect(speedsOf(reply).through_water.mps).toBe(2.5)
    expect(reply['conditions']).toMatchObject({ direction: 'upstream' })
  })

  test('a speed over ground at which the vessel would drift astern is impossible', async () => {
    const asked = {
      ...PLAIN,
      ...GROUND,
      speed_mps: 0.4,
      conditions: { ...conditions, direction: 'downstream' },
    }
    const problem = expectProblem(await post(app, '/v1/effects', asked), 422, 'impossible-input')
    expect(faultsOf(problem)).toEqual(['#/conditions/current_mps clash'])
    expect(problem.errors?.[0]?.facts).toEqual({ speed_over_ground_mps: 0.4, current_mps: 0.5 })
  })
})

test.each([
  [{}, ['# one-of', '#/speed_reference required']],
  [{ ...WATER }, ['# one-of']],
  [{ ...WATER, speed_mps: 2, speed_kn: 4 }, ['#/speed_kn one-of']],
  [{ ...WATER, speed_mps: 2, speed_kn: 4, speed_kmh: 7 }, ['#/speed_kn one-of', '#/speed_kmh one-of']],
  [{ ...WATER, speed_mps: 0.09 }, ['#/speed_mps out-of-range']],
  [{ ...WATER, speed_mps: 30.01 }, ['#/speed_mps out-of-range']],
  [{ ...WATER, speed_mps: '2' }, ['#/speed_mps wrong-type']],
  [{ ...WATER, speed_mps: null }, ['#/speed_mps wrong-type']],
  [{ speed_mps: 2, speed_reference: 'ground' }, ['#/speed_reference not-in-list']],
  [{ ...WATER, speed_mph: 5, speed_mps: 2 }, ['#/speed_mph unknown-field']],
])('a speed given as %j is refused', async (given, faults) => {
  const reply = await post(app, '/v1/effects', { segment: CANAL, vessel: MOTOR_VESSEL, ...given })
  expect(faultsOf(expectProblem(reply, 400, 'invalid-request')).sort()).toEqual([...faults].sort())
})
