import { spawn } from 'node:child_process'
import { readFileSync } from 'node:fs'
import { cpus } from 'node:os'
import { once } from 'node:events'
import autocannon from 'autocannon'
import { Bench } from 'tinybench'
import { advise, adviseBriefly } from '../src/advisory/advise.ts'
import { assess } from '../src/advisory/assess.ts'
import { decide } from '../src/advisory/decide.ts'
import { effectsAt } from '../src/advisory/effects.ts'
import { govern } from '../src/advisory/govern.ts'
import { resolve, type AdvisoryWire } from '../src/http/request.ts'
import { fileRegistry } from '../src/store/file-registry.ts'
import { growthRows } from './growth.ts'
import { passageRows } from './passages.ts'
import { registryRows } from './registry.ts'
import { studyRows } from './study.ts'

/**
 * Measures the service side by side with the least that any service must do. Each line is a ratio or a rate of this run:
 * the machine drifts, so that figures of two runs cannot be compared, and ratios within one can.
 */

const request = readFileSync(
  new URL('../openapi/examples/createAdvisory.request.json', import.meta.url),
  'utf8',
)
const wire = JSON.parse(request) as AdvisoryWire
const line = `${JSON.stringify(wire)}\n`

const ROUNDS = 7
const WARM_ROUNDS = 3
const SECONDS = 2
const STREAM_LINES = 4000

const median = (values: readonly number[]): number =>
  [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? NaN

const rows: { what: string; value: string; bar: string }[] = []

/** Rates in one thread, and in units of one Math.pow of the same run, which carries over between machines. */
async function kernel(): Promise<void> {
  const { segment, vessel, conditions, options } = resolve(wire, fileRegistry([], '2026-01-01T00:00:00Z'))
  const { situation } = decide(segment, vessel, conditions, options).main
  const sailed = { value: 2, reference: 'through-water' } as const
  let sink = 0
  let turn = 0
  const bench = new Bench({ time: 1500, warmupTime: 500 })
    .add('pow', () => {
      for (let i = 0; i < 1000; i += 1) sink += Math.pow(1.5 + i * 1e-3, 0.35 + sink * 1e-12)
    })
    .add('govern', () => void govern(segment, segment.stations[0], vessel, conditions, options))
    .add('decide', () => void decide(segment, vessel, conditions, options))
    .add('brief', () => void adviseBriefly(segment, vessel, conditions, options))
    .add('advise', () => void advise(segment, vessel, conditions, options))
    // two speeds in turn, so that no figure of the one before is of use
    .add('effects', () => void effectsAt(situation, (turn += 1) % 2 === 0 ? 2 : 2.01))
    .add('assess', () => void assess(segment, vessel, conditions, options, sailed))
  await bench.run()
  const seconds = (name: string): number => {
    const result = bench.getTask(name)?.result
    return result && 'latency' in result ? result.latency.p50 / 1000 : NaN
  }
  const pow = seconds('pow') / 1000
  for (const [name, what, bar] of [
    ['advise', 'advisory with every reason', '400, aim 150'],
    ['brief', 'advisory in brief', ''],
    ['decide', 'decision with every bound', ''],
    ['govern', 'what governs alone', ''],
    ['effects', 'effects at a given speed', '60'],
    ['assess', 'effects with decision, verdict and every report', ''],
  ] as const) {
    const each = seconds(name)
    rows.push({
      what: `${what}, one thread, in units of Math.pow`,
      value: `${(each / pow).toFixed(0)} (${Math.round(1 / each)}/s)`,
      bar,
    })
  }
}

/** What was done in one round, and what the server spent on it. */
interface Round {
  readonly count: number
  readonly seconds: number
  readonly cpuSeconds: number
}

async function measured(url: string, work: () => Promise<number>): Promise<Round> {
  const cpu = async (): Promise<number> => Number(await (await fetch(new URL('/bench/cpu', url))).text())
  const before = await cpu()
  const start = performance.now()
  const count = await work()
  return { count, seconds: (performance.now() - start) / 1000, cpuSeconds: (await cpu()) - before }
}

async function get(url: string): Promise<number> {
  const result = await autocannon({ url, connections: 8, duration: SECONDS })
  if (result.non2xx > 0) throw new Error(`${url}: ${result.non2xx} replies were refused`)
  return result.requests.total
}

async function post(url: string): Promise<number> {
  const result = await autocannon({
    url,
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: request,
    connections: 8,
    duration: SECONDS,
  })
  if (result.non2xx > 0) throw new Error(`${url}: ${result.non2xx} replies were refused`)
  return result.requests.total
}

async function stream(url: string): Promise<number> {
  const reply = await fetch(url, {
    method: 'POST',
    headers: { 'content-type': 'application/x-ndjson' },
    body: line.repeat(STREAM_LINES),
  })
  const text = await reply.text()
  if (!reply.ok || text.includes('"problem":')) throw new Error(`${url}: ${text.slice(0, 300)}`)
  return STREAM_LINES
}

/** Median ratios of paired rounds, by the clock and by the CPU time of the server, and the median rate of the first. */
async function pairs(
  what: string,
  bar: string,
  work: (url: string) => Promise<number>,
  [a, b]: readonly [string, string],
): Promise<void> {
  const rates: number[] = []
  const byClock: number[] = []
  const byCpu: number[] = []
  for (let i = -WARM_ROUNDS; i < ROUNDS; i += 1) {
    const one = await measured(a, () => work(a))
    const other = await measured(b, () => work(b))
    // the first rounds are compiling, not serving
    if (i < 0) continue
    rates.push(one.count / one.seconds)
    byClock.push(one.count / one.seconds / (other.count / other.seconds))
    byCpu.push(other.cpuSeconds / other.count / (one.cpuSeconds / one.count))
  }
  const rate = Math.round(median(rates))
  const value = `${median(byCpu).toFixed(2)} by CPU, ${median(byClock).toFixed(2)} by clock (${rate}/s)`
  rows.push({ what, value, bar })
}

async function http(): Promise<void> {
  const server = spawn(process.execPath, [new URL('server.js', import.meta.url).pathname], {
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  const [first] = (await once(server.stdout, 'data')) as [Buffer]
  const url = first.toString().trim()
  try {
    await pairs('POST /v1/advisories against an echo that validates and stringifies', '0.80', post, [
      `${url}/v1/advisories`,
      `${url}/bench/echo`,
    ])
    await pairs('POST /v1/advisories against an echo that validates and has its text ready', '', post, [
      `${url}/v1/advisories`,
      `${url}/bench/echo-ready`,
    ])
    await pairs('GET …/advisory of a segment against a still reply', '0.85', get, [
      `${url}/v1/segments/harrow-long-pound/advisory?vessel_class=cemt-iv&water_level_m=0.1`,
      `${url}/bench/still`,
    ])
    await pairs(
      'NDJSON stream, full, against bare parse and stringify',
      '0.60; above 1 with both cores',
      stream,
      [`${url}/v1/advisories/stream`, `${url}/bench/stream`],
    )
    await pairs(
      'NDJSON stream, compact, against bare parse and stringify',
      '0.60; above 1 with both cores',
      stream,
      [`${url}/v1/advisories/stream?detail=compact`, `${url}/bench/stream?compact`],
    )
  } finally {
    server.kill('SIGTERM')
  }
}

await kernel()
rows.push(...studyRows())
rows.push(...growthRows())
rows.push(...(await registryRows()))
rows.push(...(await passageRows()))
await http()
process.stdout.write(
  `${cpus().length} × ${cpus()[0]?.model ?? 'unknown processor'}, Node ${process.version}\n`,
)
console.table(rows)
