import { distance } from 'fastest-levenshtein'

// A name of a megabyte would make each comparison slow; what follows the first letters cannot make it nearer.
const COMPARED_LENGTH = 64

/** The names ordered by how few letters differ from what was given; names equally near keep their order. */
export function nearestFirst(given: string, names: readonly string[]): string[] {
  const start = given.slice(0, COMPARED_LENGTH).toLowerCase()
  return names
    .map((name) => ({ name, letters: distance(start, name.toLowerCase()) }))
    .sort((a, b) => a.letters - b.letters)
    .map(({ name }) => name)
}
