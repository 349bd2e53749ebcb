import fc from 'fast-check'
import { expect, it } from 'vitest'
import { decide, type Decision } from '../../src/advisory/decide.ts'
import { cases, evenly, ifPossible, logEvenly, vessels, type Case } from '../support/arbitraries.ts'
import { froudeScaled } from '../support/changes.ts'
import { expectClose } from '../support/expect-close.ts'

const decideMain = (c: Case): Decision | undefined =>
  ifPossible(() => decide(c.segment, c.vessel, c.conditions, c.options).main)

/** Without the Danish rule, and with the floor of 0.2 m under the keel below a share of the draught at either scale. */
function dimensionless(c: Case, k: number): Case {
  const draught = Math.min(c.vessel.draught, c.segment.maxDraught ?? Infinity)
  const ratio = Math.max(0.1, 0.2 / draught, 0.2 / (k * draught)) * (1 + 1e-9)
  const [a, b] = c.segment.banks
  const limits = {
    maxBankWaveHeight: a.maxWaveHeight ?? 0.08 * c.vessel.draught,
    maxReceptorWaveHeight: b.maxWaveHeight ?? 0.08 * c.vessel.draught,
    ...c.options.limits,
    minUnderKeelClearanceRatio: ratio,
    wakeWash: 'never' as const,
  }
  return { ...c, options: { ...c.options, limits } }
}

/** Laws with a dimension in them: bhowmik-1991, the size range of gates-herbich-1977, and barrass-1979 (knots to the 2.08). */
function isDimensional({ situation }: Decision): boolean {
  const { waveBands, squatBands, setting } = situation
  const waves = waveBands.list.reduce((bits, band) => bits | band.active, 0)
  const squats = squatBands.list.reduce((bits, band) => bits | band.active, 0)
  return (
    (waves & ((1 << 4) | (1 << 5))) !== 0 ||
    (squats & 1) !== 0 ||
    setting.length >= 130 ||
    setting.draught >= 7
  )
}

/** Small enough at both scales for the laws that are stated in metres to take no part. */
const mostlyInland = vessels.filter((v) => v.length < 100 && v.draught < 4 && v.hull === 'displacement')

it('a decision by dimensionless laws and limits scales by Froude: speeds by the root of the length scale, reasons unchanged', () => {
  const tally = { compared: 0, left: 0 }
  const inputs = fc.tuple(cases({ vessel: mostlyInland, stations: 1 }), logEvenly(0.2, 5))
  for (const [one, k] of fc.sample(inputs, { numRuns: 5000, seed: 30 })) {
    const c = dimensionless(one, k)
    // a group speaks in metres, and the breaking limit in a toe depth that scales: only the groups are left out
    const model = {
      ...c,
      segment: { ...c.segment, postedLimits: c.segment.postedLimits.map((p) => ({ ...p, appliesTo: {} })) },
    }
    const full = decideMain(model)
    const scaled = decideMain(froudeScaled(model, k))
    if (!full || !scaled || isDimensional(full) || isDimensional(scaled)) {
      expect(full === undefined).toBe(scaled === undefined)
      tally.left += 1
      continue
    }
    tally.compared += 1
    // each is found to 1e-9; a stone's or a median's root by iteration
    expectClose(scaled.speed, full.speed * Math.sqrt(k), { rel: 1e-8 })
    expect(scaled.outcome).toBe(full.outcome)
    expect(scaled.governing.criterion.id).toBe(full.governing.criterion.id)
    full.bounds.forEach((bound, i) => {
      const other = scaled.bounds[i]
      expect(other?.criterion.id).toBe(bound.criterion.id)
      if (bound.firstSpeed === Infinity) expect(other?.firstSpeed).toBe(Infinity)
      else if (Math.abs((other?.firstSpeed ?? NaN) / (bound.firstSpeed * Math.sqrt(k)) - 1) > 1e-8) {
        throw new Error(
          `${bound.criterion.id}: ${bound.firstSpeed} to ${other?.firstSpeed} at ${k}: ${JSON.stringify(model)}`,
        )
      }
    })
  }
  console.info('Froude scaling', tally)
  expect(tally.compared).toBeGreaterThan(1200)
})

