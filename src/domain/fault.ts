/** What a figure in a fault may be. Names carry the unit (`depth_m`), since facts leave the service as they are. */
export type Facts = Readonly<Record<string, string | number | boolean | readonly string[]>>

/** Reasons for which a request cannot be answered. The edge gives each a status and a title. */
export type FaultCode =
  | 'invalid-request'
  | 'malformed-json'
  | 'malformed-csv'
  | 'key-required'
  | 'role-too-small'
  | 'route-not-found'
  | 'segment-not-found'
  | 'vessel-class-not-found'
  | 'revision-not-found'
  | 'study-not-found'
  | 'limit-plan-not-found'
  | 'calibration-not-found'
  | 'method-not-found'
  | 'problem-not-found'
  | 'method-not-allowed'
  | 'not-acceptable'
  | 'request-timeout'
  | 'built-in-class'
  | 'in-use'
  | 'study-not-finished'
  | 'limit-plan-published'
  | 'number-taken'
  | 'stale-revision'
  | 'revision-required'
  | 'payload-too-large'
  | 'too-many-cells'
  | 'line-too-long'
  | 'unsupported-media-type'
  | 'impossible-input'
  | 'too-few-passages'
  | 'units-doubtful'
  | 'too-many-requests'
  | 'overloaded'
  | 'store-unavailable'
  | 'storage-full'
  | 'stopping'
  | 'internal'

export type FaultItemCode =
  | 'required'
  | 'unknown-field'
  | 'wrong-type'
  | 'out-of-range'
  | 'not-in-list'
  | 'one-of'
  | 'pattern'
  | 'clash'

/** One thing wrong with a request: where it is, what kind, and what to do about it. */
export interface FaultItem {
  /** JSON Pointer fragment into the body, such as `#/segment/depth_m`. */
  readonly pointer?: string
  /** Name of the query or path parameter, in place of a pointer. */
  readonly parameter?: string
  readonly line?: number
  readonly code: FaultItemCode
  readonly detail: string
  readonly allowed?: readonly string[]
  readonly facts?: Facts
}

/** A request that cannot be answered as it stands. Anything else that is thrown is our own error. */
export class Fault extends Error {
  constructor(
    readonly code: FaultCode,
    message: string,
    readonly parts: { readonly facts?: Facts; readonly errors?: readonly FaultItem[] } = {},
  ) {
    super(message)
    this.name = 'Fault'
  }
}

/** Valid fields that cannot hold together, each with the figures that clash. */
export function impossible(errors: readonly FaultItem[]): Fault {
  const first = errors[0]
  const more = errors.length > 1 ? ` (and ${errors.length - 1} more)` : ''
  return new Fault('impossible-input', `${first?.detail ?? 'The input is impossible'}${more}`, { errors })
}
