import type { LonLat } from '../domain/position.ts'
import { tangleOf } from './crossings.ts'
import { hasFault, type GeometryFinding } from './finding.ts'
import { axesHint, positionFindings } from './line-positions.ts'
import { lineTree } from './line-tree.ts'
import { lineLength } from './measure.ts'
import { edgeLength } from './plane.ts'

/** Most vertices of a line: one every metre over 100 km. */
const MOST_POSITIONS = 100_000
/** Vertices closer than this, m, are one: a tenth of what 7 decimals of a degree resolve. */
const SAME_PLACE = 0.001
/** Longest line, m: longer than any navigable river, and a bound for the pieces of 1 km. */
const LONGEST_LINE = 7_000_000

/** A GeoJSON geometry as it was received. */
export interface Geometry {
  readonly type: string
  readonly coordinates?: unknown
}

export interface LineOptions {
  /** what the line is, for the sentences; default `sailing line` */
  readonly name?: string
  /** a position near which the line should lie, such as `typicalPosition` of the other features */
  readonly near?: LonLat
  /** whether the line may cross and touch itself, as banks along moles do; default false */
  readonly mayCross?: boolean
}

export interface CheckedLine {
  /** n positions, n ≥ 2, no two consecutive ones at one place; null with a fault */
  readonly line: readonly LonLat[] | null
  readonly findings: readonly GeometryFinding[]
}

type Positions = readonly (readonly number[])[]

const HINTS: Readonly<Record<string, string>> = {
  MultiLineString: 'join its parts, or make a feature of each',
  Polygon: 'give the waterline as a LineString, not the area it bounds',
  MultiPolygon: 'give the waterline as a LineString, not the areas it bounds',
  Point: 'give at least two positions',
  MultiPoint: 'give its positions as the coordinates of a LineString',
}

/** Faults of the shape: type, number of positions. */
function shapeFindings({ type, coordinates }: Geometry, name: string): GeometryFinding[] {
  const fault = (
    code: 'not-a-line' | 'too-few-positions' | 'too-many-positions',
    pointer: string,
    detail: string,
  ): GeometryFinding[] => {
    const kind = code === 'not-a-line' ? 'wrong-type' : 'out-of-range'
    return [{ level: 'fault', code, kind, pointer, detail }]
  }
  if (type !== 'LineString') {
    const hint = HINTS[type] ?? 'give a LineString'
    return fault('not-a-line', '/type', `The ${name} is a ${type} where a LineString is needed: ${hint}`)
  }
  if (!Array.isArray(coordinates)) {
    return fault('not-a-line', '/coordinates', `The coordinates of the ${name} are not a list of positions`)
  }
  const { length } = coordinates
  if (length < 2) {
    const detail = `The ${name} has ${length} of the two positions that it needs at least`
    return fault('too-few-positions', '/coordinates', detail)
  }
  if (length > MOST_POSITIONS) {
    const detail = `The ${name} has ${length} vertices, at most ${MOST_POSITIONS} are taken: simplify it or cut it`
    return fault('too-many-positions', '/coordinates', detail)
  }
  return []
}

/** Leaves out vertices at the place of the one before; the first and the last stay as they are. */
function withoutRepeats(line: readonly LonLat[]): LonLat[] {
  const kept: LonLat[] = []
  const isAtLastOf = (position: LonLat) => {
    const before = kept.at(-1)
    return before !== undefined && edgeLength(before, position) < SAME_PLACE
  }
  for (const position of line) if (!isAtLastOf(position)) kept.push(position)
  const last = line.at(-1)
  if (last === undefined || last === kept.at(-1)) return kept
  while (kept.length > 1 && isAtLastOf(last)) kept.pop()
  return isAtLastOf(last) ? kept : [...kept, last]
}

function repeatFinding(given: number, kept: number, name: string): GeometryFinding[] {
  if (given === kept) return []
  const dropped = given - kept
  return [
    {
      level: 'remark',
      code: 'positions-dropped',
      pointer: '/coordinates',
      detail: `${dropped} of ${given} vertices of the ${name} repeat the one before and were left out`,
      facts: { dropped, kept },
    },
  ]
}