/** Inputs that are moved, each by a share of itself. */
const MOVES: Readonly<Record<string, (c: Case, share: number) => Case>> = {
  depth: (c, x) => station(c, (s) => ({ ...s, depth: s.depth * (1 + x) })),
  width: (c, x) =>
    station(c, (s) => ({
      ...s,
      width: s.width * (1 + x),
      distances: [s.distances[0] * (1 + x), s.distances[1] * (1 + x)],
    })),
  'bank distance': (c, x) =>
    station(c, (s) => {
      const shift = x * Math.min(...s.distances)
      return { ...s, distances: [s.distances[0] + shift, s.distances[1] - shift] }
    }),
  draught: (c, x) => {
    const draught = c.vessel.draught * (1 + x)
    const { length, beam, blockCoefficient } = c.vessel
    return { ...c, vessel: { ...c.vessel, draught, volume: blockCoefficient * length * beam * draught } }
  },
  'wave factor': (c, x) => ({ ...c, options: { ...c.options, waveFactor: 1 + x } }),
  level: (c, x) => ({
    ...c,
    conditions: { ...c.conditions, waterLevel: c.conditions.waterLevel + x * c.segment.stations[0].depth },
  }),
}

function station(
  c: Case,
  change: (s: Case['segment']['stations'][0]) => Case['segment']['stations'][0],
): Case {
  return { ...c, segment: { ...c.segment, stations: [change(c.segment.stations[0])] } }
}

const bitsAt = (decision: Decision, family: 'waveBands' | 'squatBands'): string => {
  const { list, isOutOfRange } = decision.situation[family]
  const near = list.filter(
    (band) => band.from <= decision.speed * (1 + 1e-6) && band.to >= decision.speed * (1 - 1e-6),
  )
  return `${isOutOfRange} ${near.map((band) => band.active).join()}`
}

/** Why a jump between two inputs that all but agree is one of the declared steps; undefined when it is none. */
function declaredStep(a: Decision, b: Decision): string | undefined {
  const isToeDry = (d: Decision): boolean =>
    d.situation.segment.banks.some(({ toeDepth }) => (toeDepth ?? 1) + d.situation.conditions.waterLevel <= 0)
  if (isToeDry(a) !== isToeDry(b)) return 'the toe of a bank falls dry'
  const all = (d: Decision, family: 'waveBands' | 'squatBands'): string =>
    d.situation[family].list.map((band) => band.active).join()
  if (all(a, 'squatBands') !== all(b, 'squatBands') || bitsAt(a, 'squatBands') !== bitsAt(b, 'squatBands')) {
    return 'range edge of a squat method'
  }
  if (all(a, 'waveBands') !== all(b, 'waveBands')) return 'range edge of a wave method'
  if ([a, b].some((d) => d.governing.criterion.id === 'wake-wash')) return 'wake-wash at 4.5 s'
  if (bitsAt(a, 'waveBands') !== bitsAt(b, 'waveBands'))
    return 'range edge of a wave method, or a hump set free'
  return undefined
}

it('halving the step of an input halves the change, but at declared steps', () => {
  const steps = new Map<string, number>()
  let compared = 0
  const inputs = fc.tuple(
    cases({ stations: 1, shapes: ['by-kind', 'slope', 'bottom'] }),
    fc.constantFrom(...Object.keys(MOVES)),
    evenly(0.02, 0.3),
  )
  for (const [one, name, span] of fc.sample(inputs, { numRuns: 1200, seed: 31 })) {
    const { maxDraught: _, ...segment } = one.segment
    const base: Case = {
      ...one,
      segment: { ...segment, postedLimits: [] },
      conditions: { ...one.conditions, direction: 'upstream' },
    }
    const at = (x: number): Decision | undefined => decideMain(MOVES[name]!(base, x))
    let [low, high] = [-span, span]
    let [a, b] = [at(low), at(high)]
    // always into the half that changes more: what is left after 40 halvings is a step
    for (let i = 0; i < 40 && a && b; i += 1) {
      const middle = (low + high) / 2
      const m = at(middle)
      if (!m) {
        a = undefined
        break
      }
      if (Math.abs(m.speed - a.speed) >= Math.abs(b.speed - m.speed)) [high, b] = [middle, m]
      else [low, a] = [middle, m]
    }
    if (!a || !b) continue
    compared += 1
    // m/s; a speed that starts from rest rises as the root of its input, and 40 halvings leave 1e-6 of that
    const change = Math.abs(b.speed - a.speed)
    if (change < 1e-5) continue
    const reason = declaredStep(a, b)
    if (reason === undefined) {
      throw new Error(
        `${name} at ${low}: ${a.speed} (${a.governing.criterion.id}) to ${b.speed} (${b.governing.criterion.id}): ${JSON.stringify(base)}`,
      )
    }
    steps.set(reason, (steps.get(reason) ?? 0) + 1)
  }
  console.info('continuity', { compared, steps: Object.fromEntries(steps) })
  expect(compared).toBeGreaterThan(900)
  expect([...steps.values()].reduce((sum, n) => sum + n, 0)).toBeLessThan(0.2 * compared)
})
