import { Fault } from '../domain/fault.ts'
import { stationBounds, type SegmentBounds } from './decide.ts'
import type { Inputs } from './uncertainty.ts'

/** A shift may push a length below zero or the sailing line off the water. */
function isShiftedSane({ segment, vessel }: Inputs): boolean {
  return (
    vessel.draught > 0 &&
    segment.stations.every(
      ({ depth, width, distances }) => depth > 0 && width > 0 && distances[0] > 0 && distances[1] > 0,
    )
  )
}

/**
 * The bounds of the water of shifted inputs, or undefined where the shifted figures cannot hold together.
 *
 * @param solve  finds the bounds at a station: all of them unless it says otherwise
 */
export function boundsIfPossible(
  inputs: Inputs,
  solve?: Parameters<typeof stationBounds>[4],
): SegmentBounds | undefined {
  const { segment, vessel, conditions, options } = inputs
  if (!isShiftedSane(inputs)) return undefined
  try {
    return stationBounds(segment, vessel, conditions, options, solve)
  } catch (error) {
    if (error instanceof Fault && error.code === 'impossible-input') return undefined
    throw error
  }
}
