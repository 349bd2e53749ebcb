import { hash } from 'node:crypto'
import canonicalize from 'canonicalize'
import { METHODS } from '../advisory/catalogue.ts'
import { Fault } from '../domain/fault.ts'
import type { Study } from '../limits/study.ts'
import type { JobRecord, JobStore, PlanRecord } from '../store/job-records.ts'
import type { LimitPlanWire, PlanContentWire, PublicationWire } from './limit-plans.schema.ts'
import { toMethodReply } from './methods.ts'
import { contentOf } from './plan-reply.ts'
import type { StudyInputs } from './study-of.ts'
import { cellsOf, inputsOf } from './study-results.ts'
import { studyColumns, studyRow, type StudyValue } from './study-rows.ts'

/** Rises when the form of the record changes. */
const RECORD_VERSION = 1
/** Cells of a study whose record is still one text (own choice). */
const MAX_CELLS = 200_000

const STATEMENT =
  'A proposal for the competent authority, computed from the inputs below. Local rules and the judgement of licensed professionals come first.'
const UNITS =
  'In `inputs.study` figures are SI: lengths and levels m, speeds and currents m/s, volumes m3, chainages m along the waterway. A pair of distances or banks is left and right looking downstream, or nearer and farther where no side is known.'

type Json = Readonly<Record<string, unknown>>

/** Everything a limit plan rests on, as one document. */
export interface RecordWire {
  readonly record_version: number
  readonly statement: string
  readonly plan: PlanContentWire & {
    readonly id: string
    readonly name: string
    readonly study_id: string
    readonly created: string
    readonly request: LimitPlanWire
  }
  /** absent from a draft */
  readonly publication?: Omit<PublicationWire, 'record_hash'>
  readonly study: {
    readonly id: string
    readonly name?: string
    readonly created: string
    readonly request: Json
    readonly registry_revision: number
    readonly method_version: string
    readonly service_version: string
  }
  readonly inputs: { readonly units: string; readonly study: Study }
  readonly segments: readonly Json[]
  readonly vessel_classes: readonly Json[]
  readonly calibrations: readonly Json[]
  readonly results: { readonly columns: readonly string[]; readonly rows: readonly (readonly StudyValue[])[] }
  readonly sources: readonly Json[]
  readonly record_hash: string
}

/** RFC 8785 text. */
export function canonicalText(value: unknown): string {
  const text = canonicalize(value)
  if (text === undefined) throw new RangeError('A record is an object')
  return text
}

/** SHA-256 over the canonical form of a record without its own hash. */
export function recordHash(record: Omit<RecordWire, 'record_hash'> | RecordWire): string {
  const { record_hash: _own, ...content } = record as RecordWire
  return `sha256:${hash('sha256', canonicalText(content))}`
}

/** The rows of results of a study, by the columns. */
export async function resultRows(
  job: JobRecord,
  { study }: Pick<StudyInputs, 'study'>,
  store: JobStore,
): Promise<RecordWire['results']> {
  const columns = studyColumns(study)
  const rows: StudyValue[][] = []
  for await (const cells of cellsOf(job, store)) {
    for (const cell of cells) rows.push(studyRow(study, cell))
  }
  return { columns, rows }
}

/** What a plan rests on. */
export interface PlanBasis {
  readonly plan: PlanRecord
  readonly study: JobRecord
  readonly inputs: StudyInputs
}

function assertRecordable({ cellsTotal }: JobRecord): void {
  if (cellsTotal <= MAX_CELLS) return
  throw new Fault(
    'too-many-cells',
    `The study has ${cellsTotal} cells, and a record holds at most ${MAX_CELLS}: make a plan from a study of fewer segments, vessels or levels`,
    { facts: { limit: MAX_CELLS, cells: cellsTotal } },
  )
}

/** What a record says of the plan itself. */
export const frozenPlan = (plan: PlanRecord): RecordWire['plan'] => ({
  id: plan.id,
  name: plan.name,
  study_id: plan.studyId,
  created: plan.created,
  request: plan.request as unknown as LimitPlanWire,
  ...contentOf(plan),
})

/**
 * The record of a plan.
 *
 * @param publication  absent from a draft
 * @throws Fault `too-many-cells`
 */
export async function recordOf(
  { plan, study, inputs }: PlanBasis,
  publication: RecordWire['publication'],
  store: JobStore,
): Promise<RecordWire> {
  assertRecordable(study)
  const record: Omit<RecordWire, 'record_hash'> = {
    record_version: RECORD_VERSION,
    statement: STATEMENT,
    plan: frozenPlan(plan),
    ...(publication && { publication }),
    study: {
      id: study.id,
      ...(study.name !== undefined && { name: study.name }),
      created: study.created,
      request: study.request,
      registry_revision: study.registryRevision,
      method_version: study.methodVersion,
      service_version: study.serviceVersion,
    },
    inputs: { units: UNITS, study: inputs.study },
    segments: inputs.segments,
    vessel_classes: inputs.vessel_classes,
    calibrations: inputs.calibrations,
    results: await resultRows(study, inputs, store),
    sources: METHODS.map(toMethodReply),
  }
  return { ...record, record_hash: recordHash(record) }
}

/** A plan with the study it was drawn from. */
export async function basisOf(plan: PlanRecord, store: JobStore): Promise<PlanBasis> {
  const study = await store.findJob(plan.studyId)
  // a study is not deleted while a plan rests on it
  if (!study) throw new RangeError(`The study of the plan ${plan.id} is gone`)
  return { plan, study, inputs: await inputsOf(study.id, store) }
}
