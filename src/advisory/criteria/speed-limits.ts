import { appliesTo } from '../../domain/group.ts'
import type { Direction, PostedLimit } from '../../domain/segment.ts'
import { currentAlong } from '../direction.ts'
import type { Situation } from '../situation.ts'
import { atMost, firstOfRising, type Criterion } from './criterion.ts'

/** A posted limit as the speed through the water that it allows, m/s. */
function throughWater(limit: PostedLimit, current: number): number {
  return limit.reference === 'through-water' ? limit.speed : limit.speed - current
}

/** The posted limit that binds this vessel most in a direction; undefined when none applies. */
export function bindingPostedLimit(
  situation: Situation,
  direction: Direction | undefined,
): PostedLimit | undefined {
  const current = currentAlong(situation.conditions, direction)
  let lowest: PostedLimit | undefined
  for (const limit of situation.segment.postedLimits) {
    // without a direction a limit of either direction counts: the answer must hold both ways
    const isSameWay = direction === undefined || limit.direction === 'both' || limit.direction === direction
    if (!isSameWay || !appliesTo(limit.appliesTo, situation.vessel)) continue
    if (!lowest || throughWater(limit, current) < throughWater(lowest, current)) lowest = limit
  }
  return lowest
}

/** The posted limit in a direction, over ground or through the water as it is posted. */
export function postedLimitCriterion(
  situation: Situation,
  direction: Direction | undefined,
): Criterion | undefined {
  if (!situation.options.applyPostedLimit) return undefined
  const posted = bindingPostedLimit(situation, direction)
  if (!posted) return undefined
  const current = currentAlong(situation.conditions, direction)
  const offset = posted.reference === 'through-water' ? 0 : current
  return {
    id: 'posted-limit',
    place: 'vessel',
    sense: 'at-most',
    unit: 'm/s',
    origin: 'segment',
    firstSpeed: (from, to) => firstOfRising(Math.max(0, throughWater(posted, current)), from, to),
    evaluate: (speed) => atMost(speed + offset, posted.speed),
  }
}

/** The vessel's own top speed. */
export function serviceSpeedCriterion(situation: Situation): Criterion {
  const { maxSpeed } = situation.vessel
  return {
    id: 'service-speed',
    place: 'vessel',
    sense: 'at-most',
    unit: 'm/s',
    origin: 'vessel',
    firstSpeed: (from, to) =>
      maxSpeed > from && maxSpeed <= to ? maxSpeed : maxSpeed > to ? Infinity : from,
    evaluate: (speed) => atMost(speed, maxSpeed),
  }
}
