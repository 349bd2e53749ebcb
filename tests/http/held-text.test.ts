import { expect, it } from 'vitest'
import { HeldText } from '../../src/http/held-text.ts'

it('gives back all that was added, in its order', () => {
  const held = new HeldText()
  const lines = Array.from({ length: 40_000 }, (_, i) => `row ${i}, Größe ${i % 7}\n`)
  for (const line of lines) held.add(line)
  const pieces = [...held.pieces()]
  expect(pieces.length).toBeGreaterThan(2)
  expect(pieces.join('')).toBe(lines.join(''))
})

it('holds nothing when nothing was added', () => {
  expect([...new HeldText().pieces()]).toEqual([])
})
