import { createHash, randomBytes } from 'node:crypto'

const PREFIX = 'wl_' // lets people and secret scanners tell what it is
const LENGTH = 32 // random bytes: too many to guess, so the hash needs neither salt nor work factor

/** A new key. It is shown once; only its hash is kept. */
export const newKey = (): string => PREFIX + randomBytes(LENGTH).toString('base64url')

/** SHA-256 of a key, hex: what is stored, and what a key that comes with a request is looked up by. */
export const hashOf = (key: string): string => createHash('sha256').update(key).digest('hex')
