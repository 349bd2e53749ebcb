import { randomBytes } from 'node:crypto'

/** Letters that are hard to mistake when an id is read aloud or copied by hand; 32, so that a byte is spread evenly. */
const LETTERS = '0123456789abcdefghjkmnpqrstvwxyz'
const LENGTH = 10

/** A kind and ten letters of some bytes. */
export function idFrom(kind: string, bytes: Uint8Array): string {
  const letters = Array.from(bytes.subarray(0, LENGTH), (byte) => LETTERS.charAt(byte % LETTERS.length))
  return `${kind}-${letters.join('')}`
}

/** An id that nobody can guess, one of 10¹⁵. */
export const newId = (kind: string): string => idFrom(kind, randomBytes(LENGTH))
