import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { inject, onTestFinished } from 'vitest'
import { findVesselClass, type VesselClass } from '../../src/domain/vessel-classes.ts'
import type { LonLat } from '../../src/domain/position.ts'
import { openStore } from '../../src/store/open.ts'
import type { Author, SegmentContent, Store } from '../../src/store/registry.ts'
import { emptyDatabase } from './postgres.ts'

export interface TestEngine {
  readonly kind: 'sqlite' | 'postgres'
  /** Address of a new, empty database. */
  readonly fresh: () => Promise<string>
}

/** A folder that is removed at the end of the test. */
export function temporaryFolder(whenDone: (remove: () => void) => void = onTestFinished): string {
  const folder = mkdtempSync(join(tmpdir(), 'store-'))
  whenDone(() => {
    rmSync(folder, { recursive: true, force: true })
  })
  return folder
}

/** Every suite of the store runs on each of them. */
export const ENGINES: readonly TestEngine[] = [
  { kind: 'sqlite', fresh: () => Promise.resolve(`sqlite:${temporaryFolder()}/data/registry.db`) },
  { kind: 'postgres', fresh: () => emptyDatabase(inject('postgresUrl')) },
]

/** A store that is closed at the end of the test. */
export async function testStore(url: string): Promise<Store> {
  const store = await openStore(url)
  onTestFinished(() => store.close())
  return store
}

export const AUTHOR: Author = { time: '2026-03-01T08:00:00Z', key: 'surveyor' }

/** Author at a minute of an hour. */
export const at = (minute: number): Author => ({
  ...AUTHOR,
  time: `2026-03-01T09:${String(minute).padStart(2, '0')}:00Z`,
})

/** A segment whose properties are the default ones with these on top. */
export function segment(id: string, properties: Readonly<Record<string, unknown>> = {}): SegmentContent {
  const line: LonLat[] = [
    [5, 52],
    [5.01, 52],
  ]
  return {
    id,
    line,
    length: 686.6,
    bbox: [5, 52, 5.01, 52],
    properties: { name: id, depth_m: 3.5, width_m: 40, bank_distance_m: 20, ...properties },
  }
}

/** A class of the caller's own, like a built-in one. */
export const vesselClass = (id: string, changes: Partial<VesselClass> = {}): VesselClass => ({
  ...(findVesselClass('cemt-iv') as VesselClass),
  id,
  ...changes,
})
