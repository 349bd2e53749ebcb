/** A label on a row, px. */
export interface Wanted {
  /** where its middle belongs */
  readonly at: number
  readonly width: number
  /** what stays where not all have room: the largest */
  readonly weight: number
}

/** Pushes middles apart from the left. */
function pushed(all: readonly Wanted[], from: number, gap: number): number[] {
  let edge = from
  return all.map(({ at, width }) => {
    const middle = Math.max(at, edge + width / 2)
    edge = middle + width / 2 + gap
    return middle
  })
}

/** Keeps middles left of an end. */
function heldBack(all: readonly Wanted[], middles: readonly number[], to: number, gap: number): number[] {
  let edge = to
  const held = middles.map(() => 0)
  for (let i = all.length - 1; i >= 0; i -= 1) {
    const width = all[i]?.width ?? 0
    const middle = Math.min(middles[i] ?? 0, edge - width / 2)
    held[i] = middle
    edge = middle - width / 2 - gap
  }
  return held
}

/**
 * Places labels on a row near where they belong, none on another.
 *
 * @param wanted  n labels, rising by `at`
 * @param range   from and to of the row, px
 * @param gap     between two labels, px
 * @returns for each label its middle; undefined where the row has no room for it
 */
export function spread(
  wanted: readonly Wanted[],
  [from, to]: readonly [number, number],
  gap = 3,
): (number | undefined)[] {
  const room = to - from
  let sum = 0
  const kept = new Set<Wanted>()
  for (const label of [...wanted].sort((a, b) => b.weight - a.weight)) {
    if (sum + label.width > room) continue
    sum += label.width + gap
    kept.add(label)
  }
  const all = wanted.filter((label) => kept.has(label))
  const rightwards = heldBack(all, pushed(all, from, gap), to, gap)
  const turned = [...all].reverse().map((label) => ({ ...label, at: -label.at }))
  const leftwards = heldBack(turned, pushed(turned, -to, gap), -from, gap)
    .reverse()
    .map((middle) => -middle)
  // both keep the labels apart, and so does what lies halfway between them
  const found = new Map(all.map((label, i) => [label, ((rightwards[i] ?? 0) + (leftwards[i] ?? 0)) / 2]))
  return wanted.map((label) => found.get(label))
}
