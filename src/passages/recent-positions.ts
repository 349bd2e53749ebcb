/** Times kept for a vessel at most: own choice, an hour at a report a second. */
const MOST_TIMES = 4096

/** A position at a time: s and degrees. */
export interface Fix {
  readonly time: number
  readonly lon: number
  readonly lat: number
}

/**
 * When a vessel reported over the last seconds before its newest report, and where, in order of time.
 *
 * Plain lists of numbers, since a log holds many vessels.
 */
export class RecentPositions {
  readonly #span: number
  readonly #times: number[] = []
  /** NaN where the position was not accepted */
  readonly #lons: number[] = []
  readonly #lats: number[] = []
  #newest = -Infinity

  /** @param span  how long times are kept, s */
  constructor(span: number) {
    this.#span = span
  }

  /** s; -Infinity before the first report */
  get newest(): number {
    return this.#newest
  }

  /** How many times are kept. */
  get size(): number {
    return this.#times.length
  }

  isLate(time: number): boolean {
    return time < this.#newest - this.#span
  }

  has(time: number): boolean {
    return this.#times[this.#firstFrom(time)] === time
  }

  /** Index of the first time that is not before the given one. */
  #firstFrom(time: number): number {
    if (time > this.#newest) return this.#times.length
    let [low, high] = [0, this.#times.length]
    while (low < high) {
      const middle = (low + high) >> 1
      if ((this.#times[middle] ?? Infinity) < time) low = middle + 1
      else high = middle
    }
    return low
  }

  #add(time: number, lon: number, lat: number): void {
    const at = this.#firstFrom(time)
    if (at === this.#times.length) {
      this.#times.push(time)
      this.#lons.push(lon)
      this.#lats.push(lat)
    } else {
      this.#times.splice(at, 0, time)
      this.#lons.splice(at, 0, lon)
      this.#lats.splice(at, 0, lat)
    }
    this.#newest = Math.max(this.#newest, time)
    while ((this.#times[0] ?? Infinity) < this.#newest - this.#span || this.#times.length > MOST_TIMES) {
      this.#times.shift()
      this.#lons.shift()
      this.#lats.shift()
    }
  }

  /** Keeps a report whose position counts. */
  accept({ time, lon, lat }: Fix): void {
    this.#add(time, lon, lat)
  }

  /** Keeps only the time of a report. */
  refuse({ time }: Fix): void {
    this.#add(time, NaN, NaN)
  }

  /** The accepted position next to a time, before it (step -1) or after it (step 1). */
  #next(from: number, step: 1 | -1): Fix | undefined {
    for (let i = from; i >= 0 && i < this.#times.length; i += step) {
      const [time = NaN, lon = NaN, lat = NaN] = [this.#times[i], this.#lons[i], this.#lats[i]]
      if (!Number.isNaN(lon)) return { time, lon, lat }
    }
    return undefined
  }

  /** The accepted positions next to a time, before and after it. */
  around(time: number): readonly [before: Fix | undefined, after: Fix | undefined] {
    const at = this.#firstFrom(time)
    return [this.#next(at - 1, -1), this.#next(at, 1)]
  }
}
