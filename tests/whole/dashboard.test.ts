import { execFile } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { promisify } from 'node:util'
import { pino } from 'pino'
import { expect, onTestFinished, test } from 'vitest'
import { buildApp } from '../../src/app.ts'
import { readConfig } from '../../src/config.ts'
import { serviceParts } from '../../src/parts.ts'

const SCRIPT = fileURLToPath(new URL('../../openapi/examples/dashboard.mjs', import.meta.url))
const SEGMENTS = 300
const GAUGES = 6

/** Invented segments one after the other, on six gauges. */
function collection() {
  const features = Array.from({ length: SEGMENTS }, (_, i) => ({
    type: 'Feature',
    id: `reach-${String(i).padStart(3, '0')}`,
    geometry: {
      type: 'LineString',
      coordinates: [
        [3 + i * 0.01, 54],
        [3 + (i + 1) * 0.01, 54.001],
      ],
    },
    properties: {
      gauge_id: `gauge-${i % GAUGES}`,
      depth_m: 3 + (i % 20) / 10,
      width_m: 40 + (i % 30),
      bank_distance_m: 15,
    },
  }))
  return { type: 'FeatureCollection', features }
}

test('the dashboard of the examples polls 300 segments for two classes and hears of nothing when nothing changed', async () => {
  const config = readConfig({ DATABASE_URL: 'sqlite::memory:', DEMO: 'false' })
  const app = buildApp({ ...serviceParts(config), log: pino({ level: 'silent' }) })
  onTestFinished(() => app.close())
  const url = await app.listen({ host: '127.0.0.1', port: 0 })
  const imported = await app.inject({ method: 'POST', url: '/v1/segments/import', payload: collection() })
  expect(imported.statusCode).toBe(200)

  const { stdout } = await promisify(execFile)(process.execPath, [
    SCRIPT,
    ...['--url', url, '--every', '0.1', '--rounds', '2', '--levels', 'gauge-0=0.3'],
  ])
  // six gauges and two classes make twelve layers; each segment has a board for each class
  expect(stdout).toContain('round 1: 12 layers asked for, 0 unchanged, 600 boards')
  expect(stdout).toContain('round 2: 12 layers asked for, 12 unchanged, 600 boards')
  expect(stdout.split('\n').filter((line) => line.startsWith('reach-')).length).toBe(600)
  expect(stdout).toContain('local rules and licensed practice come first')
})
