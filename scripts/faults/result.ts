/** What a fault cost. */
export interface Result {
  readonly name: string
  /** writes that were acknowledged before, during and after it */
  readonly acknowledged: number
  readonly lost: readonly string[]
  /** answers that no caller should see, and anything that was not as it must be */
  readonly wrong: readonly string[]
  readonly note: string
}
