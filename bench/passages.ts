import { readFileSync } from 'node:fs'
import { Readable } from 'node:stream'
import { parse } from 'csv-parse'
import type { LonLat } from '../src/domain/position.ts'
import { findVesselClass } from '../src/domain/vessel-classes.ts'
import { axisOf, bearingAt, positionAt } from '../src/geo/chainage.ts'
import { cellsOfLines } from '../src/http/csv-cells.ts'
import { readFeature, type FeatureWire } from '../src/http/feature-in.ts'
import { DEFAULT_OPTIONS } from '../src/http/options.schema.ts'
import { passageAnswer } from '../src/http/passage-answer.ts'
import { readLogCsv } from '../src/http/passage-rows.ts'
import { readLineBlocks } from '../src/http/line-blocks.ts'
import { toRegistrySegment } from '../src/http/to-registry-segment.ts'
import { PassageCheck } from '../src/passages/check.ts'
import type { Fairway } from '../src/passages/placement.ts'
import { JudgeThreads } from '../src/threads/judge-threads.ts'

const ROWS = 200_000
/** Rows of a day of a national feed. */
const FEED = 10_000_000
const ROUNDS = 5
const PIECE = 65_536

const WATERWAY = new URL('../openapi/examples/harrowmere-navigation.geojson', import.meta.url)

function fairways(): Fairway[] {
  const { features } = JSON.parse(readFileSync(WATERWAY, 'utf8')) as { features: FeatureWire[] }
  return features.map((feature) => {
    const { content } = readFeature(feature, '#', false)
    if (!content) throw new Error('The demo waterway cannot be read')
    const { chainage_from_m: from, chainage_to_m: to } = content.properties
    return {
      id: content.id,
      line: content.line,
      segment: toRegistrySegment(content.properties, content).segment,
      options: DEFAULT_OPTIONS,
      chainageFrom: typeof from === 'number' ? from : undefined,
      chainageTo: typeof to === 'number' ? to : undefined,
    }
  })
}

const HEADER =
  'MMSI,BaseDateTime,LAT,LON,SOG,COG,Heading,VesselName,IMO,CallSign,VesselType,Status,Length,Width,Draft,Cargo,TransceiverClass'

interface Sailing {
  readonly mmsi: number
  readonly shipType: number
  readonly size: string
}

/** A fleet of three: with draught, without, and a pleasure craft. */
const sailing = (i: number): Sailing => ({
  mmsi: 299_000_000 + i,
  shipType: i % 3 === 2 ? 37 : 79,
  size: i % 3 === 2 ? '9,3,' : i % 3 === 1 ? '84,9,' : '84,9,2.4',
})

/**
 * Rows of an invented log in the US layout, a row a minute from each vessel, 200 vessels at a time.
 *
 * @param moving  share of the rows of vessels that are under way; the others lie moored, as most of a real log does
 */
function* rowsOf(lines: readonly (readonly LonLat[])[], count: number, moving: number): Generator<string> {
  const axes = lines.map(axisOf)
  yield `${HEADER}\n`
  for (let row = 0; row < count; row += 1) {
    const vessel = sailing(row % 200)
    const minute = Math.floor(row / 200)
    const axis = axes[(row % 200) % axes.length]
    if (!axis) return
    const isMoving = (row % 200) / 200 < moving
    const along = isMoving ? (minute * 150 + row * 7) % axis.length : axis.length / 2
    const [lon, lat] = positionAt(axis, along)
    const time = new Date(1_767_225_600_000 + minute * 60_000).toISOString().slice(0, 19)
    const speed = isMoving ? (4 + (row % 5)).toFixed(1) : '0.0'
    const course = bearingAt(axis, along).toFixed(1)
    const shift = (((row * 13) % 11) - 5) * 1e-5
    yield `${vessel.mmsi},${time},${(lat + shift).toFixed(5)},${lon.toFixed(5)},${speed},${course},511,HARROW ${vessel.mmsi},,,${vessel.shipType},0,${vessel.size},${vessel.shipType},A\n`
  }
}

function bytesOf(count: number, moving: number): Buffer {
  const lines = fairways().map(({ line }) => line)
  return Buffer.from([...rowsOf(lines, count, moving)].join(''))
}

function streamOf(bytes: Buffer): Readable {
  const pieces: Buffer[] = []
  for (let from = 0; from < bytes.length; from += PIECE) pieces.push(bytes.subarray(from, from + PIECE))
  return Readable.from(pieces)
}

/** Bare parsing as the service parses: by csv-parse, blocks of lines at a time. */
async function inBlocks(bytes: Buffer): Promise<number> {
  let cells = 0
  for await (const block of readLineBlocks(streamOf(bytes)))
    for (const row of (block && cellsOfLines(block.bytes, ',')) ?? []) cells += row.length
  return cells
}

