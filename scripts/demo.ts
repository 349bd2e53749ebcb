import { pino } from 'pino'
import { buildApp } from '../src/app.ts'
import { readConfig } from '../src/config.ts'
import { serviceParts } from '../src/parts.ts'

/** Asks a service for the advisories of the demo waterway and prints them as a table, one column a class of vessels. */

const CLASSES = [
  { class: 'cemt-ii', loading: 'laden' },
  { class: 'cemt-iv', loading: 'empty' },
  { class: 'passenger-vessel' },
  { class: 'recreational-rb' },
  { class: 'planing-boat' },
] as const

interface Row {
  readonly segment_index: number
  readonly vessel_index: number
  readonly segment_id: string | null
  readonly outcome: string | null
  readonly governing_criterion: string | null
  readonly max_over_ground_kmh: number | null
  readonly sign_value: number | null
  readonly problem_code: string | null
}

/** The service at WASHLIMIT_URL or the default address; one of our own, on a free port, when none answers there. */
async function findService(): Promise<{ url: string; stop: () => Promise<void> }> {
  const config = readConfig(process.env)
  const url = process.env['WASHLIMIT_URL'] ?? `http://${config.host}:${config.port}`
  try {
    await fetch(`${url}/health/live`)
    return { url, stop: () => Promise.resolve() }
  } catch {
    const app = buildApp({ ...serviceParts(config), log: pino({ level: 'silent' }) })
    const own = await app.listen({ host: '127.0.0.1', port: 0 })
    process.stdout.write(`Nothing answers at ${url}: asking a service of our own at ${own}\n`)
    return { url: own, stop: () => app.close() }
  }
}

async function ask(url: string): Promise<Row[]> {
  const reply = await fetch(`${url}/v1/advisories/matrix`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', accept: 'application/x-ndjson' },
    body: JSON.stringify({ segments: 'all', vessels: CLASSES }),
  })
  const text = await reply.text()
  if (!reply.ok) throw new Error(`The service refused: ${text}`)
  return text
    .trim()
    .split('\n')
    .map((line) => JSON.parse(line) as Row)
}

/** A maximum with one decimal, rounded down: what is shown is never more than what was found. */
const atMost = (speed: number): string => (Math.floor(speed * 10 + 1e-9) / 10).toFixed(1)

/** What a cell says: the sign, the reason in short, or why there is no figure. */
function cellOf(row: Row | undefined): string {
  if (!row || row.problem_code !== null) return 'does not fit'
  if (row.outcome === 'no-safe-speed') return `none (${row.governing_criterion ?? ''})`
  const speed = row.sign_value === null ? atMost(row.max_over_ground_kmh ?? 0) : String(row.sign_value)
  return `${speed} (${row.governing_criterion ?? ''})`
}

function print(rows: readonly Row[]): void {
  const segments = [...new Set(rows.map((row) => row.segment_index))]
  const heads = ['km/h over ground', ...CLASSES.map((item) => Object.values(item).join(' '))]
  const lines = segments.map((index) => {
    const own = rows.filter((row) => row.segment_index === index)
    const cells = CLASSES.map((_, i) => cellOf(own.find((row) => row.vessel_index === i)))
    return [own[0]?.segment_id ?? `segment ${index}`, ...cells]
  })
  const widths = heads.map((head, i) => Math.max(head.length, ...lines.map((line) => (line[i] ?? '').length)))
  const format = (cells: readonly string[]): string =>
    cells
      .map((cell, i) => cell.padEnd(widths[i] ?? 0))
      .join('  ')
      .trimEnd()
  process.stdout.write(`${[format(heads), widths.map((width) => '-'.repeat(width)).join('  ')].join('\n')}\n`)
  for (const line of lines) process.stdout.write(`${format(line)}\n`)
}

const service = await findService()
print(await ask(service.url))
process.stdout.write(
  '\nRecommended maximum, rounded down to the sign, with the criterion that governs. Class draughts are assumed.\n' +
    'Computed advisories, not orders: local rules and licensed practice come first.\n',
)
await service.stop()
