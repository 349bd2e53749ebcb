import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { advise } from '../../src/advisory/advise.ts'
import { assess } from '../../src/advisory/assess.ts'
import type { Caution, CautionCode } from '../../src/advisory/caution.ts'
import type { Conditions, Options } from '../../src/domain/conditions.ts'
import type { Segment } from '../../src/domain/segment.ts'
import { findVesselClass } from '../../src/domain/vessel-classes.ts'
import { vesselOfClass, vesselOfDescription, type VesselFigures } from '../../src/domain/vessel-of.ts'
import type { Vessel } from '../../src/domain/vessel.ts'
import { cases, ifPossible, PLAIN, type Case } from '../support/arbitraries.ts'
import { atRest, canal, soil } from '../support/places.ts'

const ofClass = (id: string, figures: VesselFigures = {}): Vessel =>
  vesselOfClass(findVesselClass(id)!, 'laden', figures)
const motorVessel = ofClass('cemt-va', { draught: 2.8 })

/** A canal 80 m wide and 5 m deep with walls of no slope, soil above. */
const place = (more: Partial<Segment> = {}): Segment =>
  canal({ depth: 5, distances: [40, 40], shape: { kind: 'trapezoid', slope: 0 } }, more)

interface Scene {
  readonly segment?: Segment
  readonly vessel?: Vessel
  readonly conditions?: Conditions
  readonly options?: Options
  /** m/s through the water: what a passage does, in place of what is advised */
  readonly speed?: number
}

function cautionsOf(scene: Scene): readonly Caution[] {
  const { segment = place(), vessel = motorVessel, conditions = atRest, options = PLAIN, speed } = scene
  if (speed === undefined) return advise(segment, vessel, conditions, options).cautions
  const sailed = { value: speed, reference: 'through-water' } as const
  return assess(segment, vessel, conditions, options, sailed)?.cautions ?? []
}

const find = (code: CautionCode, scene: Scene): Caution | undefined =>
  cautionsOf(scene).find((caution) => caution.code === code)

const limits = (own: Options['limits']): Options => ({ ...PLAIN, limits: own })
const wall = soil('nearer', { kind: 'wall' })
const berth = { kind: 'moored-small-craft', side: 'nearer', distance: 30 } as const
const boat = vesselOfDescription({ length: 8, beam: 2.5, draught: 0.5, hull: 'planing', maxSpeed: 15 })

