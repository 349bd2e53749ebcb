import { spawn, type ChildProcessWithoutNullStreams } from 'node:child_process'
import { once } from 'node:events'
import { createInterface } from 'node:readline'
import { fileURLToPath } from 'node:url'
import { expect, onTestFinished, test } from 'vitest'

const root = fileURLToPath(new URL('../../', import.meta.url))

/** The service as a process of its own, without the environment of the test. */
function start(environment: Record<string, string>): ChildProcessWithoutNullStreams {
  const child = spawn(process.execPath, ['--import', 'tsx', 'src/server.ts'], {
    cwd: root,
    env: { PATH: process.env['PATH'], ...environment },
  })
  onTestFinished(() => void child.kill('SIGKILL'))
  return child
}

test('the process tells where its documentation is, answers, and stops on SIGTERM', async () => {
  const child = start({ PORT: '0' })
  let docs = ''
  for await (const line of createInterface(child.stdout)) {
    docs = /Documentation: (http:\/\/127\.0\.0\.1:\d+\/docs)/.exec(line)?.[1] ?? ''
    if (docs !== '') break
  }
  expect((await fetch(docs)).status).toBe(200)
  expect(await (await fetch(new URL('/health/ready', docs))).json()).toMatchObject({ status: 'ready' })
  child.stdout.resume()
  child.kill('SIGTERM')
  expect(await once(child, 'exit')).toEqual([0, null])
})

test('a bad environment stops the start and lists every fault', async () => {
  const child = start({ PORT: 'http', LOG_LEVEL: 'loud' })
  const said = String(Buffer.concat(await child.stderr.toArray()))
  expect(said).toMatch(/^The environment cannot be used:\n {2}PORT must be .*\n {2}LOG_LEVEL must be .*\n$/)
  expect(child.exitCode ?? (await once(child, 'exit'))[0]).toBe(1)
})
