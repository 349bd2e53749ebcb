import type { Fit, MethodFit } from '../calibration/measurement.ts'
import { outlierRuleOf } from '../calibration/robust.ts'
import type { Severity } from '../advisory/caution.ts'
import type { Calibration } from '../domain/calibration.ts'
import { HULLS, type Hull } from '../domain/vessel.ts'

/** A measured passage as it is drawn and listed. SI. */
export interface CalibrationPoint {
  /** place in the request, from 0 */
  readonly index: number
  readonly label?: string | undefined
  readonly hull: Hull
  /** through the water, m/s */
  readonly speed: number
  /** gauge to sailing line, m */
  readonly distance: number
  /** m */
  readonly depth: number
  /** highest wave at the gauge, m */
  readonly measured: number
  /** by id of the method, m; NaN or left out where it cannot be computed */
  readonly computed: Readonly<Record<string, number>>
  /** by id of the method */
  readonly isInRange: Readonly<Record<string, boolean>>
  /** of the recommended method */
  readonly isOutlier: boolean
}

/** What the pictures and the sheet of a calibration are made from. */
export interface CalibrationView {
  readonly id: string
  readonly name: string
  readonly segmentId?: string | undefined
  /** RFC 3339 UTC */
  readonly created: string
  readonly points: readonly CalibrationPoint[]
  readonly fit: Fit
  readonly coverage: Calibration['coverage']
  readonly cautions: readonly { readonly code: string; readonly severity: Severity; readonly text: string }[]
  readonly serviceVersion: string
  readonly methodVersion: string
  readonly seed: number
}

/** A method that is drawn: with a fit where it has one. */
export interface ChosenMethod {
  readonly id: string
  readonly fit: MethodFit | undefined
  /** indices of its own outliers */
  readonly outliers: ReadonlySet<number>
}

export const inRangeCount = ({ points }: CalibrationView, id: string): number =>
  points.filter(({ isInRange }) => isInRange[id] === true).length

/** Methods that have no fit, in the order of the rows. */
export function methodsWithoutFit({ points, fit }: CalibrationView): string[] {
  const fitted = new Set(fit.methods.map(({ id }) => id))
  const all = new Set(points.flatMap(({ computed }) => Object.keys(computed)))
  return [...all].filter((id) => !fitted.has(id))
}

export const rankedMethods = ({ fit }: CalibrationView): MethodFit[] =>
  [...fit.methods].sort((a, b) => a.rank - b.rank)

/** The named method, else the recommended one, else the one with most passages in range; undefined without any. */
export function chosenMethod(view: CalibrationView, methodId?: string): ChosenMethod | undefined {
  const byCount = methodsWithoutFit(view).sort((a, b) => inRangeCount(view, b) - inRangeCount(view, a))
  const id = methodId ?? view.fit.recommended ?? rankedMethods(view)[0]?.id ?? byCount[0]
  if (id === undefined) return undefined
  return { id, fit: view.fit.methods.find((method) => method.id === id), outliers: outliersOf(view, id) }
}

/** Outliers of a method: those that were found of the recommended one, and by the same rule those of another. */
function outliersOf({ points, fit }: CalibrationView, id: string): Set<number> {
  if (id === fit.recommended)
    return new Set(points.filter((point) => point.isOutlier).map(({ index }) => index))
  const values = points.flatMap((point) => {
    const height = point.isInRange[id] === true ? computedHeight(point, id) : undefined
    const logRatio = height === undefined ? NaN : Math.log(point.measured / height)
    return Number.isFinite(logRatio) ? [{ index: point.index, hull: point.hull, logRatio }] : []
  })
  if (values.length === 0) return new Set()
  const { bound, centreOf } = outlierRuleOf(values)
  return new Set(
    values
      .filter(({ hull, logRatio }) => Math.abs(logRatio - centreOf(hull)) > bound)
      .map(({ index }) => index),
  )
}

/** Height by a method, m; undefined where there is none that a logarithm can be taken of. */
export function computedHeight(point: CalibrationPoint, id: string): number | undefined {
  const height = point.computed[id]
  return height !== undefined && Number.isFinite(height) && height > 0 ? height : undefined
}

/** How a passage counts in the fit of a method. */
export type Standing = 'counts' | 'outlier' | 'out-of-range'

export function standingOf(point: CalibrationPoint, { id, outliers }: ChosenMethod): Standing {
  if (outliers.has(point.index)) return 'outlier'
  return point.isInRange[id] === true && computedHeight(point, id) !== undefined ? 'counts' : 'out-of-range'
}

/** Natural logarithm of measured over computed height times the factor. */
export function logResidual(point: CalibrationPoint, { id, fit }: ChosenMethod): number | undefined {
  const height = computedHeight(point, id)
  const residual = height === undefined ? NaN : Math.log(point.measured / height / factorOf(fit))
  return Number.isFinite(residual) ? residual : undefined
}

/** Factor of a fit; without one, that of the method as it is published. */
export const factorOf = (fit: MethodFit | undefined): number =>
  fit !== undefined && Number.isFinite(fit.factor) && fit.factor > 0 ? fit.factor : 1

/** Hulls that were measured, in their fixed order. */
export const measuredHulls = ({ points }: CalibrationView): Hull[] =>
  HULLS.filter((hull) => points.some((point) => point.hull === hull))

/** What a passage is called where there is little room. */
export const passageName = ({
  index,
  label,
}: {
  readonly index: number
  readonly label?: string | undefined
}): string => (label === undefined || label.trim() === '' ? `index ${index}` : label)
