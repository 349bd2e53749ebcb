import { squatAt, squatFirstSpeed } from '../squat.ts'
import type { Situation } from '../situation.ts'
import { isAtMost, type Criterion, type Origin } from './criterion.ts'
import { POLICY } from './policy.ts'

/** Net clearance that must remain after squat: the strictest of policy or request, and segment. */
export function requiredClearance(situation: Situation): { limit: number; origin: Origin } {
  const { minUnderKeelClearanceRatio } = situation.options.limits
  const ratio = minUnderKeelClearanceRatio ?? POLICY.minUnderKeelClearanceRatio
  const ofShare = ratio * situation.vessel.draught
  const general = Math.max(ofShare, POLICY.minUnderKeelClearance)
  const ofSegment = situation.segment.minUnderKeelClearance ?? 0
  if (ofSegment > general) return { limit: ofSegment, origin: 'segment' }
  const isOfRequest = minUnderKeelClearanceRatio !== undefined && ofShare >= POLICY.minUnderKeelClearance
  return { limit: general, origin: isOfRequest ? 'request' : 'policy' }
}

/** Clearance under the keel that a squat leaves, m. */
function clearanceOf(situation: Situation, squat: number): number {
  return situation.section.depth - situation.vessel.draught - squat
}

export function clearanceCriterion(situation: Situation): Criterion {
  const { limit, origin } = requiredClearance(situation)
  const allowedSquat = clearanceOf(situation, limit)
  return {
    id: 'under-keel-clearance',
    place: 'vessel',
    sense: 'at-least',
    unit: 'm',
    origin,
    firstSpeed: (from, to) => (allowedSquat > 0 ? squatFirstSpeed(situation, allowedSquat, from, to) : from),
    evaluate: (speed) => {
      const squat = squatAt(situation, speed)
      if (Number.isNaN(squat)) return { limit, isMet: false }
      // held against the squat: of a squat far below the clearance the slack would be too large a share
      return { value: clearanceOf(situation, squat), limit, isMet: isAtMost(squat, allowedSquat) }
    },
  }
}
