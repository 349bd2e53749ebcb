import type { Judging } from '../passages/judgement.ts'
import type { Fairway } from '../passages/placement.ts'
import type { VesselGuess } from '../passages/vessel-guess.ts'

/** What a thread is told. A session is one log; its vessels are numbered in the order in which they are sent. */
export type ToThread =
  | {
      readonly kind: 'open'
      readonly session: number
      readonly judging: Judging
      readonly fairways: readonly Fairway[]
    }
  | {
      readonly kind: 'judge'
      readonly session: number
      readonly task: number
      readonly newGuesses: readonly VesselGuess[]
      /** reports as `writeReport` has them */
      readonly reports: Float64Array
    }
  | { readonly kind: 'close'; readonly session: number }

/** What a thread answers to a task. */
export interface FromThread {
  readonly task: number
  /** as `writeJudgement` has them */
  readonly judgements: Float64Array
  /** by report; empty when they are not asked for */
  readonly cautions: readonly (readonly string[])[]
}
