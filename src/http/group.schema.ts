import { z } from 'zod'
import { HULLS, LOADINGS } from '../domain/vessel.ts'
import type { Group } from '../domain/segment.ts'
import { figure, Id, Label } from './fields.ts'

export const GroupFields = z
  .strictObject({
    label: Label,
    vessel_classes: z.array(Id).min(1).max(100).optional().describe('ids of vessel classes'),
    loading: z.enum(LOADINGS).optional(),
    min_draught_m: figure(0, 30, 'draught at least, m, inclusive').optional(),
    max_draught_m: figure(0, 30, 'draught below, m, exclusive').optional(),
    min_length_m: figure(0, 500, 'length at least, m, inclusive').optional(),
    hull: z.enum(HULLS).optional(),
  })
  .meta({ id: 'Group', description: 'Vessels that a rule applies to: every condition that is given holds.' })

export function toGroup(group: z.output<typeof GroupFields>): Group {
  return {
    ...(group.vessel_classes && { vesselClasses: group.vessel_classes }),
    ...(group.loading && { loading: group.loading }),
    ...(group.min_draught_m !== undefined && { minDraught: group.min_draught_m }),
    ...(group.max_draught_m !== undefined && { maxDraught: group.max_draught_m }),
    ...(group.min_length_m !== undefined && { minLength: group.min_length_m }),
    ...(group.hull && { hull: group.hull }),
  }
}
