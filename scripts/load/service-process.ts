import { spawn, type ChildProcess } from 'node:child_process'
import { once } from 'node:events'
import { readFileSync } from 'node:fs'
import { createInterface } from 'node:readline'
import { fileURLToPath } from 'node:url'
import { built } from '../built.mjs'

const ROOT = fileURLToPath(new URL('../..', import.meta.url))

export interface ServiceProcess {
  readonly url: string
  readonly port: number
  readonly child: ChildProcess
  /** Lines of its log, parsed, as they come; of severity `error` and above when `isQuiet`. */
  readonly logged: readonly Readonly<Record<string, unknown>>[]
  /** Resident memory, MB. */
  rss(): number
  /** Fulfilled with the exit code or the signal. */
  ended(): Promise<number | string>
}

interface Start {
  readonly environment: Readonly<Record<string, string>>
  /** modules that are loaded before it */
  readonly preload?: readonly string[]
  readonly isQuiet?: boolean
}

/** The service as it is built, as a process on a loopback address, with nothing but this environment. */
export async function startService({
  environment,
  preload = [],
  isQuiet = false,
}: Start): Promise<ServiceProcess> {
  const child = spawn(process.execPath, [...preload.flatMap((name) => ['--import', name]), built('server')], {
    cwd: ROOT,
    env: { PATH: process.env['PATH'], HOST: '127.0.0.1', PORT: '0', ...environment },
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  const end = (): void => void child.kill('SIGKILL')
  process.once('exit', end)
  child.once('exit', () => process.off('exit', end))
  const exit = once(child, 'exit') as Promise<[number | null, string | null]>
  const logged: Readonly<Record<string, unknown>>[] = []
  const url = await new Promise<string>((found, failed) => {
    createInterface(child.stdout).on('line', (line) => {
      const entry = JSON.parse(line) as { level: number; msg: string }
      if (!isQuiet || entry.level >= 50) logged.push(entry)
      const address = /Documentation: (http:\/\/\S+)\/docs/.exec(entry.msg)?.[1]
      if (address !== undefined) found(address)
    })
    void exit.then(([code]) => {
      failed(new Error(`The service did not start: exit code ${code}`))
    })
  })
  return {
    url,
    port: Number(new URL(url).port),
    child,
    logged,
    rss: () => {
      const status = readFileSync(`/proc/${child.pid}/status`, 'utf8')
      return Number(/VmRSS:\s+(\d+)/.exec(status)?.[1]) / 1024
    },
    ended: async () => {
      const [code, signal] = await exit
      return code ?? signal ?? 'unknown'
    },
  }
}
