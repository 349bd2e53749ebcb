import { ask, type Steps } from './engine.ts'
import type { Revision, SegmentRecord } from './registry.ts'
import type { Builder } from './schema.ts'
import { SEGMENTS, toSegment } from './shelves.ts'

export function* revisionsOf(builder: Builder, id: string): Steps<readonly Revision[]> {
  const rows = yield* ask(
    builder
      .selectFrom(SEGMENTS.revisions)
      .select(['revision', 'action', 'time', 'key', 'changed'])
      .where('id', '=', id)
      .orderBy('revision', 'desc'),
  )
  return rows.map(({ revision, action, time, key, changed }) => ({
    revision,
    action,
    time,
    ...(key !== null && { key }),
    changed: JSON.parse(changed) as string[],
  }))
}

/** The segment as a revision left it; undefined for one that deleted it. */
export function* revisionOf(
  builder: Builder,
  id: string,
  revision: number,
): Steps<SegmentRecord | undefined> {
  const [row] = yield* ask(
    builder
      .selectFrom(SEGMENTS.revisions)
      .select(['time', 'content'])
      .where('id', '=', id)
      .where('revision', '=', revision),
  )
  if (row === undefined || row.content === null) return undefined
  return toSegment({ id, revision, updated: row.time, content: row.content })
}
