import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { parseArgs } from 'node:util'
import { kindAt, MIX, type Kind } from './load/mix.ts'
import { RawClient, rawRequest } from './load/raw-client.ts'
import { startService } from './load/service-process.ts'
import { longStream, slowSender, smallStream } from './load/slow.ts'

/**
 * Measures what the service answers at most, then asks twice as much of it for a while: `npm run soak -- --seconds 120`.
 * The service is a process of its own on a loopback address; this one makes the load. Fails on any error.
 */

const { values } = parseArgs({
  options: { seconds: { type: 'string', default: '120' }, times: { type: 'string', default: '2' } },
})
const SECONDS = Number(values.seconds)
const TIMES = Number(values.times)
const AT_ONCE = 48 // requests of the closed loop, fewer than the service takes
const MOST_CONNECTIONS = 1000 // of the open loop, ten times what the service takes at once
const TICK = 5 // ms
const LONG_STREAMS = 4
const SLOW_SENDERS = 150 // more than places for requests
const SMALL_STREAMS = 5 // a second

const out = (text: string): void => void process.stdout.write(`${text}\n`)
const percentile = (sorted: readonly number[], p: number): number =>
  sorted[Math.min(sorted.length - 1, Math.floor((sorted.length * p) / 100))] ?? NaN

/** Sum of what happened. */
class Account {
  readonly counts = new Map<string, number>()
  readonly problems: string[] = []
  readonly latencies: number[] = []
  accepted = 0
  refused = 0
  errors = 0
  readonly #expected = new Map<string, Buffer>()

  readonly tell = (what: string, problem?: string): void => {
    this.counts.set(what, (this.counts.get(what) ?? 0) + 1)
    if (problem === undefined) return
    this.errors += 1
    if (this.problems.length < 10) this.problems.push(problem)
  }

  /** A reply to a kind that was due at a time, ms. */
  note(kind: Kind, reply: { status: number; body: Buffer } | Error, due: number): void {
    if (reply instanceof Error) {
      this.tell(`${kind.name} error`, `${kind.name}: ${reply.message}`)
      return
    }
    const { status, body } = reply
    if (status === 503 && body.includes('"overloaded"')) {
      this.refused += 1
      this.tell(`${kind.name} 503`)
    } else if (status !== kind.status) {
      this.tell(`${kind.name} ${status}`, `${kind.name}: ${status} ${body.toString('utf8', 0, 300)}`)
    } else {
      this.accepted += 1
      this.tell(
        `${kind.name} ${status}`,
        this.#isRight(kind, body) ? undefined : `${kind.name}: another answer`,
      )
      if (kind === MIX[0]) this.latencies.push(performance.now() - due)
    }
  }

  /** The same question has the same answer, to the last digit. */
  #isRight(kind: Kind, body: Buffer): boolean {
    if (kind.status !== 200) return true
    const expected = this.#expected.get(kind.name)
    if (!expected) this.#expected.set(kind.name, body)
    return expected?.equals(body) ?? true
  }
}

/** Requests a second when each is sent as soon as one before it is answered. */
async function capacity(port: number, choose: () => Kind, seconds: number): Promise<number> {
  const client = new RawClient(port, AT_ONCE)
  const account = new Account()
  const end = performance.now() + seconds * 1000
  const begun = performance.now()
  await Promise.all(
    Array.from({ length: AT_ONCE }, async () => {
      while (performance.now() < end) {
        const kind = choose()
        await new Promise<void>((settled) => {
          client.send(kind.request, (reply) => {
            account.note(kind, reply, performance.now())
            settled()
          })
        })
      }
    }),
  )
  client.close()
  if (account.errors > 0) throw new Error(account.problems.join('\n'))
  return (account.accepted * 1000) / (performance.now() - begun)
}

/** A client whose connections are open already, as those of callers and balancers are. */
async function opened(port: number, count: number): Promise<RawClient> {
  const client = new RawClient(port, count)
  const hello = rawRequest('GET', '/health/live')
  for (let open = 0; open < count; open += 50) {
    // all that are open have to be busy for another to be opened
    await Promise.all(
      Array.from({ length: open + 50 }, () => new Promise((settled) => client.send(hello, settled))),
    )
  }
  return client
}

