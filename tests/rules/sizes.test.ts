import { expect, test } from 'vitest'
import { sources } from '../support/sources.ts'

const MAX_LINES = 250

/** Tables of figures, which gain nothing from being cut. */
const TABLES: readonly string[] = []

test('no file of the service is over 250 lines, tables excepted', () => {
  const long = sources().filter(
    ({ path, text }) => !TABLES.includes(path) && text.trimEnd().split('\n').length > MAX_LINES,
  )
  expect(long.map(({ path }) => path)).toEqual([])
})

test('every exception exists and is still over 250 lines', () => {
  for (const path of TABLES) {
    const file = sources().find((source) => source.path === path)
    expect(file?.text.trimEnd().split('\n').length ?? 0, path).toBeGreaterThan(MAX_LINES)
  }
})
