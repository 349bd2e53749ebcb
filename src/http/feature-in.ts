import { z } from 'zod'
import { Fault, type FaultItem } from '../domain/fault.ts'
import type { LonLat } from '../domain/position.ts'
import { densify } from '../geo/densify.ts'
import type { GeometryFinding } from '../geo/finding.ts'
import { checkLine } from '../geo/line.ts'
import { boundingBox, lineLength } from '../geo/measure.ts'
import type { SegmentContent } from '../store/registry.ts'
import { crsItems } from './crs.ts'
import { ID_PATTERN } from './fields.ts'
import { RegistrySegmentFields, type RegistrySegmentWire } from './segment.schema.ts'
import { toRegistrySegment } from './to-registry-segment.ts'
import { faultItems } from './validation.ts'

/** A feature as it comes: what it holds is checked piece by piece, so that every fault is told with its place. */
export const FeatureIn = z
  .looseObject({
    type: z.literal('Feature'),
    id: z.union([z.string(), z.number()]).optional(),
    geometry: z.looseObject({ type: z.string() }),
    properties: z.record(z.string(), z.unknown()),
  })
  .meta({
    id: 'SegmentFeatureInput',
    description:
      'A GeoJSON feature: a sailing line of [longitude, latitude], drawn downstream, and a segment object. A crs member is refused unless it names CRS84.',
  })

export type FeatureWire = z.output<typeof FeatureIn>

/** Something doubtful that was accepted. */
export interface Remark {
  readonly pointer: string
  readonly feature_id?: string
  readonly code: string
  readonly detail: string
  readonly facts?: FaultItem['facts']
}

/** A feature as it will be kept, or everything that is wrong with it. */
export interface Read {
  readonly content?: SegmentContent
  readonly faults: readonly FaultItem[]
  readonly remarks: readonly Remark[]
}

/** What replies add; accepted and ignored when it comes back. */
const READ_ONLY = ['revision', 'updated', 'length_m', 'bbox']
const KNOWN = new Set(Object.keys(RegistrySegmentFields.shape))

const isPlain = (value: unknown): value is string | number | boolean =>
  typeof value === 'string' ||
  typeof value === 'boolean' ||
  (typeof value === 'number' && Number.isFinite(value))

/** Properties without what replies add; foreign ones are kept as attributes where that is asked for. */
function ownProperties(properties: Readonly<Record<string, unknown>>, keepsUnknown: boolean) {
  const entries = Object.entries(properties).filter(([name]) => !READ_ONLY.includes(name))
  if (!keepsUnknown) return Object.fromEntries(entries)
  const known = entries.filter(([name]) => KNOWN.has(name))
  const foreign = entries
    .filter(([name, value]) => !KNOWN.has(name) && value !== null)
    .map(([name, value]) => [name, isPlain(value) ? value : JSON.stringify(value)] as const)
  if (foreign.length === 0) return Object.fromEntries(known)
  const { attributes } = properties
  const own = typeof attributes === 'object' && attributes !== null ? attributes : {}
  return { ...Object.fromEntries(known), attributes: { ...Object.fromEntries(foreign), ...own } }
}

/** Turns pointers into a segment into pointers into the feature. */
const moved = (item: FaultItem, at: string, id: string | undefined): FaultItem & { feature_id?: string } => ({
  ...item,
  pointer: `${at}${(item.pointer ?? '#').replace(/^#(?:\/segment)?/, '')}`,
  ...(id !== undefined && { feature_id: id }),
})

function idItems(id: FeatureWire['id'], at: string): FaultItem[] {
  const pointer = `${at}/id`
  if (id === undefined) return [{ pointer, code: 'required', detail: 'is required: a name for the segment' }]
  if (ID_PATTERN.test(String(id))) return []
  return [
    { pointer, code: 'pattern', detail: 'must be 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit' },
  ]
}

function remarkOf(finding: GeometryFinding, at: string, id: string | undefined): Remark {
  return {
    pointer: `${at}${finding.pointer}`,
    ...(id !== undefined && { feature_id: id }),
    code: finding.code,
    detail: finding.detail,
    ...(finding.facts && { facts: finding.facts }),
  }
}

function readLine(feature: FeatureWire, at: string, id: string | undefined, near: LonLat | undefined) {
  const checked = checkLine(feature.geometry, near ? { near } : {})
  const faults = checked.findings.flatMap((finding) =>
    finding.level === 'fault'
      ? [
          {
            ...moved(
              { code: finding.kind, detail: finding.detail, ...(finding.facts && { facts: finding.facts }) },
              at,
              id,
            ),
            pointer: `${at}/geometry${finding.pointer}`,
          },
        ]
      : [],
  )
  const remarks = checked.findings
    .filter(({ level }) => level === 'remark')
    .map((finding) => remarkOf(finding, `${at}/geometry`, id))
  return { line: checked.line ? densify(checked.line) : undefined, faults, remarks }
}

/**
 * Reads a feature.
 *
 * @param at    pointer to it, `#` or `#/features/17`
 * @param near  where the other features lie, so that swapped axes show
 */
export function readFeature(feature: FeatureWire, at: string, keepsUnknown: boolean, near?: LonLat): Read {
  const id = feature.id === undefined ? undefined : String(feature.id)
  const geometry = readLine(feature, at, id, near)
  const properties = ownProperties(feature.properties, keepsUnknown)
  const parsed = RegistrySegmentFields.safeParse(properties, { error: () => '' })
  const faults: FaultItem[] = [
    ...[
      ...crsItems(feature, at),
      ...idItems(feature.id, at),
      ...crsItems(feature.geometry, `${at}/geometry`),
    ].map((item) => ({ ...item, ...(id && { feature_id: id }) })),
    ...geometry.faults,
  ]
  if (!parsed.success) {
    const items = faultItems(parsed.error, properties, RegistrySegmentFields, 'body')
    faults.push(...items.map((item) => moved(item, `${at}/properties`, id)))
  }
  if (faults.length > 0 || !parsed.success || !geometry.line || id === undefined) {
    return { faults, remarks: geometry.remarks }
  }
  return placed(id, geometry.line, parsed.data, at, geometry.remarks)
}

function placed(
  id: string,
  line: readonly LonLat[],
  wire: RegistrySegmentWire,
  at: string,
  remarks: readonly Remark[],
): Read {
  try {
    const length = lineLength(line)
    const { findings } = toRegistrySegment(wire, { line, length })
    const ofPlace = findings
      .filter(({ level }) => level === 'remark')
      .map((finding) => remarkOf(finding, `${at}/properties`, id))
    const content = { id, line, length, bbox: boundingBox(line), properties: wire }
    return { content, faults: [], remarks: [...remarks, ...ofPlace] }
  } catch (error) {
    if (!(error instanceof Fault) || error.code !== 'impossible-input') throw error
    const items = error.parts.errors ?? []
    return { faults: items.map((item) => moved(item, `${at}/properties`, id)), remarks }
  }
}
