import { execFile } from 'node:child_process'
import { readFileSync } from 'node:fs'
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

beforeAll(async () => {
  app = buildApp({
    ...serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:' })),
    log: pino({ level: 'silent' }),
  })
  url = await app.listen({ host: '127.0.0.1', port: 0 })
})

afterAll(() => app.close())

describe('the README', () => {
  test('shows a command for every endpoint', () => {
    expect(commands.length).toBeGreaterThanOrEqual(19)
  })

  test.each(commands)('%s is answered as it stands', async (command) => {
    const real = command
      .replaceAll('localhost:8080', url.replace('http://', ''))
      .replace(/^curl -s/, 'curl --silent --show-error --fail-with-body')
    const { stdout } = await promisify(execFile)('sh', ['-c', real], { cwd: root, maxBuffer: 2 ** 24 })
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
