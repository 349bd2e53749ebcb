import type { SectionShape } from '../domain/segment.ts'
import type { SegmentWire } from './segment.schema.ts'

export type SectionWire = SegmentWire['cross_section']
type ProfileWire = Extract<NonNullable<SectionWire>, { profile: unknown }>

export function isProfile(section: SectionWire): section is ProfileWire {
  return section !== undefined && 'profile' in section
}

export function toShape(section: SectionWire): SectionShape {
  if (section === undefined) return { kind: 'trapezoid' }
  if ('bottom_width_m' in section) return { kind: 'trapezoid', bottomWidth: section.bottom_width_m }
  if ('slope_h_per_v' in section) return { kind: 'trapezoid', slope: section.slope_h_per_v }
  return {
    kind: 'profile',
    offsets: section.profile.map(([offset]) => offset),
    bedDepths: section.profile.map(([, depth]) => depth),
  }
}
