import type { Calibration } from '../domain/calibration.ts'
import type { BoundingBox, LonLat } from '../domain/position.ts'
import type { VesselClass } from '../domain/vessel-classes.ts'
import type { JobStore } from './job-records.ts'

/** A segment as it is kept: its sailing line and its properties as they came, with what the registry adds. */
export interface SegmentRecord {
  readonly id: string
  readonly revision: number
  /** RFC 3339 UTC */
  readonly updated: string
  /** sailing line, drawn downstream, n ≥ 2 */
  readonly line: readonly LonLat[]
  /** geodesic length of the sailing line, m */
  readonly length: number
  readonly bbox: BoundingBox
  /** the segment object, as the schema of registry segments has it */
  readonly properties: Readonly<Record<string, unknown>>
}

/** What a write brings; the registry adds the rest. */
export type SegmentContent = Pick<SegmentRecord, 'id' | 'line' | 'length' | 'bbox' | 'properties'>

/** A vessel class of the caller's own. */
export interface ClassRecord {
  readonly id: string
  readonly revision: number
  readonly updated: string
  readonly vesselClass: VesselClass
}

type Json = Readonly<Record<string, unknown>>

/** A calibration without the rows it was made from. Never changes. */
export interface CalibrationRecord {
  readonly id: string
  /** RFC 3339 UTC */
  readonly created: string
  /** name of the access key it was made with; absent without keys */
  readonly key?: string
  /** what advisories take from it */
  readonly calibration: Calibration
  /** everything that was found, as it goes out, but for id and time */
  readonly document: Json
}

/** What a calibration was made from. */
export interface CalibrationRows {
  /** n passages, as received */
  readonly rows: readonly Json[]
  /** n passages with what the methods compute for each, as it goes out */
  readonly points: readonly Json[]
}

/** What is kept of a new calibration; the registry adds its id and time. */
export interface CalibrationContent extends CalibrationRows {
  readonly calibration: Omit<Calibration, 'id'>
  readonly document: Json
}

/** What became of deleting a calibration; nothing that a segment names is deleted. */
export type CalibrationDeleted =
  | { readonly outcome: 'deleted'; readonly registryRevision: number }
  | { readonly outcome: 'missing' }
  /** ids of the segments that name it, in their order */
  | { readonly outcome: 'in-use'; readonly usedBy: readonly string[] }

export interface SegmentFilter {
  readonly bbox?: BoundingBox
  readonly waterway?: string
  readonly gaugeId?: string
}

/** Everything that the registry holds at one moment; never changes. A later state is another snapshot. */
export interface Registry {
  /** rises by one with each write */
  readonly revision: number
  findSegment(id: string): SegmentRecord | undefined
  /** in the order of their ids */
  segments(filter?: SegmentFilter): readonly SegmentRecord[]
  findClass(id: string): ClassRecord | undefined
  /** in the order of their ids; own classes only */
  classes(): readonly ClassRecord[]
  findCalibration(id: string): CalibrationRecord | undefined
  /** in the order of their ids */
  calibrations(): readonly CalibrationRecord[]
}

export type Action = 'created' | 'updated' | 'deleted' | 'imported'

/** One change of a segment. */
export interface Revision {
  readonly revision: number
  readonly action: Action
  /** RFC 3339 UTC */
  readonly time: string
  /** name of the access key it was made with; absent without keys */
  readonly key?: string
  /** names of the properties, and `geometry`, that differ from the revision before */
  readonly changed: readonly string[]
}

/** Which revision a write expects: a number, any existing one, or none at all. */
export type Expected = number | 'any' | 'none'

/**
 * What became of a write. `stale` and `missing` leave everything as it was; something that exists where none was
 * expected is `stale` too.
 */
export type Written =
  | {
      readonly outcome: 'created' | 'updated' | 'unchanged' | 'deleted'
      readonly revision: number
      readonly registryRevision: number
    }
  | { readonly outcome: 'stale'; readonly current: number }
  | { readonly outcome: 'missing' }

export interface Imported {
  readonly created: number
  readonly updated: number
  readonly unchanged: number
  readonly registryRevision: number
}

/** Each allows what the one before allows, and more. */
export type Role = 'read' | 'write' | 'publish'

export interface AccessKey {
  readonly name: string
  readonly role: Role
  readonly created: string
  readonly expires?: string
  readonly revoked?: string
}

/** Who writes and when; the store has no clock of its own. */
export interface Author {
  /** RFC 3339 UTC */
  readonly time: string
  readonly key?: string
}

/** The database behind the registry. Every acknowledged write is on disk, and seen by every replica at once. */
export interface Store extends JobStore {
  readonly kind: 'sqlite' | 'postgres'
  /** The registry as of now: every write acknowledged before the call is in it. */
  current(): Promise<Registry>
  /** @throws Fault `calibration-not-found` when it names one that does not exist */
  putSegment(content: SegmentContent, expected: Expected, author: Author): Promise<Written>
  deleteSegment(id: string, expected: Expected, author: Author): Promise<Written>
  /**
   * All or nothing; unchanged content makes no revision.
   *
   * @throws Fault `calibration-not-found` when one of them names one that does not exist
   */
  importSegments(contents: readonly SegmentContent[], author: Author): Promise<Imported>
  /** newest first; empty for a segment that never was. Deleted segments keep theirs. */
  revisions(id: string): Promise<readonly Revision[]>
  findRevision(id: string, revision: number): Promise<SegmentRecord | undefined>
  putClass(vesselClass: VesselClass, expected: Expected, author: Author): Promise<Written>
  deleteClass(id: string, expected: Expected, author: Author): Promise<Written>
  /** Its id follows from content and time, so that the same rows sent again make another. */
  addCalibration(content: CalibrationContent, author: Author): Promise<string>
  deleteCalibration(id: string, author: Author): Promise<CalibrationDeleted>
  findCalibrationRows(id: string): Promise<CalibrationRows | undefined>
  /** SHA-256 of the key, hex -> the key, when it is neither revoked nor expired at `time`. */
  findKey(hash: string, time: string): Promise<AccessKey | undefined>
  addKey(key: AccessKey, hash: string): Promise<boolean>
  keys(): Promise<readonly AccessKey[]>
  revokeKey(name: string, time: string): Promise<boolean>
  close(): Promise<void>
}
