import { ask, discard, type Engine, keep, type Steps, type Verdict } from './engine.ts'
import { newId } from './ids.ts'
import { lockJob } from './job-parts.ts'
import type { JobStore, PlanPublication, PlanPublished, PlanRecord, PlanState } from './job-records.ts'
import { pack, packJson, unpack, unpackJson } from './packed.ts'
import type { Builder, PlanTable, PublicationTable } from './schema.ts'

type Json = Readonly<Record<string, unknown>>

type PlanRow = PlanTable & { readonly publication: Uint8Array | null }

async function toPlan(row: PlanRow): Promise<PlanRecord> {
  const [request, content, publication] = await Promise.all([
    unpackJson(row.request),
    unpackJson(row.content),
    row.publication && unpackJson(row.publication),
  ])
  return {
    id: row.id,
    name: row.name,
    state: row.state,
    studyId: row.study_id,
    created: row.created,
    ...(row.key !== null && { key: row.key }),
    request: request as Json,
    content: content as Json,
    ...(publication !== null && { publication: publication as Json }),
  }
}

/** Adds a draft to a study that is there, and stays. */
function* add(builder: Builder, row: PlanTable): Steps<Verdict<PlanRow | undefined>> {
  if (!(yield* lockJob(builder, row.study_id, 'study'))) return discard(undefined)
  yield* ask(builder.insertInto('limit_plans').values(row))
  return keep({ ...row, publication: null })
}

const plansWithPublication = (builder: Builder) =>
  builder
    .selectFrom('limit_plans')
    .leftJoin('limit_plan_publications', 'limit_plan_publications.plan_id', 'limit_plans.id')
    .selectAll('limit_plans')
    .select('limit_plan_publications.publication')

function* find(builder: Builder, id: string): Steps<PlanRow | undefined> {
  const [row] = yield* ask(plansWithPublication(builder).where('limit_plans.id', '=', id))
  return row
}

function* page(
  builder: Builder,
  { after = '', limit }: { readonly after?: string; readonly limit: number },
): Steps<readonly PlanRow[]> {
  return yield* ask(
    plansWithPublication(builder).where('limit_plans.id', '>', after).orderBy('limit_plans.id').limit(limit),
  )
}

function* stateOf(builder: Builder, id: string): Steps<PlanState | 'missing'> {
  const [row] = yield* ask(builder.selectFrom('limit_plans').select('state').where('id', '=', id))
  return row?.state ?? 'missing'
}

type Published =
  | { readonly outcome: 'published' | 'already-published'; readonly row: PlanRow }
  | Exclude<PlanPublished, { readonly plan: PlanRecord }>

/** Moves a plan on from one state to the next; its row is free of others until the transaction ends. */
function* moveOn(
  builder: Builder,
  id: string,
  from: 'draft' | 'published',
  to: 'published' | 'superseded',
): Steps<boolean> {
  const moved = yield* ask(
    builder
      .updateTable('limit_plans')
      .set({ state: to })
      .where('id', '=', id)
      .where('state', '=', from)
      .returning('id'),
  )
  return moved.length > 0
}

function* publish(
  builder: Builder,
  row: PublicationTable,
  supersedes: string | undefined,
): Steps<Verdict<Published>> {
  const { plan_id: id, number } = row
  if (!(yield* moveOn(builder, id, 'draft', 'published'))) {
    const plan = yield* find(builder, id)
    return discard(plan ? { outcome: 'already-published', row: plan } : { outcome: 'missing' })
  }
  // waits for another transaction that is about to take the number
  const added = yield* ask(
    builder
      .insertInto('limit_plan_publications')
      .values(row)
      .onConflict((conflict) => conflict.column('number').doNothing())
      .returning('plan_id'),
  )
  if (added.length === 0) {
    const [taken] = yield* ask(
      builder.selectFrom('limit_plan_publications').select('plan_id').where('number', '=', number),
    )
    return discard({ outcome: 'number-taken', by: taken?.plan_id ?? '' })
  }
  if (supersedes !== undefined) {
    // its own state is `published` already
    if (supersedes === id) return discard({ outcome: 'cannot-supersede', state: 'draft' })
    if (!(yield* moveOn(builder, supersedes, 'published', 'superseded')))
      return discard({ outcome: 'cannot-supersede', state: yield* stateOf(builder, supersedes) })
  }
  const plan = yield* find(builder, id)
  return plan ? keep({ outcome: 'published', row: plan }) : discard({ outcome: 'missing' })
}

function* recordOf(builder: Builder, id: string): Steps<Uint8Array | undefined> {
  const [row] = yield* ask(
    builder.selectFrom('limit_plan_publications').select('record').where('plan_id', '=', id),
  )
  return row?.record
}

function* remove(builder: Builder, id: string): Steps<Verdict<'deleted' | 'missing' | 'published'>> {
  const deleted = yield* ask(
    builder.deleteFrom('limit_plans').where('id', '=', id).where('state', '=', 'draft').returning('id'),
  )
  if (deleted.length > 0) return keep('deleted')
  return discard((yield* stateOf(builder, id)) === 'missing' ? 'missing' : 'published')
}

async function publicationRow(id: string, publication: PlanPublication): Promise<PublicationTable> {
  const [packed, record] = await Promise.all([packJson(publication.publication), pack(publication.record)])
  return { plan_id: id, number: publication.number, publication: packed, record }
}

type OfPlans = 'addPlan' | 'findPlan' | 'plans' | 'publishPlan' | 'findRecord' | 'deletePlan'

/**
 * Limit plans of a database. Of a published one no statement here changes anything but its state; whoever has the
 * database itself can, which recomputing its record finds out.
 */
export function plansOf(engine: Engine): Pick<JobStore, OfPlans> {
  const { builder } = engine
  return {
    addPlan: async ({ name, studyId, request, content }, { time, key = null }) => {
      const [packedRequest, packedContent] = await Promise.all([packJson(request), packJson(content)])
      const row: PlanTable = {
        id: newId('plan'),
        name,
        state: 'draft',
        study_id: studyId,
        created: time,
        key,
        request: packedRequest,
        content: packedContent,
      }
      const added = await engine.write(() => add(builder, row))
      return added && toPlan(added)
    },
    findPlan: async (id) => {
      const row = await engine.read(() => find(builder, id))
      return row && toPlan(row)
    },
    plans: async (bounds) => Promise.all((await engine.read(() => page(builder, bounds))).map(toPlan)),
    publishPlan: async (id, publication) => {
      const row = await publicationRow(id, publication)
      const published = await engine.write(() => publish(builder, row, publication.supersedes))
      if (!('row' in published)) return published
      return { outcome: published.outcome, plan: await toPlan(published.row) }
    },
    findRecord: async (id) => {
      const record = await engine.read(() => recordOf(builder, id))
      return record && unpack(record)
    },
    deletePlan: (id) => engine.write(() => remove(builder, id)),
  }
}
