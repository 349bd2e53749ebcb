import { execFile } from 'node:child_process'
import { readFileSync, writeFileSync } from 'node:fs'
import { createServer, type RequestListener } from 'node:http'
import type { AddressInfo } from 'node:net'
import { fileURLToPath } from 'node:url'
import { promisify } from 'node:util'
import { gzipSync } from 'node:zlib'
import { expect, onTestFinished, test } from 'vitest'
import type { Truth } from '../../scripts/passage-log/truth.ts'
import { addKey, registryService } from '../support/registry-service.ts'
import { buildService } from '../support/service.ts'
import { temporaryFolder } from '../support/stores.ts'

const ROOT = fileURLToPath(new URL('../..', import.meta.url))
const fileOf = (name: string): string => `${ROOT}openapi/examples/${name}`
const SAMPLE = fileOf('harrowmere-passages.csv')

interface Run {
  readonly status: number
  readonly stdout: string
  readonly stderr: string
}

/** Runs the script of the examples; what it prints, whether it succeeds or not. */
async function run(url: string, parameters: readonly string[], key = ''): Promise<Run> {
  const env = { ...process.env, WASHLIMIT_URL: url, WASHLIMIT_KEY: key }
  try {
    const done = await promisify(execFile)('sh', [fileOf('check-log.sh'), ...parameters], { env })
    return { status: 0, ...done }
  } catch (error) {
    const { code, stdout, stderr } = error as { code: number; stdout: string; stderr: string }
    return { status: code, stdout, stderr }
  }
}

async function listening(): Promise<string> {
  const { app } = buildService()
  return app.listen({ host: '127.0.0.1', port: 0 })
}

/** Something that answers every request in its own way. */
async function answering(listener: RequestListener): Promise<string> {
  const server = createServer(listener)
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  onTestFinished(() => {
    server.closeAllConnections()
    server.close()
  })
  return `http://127.0.0.1:${(server.address() as AddressInfo).port}`
}

// After a change of methods: npm run --silent passage-log > openapi/examples/harrowmere-passages.csv
test('the log of the examples is what its script writes, with a truth beside it', async () => {
  const truthFile = `${temporaryFolder()}/truth.json`
  const command = ['--import', 'tsx', 'scripts/passage-log.ts', '--truth', truthFile]
  const { stdout } = await promisify(execFile)(process.execPath, command, { cwd: ROOT, maxBuffer: 2 ** 24 })
  expect(stdout).toBe(readFileSync(SAMPLE, 'utf8'))
  const truth = JSON.parse(readFileSync(truthFile, 'utf8')) as Truth
  expect(truth.rows).toHaveLength(170)
  expect(truth.events.map(({ certainty }) => certainty).sort()).toEqual([
    ...Array<string>(11).fill('certain'),
    'depends-on-draught',
  ])
})

test('the script of the examples prints the exceedances of the log as a table', async () => {
  const { status, stdout, stderr } = await run(await listening(), [SAMPLE])
  expect({ status, stderr }).toEqual({ status: 0, stderr: '' })
  const lines = stdout.split('\n')
  const [head = '', ...table] = lines.slice(0, lines.indexOf(''))
  expect(table).toHaveLength(12)
  const at = head.indexOf('segment')
  expect(table.every((row) => row.slice(at).startsWith('harrow-') && row[at - 1] === ' ')).toBe(true)
  expect(table.toSorted()).toEqual(table)
  expect(table[0]).toMatch(
    /^2026-05-04 06:03:37 {2}299000001 {2}HARROW WREN +harrow-upper-reach +downstream /,
  )
  expect(table.filter((row) => row.includes(' depends-on-draught ')).map((row) => row.slice(21, 30))).toEqual(
    ['299000003'],
  )
  expect(stdout).toContain(
    '170 rows from 2026-05-04 06:00:00 to 2026-05-04 07:51:08: 129 matched, 16 stationary,',
  )
  expect(stdout).toContain('exceedances: 11 certain, 1 depending on a draught that is not known.')
})

test('a compressed log, a parameter with blanks and a key are sent as they should be', async () => {
  const log = `${temporaryFolder()}/log.csv.gz`
  writeFileSync(log, gzipSync(readFileSync(SAMPLE)))
  const { app, service } = registryService({ ACCESS: 'keys', DEMO: 'true' })
  const url = await app.listen({ host: '127.0.0.1', port: 0 })
  const key = await addKey(service, { name: 'desk', role: 'read' })
  const named = await run(url, [log, 'waterway=Harrowmere Navigation', 'tolerance_kn=1.5'], key)
  expect(named.stderr).toBe('')
  expect(named.stdout).toContain('170 rows from')
  expect(named.stdout.split('\n').filter((line) => line.includes('  299')).length).toBeLessThan(12)
  const without = await run(url, [log])
  expect([without.status, without.stdout]).toEqual([1, ''])
  expect(without.stderr).toContain('refused with status 401')
})

test('an answer that breaks off, or ends without a summary, is no success', async () => {
  const event = `${JSON.stringify({ type: 'event', mmsi: '299000001', vessel_name: 'WREN "II"', duration_s: 60 })}\n`
  const cut = await answering((request, reply) => {
    request.resume().on('end', () => reply.writeHead(200).end(event))
  })
  const ended = await run(cut, [SAMPLE])
  expect(ended.status).toBe(1)
  expect(ended.stdout).toContain('WREN "II"')
  expect(ended.stderr).toContain('incomplete: the answer ends without a summary')
  const torn = await answering((request, reply) => {
    request.resume().on('end', () => {
      reply.writeHead(200, { 'content-length': 10_000 })
      reply.write(event, () => request.socket.destroy())
    })
  })
  const broken = await run(torn, [SAMPLE])
  expect([broken.status, broken.stdout]).toEqual([1, ''])
  expect(broken.stderr).toContain('incomplete: the service could not be asked, or the answer broke off')
})

test.each([
  [[], 'sh openapi/examples/check-log.sh LOG'],
  [['no-such-log.csv'], 'no-such-log.csv cannot be read'],
  [[SAMPLE, 'tolerance'], 'tolerance is not NAME=VALUE'],
])('a wrong command, %j, says so', async (parameters, said) => {
  const { status, stderr } = await run('http://127.0.0.1:9', parameters)
  expect(status).toBe(2)
  expect(stderr).toContain(said)
})

test('the script explains itself', async () => {
  const { status, stdout } = await run('http://127.0.0.1:9', ['--help'])
  expect(status).toBe(0)
  expect(stdout).toContain('WASHLIMIT_URL')
  expect(stdout).not.toContain('set -eu')
})
