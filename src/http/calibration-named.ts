import { Fault, type FaultItem } from '../domain/fault.ts'
import type { Registry, SegmentContent } from '../store/registry.ts'
import { nearestFirst } from './nearest.ts'

const MAX_ALLOWED = 20

const nearestCalibrations = (id: string, registry: Registry): string[] =>
  nearestFirst(
    id,
    registry.calibrations().map((record) => record.id),
  ).slice(0, MAX_ALLOWED)

export function calibrationNotFound(id: string, registry: Registry): Fault {
  const [nearest] = nearestCalibrations(id, registry)
  const hint = nearest === undefined ? '' : `; the nearest is ${nearest}`
  return new Fault('calibration-not-found', `There is no calibration ${id}${hint}`, {
    facts: { calibration_id: id, ...(nearest !== undefined && { nearest }) },
  })
}

/**
 * The fault of a segment that names a calibration which does not exist: every advisory on it would be refused.
 *
 * @param at  pointer to the feature
 */
export function calibrationItems({ id, properties }: SegmentContent, registry: Registry, at: string) {
  const { calibration_id: named } = properties
  if (typeof named !== 'string' || registry.findCalibration(named)) return []
  const item: FaultItem & { readonly feature_id: string } = {
    pointer: `${at}/properties/calibration_id`,
    feature_id: id,
    code: 'not-in-list',
    detail: `names the calibration ${named}, which does not exist: make it first, or leave it out`,
    allowed: nearestCalibrations(named, registry),
  }
  return [item]
}
