import { writeFileSync } from 'node:fs'
import { parseArgs } from 'node:util'
import { pino } from 'pino'
import { buildApp } from '../src/app.ts'
import { readConfig } from '../src/config.ts'
import { serviceParts } from '../src/parts.ts'
import { csvOf, LAYOUTS, type Layout } from './passage-log/layouts.ts'
import { inventLog } from './passage-log/log.ts'
import type { Advisory } from './passage-log/maximum.ts'

/**
 * Writes an invented log of position reports for the demo waterway, to try `/v1/passages/check` with:
 *
 *   npm run --silent passage-log -- [--seed 1] [--vessels 0] [--layout plain] [--truth truth.json] > log.csv
 *
 * The vessels of the log are invented, and so is every identity in it. `--vessels` adds as many ordinary ones to those
 * with a story; `--truth` writes what is true of each row, and which exceedances were planted.
 */

const { values } = parseArgs({
  options: {
    seed: { type: 'string', default: '1' },
    vessels: { type: 'string', default: '0' },
    layout: { type: 'string', default: 'plain' },
    truth: { type: 'string' },
  },
})

function whole(name: 'seed' | 'vessels', most: number): number {
  const value = Number(values[name])
  if (values[name].trim() !== '' && Number.isInteger(value) && value >= 0 && value <= most) return value
  throw new Error(`--${name} takes a whole number from 0 to ${most}`)
}

function layoutOf(name: string): Layout {
  if (name in LAYOUTS) return name as Layout
  throw new Error(`--layout takes one of ${Object.keys(LAYOUTS).join(', ')}`)
}

const layout = layoutOf(values.layout)
const [seed, vessels] = [whole('seed', 2 ** 32 - 1), whole('vessels', 10_000)]
const app = buildApp({
  ...serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:' })),
  log: pino({ level: 'silent' }),
})
const { rows, truth } = await inventLog(
  async (body) =>
    (await app.inject({ method: 'POST', url: '/v1/advisories', payload: body })).json<Advisory>(),
  seed,
  vessels,
)
await app.close()
process.stdout.write(csvOf(rows, layout))
if (values.truth !== undefined) writeFileSync(values.truth, `${JSON.stringify(truth, null, 2)}\n`)