function lengthFindings(line: readonly LonLat[], name: string): GeometryFinding[] {
  if (line.length < 2) {
    const detail = `The ${name} has no length: all its positions are one place`
    return [{ level: 'fault', code: 'without-length', kind: 'out-of-range', pointer: '/coordinates', detail }]
  }
  // edge by edge first: cutting an endless line into pieces of 1 km is what the bound is for
  const rough = line.reduce((sum, b, i) => sum + (i > 0 ? edgeLength(line[i - 1] ?? b, b) : 0), 0)
  const length = rough > LONGEST_LINE ? rough : lineLength(line)
  if (length <= LONGEST_LINE) return []
  const km = Math.round(length / 1000)
  return [
    {
      level: 'fault',
      code: 'too-long',
      kind: 'out-of-range',
      pointer: '/coordinates',
      detail: `The ${name} is ${km} km long, longer than any waterway: is a position misplaced?`,
      facts: { length_km: km },
    },
  ]
}

const at = ([lon, lat]: LonLat): string => `${lon.toFixed(5)}, ${lat.toFixed(5)}`

/**
 * Crossing is a remark, running back a fault.
 *
 * The distance along a line stays defined everywhere on it either way. Where the line crosses itself, a vessel is
 * placed on the wrong limb at most within the width of the crossing. Where it runs back on itself every place has two
 * distances along it and two directions downstream, over a length: nothing can be placed there.
 */
function tangleFindings(line: readonly LonLat[], name: string): GeometryFinding[] {
  const { crossings, overlaps, isTooTangled } = tangleOf(lineTree(line))
  const findings: GeometryFinding[] = []
  const [overlap] = overlaps
  const [crossing] = crossings
  if (isTooTangled) {
    findings.push({
      level: 'fault',
      code: 'too-tangled',
      kind: 'out-of-range',
      pointer: '/coordinates',
      detail: `The ${name} doubles back so often that it cannot be checked for crossings: draw it along the waterway once`,
    })
  }
  if (overlap) {
    findings.push({
      level: 'fault',
      code: 'runs-back-on-itself',
      kind: 'out-of-range',
      pointer: `/coordinates/${overlap.other}`,
      detail: `The ${name} runs back on itself at ${at(overlap.position)}: places there would have two chainages. Draw each stretch once`,
      facts: { overlaps: overlaps.length },
    })
  }
  if (crossing) {
    findings.push({
      level: 'remark',
      code: 'crosses-itself',
      pointer: `/coordinates/${crossing.edge}`,
      detail: `The ${name} crosses itself ${crossings.length === 1 ? 'once' : `${crossings.length} times, first`} at ${at(crossing.position)}: positions near that place may be matched to either limb`,
      facts: { crossings: crossings.length },
    })
  }
  return findings
}

/**
 * Checks a sailing line or a bank line and cleans it up.
 *
 * Accepted as they are: edges across the antimeridian, taken the shorter way; a vertex within a millimetre of the
 * one before is left out; heights are dropped. See `tangleFindings` for crossings.
 *
 * @param geometry  as received; `coordinates` may be anything
 * @returns the line, or null and at least one fault, each kind of fault once with the place where it occurs first
 */
export function checkLine(geometry: Geometry, options: LineOptions = {}): CheckedLine {
  const { name = 'sailing line', near, mayCross = false } = options
  const ofShape = shapeFindings(geometry, name)
  if (hasFault(ofShape)) return { line: null, findings: ofShape }
  const ofPositions = positionFindings(geometry.coordinates as readonly unknown[], name)
  if (hasFault(ofPositions)) return { line: null, findings: ofPositions }
  const given = (geometry.coordinates as Positions).map(([lon = NaN, lat = NaN]): LonLat => [lon, lat])
  const line = withoutRepeats(given)
  const ofLength = lengthFindings(line, name)
  const isMeasurable = !hasFault(ofLength)
  const findings = [
    ...ofPositions,
    ...repeatFinding(given.length, line.length, name),
    ...ofLength,
    ...(near ? axesHint(line, near, name) : []),
    ...(isMeasurable && !mayCross ? tangleFindings(line, name) : []),
  ]
  return { line: hasFault(findings) ? null : line, findings }
}
