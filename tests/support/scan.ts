import type { Decision } from '../../src/advisory/decide.ts'
import type { Criterion } from '../../src/advisory/criteria/criterion.ts'

/**
 * Speeds of an independent scan from rest up to a speed: evenly spaced, then closing in on the end, then close on both
 * sides of every speed at which a method of the situation starts or stops to count.
 */
export function scanSpeeds(decision: Decision, to: number, count: number): number[] {
  const speeds: number[] = []
  for (let i = 1; i <= count; i += 1) speeds.push((to * i) / count)
  for (let k = 1; k <= 12; k += 1) speeds.push(to * (1 - 10 ** -k))
  const { waveBands, squatBands, shallowWaveSpeed } = decision.situation
  const edges = [...waveBands.list, ...squatBands.list].map((band) => band.to)
  // where weggel-sorensen-1986 changes its coefficients or caps its depth
  edges.push(0.55 * shallowWaveSpeed, 0.42 * shallowWaveSpeed)
  for (const edge of edges) {
    for (const share of [1e-9, 1e-6, 1e-4, 1e-3]) speeds.push(edge * (1 - share), edge * (1 + share))
  }
  return speeds.filter((speed) => speed > 0 && speed <= to).sort((a, b) => a - b)
}

/** The lowest scanned speed at which a criterion does not hold; undefined when it holds at all. */
export function firstFailure(criterion: Criterion, speeds: readonly number[]): number | undefined {
  return speeds.find((speed) => !criterion.evaluate(speed).isMet)
}
