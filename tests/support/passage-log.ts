import { expect } from 'vitest'
import { inventLog, type InventedLog } from '../../scripts/passage-log/log.ts'
import type { Advisory } from '../../scripts/passage-log/maximum.ts'
import { continues, tracksOf, type TruthRow } from '../../scripts/passage-log/truth.ts'
import type { App } from '../../src/http/app-type.ts'
import { linesOf, post, type Json } from './service.ts'

/** What the service said of a log. */
export interface Checked {
  readonly reports: readonly Json[]
  readonly events: readonly Json[]
  readonly summary: Json
}

/** An invented log whose maxima come from single advisories of the same service. */
export function invent(app: App, seed: number, vessels: number): Promise<InventedLog> {
  return inventLog(async (body) => (await post(app, '/v1/advisories', body)).json<Advisory>(), seed, vessels)
}

/** Sends a log and sorts the lines that come back; the last one is the summary. */
export async function check(
  app: App,
  detail: 'reports' | 'events' | 'summary',
  log: string | Buffer,
  headers: Record<string, string> = {},
  parameters = '',
): Promise<Checked> {
  const reply = await post(app, `/v1/passages/check?detail=${detail}${parameters}`, log, {
    'content-type': 'text/csv',
    ...headers,
  })
  expect(reply.statusCode, reply.body.slice(0, 2000)).toBe(200)
  const lines = linesOf(reply.body)
  const summary = lines.at(-1)
  expect(summary).toMatchObject({ type: 'summary', complete: true })
  const sorted = { report: [] as Json[], event: [] as Json[], summary: [] as Json[] }
  for (const line of lines) sorted[line['type'] as keyof typeof sorted].push(line)
  expect(sorted.summary).toHaveLength(1)
  return { reports: sorted.report, events: sorted.event, summary: summary! }
}

/** Events by vessel and time. */
export const inOrder = (events: readonly Json[]): Json[] =>
  events.toSorted((a, b) => keyOf(a).localeCompare(keyOf(b)))

const keyOf = (event: Json): string => `${String(event['mmsi'])} ${String(event['start'])}`

/** Without what changes with the order of the rows. */
export const withoutLines = (events: readonly Json[]): Json[] =>
  inOrder(events).map(({ event_id: _id, first_line: _first, last_line: _last, ...event }) => event)

/** A log with its columns in another order. */
export function withColumns(csv: string, order: (columns: number) => readonly number[]): string {
  const rows = csv.split('\n').filter((row) => row !== '')
  const columns = order(rows[0]!.split(',').length)
  return rows
    .map((row) => {
      const cells = row.split(',')
      return `${columns.map((column) => cells[column]).join(',')}\n`
    })
    .join('')
}

/** A log with the rows of each vessel together, in their order, and the vessels in the reverse of their first rows. */
export function byVessel(csv: string): string {
  const [head = '', ...rows] = csv.split('\n').filter((row) => row !== '')
  const column = head.split(',').indexOf('mmsi')
  const blocks = new Map<string, string[]>()
  for (const row of rows) {
    const mmsi = row.split(',')[column]!
    blocks.set(mmsi, [...(blocks.get(mmsi) ?? []), row])
  }
  return [head, ...[...blocks.values()].toReversed().flat(), ''].join('\n')
}

/** A vessel's matched rows through one segment in one direction, as they truly are. */
export interface TruePassage {
  readonly key: string
  /** time-weighted mean over ground, kn */
  readonly speed: number
  readonly rows: readonly TruthRow[]
}

/** Passages of the truth, by the words of the contract. */
export function passagesOf(rows: readonly TruthRow[]): TruePassage[] {
  return tracksOf(rows).flatMap((track) => {
    const runs: (typeof track)[number][][] = []
    for (const judged of track) {
      const run = runs.at(-1)
      if (run && continues(run.at(-1), judged)) run.push(judged)
      else runs.push([judged])
    }
    return runs.map((run) => {
      let [distance, duration] = [0, 0]
      for (let i = 1; i < run.length; i += 1) {
        const [before, now] = [run[i - 1]!, run[i]!]
        const step = now.time - before.time
        distance += (step * (before.row.over_ground_kn + now.row.over_ground_kn)) / 2
        duration += step
      }
      const { row } = run[0]!
      return {
        key: `${row.segment_id ?? ''} ${row.vessel_class} ${row.direction ?? ''}`,
        speed: duration > 0 ? distance / duration : row.over_ground_kn,
        rows: run.map((judged) => judged.row),
      }
    })
  })
}

/** The speed that a share of the passages does not reach: linear between order statistics at (n - 1) times the share. */
export function percentile(speeds: readonly number[], share: number): number {
  const sorted = speeds.toSorted((a, b) => a - b)
  const at = (sorted.length - 1) * share
  const [low, high] = [sorted[Math.floor(at)]!, sorted[Math.ceil(at)]!]
  return low + (at - Math.floor(at)) * (high - low)
}
