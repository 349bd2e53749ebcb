import { connect, type Socket } from 'node:net'

/** A reply to a request whose length its head tells. */
export interface RawReply {
  readonly status: number
  readonly body: Buffer
}

type Settle = (reply: RawReply | Error) => void

const HEAD_END = Buffer.from('\r\n\r\n')

/** One kept connection with one request at a time. */
class Connection {
  readonly #socket: Socket
  #settle: Settle | undefined
  #received: Buffer[] = []
  #length = 0
  #total = Infinity
  #bodyStart = 0
  isOpen = true

  constructor(
    port: number,
    readonly onIdle: (connection: Connection) => void,
  ) {
    this.#socket = connect(port, '127.0.0.1')
    this.#socket.setNoDelay(true)
    this.#socket.on('data', (piece: Buffer) => {
      this.#take(piece)
    })
    this.#socket.on('error', (error) => {
      this.#end(error)
    })
    this.#socket.on('close', () => {
      this.#end(new Error('closed without a reply'))
    })
  }

  send(request: Buffer, settle: Settle): void {
    this.#settle = settle
    this.#socket.write(request)
  }

  destroy(): void {
    this.#socket.destroy()
  }

  #end(error: Error): void {
    this.isOpen = false
    const settle = this.#settle
    this.#settle = undefined
    settle?.(error)
  }

  #take(piece: Buffer): void {
    this.#received.push(piece)
    this.#length += piece.length
    if (this.#total === Infinity) this.#readHead()
    if (this.#length < this.#total) return
    const all = Buffer.concat(this.#received)
    const settle = this.#settle
    this.#received = []
    this.#length = 0
    this.#settle = undefined
    const start = this.#bodyStart
    this.#total = Infinity
    settle?.({ status: Number(all.toString('latin1', 9, 12)), body: all.subarray(start) })
    this.onIdle(this)
  }

  #readHead(): void {
    const all = this.#received.length === 1 ? (this.#received[0] as Buffer) : Buffer.concat(this.#received)
    const end = all.indexOf(HEAD_END)
    if (end < 0) return
    const head = all.toString('latin1', 0, end)
    const length = /\r\ncontent-length: (\d+)/i.exec(head)?.[1]
    this.#bodyStart = end + HEAD_END.length
    this.#total = this.#bodyStart + (length === undefined ? 0 : Number(length))
    if (length === undefined && !/ (204|304) /.test(head))
      this.#socket.destroy(new Error(`a reply without a length: ${head}`))
  }
}

/** Sends requests that are bytes already, on as many connections as are needed: much cheaper than a client of HTTP. */
export class RawClient {
  readonly #idle: Connection[] = []
  readonly #all = new Set<Connection>()

  constructor(
    readonly port: number,
    readonly most: number,
  ) {}

  /** @returns false when every connection is busy, and nothing was sent */
  send(request: Buffer, settle: Settle): boolean {
    let connection = this.#idle.pop()
    while (connection && !connection.isOpen) {
      this.#all.delete(connection)
      connection = this.#idle.pop()
    }
    if (!connection) {
      for (const one of this.#all) if (!one.isOpen) this.#all.delete(one)
      if (this.#all.size >= this.most) return false
      connection = new Connection(this.port, (free) => void this.#idle.push(free))
      this.#all.add(connection)
    }
    connection.send(request, settle)
    return true
  }

  close(): void {
    for (const connection of this.#all) connection.destroy()
  }
}

/** A request as bytes. */
export function rawRequest(method: string, path: string, body = '', type = 'application/json'): Buffer {
  const head = [
    `${method} ${path} HTTP/1.1`,
    'host: 127.0.0.1',
    ...(body === '' ? [] : [`content-type: ${type}`, `content-length: ${Buffer.byteLength(body)}`]),
  ]
  return Buffer.from(`${head.join('\r\n')}\r\n\r\n${body}`)
}
