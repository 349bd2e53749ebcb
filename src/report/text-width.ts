/** Widths of a common sans-serif, in ems, by kind of character; a little wide, so that labels rather stand apart. */
const KINDS: readonly (readonly [RegExp, number])[] = [
  [/[ijlI|.,:;'!·]/, 0.3],
  [/[ ftr()[\]/\u00a0\u202f-]/, 0.36],
  [/[mwMW@%…—]/, 0.92],
  [/[A-Z&Δ√×−+=<>]/, 0.72],
  [/[\u0020-\u024f\u2010-\u2027]/, 0.58],
]

/** What a character that is not listed may take: ideographs fill their square. */
const WIDEST = 1

/** Width that a text takes at most, in the unit of `size`. */
export function textWidth(text: string, size: number): number {
  let width = 0
  for (const character of text) width += KINDS.find(([kind]) => kind.test(character))?.[1] ?? WIDEST
  return width * size
}

/** A text that fits a width: whole, or cut with an ellipsis. */
export function fitted(text: string, width: number, size: number): string {
  if (textWidth(text, size) <= width) return text
  const all = Array.from(text)
  while (all.length > 1 && textWidth(`${all.join('')}…`, size) > width) all.pop()
  return `${all.join('').trimEnd()}…`
}
