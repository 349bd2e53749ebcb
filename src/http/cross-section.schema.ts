import { z } from 'zod'
import { crossCheck } from './cross-check.ts'
import { figure, Label } from './fields.ts'

export const Slope = figure(0, 20, 'horizontal over vertical')

const ProfilePoint = z.tuple([z.number().min(-20000).max(20000), z.number().min(-100).max(150)])

const Profile = z
  .strictObject({
    label: Label,
    profile: z
      .array(ProfilePoint)
      .min(3)
      .max(2000)
      .describe(
        '[offset_m, bed_depth_m]: offset from the sailing line, positive to the right looking downstream, strictly rising; depth positive below the datum',
      ),
  })
  .check(
    crossCheck(({ profile }, report) => {
      if (!Array.isArray(profile) || !profile.every((point) => Array.isArray(point))) return
      profile.forEach(([offset], i) => {
        const before = profile[i - 1]?.[0]
        if (before !== undefined && !(offset > before)) {
          report(['profile', i, 0], 'out-of-range', `must be above the offset before it, ${before}`)
        }
      })
      const first = profile[0]?.[0] ?? 0
      const last = profile.at(-1)?.[0] ?? 0
      if (first > 0 || last < 0) {
        report(
          ['profile'],
          'out-of-range',
          'must reach from left of the sailing line to right of it: offset 0 lies outside',
        )
      }
    }),
  )

export const CrossSectionFields = z
  .union([
    z.strictObject({ label: Label, bottom_width_m: figure(0, 20000, 'm') }),
    z.strictObject({ label: Label, slope_h_per_v: Slope }),
    Profile,
  ])
  .meta({ id: 'CrossSection', description: 'A trapezoid by bottom width or slope, or a surveyed profile.' })
