import { execFile } from 'node:child_process'
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { promisify } from 'node:util'
import { pino } from 'pino'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { buildApp } from '../../src/app.ts'
import { readConfig } from '../../src/config.ts'
import type { App } from '../../src/http/app-type.ts'
import { serviceParts } from '../../src/parts.ts'

const root = fileURLToPath(new URL('../..', import.meta.url))
const readme = readFileSync(`${root}README.md`, 'utf8')

/** Commands that the README shows, each as it can be typed. */
const commands = [...readme.matchAll(/```sh\n([\s\S]*?)```/g)]
  .flatMap(([, block = '']) => block.trim().split(/\n(?=curl )/))
  .filter((command) => command.startsWith('curl '))

let app: App
let url = ''
/** Ids that the commands name, as the script before them prints them. */
let ids: Record<string, string> = {}

beforeAll(async () => {
  app = buildApp({
    ...serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:' })),
    log: pino({ level: 'silent' }),
  })
  url = await app.listen({ host: '127.0.0.1', port: 0 })
  ids = await published()
}, 120_000)

/** Goes the way from segments to published limits as the README has it. */
async function published(): Promise<Record<string, string>> {
  const folder = mkdtempSync(join(tmpdir(), 'limits-'))
  try {
    const { stdout } = await promisify(execFile)('sh', ['openapi/examples/limits.sh', folder], {
      cwd: root,
      env: { ...process.env, WASHLIMIT_URL: url },
    })
    expect(stdout).toMatch(/^study=study-\w+ plan=plan-\w+\n$/)
    expect(readdirSync(folder).sort()).toEqual(FILES)
    expect(JSON.parse(readFileSync(`${folder}/verification.json`, 'utf8'))).toMatchObject({
      verdict: 'reproduced',
    })
    const pairs = stdout.trim().split(' ')
    return Object.fromEntries(pairs.map((pair) => pair.split('=') as [string, string]))
  } finally {
    rmSync(folder, { recursive: true })
  }
}

const FILES = [
  'evidence.html',
  'import.json',
  'notice.json',
  'plan.csv',
  'plan.geojson',
  'plan.json',
  'plan.request.json',
  'publication.json',
  'publication.request.json',
  'record.json',
  'study.csv',
  'verification.json',
]

afterAll(() => app.close())

describe('the README', () => {
  test('shows a command for every endpoint', () => {
    expect(commands.length).toBeGreaterThanOrEqual(45)
  })

  test.each(commands)('%s is answered as it stands', async (command) => {
    const real = command
      .replaceAll('localhost:8080', url.replace('http://', ''))
      .replace(/^curl -s/, 'curl --silent --show-error --fail-with-body')
    const { stdout } = await promisify(execFile)('sh', ['-c', real], {
      cwd: root,
      maxBuffer: 2 ** 24,
      env: { ...process.env, ...ids },
    })
    // 204 has no body; curl itself fails on a refusal
    if (command.includes('-X DELETE')) expect(stdout).toBe('')
    else expect(stdout.length).toBeGreaterThan(10)
  })

  test('states the figures that the first command returns', async () => {
    const first = commands[0] ?? ''
    const body = /-d '([\s\S]*)'/.exec(first)?.[1] ?? ''
    const reply = await fetch(`${url}/v1/advisories`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body,
    })
    const advisory = (await reply.json()) as {
      governing_criterion: string
      recommended_max_speed: { over_ground: { kmh: number }; sign: { value: number } }
      critical_speed: { through_water: { kmh: number } }
    }
    const stated =
      /: ([\d.]+) km\/h, and (\d+) km\/h on the sign[\s\S]*?critical speed is ([\d.]+) km\/h/.exec(readme)
    expect(stated?.slice(1)).toEqual([
      // a maximum is shown rounded down, as on the sheet
      (Math.floor(advisory.recommended_max_speed.over_ground.kmh * 100) / 100).toFixed(2),
      String(advisory.recommended_max_speed.sign.value),
      advisory.critical_speed.through_water.kmh.toFixed(2),
    ])
    expect(advisory.governing_criterion).toBe('bank-wave-height')
  })
})
