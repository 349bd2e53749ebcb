import type { Compilable, CompiledQuery } from 'kysely'
import type { Builder, State } from './schema.ts'

/**
 * The statements of one transaction, asked for one by one. Who runs them decides whether that takes a promise: SQLite
 * runs them all at once, so that nothing else in the process sees or waits for half a transaction.
 */
export type Steps<T> = Generator<CompiledQuery, T, readonly unknown[]>

/** Runs a query as a step: `const rows = yield* ask(query)`. */
export function* ask<Row>(query: Compilable<Row>): Steps<readonly Row[]> {
  return (yield query.compile()) as readonly Row[]
}

/** How a write ends: committed, or rolled back with an answer that says why. */
export interface Verdict<T> {
  readonly isKept: boolean
  readonly answer: T
}

export const keep = <T>(answer: T): Verdict<T> => ({ isKept: true, answer })
export const discard = <T>(answer: T): Verdict<T> => ({ isKept: false, answer })

/** A database of one kind. What it throws is a `Fault` where the database is at fault. */
export interface Engine {
  readonly kind: 'sqlite' | 'postgres'
  readonly builder: Builder
  /** The numbers of the last committed write. */
  state(): Promise<State>
  /** Every step sees the same moment. */
  read<T>(steps: () => Steps<T>): Promise<T>
  /** The steps may run several times until one run is committed. */
  write<T>(steps: () => Steps<Verdict<T>>): Promise<T>
  close(): Promise<void>
}
