import { METHOD_VERSION } from '../advisory/catalogue.ts'
import type { Cell } from '../limits/cell.ts'
import { PlanBuilder } from '../limits/plan-builder.ts'
import type { PlanContentWire } from './limit-plans.schema.ts'
import { toPlanContent, toPlanRules } from './plan-reply.ts'
import { canonicalText, recordHash, type RecordWire } from './record.ts'
import { comparableInputs, inputsAnew } from './record-inputs.ts'
import { studyColumns, studyRow } from './study-rows.ts'

const MAX_DIFFERENCES = 100

/** Versions that figures were computed with. */
export interface Versions {
  readonly service_version: string
  readonly method_version: string
}

/** A figure that did not come out as it was published. */
export interface Difference {
  /** JSON Pointer into the record */
  readonly pointer: string
  readonly field: string
  readonly published: unknown
  readonly recomputed: unknown
}

export type Verdict = 'reproduced' | 'methods-changed' | 'not-reproduced' | 'record-altered'

/** What recomputing a record says, as it goes out. */
export interface VerificationWire {
  readonly verdict: Verdict
  readonly text: string
  readonly record_hash: string
  readonly computed_hash: string
  readonly published_with: Versions
  readonly recomputed_with: Versions
  readonly figures: { readonly compared: number; readonly equal: number; readonly different: number }
  readonly largest_difference_mps: number
  readonly differences: readonly Difference[]
}

const TEXTS: Readonly<Record<Verdict, string>> = {
  reproduced:
    'Every figure comes out again to the last digit from the segments, vessels and rules of the record, and its hash is that of its content.',
  'methods-changed':
    'The hash of the record is that of its content, but some figures come out differently: the methods have changed since. The service version that it names reproduces it.',
  'not-reproduced':
    'The hash of the record is that of its content, and the methods are the same, but some figures come out differently: either they were never computed so, or this service is at fault.',
  'record-altered':
    'The record is not what was published: its hash is not that of its content, not the one that was published, or not what the database holds.',
}

/** Compares two values leaf by leaf. */
class Comparison {
  compared = 0
  different = 0
  largest = 0
  readonly differences: Difference[] = []

  /** @param field  name of the figure, whose end is its unit */
  compare(published: unknown, recomputed: unknown, pointer: string, field = ''): void {
    if (isObject(published) && isObject(recomputed)) {
      for (const name of new Set([...Object.keys(published), ...Object.keys(recomputed)]))
        this.compare(published[name], recomputed[name], `${pointer}/${escaped(name)}`, name)
      return
    }
    this.compared += 1
    if (published !== recomputed) this.#add({ pointer, field, published, recomputed })
  }

  /** @param columns  names of n figures */
  compareRow(
    published: readonly unknown[],
    recomputed: readonly unknown[],
    pointer: string,
    columns: readonly string[],
  ): void {
    columns.forEach((column, i) => {
      if (column === 'problem_detail') return
      this.compare(published[i], recomputed[i], `${pointer}/${i}`, column)
    })
  }

  #add(difference: Difference): void {
    const { published, recomputed, field } = difference
    this.different += 1
    if (this.differences.length < MAX_DIFFERENCES)
      this.differences.push({
        ...difference,
        published: published ?? null,
        recomputed: recomputed ?? null,
      })
    const isSpeed = /(?:^|_)mps$/.test(field)
    if (isSpeed && typeof published === 'number' && typeof recomputed === 'number')
      this.largest = Math.max(this.largest, Math.abs(published - recomputed))
  }
}

type Fields = Readonly<Record<string, unknown>>

/** Lists are compared by index, like fields. */
const isObject = (value: unknown): value is Fields => typeof value === 'object' && value !== null

const escaped = (name: string): string => name.replaceAll('~', '~0').replaceAll('/', '~1')

/** The figures of a plan: what is said about them may be worded anew without a figure being another. */
const withoutWords = ({ stretches, totals, unassigned_vessels }: PlanContentWire) => ({
  stretches: stretches.map(({ cautions: _words, ...figures }) => figures),
  totals,
  unassigned_vessels,
})

