import { once } from 'node:events'
import { request, type IncomingMessage } from 'node:http'
import { connect } from 'node:net'
import { setTimeout as wait } from 'node:timers/promises'
import { SHORT_LINE, STREAMS } from './mix.ts'

/** What became of requests by name: `stream 200`, `stream 503`, `stream error`. */
export type Told = (what: string, problem?: string) => void

/** Sends a body at once and reads the whole reply, which must be complete. */
export async function smallStream(port: number, index: number, tell: Told): Promise<void> {
  const { name, path, type, body, lines } = STREAMS[index % STREAMS.length] as (typeof STREAMS)[number]
  try {
    const sender = request({
      port,
      host: '127.0.0.1',
      method: 'POST',
      path,
      headers: { 'content-type': type },
    })
    sender.end(body)
    const [reply] = (await once(sender, 'response')) as [IncomingMessage]
    const text = String(Buffer.concat(await reply.toArray()))
    const { statusCode = 0 } = reply
    const isWhole =
      statusCode !== 200 ||
      (lines === undefined ? text.includes('"complete":true') : text.trimEnd().split('\n').length === lines)
    tell(
      `${name} ${statusCode}`,
      isWhole && [200, 503].includes(statusCode) ? undefined : `${name}: ${text.slice(0, 200)}`,
    )
  } catch (error) {
    tell(`${name} error`, `${name}: ${String(error)}`)
  }
}

/** A stream that lasts: a line now and then until told to end; every line must come back. */
export async function longStream(port: number, until: () => boolean, tell: Told): Promise<void> {
  const name = 'long stream'
  try {
    const sender = request({
      port,
      host: '127.0.0.1',
      method: 'POST',
      path: '/v1/advisories/stream?detail=compact',
      headers: { 'content-type': 'application/x-ndjson' },
    })
    let sent = 0
    sender.write(SHORT_LINE)
    sent += 1
    const [reply] = (await once(sender, 'response')) as [IncomingMessage]
    let received = 0
    reply.on('data', (piece: Buffer) => {
      for (const byte of piece) if (byte === 10) received += 1
    })
    const ended = once(reply, 'end')
    while (!until() && reply.statusCode === 200) {
      if (!sender.write(SHORT_LINE.repeat(10))) await once(sender, 'drain')
      sent += 10
      await wait(100)
    }
    sender.end()
    await ended
    const isRight = reply.statusCode === 503 || (received === sent && reply.complete)
    tell(`${name} ${reply.statusCode}`, isRight ? undefined : `${name}: ${sent} lines in, ${received} out`)
  } catch (error) {
    tell(`${name} error`, `${name}: ${String(error)}`)
  }
}

/** A sender that drips its body and never ends it: it must be told 408, and others not notice. */
export async function slowSender(port: number, until: () => boolean, tell: Told): Promise<void> {
  while (!until()) {
    const socket = connect(port, '127.0.0.1')
    let text = ''
    socket.on('data', (piece: Buffer) => (text += piece.toString('latin1')))
    socket.on('error', () => undefined)
    socket.write(
      'POST /v1/advisories HTTP/1.1\r\nhost: a\r\ncontent-type: application/json\r\ncontent-length: 5000\r\n\r\n',
    )
    while (!until() && text === '' && !socket.destroyed) {
      socket.write(' ')
      await wait(500)
    }
    socket.destroy()
    if (text !== '') {
      const status = text.slice(9, 12)
      tell(
        `slow sender ${status}`,
        ['408', '503'].includes(status) ? undefined : `slow sender: ${text.slice(0, 100)}`,
      )
    }
  }
}
