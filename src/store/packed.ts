import { promisify } from 'node:util'
import { deflate, inflate } from 'node:zlib'

const deflated = promisify(deflate)
const inflated = promisify(inflate)

/** Text as it is stored, outside the event loop: deflated, form of RFC 1950. */
export const pack = (text: string): Promise<Uint8Array> => deflated(text)

export const unpack = async (bytes: Uint8Array): Promise<string> => (await inflated(bytes)).toString('utf8')

/** JSON of plain data, as it is stored. */
export const packJson = (value: unknown): Promise<Uint8Array> => pack(JSON.stringify(value))

export const unpackJson = async (bytes: Uint8Array): Promise<unknown> => JSON.parse(await unpack(bytes))
