import { readFileSync } from 'node:fs'
import { setTimeout as wait } from 'node:timers/promises'
import { fileURLToPath } from 'node:url'
import { startService } from '../load/service-process.ts'
import type { Result } from './result.ts'
import { asker, ledger, lostOf, shown, writer } from './writers.ts'

const preload = (name: string): string => fileURLToPath(new URL(`./preload-${name}.mjs`, import.meta.url))

/** A log long enough for threads: the passages of the example by many ships. */
function longLog(ships: number): string {
  const text = readFileSync(
    new URL('../../openapi/examples/harrowmere-passages.csv', import.meta.url),
    'utf8',
  )
  const [head = '', ...rows] = text.trimEnd().split('\n')
  const place = head
    .toLowerCase()
    .split(',')
    .findIndex((name) => name.trim() === 'mmsi')
  const lines = rows.flatMap((row) =>
    Array.from({ length: ships }, (_, ship) => {
      const cells = row.split(',')
      cells[place] = String(Number(cells[place]) + ship * 1000)
      return cells.join(',')
    }),
  )
  return `${[head, ...lines].join('\n')}\n`
}

/** Threads that are killed while they judge a log: the answer is the same to the last digit. */
export async function threadsKilled(): Promise<Result> {
  const service = await startService({
    environment: { DATABASE_URL: 'sqlite::memory:' },
    preload: [preload('threads')],
  })
  const log = longLog(60)
  const check = async (): Promise<string> => {
    const reply = await fetch(`${service.url}/v1/passages/check?detail=reports`, {
      method: 'POST',
      headers: { 'content-type': 'text/csv' },
      body: log,
    })
    return reply.text()
  }
  const wrong: string[] = []
  const undisturbed = await check()
  if (!undisturbed.includes('"complete":true')) wrong.push('the log is not answered')
  for (let round = 0; round < 3; round += 1) {
    const state = { isOver: false }
    const killing = (async () => {
      while (!state.isOver) {
        await wait(150 + Math.random() * 300)
        service.child.kill('SIGUSR2')
      }
    })()
    if ((await check()) !== undisturbed) wrong.push(`round ${round}: another answer`)
    state.isOver = true
    await killing
  }
  const kills = service.logged.map(({ msg }) => Number(/^killed (\d+)/.exec(String(msg))?.[1] ?? 0))
  const killed = kills.reduce((sum, count) => sum + count, 0)
  if (killed < 3) wrong.push(`only ${killed} threads were killed`)
  service.child.kill('SIGTERM')
  await service.ended()
  const rows = log.split('\n').length - 2
  return {
    name: 'threads killed',
    acknowledged: 0,
    lost: [],
    wrong,
    note: `${killed} threads killed over 3 logs of ${rows} rows`,
  }
}

/** A time of day that jumps forward and back: nobody is shut out, nothing is lost, answers stay. */
export async function clockJumps(folder: string): Promise<Result> {
  const service = await startService({
    environment: { DATABASE_URL: `sqlite:${folder}/clock.db`, RATE_LIMIT_PER_MINUTE: '100000' },
    preload: [preload('clock')],
  })
  const { url } = service
  const book = ledger()
  let isOver = false
  const over = (): boolean => isOver
  const working = [writer(url, 'w0', over, book), writer(url, 'w1', over, book), asker(url, over, book)]
  const wrong: string[] = []
  for (let jump = 0; jump < 3; jump += 1) {
    await wait(700)
    service.child.kill('SIGUSR2')
    await wait(100)
    const reply = await fetch(`${url}/v1/methods`)
    const reset = Number(/;t=(\d+)$/.exec(reply.headers.get('ratelimit') ?? '')?.[1])
    if (!(reply.status === 200 && reset <= 60))
      wrong.push(`after jump ${jump + 1} the limit resets in ${reset} s`)
  }
  await wait(500)
  isOver = true
  await Promise.all(working)
  const lost = await lostOf(url, book)
  const jumps = service.logged.filter(({ msg }) => String(msg).startsWith('the clock says')).length
  if (jumps !== 3) wrong.push(`the clock jumped ${jumps} times`)
  service.child.kill('SIGTERM')
  const code = await service.ended()
  if (code !== 0) wrong.push(`ended with ${code}`)
  return {
    name: 'clock jumps of a day',
    acknowledged: book.acknowledged.length,
    lost,
    wrong: [...wrong, ...book.wrong],
    note: shown(book),
  }
}
