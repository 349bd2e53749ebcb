import { once } from 'node:events'
import { request, type IncomingMessage } from 'node:http'
import { setTimeout as wait } from 'node:timers/promises'
import { SHORT_LINE } from '../load/mix.ts'
import { startService } from '../load/service-process.ts'
import { asker, ledger, lostOf, shown, writer } from './writers.ts'
import type { Result } from './result.ts'

const WRITERS = 8

/** SIGTERM while requests are answered and a stream is open: each is answered or told, none is cut. */
export async function terminated(folder: string): Promise<Result> {
  const environment = { DATABASE_URL: `sqlite:${folder}/stopped.db` }
  const service = await startService({ environment })
  const book = ledger()
  let isOver = false
  const until = (): boolean => isOver
  const working = [
    ...Array.from({ length: WRITERS }, (_, i) => writer(service.url, `w${i}`, until, book)),
    ...Array.from({ length: WRITERS }, () => asker(service.url, until, book)),
  ]
  const sender = request({
    port: service.port,
    host: '127.0.0.1',
    method: 'POST',
    path: '/v1/advisories/stream?detail=compact',
    headers: { 'content-type': 'application/x-ndjson' },
  })
  sender.write(SHORT_LINE)
  const [reply] = (await once(sender, 'response')) as [IncomingMessage]
  const text = reply.toArray()
  await wait(1500)
  service.child.kill('SIGTERM')
  service.child.once('exit', () => (isOver = true))
  await wait(1000)
  sender.end(SHORT_LINE)
  const lines = String(Buffer.concat(await text))
    .trimEnd()
    .split('\n').length
  const code = await service.ended()
  isOver = true
  await Promise.all(working)
  const cut = service.logged.filter(({ msg }) => msg === 'cut off').length
  const again = await startService({ environment })
  const lost = await lostOf(again.url, book)
  again.child.kill('SIGTERM')
  await again.ended()
  const wrong = [...book.wrong]
  if (lines !== 2) wrong.push(`the stream had ${lines} lines of 2`)
  if (code !== 0) wrong.push(`ended with ${code}`)
  if (cut > 0) wrong.push(`${cut} requests were taken up and not answered`)
  return {
    name: 'SIGTERM under load',
    acknowledged: book.acknowledged.length,
    lost,
    wrong,
    // what came when nothing listened any more was never taken up
    note: `${shown(book)}; the open stream came to its end`,
  }
}

/** SIGKILL amid writes, again and again on the same file. */
export async function killed(folder: string, rounds: number): Promise<Result> {
  const environment = { DATABASE_URL: `sqlite:${folder}/killed.db` }
  const book = ledger()
  for (let round = 0; round < rounds; round += 1) {
    const service = await startService({ environment })
    let isOver = false
    const working = Array.from({ length: WRITERS }, (_, i) =>
      writer(service.url, `w${i}`, () => isOver, book),
    )
    await wait(200 + Math.random() * 600)
    service.child.kill('SIGKILL')
    isOver = true
    await Promise.all(working)
    await service.ended()
  }
  const service = await startService({ environment })
  const lost = await lostOf(service.url, book)
  service.child.kill('SIGTERM')
  await service.ended()
  return {
    name: `SIGKILL during writes, ${rounds} times`,
    acknowledged: book.acknowledged.length,
    lost,
    wrong: book.wrong,
    note: shown(book),
  }
}
