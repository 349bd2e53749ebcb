import { z } from 'zod'
import type { Conditions, Options, RequestedLimits } from '../domain/conditions.ts'
import { DIRECTIONS } from '../domain/segment.ts'
import { figure, Id, Label } from './fields.ts'
import { WAVE_METHOD_IDS } from '../advisory/catalogue.ts'
import { toVessel, VesselFields, type Classes } from './vessel.schema.ts'

export const SIGN_UNIT_NAMES = ['km/h', 'kn', 'mph'] as const

export const ConditionsFields = z
  .strictObject({
    label: Label,
    water_level_m: figure(-50, 50, 'above the datum, m; default 0').optional(),
    current_mps: figure(-5, 5, 'along the segment, positive downstream, m/s; default 0').optional(),
    direction: z
      .enum(DIRECTIONS)
      .optional()
      .describe('left out with a current: the direction with the lower speed over ground'),
    meeting_vessel: VesselFields.optional().describe('a vessel that is met in this segment'),
  })
  .meta({ id: 'Conditions', description: 'The water and the traffic of the moment.' })

const LimitsFields = z
  .strictObject({
    label: Label,
    max_critical_ratio: figure(0.1, 2, 'speed over critical speed').optional(),
    max_depth_froude_number: figure(0.1, 2, 'depth Froude number').optional(),
    min_under_keel_clearance_ratio: figure(0, 2, 'net clearance over draught').optional(),
    max_bank_wave_height_m: figure(0.01, 10, 'of both banks, m').optional(),
    max_receptor_wave_height_m: figure(0.01, 10, 'of all receptors, m').optional(),
    max_drawdown_m: figure(0.01, 10, 'at both banks, m').optional(),
    max_return_current_mps: figure(0.01, 10, 'at both banks, m/s').optional(),
    wake_wash: z
      .enum(['when-long', 'always', 'never'])
      .optional()
      .describe('rule for long wake wash; default when-long: from 4.5 s on'),
  })
  .meta({ id: 'Limits', description: "Limits in place of the segment's and the policy's." })

export const OptionsFields = z
  .strictObject({
    label: Label,
    wave_methods: z
      .union([z.literal('applicable'), z.array(z.enum(WAVE_METHOD_IDS)).min(1).max(WAVE_METHOD_IDS.length)])
      .optional()
      .describe('methods that count where one of them is in range; default applicable'),
    combine: z.enum(['highest', 'median']).optional().describe('of the methods in range; default highest'),
    limits: LimitsFields.optional(),
    apply_posted_limit: z.boolean().optional().describe('default true'),
    sign_unit: z.enum(SIGN_UNIT_NAMES).optional().describe('default km/h'),
    sign_step: figure(0.1, 10, 'step of the sign, in its unit; default 1').optional(),
    curve: z.boolean().optional().describe('add the speed curve; default false'),
    wave_factor: figure(0.1, 10, 'measured over computed wave height, for every method').optional(),
    calibration_id: Id.nullable().optional().describe("null ignores the segment's"),
  })
  .meta({ id: 'Options', description: 'How the advisory is made.' })

export type ConditionsWire = z.output<typeof ConditionsFields>
export type OptionsWire = z.output<typeof OptionsFields>

/** @throws Fault `vessel-class-not-found` for the vessel that is met */
export function toConditions(wire: ConditionsWire, registry: Classes): Conditions {
  return {
    waterLevel: wire.water_level_m ?? 0,
    current: wire.current_mps ?? 0,
    isWaterLevelGiven: wire.water_level_m !== undefined,
    isCurrentGiven: wire.current_mps !== undefined,
    ...(wire.direction && { direction: wire.direction }),
    ...(wire.meeting_vessel && { meetingVessel: toVessel(wire.meeting_vessel, registry) }),
  }
}

function toLimits(wire: z.output<typeof LimitsFields>): RequestedLimits {
  return {
    ...(wire.max_critical_ratio !== undefined && { maxCriticalRatio: wire.max_critical_ratio }),
    ...(wire.max_depth_froude_number !== undefined && {
      maxDepthFroudeNumber: wire.max_depth_froude_number,
    }),
    ...(wire.min_under_keel_clearance_ratio !== undefined && {
      minUnderKeelClearanceRatio: wire.min_under_keel_clearance_ratio,
    }),
    ...(wire.max_bank_wave_height_m !== undefined && { maxBankWaveHeight: wire.max_bank_wave_height_m }),
    ...(wire.max_receptor_wave_height_m !== undefined && {
      maxReceptorWaveHeight: wire.max_receptor_wave_height_m,
    }),
    ...(wire.max_drawdown_m !== undefined && { maxDrawdown: wire.max_drawdown_m }),
    ...(wire.max_return_current_mps !== undefined && { maxReturnCurrent: wire.max_return_current_mps }),
    ...(wire.wake_wash !== undefined && { wakeWash: wire.wake_wash }),
  }
}

/** Options of a request that gives none. */
export const DEFAULT_OPTIONS: Options = optionsOf({})

/** The options of a request; without any always the same object. */
export function toOptions(wire: OptionsWire | undefined): Options {
  return wire === undefined ? DEFAULT_OPTIONS : optionsOf(wire)
}

function optionsOf(wire: OptionsWire): Options {
  return {
    ...(Array.isArray(wire.wave_methods) && { waveMethods: wire.wave_methods }),
    combine: wire.combine ?? 'highest',
    limits: toLimits(wire.limits ?? {}),
    applyPostedLimit: wire.apply_posted_limit ?? true,
    signUnit: wire.sign_unit ?? 'km/h',
    signStep: wire.sign_step ?? 1,
    hasCurve: wire.curve ?? false,
    ...(wire.wave_factor !== undefined && { waveFactor: wire.wave_factor }),
  }
}
