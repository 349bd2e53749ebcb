import { once } from 'node:events'
import { request as httpRequest, type IncomingMessage } from 'node:http'
import type { AddressInfo } from 'node:net'
import { beforeAll, expect, onTestFinished, test } from 'vitest'
import { csvOf } from '../../scripts/passage-log/layouts.ts'
import { invent } from '../support/passage-log.ts'
import { buildService, linesOf } from '../support/service.ts'

let log: readonly string[]

beforeAll(async () => {
  const closing: (() => Promise<void>)[] = []
  const { app } = buildService((close) => closing.push(close))
  log = csvOf((await invent(app, 3, 5)).rows, 'plain').split(/(?<=\n)/)
  for (const close of closing) await close()
})

async function sending(detail: string) {
  const { app } = buildService()
  await app.listen({ host: '127.0.0.1', port: 0 })
  const sender = httpRequest({
    port: (app.server.address() as AddressInfo).port,
    host: '127.0.0.1',
    method: 'POST',
    path: `/v1/passages/check?detail=${detail}`,
    headers: { 'content-type': 'text/csv' },
  })
  sender.on('error', () => undefined)
  onTestFinished(() => void sender.destroy())
  return sender
}

test('reports come while the log is still being sent, the summary after its end', async () => {
  const sender = await sending('reports')
  // the header and half of the rows; the socket stays open
  sender.write(log.slice(0, 60).join(''))
  const [reply] = (await once(sender, 'response')) as [IncomingMessage]
  const chunks: Buffer[] = []
  reply.on('data', (chunk: Buffer) => chunks.push(chunk))
  await once(reply, 'data')
  const early = linesOf(String(Buffer.concat(chunks)).replace(/[^\n]*$/, ''))
  expect(early[0]).toMatchObject({ type: 'report', line: 2 })
  expect(early.some(({ type }) => type === 'summary')).toBe(false)

  sender.end(log.slice(60).join(''))
  await once(reply, 'end')
  const lines = linesOf(String(Buffer.concat(chunks)))
  expect(lines.filter(({ type }) => type === 'report').map(({ line }) => line)).toEqual(
    log.slice(1).map((_, i) => i + 2),
  )
  expect(lines.at(-1)).toMatchObject({ type: 'summary', complete: true })
  // an event is told when it closes, not at the end
  const firstEvent = lines.findIndex(({ type }) => type === 'event')
  expect(lines.slice(firstEvent).some(({ type }) => type === 'report')).toBe(true)
})

test('events begin after the last byte of the log, for callers that cannot read while they send', async () => {
  const sender = await sending('events')
  const chunks: Buffer[] = []
  const answered = once(sender, 'response').then(([reply]) => {
    ;(reply as IncomingMessage).on('data', (chunk: Buffer) => chunks.push(chunk))
    return reply as IncomingMessage
  })
  sender.write(log.slice(0, 100).join(''))
  // rows take microseconds: a reply that did not wait for the end would have come long before
  await new Promise((resolve) => setTimeout(resolve, 300))
  expect(chunks).toEqual([])
  sender.end(log.slice(100).join(''))
  const reply = await answered
  if (!reply.readableEnded) await once(reply, 'end')
  const lines = linesOf(String(Buffer.concat(chunks)))
  expect(lines.at(-1)).toMatchObject({ type: 'summary', complete: true })
  expect(lines.slice(0, -1).map(({ type }) => type)).toEqual(lines.slice(0, -1).map(() => 'event'))
  expect(lines.length).toBeGreaterThan(10)
})
