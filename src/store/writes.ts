import { changedNames } from './canonical.ts'
import { ask, discard, keep, type Steps, type Verdict } from './engine.ts'
import { assertCalibrations } from './references.ts'
import type { Action, Author, Expected, Imported, Written } from './registry.ts'
import type { Builder, ItemTable } from './schema.ts'
import type { Document, Shelf } from './shelves.ts'

/** Rows of one statement of an import: far below the numbers of parameters that the engines take. */
const BATCH = 250

type Current = Pick<ItemTable, 'id' | 'revision' | 'deleted' | 'content'>

/** What a write does to one item. */
interface Change extends Document {
  readonly action: Action
  readonly revision: number
  readonly changed: readonly string[]
}

/** Raises the revision of the registry, which keeps every other writer out until the transaction ends. */
export function* nextRevision(builder: Builder): Steps<number> {
  const rows = yield* ask(
    builder
      .updateTable('state')
      .set((column) => ({ registry_revision: column('registry_revision', '+', 1) }))
      .returning('registry_revision'),
  )
  const revision = rows[0]?.registry_revision
  if (revision === undefined) throw new Error('The database has lost its row of state')
  return revision
}

/** The refusal of a write that expects something else than there is. */
function refusal(current: number | undefined, expected: Expected): Written | undefined {
  if (current === undefined) return expected === 'none' ? undefined : { outcome: 'missing' }
  return expected === 'any' || expected === current ? undefined : { outcome: 'stale', current }
}

function* find(builder: Builder, shelf: Shelf, ids: readonly string[]): Steps<ReadonlyMap<string, Current>> {
  const rows = yield* ask(
    builder
      .selectFrom(shelf.items)
      .select(['id', 'revision', 'deleted', 'content'])
      .where('id', 'in', [...ids]),
  )
  return new Map(rows.map((row) => [row.id, row]))
}

const existing = (row: Current | undefined): Current | undefined => (row?.deleted === 0 ? row : undefined)

/** The change that a document makes; none when the item holds the same already. */
function changeOf(
  shelf: Shelf,
  row: Current | undefined,
  document: Document,
  action: Action,
): Change | undefined {
  const before = existing(row)
  const isSame = before?.content === document.content
  const changed = isSame
    ? []
    : changedNames(before ? shelf.fieldsOf(before.content) : {}, shelf.fieldsOf(document.content))
  if (before !== undefined && changed.length === 0) return undefined
  return { ...document, action, revision: (row?.revision ?? 0) + 1, changed }
}

export function* put(
  builder: Builder,
  shelf: Shelf,
  document: Document,
  expected: Expected,
  author: Author,
): Steps<Verdict<Written>> {
  const registryRevision = yield* nextRevision(builder)
  const row = (yield* find(builder, shelf, [document.id])).get(document.id)
  const before = existing(row)
  const refused = refusal(before?.revision, expected)
  if (refused) return discard(refused)
  yield* assertCalibrations(builder, [document])
  const outcome = before ? 'updated' : 'created'
  const change = changeOf(shelf, row, document, outcome)
  if (change === undefined) {
    const revision = row?.revision ?? 0
    return discard({ outcome: 'unchanged', revision, registryRevision: registryRevision - 1 })
  }
  yield* record(builder, shelf, [change], registryRevision, author)
  return keep({ outcome, revision: change.revision, registryRevision })
}

export function* remove(
  builder: Builder,
  shelf: Shelf,
  id: string,
  expected: Expected,
  author: Author,
): Steps<Verdict<Written>> {
  const registryRevision = yield* nextRevision(builder)
  const before = existing((yield* find(builder, shelf, [id])).get(id))
  const refused = refusal(before?.revision, expected)
  if (refused) return discard(refused)
  if (before === undefined) return discard({ outcome: 'missing' })
  const revision = before.revision + 1
  const changed = changedNames(shelf.fieldsOf(before.content), {})
  const change: Change = { id, content: before.content, action: 'deleted', revision, changed }
  yield* record(builder, shelf, [change], registryRevision, author)
  return keep({ outcome: 'deleted', revision, registryRevision })
}

/**
 * Creates or replaces each document.
 *
 * @param documents  n documents with unique ids
 */
export function* importAll(
  builder: Builder,
  shelf: Shelf,
  documents: readonly Document[],
  author: Author,
): Steps<Verdict<Imported>> {
  const registryRevision = yield* nextRevision(builder)
  yield* assertCalibrations(builder, documents)
  const counts = { created: 0, updated: 0, unchanged: 0 }
  for (let start = 0; start < documents.length; start += BATCH) {
    const batch = documents.slice(start, start + BATCH)
    const rows = yield* find(
      builder,
      shelf,
      batch.map(({ id }) => id),
    )
    const changes = batch.flatMap((document) => {
      const row = rows.get(document.id)
      const change = changeOf(shelf, row, document, 'imported')
      counts[change === undefined ? 'unchanged' : existing(row) ? 'updated' : 'created'] += 1
      return change ?? []
    })
    if (changes.length > 0) yield* record(builder, shelf, changes, registryRevision, author)
  }
  const isChanged = counts.created + counts.updated > 0
  return isChanged
    ? keep({ ...counts, registryRevision })
    : discard({ ...counts, registryRevision: registryRevision - 1 })
}

/** Writes the items as they are now, and a revision of each. */
function* record(
  builder: Builder,
  { items, revisions }: Shelf,
  changes: readonly Change[],
  registryRevision: number,
  { time, key }: Author,
): Steps<void> {
  const now = changes.map(({ id, revision, action, content }) => {
    const deleted = action === 'deleted' ? 1 : 0
    return { id, revision, changed_at: registryRevision, deleted, updated: time, content }
  })
  yield* ask(
    builder
      .insertInto(items)
      .values(now)
      .onConflict((conflict) =>
        conflict.column('id').doUpdateSet((column) => ({
          revision: column.ref('excluded.revision'),
          changed_at: column.ref('excluded.changed_at'),
          deleted: column.ref('excluded.deleted'),
          updated: column.ref('excluded.updated'),
          content: column.ref('excluded.content'),
        })),
      ),
  )
  yield* ask(
    builder.insertInto(revisions).values(
      changes.map(({ id, revision, action, changed, content }) => ({
        id,
        revision,
        registry_revision: registryRevision,
        action,
        time,
        key: key ?? null,
        changed: JSON.stringify(changed),
        content: action === 'deleted' ? null : content,
      })),
    ),
  )
}
