import { type Kysely, type Migration, Migrator, PostgresAdapter, sql } from 'kysely'

/** The schema of the database is one that this version does not know. */
export class SchemaTooNew extends Error {
  constructor(names: readonly string[]) {
    super(
      `The database was written by a newer version of the service (schema ${names.join(', ')}), which this version ` +
        'would damage. Start the newer version, or set DATABASE_URL to another database.',
    )
    this.name = 'SchemaTooNew'
  }
}

/** As of the first version; later ones are added below, never changed. */
const registry: Migration = {
  async up(db: Kysely<unknown>) {
    await db.schema
      .createTable('state')
      .addColumn('id', 'integer', (column) => column.primaryKey().check(sql`id = 1`))
      .addColumn('registry_revision', 'integer', (column) => column.notNull())
      .addColumn('access_revision', 'integer', (column) => column.notNull())
      .execute()
    await sql`insert into state (id, registry_revision, access_revision) values (1, 0, 0)`.execute(db)
    await createItems(db, 'segments', 'segment_revisions')
    await createItems(db, 'vessel_classes', 'vessel_class_revisions')
    await db.schema
      .createTable('access_keys')
      .addColumn('name', 'text', (column) => column.primaryKey().notNull())
      .addColumn('role', 'text', (column) => column.notNull())
      .addColumn('hash', 'text', (column) => column.notNull().unique())
      .addColumn('created', 'text', (column) => column.notNull())
      .addColumn('expires', 'text')
      .addColumn('revoked', 'text')
      .execute()
  },
}

/** Items as they are now, without their history. */
async function createCurrent(db: Kysely<unknown>, items: string): Promise<void> {
  await db.schema
    .createTable(items)
    // SQLite lets a primary key be null unless told otherwise
    .addColumn('id', 'text', (column) => column.primaryKey().notNull())
    .addColumn('revision', 'integer', (column) => column.notNull())
    .addColumn('changed_at', 'integer', (column) => column.notNull())
    .addColumn('deleted', 'integer', (column) => column.notNull())
    .addColumn('updated', 'text', (column) => column.notNull())
    .addColumn('content', 'text', (column) => column.notNull())
    .execute()
  await db.schema.createIndex(`${items}_changed_at`).on(items).column('changed_at').execute()
}

async function createItems(db: Kysely<unknown>, items: string, revisions: string): Promise<void> {
  await createCurrent(db, items)
  await db.schema
    .createTable(revisions)
    .addColumn('id', 'text', (column) => column.notNull().references(`${items}.id`))
    .addColumn('revision', 'integer', (column) => column.notNull())
    .addColumn('registry_revision', 'integer', (column) => column.notNull())
    .addColumn('action', 'text', (column) => column.notNull())
    .addColumn('time', 'text', (column) => column.notNull())
    .addColumn('key', 'text')
    .addColumn('changed', 'text', (column) => column.notNull())
    .addColumn('content', 'text')
    .addPrimaryKeyConstraint(`${revisions}_pkey`, ['id', 'revision'])
    .execute()
}

const calibrations: Migration = {
  async up(db: Kysely<unknown>) {
    await createCurrent(db, 'calibrations')
    await db.schema
      .createTable('calibration_rows')
      .addColumn('id', 'text', (column) => column.primaryKey().notNull().references('calibrations.id'))
      .addColumn('content', 'text', (column) => column.notNull())
      .execute()
  },
}

/** Types for which the engines have names, or orders, of their own. */
function columnTypes(db: Kysely<unknown>) {
  const isPostgres = db.getExecutor().adapter instanceof PostgresAdapter
  return {
    // ids are paged in the order of their bytes, whatever the locale of the database
    id: isPostgres ? sql`text collate "C"` : sql`text`,
    bytes: isPostgres ? sql`bytea` : sql`blob`,
  }
}