/** A scene that has a caution, and one as near to it as can be that has not. */
const ROWS: readonly (readonly [CautionCode, with_: Scene, without: Scene])[] = [
  // V/V_L from 0.75 or F from 0.6; sqrt(9.80665 * 5) = 7.0 m/s
  [
    'elevated',
    { segment: place({ confinement: 'open' }), speed: 0.65 * 7 },
    { segment: place({ confinement: 'open' }), speed: 0.55 * 7 },
  ],
  [
    'near-critical',
    { segment: place({ confinement: 'open' }), speed: 0.8 * 7.0023 },
    { segment: place({ confinement: 'open' }), speed: 0.69 * 7 },
  ],
  [
    'transcritical',
    { segment: place({ confinement: 'open' }), speed: 7 },
    { segment: place({ confinement: 'open' }), speed: 0.84 * 7 },
  ],
  [
    'supercritical',
    { segment: place({ confinement: 'open' }), vessel: boat, speed: 9 },
    { segment: place({ confinement: 'open' }), vessel: boat, speed: 7 },
  ],
  ['no-steady-flow', { speed: 5.5 }, { speed: 3 }],
  // gates-herbich-1977 is for 130 m and 7 m: out for every displacement hull below; a boat at rest's pace is in no planing method
  [
    'outside-method-range',
    { speed: 3 },
    {
      vessel: ofClass('handysize'),
      segment: canal({ depth: 14, distances: [400, 400] }, { confinement: 'open' }),
      speed: 7.3,
    },
  ],
  // a sea-going ship in a canal deeper than 2.25 T: no squat method is meant for it
  [
    'no-method-in-range',
    {
      vessel: ofClass('coaster', { blockCoefficient: 0.95 }),
      segment: canal({ depth: 20, distances: [100, 100] }),
    },
    {
      vessel: ofClass('coaster', { blockCoefficient: 0.7 }),
      segment: canal({ depth: 6.5, distances: [100, 100] }),
      options: limits({ maxBankWaveHeight: 0.1 }),
    },
  ],
  ['bank-suction', { speed: 4.1 }, { speed: 3.2 }],
  [
    'bank-within-reach',
    { segment: place({ confinement: 'open' }) },
    { segment: canal({ depth: 5, distances: [69, 69] }, { confinement: 'open' }) },
  ],
  // n h = 3 x 4 = 12 against distance less B/2
  [
    'hull-over-slope',
    { segment: canal({ depth: 4, distances: [17.6, 17.6] }) },
    { segment: canal({ depth: 4, distances: [17.8, 17.8] }) },
  ],
  [
    'draught-above-permitted',
    { segment: place({ maxDraught: 2.7 }) },
    { segment: place({ maxDraught: 2.8 }) },
  ],
  [
    'static-clearance-small',
    { vessel: ofClass('cemt-va', { draught: 4.6 }) },
    { vessel: ofClass('cemt-va', { draught: 4.5 }) },
  ],
  ['meeting-not-considered', {}, { conditions: { ...atRest, meetingVessel: motorVessel } }],
  [
    'mooring-drawdown',
    { segment: place({ receptors: [berth] }), speed: 4.1 },
    { segment: place({ receptors: [berth] }), speed: 2 },
  ],
  ['wall-reflection', { segment: place({ banks: [wall, soil('farther')] }) }, {}],
  [
    'wall-has-no-criterion',
    { segment: place({ banks: [wall, soil('farther')] }) },
    { segment: place({ banks: [{ ...wall, maxWaveHeight: 0.4 }, soil('farther')] }) },
  ],
  // fine sand bears 0.55 m/s at 3 m and more (Keown et al. 1977)
  [
    'permissible-velocity-exceeded',
    { segment: place({ bedKind: 'fine-sand' }), speed: 4.1 },
    { segment: place({ bedKind: 'fine-sand' }), speed: 1.5 },
  ],
  ['assumed-value-matters', { vessel: ofClass('cemt-va') }, {}],
  // 10 km/h is the first step: below, a sign would be 0
  [
    'sign-below-steerage',
    { options: { ...limits({ maxBankWaveHeight: 0.1 }), signStep: 10 } },
    { options: limits({ maxBankWaveHeight: 0.1 }) },
  ],
  [
    'against-current',
    { conditions: { ...atRest, current: 0.3, direction: 'upstream' } },
    { conditions: { ...atRest, current: 0.3, direction: 'downstream' } },
  ],
  ['below-steerage', { speed: 1.38 }, { speed: 1.4 }],
  // 6.5 km/h is 1.8056 m/s
  ['below-type-test-steerage', { speed: 1.8 }, { speed: 1.81 }],
  // a lake, bank limit 0.15 m at 60 m: the hump at about 3 m/s, planing waves lower at full speed
  ['faster-window', planingScene(0.18, 'planing-boat'), planingScene(0.18, 'recreational-rd')],
  ['depth-change', { segment: twoDepths(8) }, { segment: twoDepths(7.5) }],
]

function planingScene(maxBankWaveHeight: number, id: string): Scene {
  return {
    vessel: ofClass(id),
    segment: canal(
      { depth: 15, distances: [60, 60], shape: { kind: 'trapezoid', slope: 0 } },
      { confinement: 'open' },
    ),
    options: limits({
      maxBankWaveHeight,
      wakeWash: 'never',
      maxDepthFroudeNumber: 3,
      maxCriticalRatio: 3,
      minUnderKeelClearanceRatio: 0,
    }),
  }
}

function twoDepths(depth: number): Segment {
  const segment = place()
  const [station] = segment.stations
  return { ...segment, stations: [station, { ...station, index: 1, depth }] }
}