/** What is known of a record from elsewhere, the database or the evidence on paper: it has to agree. */
export interface Stored {
  readonly plan?: RecordWire['plan']
  readonly publication?: RecordWire['publication']
  readonly recordHash?: string
}

function isAltered(record: RecordWire, computedHash: string, stored: Stored | undefined): boolean {
  if (record.record_hash !== computedHash) return true
  if (!stored) return false
  return (
    (stored.recordHash ?? computedHash) !== computedHash ||
    (stored.plan !== undefined &&
      (canonicalText(stored.plan) !== canonicalText(record.plan) ||
        canonicalText(stored.publication ?? {}) !== canonicalText(record.publication ?? {})))
  )
}

function verdictOf(isRecordAltered: boolean, different: number, published: Versions): Verdict {
  if (isRecordAltered) return 'record-altered'
  if (different === 0) return 'reproduced'
  return published.method_version === METHOD_VERSION ? 'not-reproduced' : 'methods-changed'
}

/** Takes the recomputed cells of a record as they come, and says at the end whether it is reproduced. */
export class Verification {
  readonly #record: RecordWire
  readonly #plan: PlanBuilder
  readonly #comparison = new Comparison()
  #rows = 0

  /** @throws Fault when the record's own rules cannot be those of its study */
  constructor(record: RecordWire) {
    this.#record = record
    this.#plan = new PlanBuilder(record.inputs.study, toPlanRules(record.plan.request))
  }

  /** @param cells  the next ones, in the order of the study */
  add(cells: readonly Cell[]): void {
    this.#plan.add(cells)
    const { study } = this.#record.inputs
    const { columns, rows } = this.#record.results
    for (const cell of cells) {
      this.#comparison.compareRow(
        rows[this.#rows] ?? [],
        studyRow(study, cell),
        `/results/rows/${this.#rows}`,
        columns,
      )
      this.#rows += 1
    }
  }

  /** Whether what readers see of the inputs gives what is computed with. */
  #compareInputs(): void {
    const { inputs, segments, vessel_classes, calibrations } = this.#record
    const published = comparableInputs({ study: inputs.study, segments, vessel_classes, calibrations })
    let anew: Readonly<Record<string, unknown>>
    try {
      anew = comparableInputs(inputsAnew(this.#record))
    } catch (error) {
      anew = { inputs: error instanceof Error ? error.message : String(error) }
    }
    this.#comparison.compare(published, anew, '')
  }

  /**
   * @param stored  what else is known of the plan; absent where there is only the record
   */
  conclude(serviceVersion: string, stored?: Stored): VerificationWire {
    const { study } = this.#record.inputs
    const { columns, rows } = this.#record.results
    const comparison = this.#comparison
    comparison.compare(columns, studyColumns(study), '/results/columns')
    this.#compareInputs()
    for (let i = this.#rows; i < rows.length; i += 1)
      comparison.compareRow(rows[i] ?? [], [], `/results/rows/${i}`, columns)
    const content = JSON.parse(JSON.stringify(toPlanContent(this.#plan.plan(), study))) as PlanContentWire
    comparison.compare(withoutWords(this.#record.plan), withoutWords(content), '/plan')
    const { publication } = this.#record
    const published: Versions = {
      service_version: publication?.service_version ?? this.#record.study.service_version,
      method_version: this.#record.study.method_version,
    }
    const computedHash = recordHash(this.#record)
    const { compared, different, largest, differences } = comparison
    const verdict = verdictOf(isAltered(this.#record, computedHash, stored), different, published)
    return {
      verdict,
      text: TEXTS[verdict],
      record_hash: this.#record.record_hash,
      computed_hash: computedHash,
      published_with: published,
      recomputed_with: { service_version: serviceVersion, method_version: METHOD_VERSION },
      figures: { compared, equal: compared - different, different },
      largest_difference_mps: largest,
      differences,
    }
  }
}
