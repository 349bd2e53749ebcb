import { advise } from '../src/advisory/advise.ts'
import { decide } from '../src/advisory/decide.ts'
import type { LonLat } from '../src/domain/position.ts'
import type { Segment } from '../src/domain/segment.ts'
import { WAVE_METHODS } from '../src/hydro/waves/all.ts'
import { DEFAULT_OPTIONS } from '../src/http/options.schema.ts'
import { resolve } from '../src/http/request.ts'
import type { Fairway } from '../src/passages/placement.ts'
import { type LogRow, type PositionReport } from '../src/passages/position-report.ts'
import { reportOfObject } from '../src/passages/row-reader.ts'
import { Tracks } from '../src/passages/tracks.ts'
import { fileRegistry } from '../src/store/file-registry.ts'

const ROUNDS = 9
const EDGES_OF_LINE = 50
const REPORTS = 20_000

interface Row {
  readonly what: string
  readonly value: string
  readonly bar: string
}

const median = (values: readonly number[]): number =>
  [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? NaN

/** Medians of the works, us each, measured in turn. */
function side(works: readonly (() => void)[], times: number): number[] {
  const taken = works.map((): number[] => [])
  for (let round = -2; round < ROUNDS; round += 1) {
    works.forEach((work, i) => {
      const start = performance.now()
      for (let k = 0; k < times; k += 1) work()
      if (round >= 0) taken[i]?.push(((performance.now() - start) * 1000) / times)
    })
  }
  return taken.map(median)
}

const text = (values: readonly number[]): string => values.map((value) => value.toFixed(1)).join(', ')

/** A cost of advisories against the number of methods that count, on open water where most of them are in range. */
function methodRow(): Row {
  const { segment, vessel, conditions } = resolve(
    {
      segment: { depth_m: 6, width_m: 300, bank_distance_m: 60, confinement: 'open' },
      vessel: { class: 'tug' },
    },
    fileRegistry([], '2026-01-01T00:00:00Z'),
  )
  const counts = [1, 2, WAVE_METHODS.length]
  const optionsOf = (count: number) => ({
    ...DEFAULT_OPTIONS,
    waveMethods: WAVE_METHODS.slice(0, count).map(({ id }) => id),
  })
  const all = counts.map((count) => optionsOf(count))
  const decided = side(
    all.map((options) => () => void decide(segment, vessel, conditions, options)),
    2000,
  )
  const advised = side(
    all.map((options) => () => void advise(segment, vessel, conditions, options)),
    1000,
  )
  return {
    what: `decision, and advisory, with ${counts.join(', ')} wave methods asked for`,
    value: `${text(decided)} us; ${text(advised)} us`,
    bar: 'near constant',
  }
}

/** Lines of 50 edges each, in rows, as far apart as waterways are. */
function linesOf(edges: number): LonLat[][] {
  return Array.from({ length: edges / EDGES_OF_LINE }, (_, i) => {
    const lon = 3 + (i % 100) * 0.06
    const lat = 50 + Math.floor(i / 100) * 0.05
    return Array.from({ length: EDGES_OF_LINE + 1 }, (__, k): LonLat => [
      lon + k * 1e-3,
      lat + 1e-3 * Math.sin(k / 5),
    ])
  })
}

function reportsOn(lines: readonly (readonly LonLat[])[]): PositionReport[] {
  return Array.from({ length: REPORTS }, (_, i) => {
    const line = lines[(i * 7919) % lines.length] ?? []
    const [lon, lat] = line[(i * 31) % line.length] ?? [0, 0]
    const row: LogRow = reportOfObject(
      { mmsi: 299_000_000 + i, time: '2026-01-01T00:00:00Z', lat: lat + 1e-4, lon, sog_kn: 5, cog_deg: 90 },
      i,
      () => undefined,
    )
    if (!row.report) throw new Error('The invented report cannot be read')
    return row.report
  })
}

/** A cost of placing a report against the edges of all lines: each vessel reports once, so that no track helps. */
function networkRow(): Row {
  const { segment } = resolve(
    { segment: { depth_m: 4, width_m: 60, bank_distance_m: 30 }, vessel: { class: 'cemt-iv' } },
    fileRegistry([], '2026-01-01T00:00:00Z'),
  )
  const counts = [100, 10_000, 200_000]
  const setups = counts.map((count) => {
    const lines = linesOf(count)
    const fairways = lines.map((line, i) => fairwayOf(line, i, segment))
    return { tracks: () => new Tracks(fairways, { maxGap: 600 }), reports: reportsOn(lines) }
  })
  const taken = setups.map(({ tracks, reports }) => {
    const rounds: number[] = []
    for (let round = -1; round < 5; round += 1) {
      const fresh = tracks()
      const start = performance.now()
      for (const report of reports) fresh.place(report)
      if (round >= 0) rounds.push(((performance.now() - start) * 1000) / reports.length)
    }
    return median(rounds)
  })
  return {
    what: `placing a report of a new vessel among ${counts.join(', ')} edges`,
    value: `${text(taken)} us`,
    bar: 'near logarithmic',
  }
}

const fairwayOf = (line: readonly LonLat[], number: number, segment: Segment): Fairway => ({
  id: `line-${number}`,
  line,
  segment,
  options: DEFAULT_OPTIONS,
  chainageFrom: undefined,
  chainageTo: undefined,
})

/** How costs grow with what they depend on. */
export function growthRows(): Row[] {
  return [methodRow(), networkRow()]
}
