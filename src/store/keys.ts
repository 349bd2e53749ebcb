import { ask, discard, type Engine, keep, type Steps, type Verdict } from './engine.ts'
import type { AccessKey, Store } from './registry.ts'
import { type AccessKeyTable, type Builder, stateQuery } from './schema.ts'

const toKey = ({ name, role, created, expires, revoked }: AccessKeyTable): AccessKey => ({
  name,
  role,
  created,
  ...(expires !== null && { expires }),
  ...(revoked !== null && { revoked }),
})

/** Raises the revision by which every replica learns that keys changed; one writer at a time. */
function* raiseRevision(builder: Builder): Steps<void> {
  yield* ask(
    builder.updateTable('state').set((column) => ({ access_revision: column('access_revision', '+', 1) })),
  )
}

function* add(builder: Builder, key: AccessKey, hash: string): Steps<Verdict<boolean>> {
  yield* raiseRevision(builder)
  const { name, role, created, expires = null, revoked = null } = key
  const rows = yield* ask(
    builder
      .insertInto('access_keys')
      .values({ name, role, hash, created, expires, revoked })
      .onConflict((conflict) => conflict.column('name').doNothing())
      .returning('name'),
  )
  return rows.length > 0 ? keep(true) : discard(false)
}

function* revoke(builder: Builder, name: string, time: string): Steps<Verdict<boolean>> {
  yield* raiseRevision(builder)
  const rows = yield* ask(
    builder
      .updateTable('access_keys')
      .set({ revoked: time })
      .where('name', '=', name)
      .where('revoked', 'is', null)
      .returning('name'),
  )
  return rows.length > 0 ? keep(true) : discard(false)
}

interface Keys {
  readonly revision: number
  /** Found by hash, not compared with the key: nobody can choose a hash, so the time that a look-up takes tells nothing. */
  readonly byHash: ReadonlyMap<string, AccessKey>
}

function* load(builder: Builder): Steps<Keys> {
  const [state] = yield* ask<{ access_revision: number }>({ compile: () => stateQuery(builder) })
  const rows = yield* ask(builder.selectFrom('access_keys').selectAll())
  return {
    revision: state?.access_revision ?? 0,
    byHash: new Map(rows.map((row) => [row.hash, toKey(row)])),
  }
}

const isValid = ({ expires, revoked }: AccessKey, time: string): boolean =>
  revoked === undefined && (expires === undefined || Date.parse(time) < Date.parse(expires))

type KeyStore = Pick<Store, 'findKey' | 'addKey' | 'keys' | 'revokeKey'>

/** The keys, held in memory and loaded again when any replica changed one. */
export function keysOf(engine: Engine): KeyStore {
  const { builder } = engine
  let known: Keys | undefined
  return {
    findKey: async (hash, time) => {
      const { access_revision: revision } = await engine.state()
      if (known?.revision !== revision) known = await engine.read(() => load(builder))
      const key = known.byHash.get(hash)
      return key !== undefined && isValid(key, time) ? key : undefined
    },
    addKey: (key, hash) => engine.write(() => add(builder, key, hash)),
    keys: async () => {
      const { byHash } = await engine.read(() => load(builder))
      return [...byHash.values()].sort((a, b) => (a.name < b.name ? -1 : 1))
    },
    revokeKey: (name, time) => engine.write(() => revoke(builder, name, time)),
  }
}
