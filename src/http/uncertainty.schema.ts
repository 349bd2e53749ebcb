import { z } from 'zod'
import { UNCERTAIN_FIELDS, type UncertainField } from '../advisory/uncertainty.ts'
import { crossCheck } from './cross-check.ts'
import { figure, Label } from './fields.ts'

function spread(max: number, unit: string) {
  return z
    .strictObject({
      label: Label,
      sd: figure(1e-6, max, `standard deviation, ${unit}`).optional(),
      half_range: figure(1e-6, max, `half of the range, ${unit}`).optional(),
    })
    .check(
      crossCheck((value, report) => {
        const given = (value.sd === undefined ? 0 : 1) + (value.half_range === undefined ? 0 : 1)
        if (given !== 1)
          report([], 'one-of', 'needs one of sd and half_range', { allowed: ['sd', 'half_range'] })
      }),
    )
    .optional()
}

/** Inputs that scatter, but for the wave height, which does so in proportion. */
export const SPREADS = {
  depth_m: spread(50, 'm'),
  width_m: spread(5000, 'm'),
  bank_distance_m: spread(5000, 'm'),
  draught_m: spread(10, 'm'),
  current_mps: spread(5, 'm/s'),
} as const

/** How uncertain the inputs are, without what belongs to sampling. */
export const UncertaintyFields = z
  .strictObject({
    label: Label,
    ...SPREADS,
    wave_height_log_sd: figure(1e-6, 2, 'standard deviation of the logarithm of the wave height').optional(),
  })
  .check(
    crossCheck((value, report) => {
      const given = Object.keys(value).filter((field) => field !== 'label')
      if (given.length === 0) report([], 'required', 'needs at least one input that is uncertain')
    }),
  )
  .meta({ id: 'Uncertainty', description: 'Standard deviation or half range by input.' })

/** Shift of each uncertain input: its standard deviation or half range. */
export function toHalves(wire: z.output<typeof UncertaintyFields>): ReadonlyMap<UncertainField, number> {
  const halves = new Map<UncertainField, number>()
  for (const field of UNCERTAIN_FIELDS) {
    const half =
      field === 'wave_height' ? wire.wave_height_log_sd : (wire[field]?.sd ?? wire[field]?.half_range)
    if (half !== undefined) halves.set(field, half)
  }
  return halves
}
