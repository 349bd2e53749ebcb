import type { Conditions, Options } from '../domain/conditions.ts'
import type { Direction, Segment } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'
import { criterionReports, type CriterionReport } from './advise.ts'
import { assumptionsOf } from './assumptions.ts'
import type { Assumption, Caution } from './caution.ts'
import { cautionsAt } from './cautions.ts'
import { decide, type Decision } from './decide.ts'
import { currentAlong } from './direction.ts'
import { effectsAt, type Effects } from './effects.ts'
import { squatReports, waveReports, type SquatReport, type WaveReport } from './method-report.ts'

/** A speed as a vessel sails it. */
export interface SailedSpeed {
  /** m/s */
  readonly value: number
  readonly reference: 'through-water' | 'over-ground'
}

export type Verdict = 'within' | 'exceeds' | 'no-safe-speed'

/** What a speed does, and whether it is faster than advised. */
export interface Assessment {
  readonly verdict: Verdict
  readonly decision: Decision
  /** m/s through the water */
  readonly speed: number
  readonly effects: Effects
  readonly criteria: readonly CriterionReport[]
  readonly waveMethods: readonly WaveReport[]
  readonly squatMethods: readonly SquatReport[]
  readonly cautions: readonly Caution[]
  readonly assumptions: readonly Assumption[]
}

/** Slack of the comparison with the recommendation, as of the criteria themselves. */
const SLACK = 1e-9

/** Speed through the water in a direction, m/s. */
function throughWater(sailed: SailedSpeed, conditions: Conditions, direction: Direction | undefined): number {
  return sailed.reference === 'through-water'
    ? sailed.value
    : sailed.value - currentAlong(conditions, direction)
}

/** Whether a speed through the water is at most the recommendation. */
export function verdictOf(decision: Decision, speed: number): Verdict {
  if (decision.outcome === 'no-safe-speed') return 'no-safe-speed'
  return speed <= decision.speed * (1 + SLACK) ? 'within' : 'exceeds'
}

/**
 * What a passage at a given speed does. Over ground without a direction, the higher speed through the water counts, and
 * the speed must be allowed in both.
 *
 * @returns undefined when the vessel would not move ahead through the water at that speed over ground
 * @throws Fault `impossible-input` when the figures cannot hold together
 */
export function assess(
  segment: Segment,
  vessel: Vessel,
  conditions: Conditions,
  options: Options,
  sailed: SailedSpeed,
): Assessment | undefined {
  const { main, byDirection } = decide(segment, vessel, conditions, options)
  const decision = byDirection ? decisionFor(byDirection, main, sailed, conditions) : main
  const speed = throughWater(sailed, conditions, decision.direction)
  if (!(speed > 0)) return undefined
  const { situation } = decision
  const effects = effectsAt(situation, speed)
  const cautions = cautionsAt(situation, effects, decision.direction)
  if (speed < situation.vessel.minSteerageSpeed) cautions.push(belowSteerage(situation.vessel, speed))
  return {
    verdict: verdictOf(decision, speed),
    decision,
    speed,
    effects,
    criteria: criterionReports(decision, speed),
    waveMethods: waveReports(situation, speed),
    squatMethods: squatReports(situation, speed),
    cautions,
    assumptions: assumptionsOf(situation),
  }
}

const SEVERITY: Readonly<Record<Verdict, number>> = { within: 0, exceeds: 1, 'no-safe-speed': 2 }

/**
 * The decision that a speed is held against: the direction asked for; else, over ground, the one in which it is the
 * faster through the water, unless only the other one forbids it, as a posted limit of one direction can.
 */
function decisionFor(
  byDirection: Readonly<Record<Direction, Decision>>,
  main: Decision,
  sailed: SailedSpeed,
  conditions: Conditions,
): Decision {
  if (conditions.direction || sailed.reference === 'through-water') return main
  const { upstream, downstream } = byDirection
  const [faster, slower] = conditions.current > 0 ? [upstream, downstream] : [downstream, upstream]
  const slowerSpeed = throughWater(sailed, conditions, slower.direction)
  if (!(slowerSpeed > 0)) return faster
  const ofFaster = verdictOf(faster, throughWater(sailed, conditions, faster.direction))
  return SEVERITY[verdictOf(slower, slowerSpeed)] > SEVERITY[ofFaster] ? slower : faster
}

function belowSteerage(vessel: Vessel, speed: number): Caution {
  return {
    code: 'below-steerage',
    severity: 'warning',
    text: 'The speed through the water is below what the vessel needs to steer.',
    facts: { through_water_mps: speed, min_steerage_mps: vessel.minSteerageSpeed },
  }
}
