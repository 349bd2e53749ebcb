/** A box on a drawing, px. */
export interface Box {
  readonly x: number
  readonly y: number
  readonly width: number
  readonly height: number
}

export function boxesOverlap(a: Box, b: Box, gap = 0): boolean {
  return (
    a.x < b.x + b.width + gap &&
    b.x < a.x + a.width + gap &&
    a.y < b.y + b.height + gap &&
    b.y < a.y + a.height + gap
  )
}

/** Boxes that are taken, held by cells so that thousands are asked quickly. */
export class TakenPlaces {
  readonly #cells = new Map<string, Box[]>()
  readonly #size: number

  /** @param size  side of a cell, px, about that of the boxes */
  constructor(size = 40) {
    this.#size = size
  }

  #keys({ x, y, width, height }: Box): string[] {
    const keys: string[] = []
    for (let i = Math.floor(x / this.#size); i <= Math.floor((x + width) / this.#size); i += 1) {
      for (let j = Math.floor(y / this.#size); j <= Math.floor((y + height) / this.#size); j += 1) {
        keys.push(`${i},${j}`)
      }
    }
    return keys
  }

  isFree(box: Box, gap = 1): boolean {
    const wide = { x: box.x - gap, y: box.y - gap, width: box.width + 2 * gap, height: box.height + 2 * gap }
    return this.#keys(wide).every(
      (key) => this.#cells.get(key)?.every((taken) => !boxesOverlap(taken, box, gap)) ?? true,
    )
  }

  take(box: Box): void {
    for (const key of this.#keys(box)) {
      const cell = this.#cells.get(key)
      if (cell) cell.push(box)
      else this.#cells.set(key, [box])
    }
  }

  /** Takes the first of the boxes that is free; undefined when none is. */
  takeFirst<T extends Box>(candidates: Iterable<T>, gap = 1): T | undefined {
    for (const candidate of candidates) {
      if (!this.isFree(candidate, gap)) continue
      this.take(candidate)
      return candidate
    }
    return undefined
  }
}
