import fc from 'fast-check'
import { expect, it } from 'vitest'
import { advise } from '../../src/advisory/advise.ts'
import { assess } from '../../src/advisory/assess.ts'
import { fasterWindow } from '../../src/advisory/faster-window.ts'
import { decide, type Decision } from '../../src/advisory/decide.ts'
import type { Options } from '../../src/domain/conditions.ts'
import { findVesselClass } from '../../src/domain/vessel-classes.ts'
import { vesselOfClass } from '../../src/domain/vessel-of.ts'
import { cases, fastCraft, ifPossible, PLAIN, vessels, type Case } from '../support/arbitraries.ts'
import { expectClose } from '../support/expect-close.ts'
import { atRest, canal } from '../support/places.ts'

const holdsAt = (decision: Decision, speed: number): boolean =>
  decision.bounds.every(({ criterion }) => criterion.evaluate(speed).isMet)

/** First run of scanned speeds above the recommendation at which every criterion holds. */
function scannedWindow(decision: Decision, count: number): { from: number; to: number } | undefined {
  const top = decision.situation.vessel.maxSpeed
  const step = (top - decision.speed) / count
  let from: number | undefined
  for (let i = 1; i <= count; i += 1) {
    const speed = decision.speed + i * step
    if (holdsAt(decision, speed)) from ??= speed
    else if (from !== undefined) return { from, to: speed - step }
  }
  return from === undefined ? undefined : { from, to: top }
}

const planingBoat = vesselOfClass(findVesselClass('planing-boat')!, 'laden', {})

/** A planing boat on a lake: by its waves it may sail slowly, or fast beyond the hump, but not between. */
const lake = (height: number, distance: number): Case => ({
  vessel: planingBoat,
  conditions: atRest,
  options: {
    ...PLAIN,
    limits: {
      maxBankWaveHeight: height,
      wakeWash: 'never',
      maxDepthFroudeNumber: 3,
      maxCriticalRatio: 3,
      minUnderKeelClearanceRatio: 0,
    },
  },
  segment: canal(
    { depth: 15, distances: [distance, distance], shape: { kind: 'trapezoid', slope: 0 } },
    { confinement: 'open' },
  ),
})

it.each([
  [0.12, 60],
  [0.15, 40],
  [0.18, 60],
  [0.2, 25],
])(
  'the faster window of a planing boat under a bank limit of %d m at %d m agrees with a scan',
  (height, distance) => {
    const c = lake(height, distance)
    const { decision, cautions } = advise(c.segment, c.vessel, c.conditions, c.options)
    const count = 40_000
    const scanned = scannedWindow(decision, count)
    const caution = cautions.find(({ code }) => code === 'faster-window')
    expect(caution !== undefined).toBe(scanned !== undefined)
    if (!scanned || !caution) return
    const step = (planingBoat.maxSpeed - decision.speed) / count
    expectClose(Number(caution.facts?.['from_mps']), scanned.from, { abs: 1.5 * step })
    expectClose(Number(caution.facts?.['to_mps']), scanned.to, { abs: 1.5 * step })
    // never the recommendation, and a speed inside the window exceeds it
    expect(decision.speed).toBeLessThan(scanned.from)
    const inside = { value: (scanned.from + scanned.to) / 2, reference: 'through-water' } as const
    expect(assess(c.segment, c.vessel, c.conditions, c.options, inside)?.verdict).toBe('exceeds')
  },
)

it('at least two of the hand-made planing cases have a faster window', () => {
  const windows = [0.12, 0.15, 0.18, 0.2, 0.25].map((height) => {
    const c = lake(height, 60)
    return fasterWindow(decide(c.segment, c.vessel, c.conditions, c.options).main)
  })
  expect(windows.filter((window) => window !== undefined).length).toBeGreaterThanOrEqual(2)
})

it.each([
  { of: 'fast craft', vessel: fastCraft, least: 15, choose: (own: Options): Options => own },
  {
    // a method that enters its range can lower a median
    of: 'displacement hulls by the median',
    vessel: vessels.filter((vessel) => vessel.hull === 'displacement'),
    least: 15,
    choose: (own: Options): Options => ({ ...own, combine: 'median' }),
  },
])(
  'for $of a faster window is reported where a scan finds one of some width, and none where it finds none',
  (row) => {
    const tally = { windows: 0, none: 0, narrow: 0 }
    const list = fc.sample(cases({ vessel: row.vessel, depths: [2, 60], reach: [2, 60], stations: 1 }), {
      numRuns: 1500,
      seed: 50,
    })
    for (const one of list) {
      const c = { ...one, options: row.choose(one.options) }
      const decision = ifPossible(() => decide(c.segment, c.vessel, c.conditions, c.options).main)
      if (!decision || decision.governing.criterion.id === 'service-speed') continue
      const reported = fasterWindow(decision)
      const scanned = scannedWindow(decision, 720)
      const step = (decision.situation.vessel.maxSpeed - decision.speed) / 720
      const say = (): string => JSON.stringify({ reported, scanned, speed: decision.speed, c })
      if (reported) {
        tally.windows += 1
        // inside: sampled, ends left out by 1e-6
        for (let i = 0; i <= 20; i += 1) {
          const speed = reported.from + ((reported.to - reported.from) * i) / 20
          if (!holdsAt(decision, speed)) throw new Error(`fails inside at ${speed}: ${say()}`)
        }
        if (holdsAt(decision, reported.from - 2e-6)) throw new Error(`starts earlier: ${say()}`)
        if (scanned && scanned.from < reported.from - step) tally.narrow += 1
      } else if (scanned) {
        // narrower than a 240th of the speeds above may go unseen
        if (scanned.to - scanned.from > 4 * step) throw new Error(`not reported: ${say()}`)
        tally.narrow += 1
      } else tally.none += 1
    }
    console.info(`faster windows of ${row.of}`, tally)
    expect(tally.windows).toBeGreaterThan(row.least)
  },
)
