import type { Sampled } from '../limits/cell.ts'
import type { Plan, PlanRules } from '../limits/plan.ts'
import type { Study } from '../limits/study.ts'

export type PlanState = 'draft' | 'published' | 'superseded'

/** What an authority says of a plan when it publishes it, with what it was published from. */
export interface EvidencePublication {
  readonly number: string
  readonly title: string
  readonly authority: string
  readonly signatory?: string | undefined
  /** date, RFC 3339 */
  readonly effectiveFrom: string
  /** number of the publication that this one replaces */
  readonly supersedes?: string | undefined
  readonly note?: string | undefined
  /** RFC 3339 UTC */
  readonly publishedAt: string
  /** name of the access key; absent without keys */
  readonly publishedBy?: string | undefined
  readonly serviceVersion: string
  readonly methodVersion: string
  /** `sha256:` and hex */
  readonly recordHash: string
}

/** A published method as the evidence cites it. */
export interface EvidenceMethod {
  readonly id: string
  readonly name: string
  readonly reference: string
  /** whether the source was recalled and not read again */
  readonly isFromMemory: boolean
}

/** What the evidence of a limit plan is made from: plain data. */
export interface EvidenceView {
  readonly id: string
  readonly name: string
  readonly state: PlanState
  readonly studyId: string
  readonly studyName?: string | undefined
  readonly study: Study
  readonly rules: PlanRules
  readonly plan: Plan
  readonly publication?: EvidencePublication | undefined
  /** what the samples of the governing cell say, stretch by stretch; absent without uncertainty */
  readonly sampled?: readonly (Sampled | undefined)[] | undefined
  readonly methods: readonly EvidenceMethod[]
  /** of the service that makes this document */
  readonly serviceVersion: string
  readonly methodVersion: string
  /** when the document was made, RFC 3339 UTC */
  readonly made: string
}
