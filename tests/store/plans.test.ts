import Database from 'better-sqlite3'
import { describe, expect, test } from 'vitest'
import type { JobContent, PlanContent, PlanPublication } from '../../src/store/job-records.ts'
import { openStore } from '../../src/store/open.ts'
import type { Store } from '../../src/store/registry.ts'
import { onDatabase } from '../support/postgres.ts'
import { at, AUTHOR, ENGINES, testStore } from '../support/stores.ts'

const STUDY: JobContent = {
  kind: 'study',
  request: {},
  inputs: {},
  cellsTotal: 1,
  chunksTotal: 1,
  registryRevision: 1,
  methodVersion: '2026.1',
  serviceVersion: '1.2.3',
}

const planContent = (studyId: string, changes: Partial<PlanContent> = {}): PlanContent => ({
  name: 'Spring plan',
  studyId,
  request: { sign_unit: 'km/h' },
  content: { stretches: [{ limit: 6, note: 'Übergang' }] },
  ...changes,
})

/** @param record  longer than a page of a database */
const publication = (number: string, changes: Partial<PlanPublication> = {}): PlanPublication => ({
  number,
  publication: { number, title: 'Limits of Harrowmere' },
  record: JSON.stringify({ number, cells: Array.from({ length: 3000 }, (_, i) => i / 7) }),
  ...changes,
})

/** Id of a study that has succeeded. */
async function studyIn(store: Store): Promise<string> {
  const { id } = await store.addJob(STUDY, AUTHOR)
  await store.startJob(id, AUTHOR.time)
  await store.endJob(id, { state: 'succeeded' }, AUTHOR.time)
  return id
}

/** Ids of drafts on one study. */
async function draftsIn(store: Store, count: number): Promise<string[]> {
  const study = await studyIn(store)
  const ids: string[] = []
  for (let i = 0; i < count; i += 1) ids.push((await store.addPlan(planContent(study), AUTHOR))!.id)
  return ids
}

async function execute(url: string, text: string): Promise<void> {
  if (!url.startsWith('sqlite:')) {
    await onDatabase(url, text)
    return
  }
  const file = new Database(url.slice('sqlite:'.length))
  file.exec(text)
  file.close()
}

