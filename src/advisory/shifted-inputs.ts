import type { Station } from '../domain/segment.ts'
import { volumeAt } from '../domain/vessel-of.ts'
import { draughtUsed, type Inputs, type UncertainField } from './uncertainty.ts'

/** What is added to uncertain inputs: lengths in m, current in m/s, wave height as the logarithm of a factor. */
export type Shifts = Partial<Record<UncertainField, number>>

type Mutable<T> = { -readonly [Key in keyof T]: T[Key] }

interface ShiftedStation extends Mutable<Omit<Station, 'distances' | 'shape'>> {
  readonly distances: [number, number]
  readonly shape:
    | Extract<Station['shape'], { kind: 'trapezoid' }>
    | { readonly kind: 'profile'; readonly offsets: number[]; readonly bedDepths: number[] }
}

function copyOf(station: Station): ShiftedStation {
  const { distances, shape } = station
  return {
    ...station,
    distances: [...distances],
    shape:
      shape.kind === 'profile'
        ? { kind: 'profile', offsets: [...shape.offsets], bedDepths: [...shape.bedDepths] }
        : shape,
  }
}

/**
 * Writes a station with its bed moved down, then widened, each waterline receding by half, then with the sailing line
 * moved away from the nearer bank at the same width. A profile moves down as a whole and is stretched in proportion.
 */
function shiftStation(to: ShiftedStation, from: Station, shifts: Shifts): void {
  const { depth_m: deepening = 0, width_m: widening = 0, bank_distance_m: moving = 0 } = shifts
  const { depth, width, distances, shape } = from
  const outward = distances[0] <= distances[1] ? moving : -moving
  to.depth = depth + deepening
  to.width = width + widening
  to.distances[0] = distances[0] + widening / 2 + outward
  to.distances[1] = distances[1] + widening / 2 - outward
  if (shape.kind === 'trapezoid' || to.shape.kind === 'trapezoid') return
  const stretch = (width + widening) / width
  for (const [i, offset] of shape.offsets.entries()) to.shape.offsets[i] = offset * stretch - outward
  for (const [i, bedDepth] of shape.bedDepths.entries()) to.shape.bedDepths[i] = bedDepth + deepening
}

/**
 * Inputs that are shifted again and again, as samples are: the figures are written into one copy, since to copy
 * everything for each sample takes an eighth of the time of its decision.
 */
export class ShiftedInputs {
  readonly #base: Inputs
  readonly #draught: number
  readonly #stations: readonly [ShiftedStation, ...ShiftedStation[]]
  readonly #copy

  constructor(base: Inputs) {
    const { segment, vessel, conditions, options } = base
    const [first, ...rest] = segment.stations
    this.#base = base
    this.#draught = draughtUsed(base)
    this.#stations = [copyOf(first), ...rest.map(copyOf)]
    this.#copy = {
      segment: { ...segment, stations: this.#stations },
      vessel: { ...vessel, basis: { ...vessel.basis } },
      conditions: { ...conditions },
      options: { ...options, waveScale: options.waveScale ?? 1 },
    }
  }

  /**
   * The inputs with some of them shifted from their base. A draught is shifted from the one that a decision uses, and
   * counts as given then, so that no permitted draught caps it.
   *
   * @returns a view that holds until the next call
   */
  by(shifts: Shifts): Inputs {
    const { segment, vessel, conditions, options } = this.#base
    const copy = this.#copy
    for (const [i, station] of this.#stations.entries()) {
      const from = segment.stations[i]
      if (from) shiftStation(station, from, shifts)
    }
    const { draught_m: sinking, current_mps: flow = 0, wave_height: waveHeight } = shifts
    copy.vessel.draught = sinking === undefined ? vessel.draught : this.#draught + sinking
    copy.vessel.volume = volumeAt(vessel, copy.vessel.draught)
    copy.vessel.basis.draught = sinking === undefined ? vessel.basis.draught : 'given'
    copy.conditions.current = conditions.current + flow
    copy.options.waveScale = (options.waveScale ?? 1) * Math.exp(waveHeight ?? 0)
    return copy
  }
}

/** The same inputs with one of them shifted, in the units of `Shifts`. */
export function shifted(inputs: Inputs, field: UncertainField, shift: number): Inputs {
  return new ShiftedInputs(inputs).by({ [field]: shift })
}
