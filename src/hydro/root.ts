/**
 * Where a continuous function that starts at or below zero first rises above it: Chandrupatla's bracketed iteration
 * (inverse quadratic where the function is smooth enough for it, bisection elsewhere).
 *
 * @param f   finite on [low, high], f(low) ≤ 0 < f(high)
 * @returns x in [low, high] with f(x) ≤ 0 and f positive within 4 units in the last place above it
 * @holds any continuous f; with several roots in the bracket, one of them
 * @error 4 units in the last place of x
 * @source Chandrupatla, T.R. (1997), A new hybrid quadratic/bisection algorithm for finding the zero of a nonlinear
 *   function without using derivatives, Advances in Engineering Software 28, 145-149 (from memory)
 * @example risingRoot((x) => x * x - 2, 1, 2) // 1.4142135624
 */
export function risingRoot(f: (x: number) => number, low: number, high: number): number {
  // a: newest point, b: other end of the bracket, c: point before
  let b = low
  let fb = f(low)
  let a = high
  let fa = f(high)
  let step = 0.5
  while (Math.abs(b - a) > 4 * Number.EPSILON * Math.abs(a)) {
    const x = a + held(step, Math.abs(b - a), Math.abs(a)) * (b - a)
    const fx = f(x)
    let c = a
    let fc = fa
    if (fx > 0 !== fa > 0) {
      c = b
      fc = fb
      b = a
      fb = fa
    }
    a = x
    fa = fx
    step = nextStep(a, b, c, fa, fb, fc)
  }
  return fa > 0 ? b : a
}

/** Keeps a step inside the bracket by units in the last place, so that each evaluation shrinks it. */
function held(step: number, width: number, scale: number): number {
  const margin = Math.min(0.5, (2 * Number.EPSILON * scale) / width)
  return Math.min(1 - margin, Math.max(margin, step))
}

/** Share of the bracket at which inverse quadratic interpolation puts the root; a half where it cannot be trusted. */
function nextStep(a: number, b: number, c: number, fa: number, fb: number, fc: number): number {
  const xi = (a - b) / (c - b)
  const phi = (fa - fb) / (fc - fb)
  if (!(phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)) return 0.5
  return (fa / (fb - fa)) * (fc / (fb - fc)) + ((c - a) / (b - a)) * (fa / (fc - fa)) * (fb / (fc - fb))
}