describe('a caution', () => {
  it.each(ROWS)('%s is given where it is due, and not beside it', (code, due, beside) => {
    expect(find(code, due)?.text.length).toBeGreaterThan(20)
    expect(find(code, beside)).toBeUndefined()
  })

  it('local-rules-apply is given always, and first, with the advisory and with a passage', () => {
    for (const c of fc.sample(cases(), { numRuns: 500, seed: 60 })) {
      const advisory = ifPossible(() => advise(c.segment, c.vessel, c.conditions, c.options))
      if (advisory) expect(advisory.cautions[0]?.code).toBe('local-rules-apply')
    }
    expect(cautionsOf({ speed: 3 })[0]?.code).toBe('local-rules-apply')
  })

  it('about meeting is a warning above nine tenths of the critical speed with a vessel like it, and info below', () => {
    const { meetingCriticalSpeed } = advise(place(), motorVessel, atRest, PLAIN).decision.situation
    expect(meetingCriticalSpeed).toBeGreaterThan(0)
    expect(find('meeting-not-considered', { speed: 0.91 * meetingCriticalSpeed })?.severity).toBe('warning')
    expect(find('meeting-not-considered', { speed: 0.89 * meetingCriticalSpeed })?.severity).toBe('info')
  })

  it('about the bed adds the current going upstream and takes it away going downstream', () => {
    const segment = place({ bedKind: 'fine-sand' })
    const at = (direction: 'upstream' | 'downstream'): Caution | undefined =>
      find('permissible-velocity-exceeded', {
        segment,
        speed: 2.5,
        conditions: { ...atRest, current: 0.5, direction },
      })
    const still = find('permissible-velocity-exceeded', {
      segment: place({ bedKind: 'fine-sand' }),
      speed: 4.1,
    })
    expect(Number(still?.facts?.['permissible_mps'])).toBeCloseTo(0.55, 9)
    const { effects } = assess(segment, motorVessel, atRest, PLAIN, {
      value: 2.5,
      reference: 'through-water',
    })!
    expect(Number(at('upstream')?.facts?.['velocity_mps'])).toBeCloseTo(effects.returnCurrent + 0.5, 9)
    expect(at('downstream')).toBeUndefined()
  })

  it('has every code of its kind that the advisory can emit covered by a row', () => {
    const covered = new Set<string>(ROWS.map(([code]) => code)).add('local-rules-apply')
    const seen = new Set<string>()
    for (const c of fc.sample(cases(), { numRuns: 1500, seed: 61 })) {
      const advisory = ifPossible(() => advise(c.segment, c.vessel, c.conditions, c.options))
      advisory?.cautions.forEach((caution) => seen.add(caution.code))
    }
    expect([...seen].filter((code) => !covered.has(code))).toEqual([])
    expect(seen.size).toBeGreaterThan(18)
  })
})

describe('an assumption', () => {
  const fieldsOf = (c: Case): string[] =>
    advise(c.segment, c.vessel, c.conditions, c.options).assumptions.map((assumption) => assumption.field)

  it('is listed for each default: kind and slope of the banks, level, current, traffic, and every figure of the class', () => {
    const bank = (side: 'nearer' | 'farther') => soil(side, { isKindGiven: false })
    const segment = canal({ depth: 5, distances: [40, 40] }, { banks: [bank('nearer'), bank('farther')] })
    const conditions = { ...atRest, isWaterLevelGiven: false, isCurrentGiven: false }
    const fields = fieldsOf({ segment, vessel: ofClass('cemt-va'), conditions, options: PLAIN })
    for (const field of [
      'segment.nearer_bank.kind',
      'segment.farther_bank.kind',
      'segment.nearer_bank.slope_h_per_v',
      'segment.farther_bank.slope_h_per_v',
      'conditions.water_level_m',
      'conditions.current_mps',
      'conditions.meeting_vessel',
      'vessel.length_m',
      'vessel.beam_m',
      'vessel.draught_m',
      'vessel.block_coefficient',
      'vessel.midship_coefficient',
      'vessel.entrance_length_m',
      'vessel.displacement_m3',
      'vessel.max_speed_mps',
      'vessel.min_steerage_speed_mps',
      'vessel.rock_manual_coefficient',
      'vessel.blaauw_coefficient',
    ]) {
      expect(fields).toContain(field)
    }
  })

  it('is not listed for what was given', () => {
    const vessel = vesselOfDescription({
      length: 60,
      beam: 8,
      draught: 2,
      hull: 'displacement',
      blockCoefficient: 0.8,
      midshipCoefficient: 0.98,
      entranceLength: 10,
      volume: 768,
      maxSpeed: 6,
      minSteerageSpeed: 1.2,
    })
    const segment = place({ banks: [soil('nearer', { slope: 2 }), soil('farther', { slope: 2 })] })
    const conditions = { ...atRest, meetingVessel: vessel }
    const fields = fieldsOf({ segment, vessel, conditions, options: PLAIN })
    expect(fields.filter((field) => /^(vessel|conditions|segment)\./.test(field))).toEqual([])
  })

  it('says so when the permitted draught caps that of the class, when the strip is short, and when the water is open', () => {
    const base = { vessel: ofClass('cemt-va'), conditions: atRest, options: PLAIN }
    const capped = advise(place({ maxDraught: 2 }), base.vessel, atRest, PLAIN)
    expect(capped.assumptions.find(({ field }) => field === 'vessel.draught_m')?.value).toBe(2)
    expect(fieldsOf({ ...base, segment: canal({ depth: 5, distances: [60, 70] }) })).toContain(
      'effective_width_m',
    )
    expect(fieldsOf({ ...base, segment: canal({ depth: 5, distances: [60, 68] }) })).not.toContain(
      'effective_width_m',
    )
    expect(fieldsOf({ ...base, segment: place({ confinement: 'open' }) })).toContain('segment.confinement')
  })
})