async function createJobs(db: Kysely<unknown>): Promise<void> {
  const { id, bytes } = columnTypes(db)
  await db.schema
    .createTable('jobs')
    .addColumn('id', id, (column) => column.primaryKey().notNull())
    .addColumn('kind', 'text', (column) => column.notNull())
    .addColumn('state', 'text', (column) => column.notNull())
    .addColumn('name', 'text')
    .addColumn('plan_id', id)
    .addColumn('created', 'text', (column) => column.notNull())
    .addColumn('started', 'text')
    .addColumn('finished', 'text')
    .addColumn('key', 'text')
    .addColumn('cells_total', 'integer', (column) => column.notNull())
    .addColumn('cells_done', 'integer', (column) => column.notNull())
    .addColumn('chunks_total', 'integer', (column) => column.notNull())
    .addColumn('chunks_done', 'integer', (column) => column.notNull())
    .addColumn('problem', 'text')
    .addColumn('registry_revision', 'integer', (column) => column.notNull())
    .addColumn('method_version', 'text', (column) => column.notNull())
    .addColumn('service_version', 'text', (column) => column.notNull())
    // large ones last: SQLite reads a row from its start
    .addColumn('result', bytes)
    .addColumn('request', bytes, (column) => column.notNull())
    .execute()
  await db.schema.createIndex('jobs_state').on('jobs').column('state').execute()
  await db.schema.createIndex('jobs_plan_id').on('jobs').column('plan_id').execute()
  await db.schema
    .createTable('job_inputs')
    .addColumn('id', id, (column) => column.primaryKey().notNull().references('jobs.id'))
    .addColumn('content', bytes, (column) => column.notNull())
    .execute()
  await db.schema
    .createTable('job_chunks')
    .addColumn('job_id', id, (column) => column.notNull().references('jobs.id'))
    .addColumn('number', 'integer', (column) => column.notNull())
    .addColumn('cells', 'integer', (column) => column.notNull())
    .addColumn('content', bytes, (column) => column.notNull())
    .addPrimaryKeyConstraint('job_chunks_pkey', ['job_id', 'number'])
    .execute()
}

async function createPlans(db: Kysely<unknown>): Promise<void> {
  const { id, bytes } = columnTypes(db)
  await db.schema
    .createTable('limit_plans')
    .addColumn('id', id, (column) => column.primaryKey().notNull())
    .addColumn('name', 'text', (column) => column.notNull())
    .addColumn('state', 'text', (column) => column.notNull())
    .addColumn('study_id', id, (column) => column.notNull().references('jobs.id'))
    .addColumn('created', 'text', (column) => column.notNull())
    .addColumn('key', 'text')
    .addColumn('request', bytes, (column) => column.notNull())
    .addColumn('content', bytes, (column) => column.notNull())
    .execute()
  await db.schema.createIndex('limit_plans_study_id').on('limit_plans').column('study_id').execute()
  await db.schema
    .createTable('limit_plan_publications')
    .addColumn('plan_id', id, (column) => column.primaryKey().notNull().references('limit_plans.id'))
    .addColumn('number', 'text', (column) => column.notNull().unique())
    .addColumn('publication', bytes, (column) => column.notNull())
    .addColumn('record', bytes, (column) => column.notNull())
    .execute()
}

const jobs: Migration = {
  async up(db: Kysely<unknown>) {
    await createJobs(db)
    await createPlans(db)
  },
}

/** In the order of their names. */
const MIGRATIONS: Readonly<Record<string, Migration>> = {
  '001-registry': registry,
  '002-calibrations': calibrations,
  '003-jobs': jobs,
}

/**
 * Brings the schema up to date. On PostgreSQL it lets one replica in at a time; on SQLite the caller holds the lock.
 *
 * @throws SchemaTooNew
 */
export async function migrate(db: Kysely<unknown>): Promise<void> {
  const provider = { getMigrations: () => Promise.resolve({ ...MIGRATIONS }) }
  const { error } = (await new Migrator({ db, provider }).migrateToLatest()) as { error?: Error }
  if (error === undefined) return
  const unknown = await unknownMigrations(db).catch(() => [])
  if (unknown.length > 0) throw new SchemaTooNew(unknown)
  throw error
}

async function unknownMigrations(db: Kysely<unknown>): Promise<string[]> {
  const { rows } = await sql<{ name: string }>`select name from kysely_migration order by name`.execute(db)
  return rows.map(({ name }) => name).filter((name) => !(name in MIGRATIONS))
}
