import type { Conditions, Options } from '../domain/conditions.ts'
import type { Direction, Segment } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'
import { assumptionsOf } from './assumptions.ts'
import type { Assumption, Caution } from './caution.ts'
import { cautionsAt } from './cautions.ts'
import type { Criterion, Evaluation } from './criteria/criterion.ts'
import { speedCurve, type Curve } from './curve.ts'
import { decide, type Decision } from './decide.ts'
import { effectsAt, type Effects } from './effects.ts'
import { fasterWindow } from './faster-window.ts'
import { squatReports, waveReports, type SquatReport, type WaveReport } from './method-report.ts'
import { signOfDecision, type Sign } from './sign.ts'

/** A criterion as it stands in an answer. */
export interface CriterionReport {
  readonly criterion: Criterion
  readonly evaluation: Evaluation
  /** first speed at which it is reached, taken alone, m/s; Infinity when not up to the top speed */
  readonly firstSpeed: number
  readonly isGoverning: boolean
}

/** What would be advised without the factor that was applied. */
export interface Uncalibrated {
  readonly decision: Decision
  /** m, at that recommendation; NaN when there is none */
  readonly bankWaveHeight: number
}

/** The answer in brief: what a row of a table holds. */
export interface Brief {
  readonly decision: Decision
  readonly byDirection?: Readonly<Record<Direction, Decision>> | undefined
  readonly sign?: Sign | undefined
  /** at the recommendation; at minimum steerage when no speed is safe */
  readonly effects: Effects
  readonly uncalibrated?: Uncalibrated | undefined
  readonly cautions: readonly Caution[]
}

/** The answer: a largest speed with its reasons. */
export interface Advisory extends Brief {
  readonly criteria: readonly CriterionReport[]
  readonly waveMethods: readonly WaveReport[]
  readonly squatMethods: readonly SquatReport[]
  readonly curve?: Curve | undefined
  readonly assumptions: readonly Assumption[]
}

/** Speed that the figures of an answer are for: the recommendation, or minimum steerage when no speed is safe. */
export function speedOfFigures(decision: Decision): number {
  return decision.outcome === 'no-safe-speed' ? decision.situation.vessel.minSteerageSpeed : decision.speed
}

/** Every criterion at a speed, in the order of the bounds. */
export function criterionReports(decision: Decision, speed: number): CriterionReport[] {
  return decision.bounds.map((bound) => ({
    criterion: bound.criterion,
    evaluation: bound.criterion.evaluate(speed),
    firstSpeed: bound.firstSpeed,
    isGoverning: bound === decision.governing,
  }))
}

function withoutFactor(
  segment: Segment,
  vessel: Vessel,
  conditions: Conditions,
  options: Options,
): Uncalibrated {
  const { waveFactor: _factor, calibration: _calibration, ...plain } = options
  const { main } = decide(segment, vessel, conditions, plain)
  const isSafe = main.outcome !== 'no-safe-speed'
  return {
    decision: main,
    bankWaveHeight: isSafe ? effectsAt(main.situation, main.speed).bankWaveHeight : NaN,
  }
}

/** Cautions about the decision itself. */
function decisionCautions(decision: Decision, sign: Sign | undefined): Caution[] {
  const cautions: Caution[] = []
  const window = fasterWindow(decision)
  if (window) {
    cautions.push({
      code: 'faster-window',
      severity: 'caution',
      text: 'Beyond the speed that governs there is a faster range in which every criterion holds again. It is not recommended: reaching it means passing through worse waves.',
      facts: { from_mps: window.from, to_mps: window.to },
    })
  }
  const { governing, outcome } = decision
  const isUnknown =
    governing.criterion.id !== 'service-speed' &&
    governing.criterion.evaluate(decision.speed * (1 + 1e-6)).value === undefined
  if (isUnknown) {
    cautions.push({
      code: 'no-method-in-range',
      severity: 'warning',
      text: `Just above the recommended speed no method can evaluate the criterion ${governing.criterion.id}: what cannot be evaluated counts as reached.`,
      facts: { criterion: governing.criterion.id },
    })
  }
  if (outcome !== 'no-safe-speed' && !sign) {
    cautions.push({
      code: 'sign-below-steerage',
      severity: 'warning',
      text: 'Rounded down to the step of the sign, the speed would be below what the vessel needs to steer: no sign value is given.',
    })
  }
  return cautions
}

/**
 * The advisory of a vessel on a segment, in brief.
 *
 * @param segment     the water, one station or more
 * @param vessel      the vessel
 * @param conditions  level, current, direction, traffic
 * @param options     methods, limits, sign
 * @throws Fault `impossible-input` when the figures cannot hold together
 */
export function adviseBriefly(
  segment: Segment,
  vessel: Vessel,
  conditions: Conditions,
  options: Options,
): Brief {
  const { main, byDirection } = decide(segment, vessel, conditions, options)
  const { situation } = main
  const sign = main.outcome === 'no-safe-speed' ? undefined : signOfDecision(main)
  const ofDecision = decisionCautions(main, sign)
  const uncalibrated = situation.waveFactors.isCorrected
    ? withoutFactor(segment, vessel, conditions, options)
    : undefined
  // last, since the reports of an answer are at the same speed, of which the figures are held
  const effects = effectsAt(situation, speedOfFigures(main))
  const cautions = cautionsAt(situation, effects, main.direction)
  cautions.push(...ofDecision)
  return { decision: main, byDirection, sign, effects, uncalibrated, cautions }
}

/** The advisory of a vessel on a segment, with every reason; parameters and faults as of `adviseBriefly`. */
export function advise(segment: Segment, vessel: Vessel, conditions: Conditions, options: Options): Advisory {
  const brief = adviseBriefly(segment, vessel, conditions, options)
  const { decision } = brief
  const speed = speedOfFigures(decision)
  return {
    decision,
    byDirection: brief.byDirection,
    sign: brief.sign,
    effects: brief.effects,
    uncalibrated: brief.uncalibrated,
    cautions: brief.cautions,
    criteria: criterionReports(decision, speed),
    waveMethods: waveReports(decision.situation, speed),
    squatMethods: squatReports(decision.situation, speed),
    curve: options.hasCurve ? speedCurve(decision) : undefined,
    assumptions: assumptionsOf(decision.situation),
  }
}