/** Sends at a rate, whatever is answered. */
async function drive(port: number, rate: number, account: Account, seconds: number): Promise<number> {
  const client = await opened(port, MOST_CONNECTIONS)
  const begun = performance.now()
  let sent = 0
  let notSent = 0
  let waiting = 0
  while (performance.now() - begun < seconds * 1000) {
    const due = ((performance.now() - begun) / 1000) * rate
    while (sent < due) {
      sent += 1
      const kind = kindAt(Math.random())
      const time = begun + (sent / rate) * 1000
      const isSent = client.send(kind.request, (reply) => {
        waiting -= 1
        account.note(kind, reply, time)
      })
      if (isSent) waiting += 1
      else notSent += 1
    }
    await wait(TICK)
  }
  while (waiting > 0) await wait(TICK)
  client.close()
  out(
    `offered: ${Math.round(sent / seconds)}/s over ${seconds} s${notSent > 0 ? `, of which ${notSent} found no connection` : ''}`,
  )
  return sent
}

const folder = mkdtempSync(join(tmpdir(), 'soak-'))
const service = await startService({
  environment: {
    DATABASE_URL: `sqlite:${folder}/registry.db`,
    REQUEST_TIMEOUT_MS: '10000',
  },
  isQuiet: true,
}).catch(() => undefined)
if (!service) throw new Error('The service does not start')
const { port } = service
try {
  await capacity(port, () => MIX[0] as Kind, 5)
  const short = await capacity(port, () => MIX[0] as Kind, 8)
  const mixed = await capacity(port, () => kindAt(Math.random()), 8)
  out(`capacity: ${Math.round(short)} short advisories a second, ${Math.round(mixed)} of the mix`)
  const [account, start] = [new Account(), service.rss()]
  let isOver = false
  const over = (): boolean => isOver
  const others = [
    ...Array.from({ length: LONG_STREAMS }, () => longStream(port, over, account.tell)),
    ...Array.from({ length: SLOW_SENDERS }, () => slowSender(port, over, account.tell)),
    ...Array.from({ length: SMALL_STREAMS }, async (_, i) => {
      for (let n = i; !over(); n += 1) {
        await smallStream(port, n, account.tell)
        await wait(1000)
      }
    }),
  ]
  const watching = (async () => {
    while (!over()) {
      const begun = performance.now()
      const { status } = await fetch(`${service.url}/health/live`)
      account.tell(`health ${status}`, status === 200 ? undefined : `health: ${status}`)
      account.tell(performance.now() - begun > 1000 ? 'health later than 1 s' : 'health within 1 s')
      await wait(500)
    }
  })()
  const sizes = [start]
  const sampling = setInterval(() => sizes.push(service.rss()), (SECONDS * 1000) / 4 + 1)
  await drive(port, TIMES * mixed, account, SECONDS)
  clearInterval(sampling)
  isOver = true
  await Promise.all([...others, watching])
  const sorted = account.latencies.sort((a, b) => a - b)
  out(`accepted: ${account.accepted} (${Math.round(account.accepted / SECONDS)}/s)`)
  out(`refused with 503 overloaded: ${account.refused}`)
  out(`errors: ${account.errors}`)
  out(
    `short advisories: p50 ${percentile(sorted, 50).toFixed(1)} ms, p99 ${percentile(sorted, 99).toFixed(1)} ms, slowest ${percentile(sorted, 100).toFixed(1)} ms`,
  )
  sizes.push(service.rss())
  out(`resident memory from start to end, by quarters: ${sizes.map((size) => size.toFixed(0)).join(', ')} MB`)
  for (const [what, count] of [...account.counts].sort()) out(`  ${what}: ${count}`)
  for (const problem of account.problems) out(`  ! ${problem}`)
  service.child.kill('SIGTERM')
  const code = await service.ended()
  out(`stopped with ${code}; lines of error in its log: ${service.logged.length}`)
  for (const line of service.logged.slice(0, 3)) out(`  ! ${JSON.stringify(line).slice(0, 400)}`)
  process.exitCode = account.errors === 0 && code === 0 && service.logged.length === 0 ? 0 : 1
} finally {
  service.child.kill('SIGKILL')
  rmSync(folder, { recursive: true, force: true })
}