describe.each(ENGINES)('limit plans on $kind', ({ fresh }) => {
  test('a draft is kept as it was made, and leaves the registry alone', async () => {
    const store = await testStore(await fresh())
    const study = await studyIn(store)
    const plan = await store.addPlan(planContent(study), at(1))
    expect(plan?.id).toMatch(/^plan-[0-9a-z]{10}$/)
    expect(plan).toEqual({
      id: plan?.id,
      name: 'Spring plan',
      state: 'draft',
      studyId: study,
      created: at(1).time,
      key: 'surveyor',
      request: { sign_unit: 'km/h' },
      content: { stretches: [{ limit: 6, note: 'Übergang' }] },
    })
    expect(await store.findPlan(plan!.id)).toEqual(plan)
    expect(await store.findRecord(plan!.id)).toBeUndefined()
    expect(await store.findPlan('plan-0')).toBeUndefined()
    expect((await store.current()).revision).toBe(0)
    expect(await store.addPlan(planContent(study), { time: AUTHOR.time })).not.toHaveProperty('key')
  })

  test('none is made on a study that is not there, or on a verification', async () => {
    const store = await testStore(await fresh())
    const verification = await store.addJob({ ...STUDY, kind: 'verification' }, AUTHOR)
    expect(await store.addPlan(planContent('study-0'), AUTHOR)).toBeUndefined()
    expect(await store.addPlan(planContent(verification.id), AUTHOR)).toBeUndefined()
    expect(await store.plans({ limit: 10 })).toEqual([])
  })

  test('lists go by id, page by page', async () => {
    const store = await testStore(await fresh())
    const ids = (await draftsIn(store, 7)).sort((a, b) => (a < b ? -1 : 1))
    await store.publishPlan(ids[1]!, publication('1'))
    const first = await store.plans({ limit: 3 })
    expect(first.map(({ id }) => id)).toEqual(ids.slice(0, 3))
    expect(first.map(({ state }) => state)).toEqual(['draft', 'published', 'draft'])
    expect(first[1]).toEqual(await store.findPlan(ids[1]!))
    const rest = await store.plans({ after: ids[2]!, limit: 50 })
    expect(rest.map(({ id }) => id)).toEqual(ids.slice(3))
  })

  test('publishing adds number, publication and record, once', async () => {
    const store = await testStore(await fresh())
    const [id = ''] = await draftsIn(store, 1)
    const draft = await store.findPlan(id)
    const published = await store.publishPlan(id, publication('2026-1'))
    const plan = {
      ...draft,
      state: 'published',
      publication: { number: '2026-1', title: 'Limits of Harrowmere' },
    }
    expect(published).toEqual({ outcome: 'published', plan })
    expect(await store.findPlan(id)).toEqual(plan)
    expect(await store.findRecord(id)).toBe(publication('2026-1').record)
    for (const again of [publication('2026-1', { record: '{}' }), publication('2026-2')]) {
      expect(await store.publishPlan(id, again)).toEqual({ outcome: 'already-published', plan })
    }
    expect(await store.findRecord(id)).toBe(publication('2026-1').record)
    expect(await store.publishPlan('plan-0', publication('2026-2'))).toEqual({ outcome: 'missing' })
  })

  test('a number that is taken is refused, and the draft stays one', async () => {
    const store = await testStore(await fresh())
    const [first = '', second = ''] = await draftsIn(store, 2)
    await store.publishPlan(first, publication('1'))
    expect(await store.publishPlan(second, publication('1'))).toEqual({ outcome: 'number-taken', by: first })
    expect(await store.findPlan(second)).toMatchObject({ state: 'draft' })
    expect(await store.findPlan(second)).not.toHaveProperty('publication')
    expect(await store.publishPlan(second, publication('2'))).toMatchObject({ outcome: 'published' })
  })

  test('superseding changes the state of the other plan and nothing else', async () => {
    const store = await testStore(await fresh())
    const [first = '', second = '', third = ''] = await draftsIn(store, 3)
    await store.publishPlan(first, publication('1'))
    const before = await store.findPlan(first)
    expect(await store.publishPlan(second, publication('2', { supersedes: first }))).toMatchObject({
      outcome: 'published',
      plan: { id: second, state: 'published' },
    })
    expect(await store.findPlan(first)).toEqual({ ...before, state: 'superseded' })
    expect(await store.findRecord(first)).toBe(publication('1').record)
    expect(await store.publishPlan(first, publication('4'))).toMatchObject({ outcome: 'already-published' })
    for (const [supersedes, state] of [
      [first, 'superseded'],
      [third, 'draft'],
      ['plan-0', 'missing'],
    ] as const) {
      const refused = await store.publishPlan(third, publication('3', { supersedes }))
      expect(refused).toEqual({ outcome: 'cannot-supersede', state })
    }
    expect(await store.findPlan(third)).toMatchObject({ state: 'draft' })
    expect(await store.publishPlan(third, publication('3'))).toMatchObject({ outcome: 'published' })
  })

  test('of replicas that publish under one number at once exactly one does', async () => {
    const url = await fresh()
    const stores = [await testStore(url), await testStore(url), await testStore(url)]
    const ids = await draftsIn(stores[0]!, 6)
    for (let round = 0; round < 2; round += 1) {
      const rivals = ids.slice(round * 3, round * 3 + 3)
      const outcomes = await Promise.all(
        rivals.map((id, i) => stores[i]!.publishPlan(id, publication(`number-${round}`))),
      )
      const winners = rivals.filter((_, i) => outcomes[i]?.outcome === 'published')
      expect(winners).toHaveLength(1)
      const losers = outcomes.filter(({ outcome }) => outcome !== 'published')
      expect(losers).toEqual([0, 1].map(() => ({ outcome: 'number-taken', by: winners[0] })))
    }
  })

  test('of replicas that publish one plan at once exactly one does, and the others learn what it says', async () => {
    const url = await fresh()
    const stores = [await testStore(url), await testStore(url), await testStore(url)]
    const [id = ''] = await draftsIn(stores[0]!, 1)
    const outcomes = await Promise.all(stores.map((store, i) => store.publishPlan(id, publication(`n${i}`))))
    const [winner, ...others] = outcomes.filter(({ outcome }) => outcome === 'published')
    expect(others).toEqual([])
    const kept = await stores[0]!.findPlan(id)
    expect(winner).toEqual({ outcome: 'published', plan: kept })
    for (const outcome of outcomes)
      if (outcome !== winner) expect(outcome).toEqual({ outcome: 'already-published', plan: kept })
  })

  test('of replicas that supersede one plan at once exactly one does', async () => {
    const url = await fresh()
    const stores = [await testStore(url), await testStore(url)]
    const [old = '', a = '', b = ''] = await draftsIn(stores[0]!, 3)
    await stores[0]!.publishPlan(old, publication('old'))
    const outcomes = await Promise.all(
      [a, b].map((id, i) => stores[i]!.publishPlan(id, publication(id, { supersedes: old }))),
    )
    expect(outcomes.map(({ outcome }) => outcome).sort()).toEqual(['cannot-supersede', 'published'])
  })

  test('drafts are deleted, published and superseded ones stay', async () => {
    const store = await testStore(await fresh())
    const [draft = '', old = '', current = ''] = await draftsIn(store, 3)
    await store.publishPlan(old, publication('1'))
    await store.publishPlan(current, publication('2', { supersedes: old }))
    expect(await store.deletePlan(draft)).toBe('deleted')
    expect(await store.deletePlan(draft)).toBe('missing')
    expect(await store.deletePlan(old)).toBe('published')
    expect(await store.deletePlan(current)).toBe('published')
    expect(await store.plans({ limit: 10 })).toHaveLength(2)
  })

  test('deleting a draft and publishing it at once leaves it whole or gone', async () => {
    const url = await fresh()
    const [store, other] = [await testStore(url), await testStore(url)]
    for (const id of await draftsIn(store, 8)) {
      const [published, deleted] = await Promise.all([
        store.publishPlan(id, publication(id)),
        other.deletePlan(id),
      ])
      const isKept = published.outcome === 'published'
      expect([published.outcome, deleted]).toEqual(
        isKept ? ['published', 'published'] : ['missing', 'deleted'],
      )
      expect(await store.findRecord(id)).toBe(isKept ? publication(id).record : undefined)
    }
  })

  test('a study that plans rest on stays, with what was computed, until the last one is gone', async () => {
    const store = await testStore(await fresh())
    const study = await studyIn(store)
    const plans = [
      (await store.addPlan(planContent(study), AUTHOR))!.id,
      (await store.addPlan(planContent(study), AUTHOR))!.id,
    ].sort((a, b) => (a < b ? -1 : 1))
    expect(await store.removeJob(study, at(1).time)).toEqual({ outcome: 'in-use', usedBy: plans })
    expect(await store.jobInputs(study)).toEqual({})
    for (const id of plans) await store.deletePlan(id)
    expect(await store.removeJob(study, at(2).time)).toEqual({ outcome: 'deleted' })
  })

  test('deleting a study and planning on it at once never leaves a plan without one', async () => {
    const url = await fresh()
    const [store, other] = [await testStore(url), await testStore(url)]
    for (let run = 0; run < 10; run += 1) {
      const study = await studyIn(store)
      const [plan, removed] = await Promise.all([
        store.addPlan(planContent(study), AUTHOR),
        other.removeJob(study, at(1).time),
      ])
      expect(removed.outcome).toBe(plan ? 'in-use' : 'deleted')
    }
  })

  test('what somebody changes in the database itself is shown as it stands there', async () => {
    const url = await fresh()
    const store = await testStore(url)
    const [id = ''] = await draftsIn(store, 1)
    await store.publishPlan(id, publication('1'))
    await execute(url, `update limit_plans set name = 'Another plan' where id = '${id}'`)
    expect(await store.findPlan(id)).toMatchObject({ name: 'Another plan', state: 'published' })
    expect(await store.findRecord(id)).toBe(publication('1').record)
  })

  test('they survive reopening', async () => {
    const url = await fresh()
    const first = await openStore(url)
    const [id = ''] = await draftsIn(first, 1)
    const published = await first.publishPlan(id, publication('1'))
    await first.close()
    const second = await testStore(url)
    expect(await second.findPlan(id)).toEqual('plan' in published ? published.plan : undefined)
    expect(await second.findRecord(id)).toBe(publication('1').record)
  })
})
