import type { Facts, FaultItemCode } from '../domain/fault.ts'

/** What makes geometry unusable. */
export type GeometryFaultCode =
  | 'not-a-line'
  | 'too-few-positions'
  | 'too-many-positions'
  | 'not-a-position'
  | 'not-finite'
  | 'looks-projected'
  | 'axes-swapped'
  | 'longitude-beyond-180'
  | 'latitude-beyond-85'
  | 'without-length'
  | 'too-long'
  | 'runs-back-on-itself'
  | 'too-tangled'
  | 'bank-crosses-line'
  | 'banks-on-one-side'
  | 'bank-on-wrong-side'
  | 'bank-out-of-reach'
  | 'chainage-without-span'
  | 'bottom-wider-than-banks'

/** What is doubtful and accepted. */
export type GeometryRemarkCode =
  | 'height-dropped'
  | 'positions-dropped'
  | 'axes-doubtful'
  | 'crosses-itself'
  | 'banks-swapped'
  | 'bank-too-short'
  | 'bank-opens'
  | 'bank-missed'
  | 'bank-widens'
  | 'chainage-differs-from-length'
  | 'widths-differ'
  | 'station-outside'

interface Common {
  /** into what was checked, such as `/coordinates/3` of a line or `/left/line` of banks; empty for the whole */
  readonly pointer: string
  /** what is wrong, where, and what to do */
  readonly detail: string
  readonly facts?: Facts
}

/** One thing about given geometry: a fault refuses it, a remark tells what was made of it. */
export type GeometryFinding =
  | (Common & {
      readonly level: 'fault'
      readonly code: GeometryFaultCode
      /** the kind of it in lists of faults */
      readonly kind: FaultItemCode
    })
  | (Common & { readonly level: 'remark'; readonly code: GeometryRemarkCode })

export function hasFault(findings: readonly GeometryFinding[]): boolean {
  return findings.some(({ level }) => level === 'fault')
}