/** Bare parsing by csv-parse as its users do: as a stream of rows. */
async function streamed(bytes: Buffer): Promise<number> {
  let cells = 0
  const rows = streamOf(bytes).pipe(parse({ relax_quotes: true, relax_column_count: true }))
  for await (const row of rows) cells += (row as string[]).length
  return cells
}

async function checked(
  bytes: Buffer,
  threads: JudgeThreads,
  detail: 'events' | 'reports' | 'summary',
): Promise<number> {
  const judging = {
    waterLevel: 0,
    current: 0,
    tolerance: 0.25,
    position: 'actual',
    isFull: detail === 'reports',
  } as const
  const all = fairways()
  const check = new PassageCheck({
    fairways: all,
    findClass: findVesselClass,
    judging,
    convoy: { length: NaN, beam: NaN, draught: NaN },
    maxGap: 600,
    minEventReports: 2,
  })
  const session = threads.open({ judging, fairways: all, judge: check.judge })
  const answer = passageAnswer(readLogCsv(streamOf(bytes)), check, session, {
    format: 'ndjson',
    onRow: () => undefined,
    detail,
    about: {
      parameters: {},
      reproducibility: { service_version: '', method_version: '', registry_revision: 0 },
    },
  })
  let length = 0
  for await (const piece of answer) length += piece.length
  return length
}

const median = (values: readonly number[]): number =>
  [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? NaN

/** What a work took, s by the clock and s of CPU over all threads. */
interface Taken {
  readonly clock: number
  readonly cpu: number
}

async function taken(work: () => Promise<number>): Promise<Taken> {
  const before = process.cpuUsage()
  const start = performance.now()
  await work()
  const clock = (performance.now() - start) / 1000
  const { user, system } = process.cpuUsage(before)
  return { clock, cpu: (user + system) / 1e6 }
}

/**
 * Median ratios of a work to bare parsing of the same bytes by the same parser, csv-parse, side by side: in blocks as the
 * service parses, and as a stream of rows. By CPU for one core, which what else the machine does touches least, and by the
 * clock. A day of a national feed follows from the rate by the clock.
 */
async function against(bytes: Buffer, rows: number, work: () => Promise<number>): Promise<string> {
  const rates: number[] = []
  const byCpu: number[] = []
  const byClock: number[] = []
  const ofBlocks: number[] = []
  for (let round = -1; round < ROUNDS; round += 1) {
    const whole = await taken(work)
    const blocks = await taken(() => inBlocks(bytes))
    const parsed = await taken(() => streamed(bytes))
    if (round < 0) continue
    rates.push(rows / whole.clock)
    byCpu.push(parsed.cpu / whole.cpu)
    byClock.push(parsed.clock / whole.clock)
    ofBlocks.push(blocks.cpu / whole.cpu)
  }
  const rate = median(rates)
  const ofStream = `${median(byCpu).toFixed(2)} by CPU, ${median(byClock).toFixed(2)} by clock as a stream`
  const ratios = `of csv-parse ${median(ofBlocks).toFixed(2)} by CPU in blocks, ${ofStream}`
  const day = `${(FEED / rate).toFixed(0)} s for ${FEED / 1e6} million rows`
  return `${ratios} (${Math.round(rate)} rows/s, ${day})`
}

/** Logs of position reports against bare parsing of the same bytes. */
export async function passageRows(): Promise<{ what: string; value: string; bar: string }[]> {
  const alone = new JudgeThreads({ threads: 0 })
  const together = new JudgeThreads()
  const mixed = bytesOf(ROWS, 0.2)
  const moving = bytesOf(ROWS / 4, 1)
  const rows: { what: string; value: string; bar: string }[] = []
  const add = async (
    what: string,
    bytes: Buffer,
    count: number,
    bar: string,
    work: () => Promise<number>,
  ): Promise<void> => {
    rows.push({ what: `log, ${what}`, value: await against(bytes, count, work), bar })
  }
  const usual = 'one row in five under way'
  await add(`events, one core, ${usual}`, mixed, ROWS, '0.33 by CPU', () => checked(mixed, alone, 'events'))
  await add(`events, all cores, ${usual}`, mixed, ROWS, 'near 2 × one core', () =>
    checked(mixed, together, 'events'),
  )
  await add('events, one core, all under way', moving, ROWS / 4, '', () => checked(moving, alone, 'events'))
  await add('events, all cores, all under way', moving, ROWS / 4, '', () =>
    checked(moving, together, 'events'),
  )
  await add(`reports, one core, ${usual}`, mixed, ROWS, '', () => checked(mixed, alone, 'reports'))
  await together.end()
  return rows
}
