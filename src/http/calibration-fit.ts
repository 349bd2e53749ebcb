import { createHash } from 'node:crypto'
import { fitOf } from '../calibration/fit.ts'
import type { Measurement } from '../calibration/measurement.ts'
import { Fault, type FaultItem } from '../domain/fault.ts'
import type { CalibrationContent, SegmentRecord } from '../store/registry.ts'
import { measurementOf, toPoint } from './calibration-measurements.ts'
import { coverageOf, type Fitted, toCalibration, toDocument, usedMeasurements } from './calibration-reply.ts'
import type { RowWire } from './calibration-row.schema.ts'
import { readRows, type RowSource } from './calibration-rows.ts'
import { type CalibrationOrder, FEWEST_PASSAGES } from './calibrations.schema.ts'
import { segmentNotFound, segmentOf } from './request.ts'
import type { View } from './service.ts'
import { refused } from './validation.ts'

const FOOT = 0.3048 // m
/** Feet taken for metres, and metres for feet. */
const UNIT_RATIOS = [1 / FOOT, FOOT] as const
const UNIT_SLACK = 0.1

/** Faults of rows as one problem: 422 where every one is a pair of figures that clash, which it tells, else 400. */
function refusedRows(errors: readonly FaultItem[]): Fault {
  const [first] = errors
  if (!first || errors.some(({ code, facts }) => code !== 'clash' || !facts)) return refused(errors)
  const more = errors.length > 1 ? ` (and ${errors.length - 1} more)` : ''
  return new Fault('impossible-input', `${first.detail}${more}`, { errors })
}

function tooFew(passages: number, detail: string, inRange?: readonly string[]): Fault {
  return new Fault('too-few-passages', detail, {
    facts: { passages, needed: FEWEST_PASSAGES, ...(inRange && { in_range: inRange }) },
  })
}

/** A factor needs enough passages in the range of one method at least. */
function refuseTooFewInRange(measurements: readonly Measurement[], methodIds: readonly string[]): void {
  const counts = methodIds.map((_, i) => measurements.filter(({ isInRange }) => isInRange[i] === true).length)
  const most = Math.max(...counts)
  if (most >= FEWEST_PASSAGES) return
  const inRange = methodIds.map((id, i) => `${id}: ${counts[i] ?? 0}`)
  throw tooFew(
    most,
    `A method needs ${FEWEST_PASSAGES} passages in its range for a factor, and none has: ${inRange.join(', ')}`,
    inRange,
  )
}

function median(values: readonly number[]): number {
  const sorted = values.toSorted((a, b) => a - b)
  const middle = sorted.length / 2
  return ((sorted[Math.ceil(middle) - 1] ?? NaN) + (sorted[Math.floor(middle)] ?? NaN)) / 2
}

/** Heights in feet, or a water in feet, show as a factor of that size by every method. */
function refuseDoubtfulUnits(measurements: readonly Measurement[]): void {
  const ratios = measurements.flatMap(({ height, computed, isInRange }) =>
    computed.flatMap((own, i) => (isInRange[i] === true ? height / own : [])),
  )
  const ratio = median(ratios)
  const like = UNIT_RATIOS.find((unit) => Math.abs(ratio / unit - 1) <= UNIT_SLACK)
  if (like === undefined) return
  const guess =
    like > 1
      ? 'are the wave heights in feet, or the distances and depths in units other than metres?'
      : 'are the wave heights in units other than metres, or the distances and depths in feet?'
  throw new Fault(
    'units-doubtful',
    `Measured over computed heights have the median ${ratio.toFixed(3)}, much like feet for metres: ${guess} Send metres, or confirm_units when they are`,
    { facts: { ratio } },
  )
}

const sortedText = (row: object): string => JSON.stringify(row, Object.keys(row).sort())

/** SHA-256 over everything that the figures follow from. */
function hashOf(
  order: CalibrationOrder,
  rows: readonly RowWire[],
  record: SegmentRecord | undefined,
  { registry }: View,
): string {
  const hash = createHash('sha256')
  const classes = new Set(rows.flatMap((row) => row.vessel_class ?? []))
  const own = [...classes].flatMap((id) => registry.findClass(id)?.vesselClass ?? [])
  hash.update(JSON.stringify([order.methodIds, order.seed, record?.line, record?.properties, own]))
  for (const row of rows) hash.update(`\n${sortedText(row)}`)
  return `sha256:${hash.digest('hex')}`
}

function recordOf({ segmentId }: CalibrationOrder, { registry }: View): SegmentRecord | undefined {
  if (segmentId === undefined) return undefined
  const record = registry.findSegment(segmentId)
  if (!record) throw segmentNotFound(segmentId, registry)
  return record
}

/**
 * A calibration from rows.
 *
 * @throws Fault `invalid-request`, `impossible-input`, `segment-not-found`, `too-few-passages`, `units-doubtful`
 */
export async function calibrationOf(
  order: CalibrationOrder,
  sources: readonly RowSource[],
  view: View,
): Promise<CalibrationContent> {
  const record = recordOf(order, view)
  const { methodIds } = order
  const water = { segment: record && segmentOf(record), registry: view.registry, methodIds }
  const { rows, made, errors } = await readRows(sources, (wire, index) => measurementOf(wire, index, water))
  if (errors.length > 0) throw refusedRows(errors)
  if (made.length < FEWEST_PASSAGES) {
    throw tooFew(
      made.length,
      `A calibration needs at least ${FEWEST_PASSAGES} passages; there are ${made.length}`,
    )
  }
  refuseTooFewInRange(made, methodIds)
  if (!order.isConfirmed) refuseDoubtfulUnits(made)
  const fitted: Fitted = {
    order,
    measurements: made,
    fit: fitOf(made, methodIds, { seed: order.seed }),
    inputHash: hashOf(order, rows, record, view),
    serviceVersion: view.serviceVersion,
    segmentRevision: record?.revision,
  }
  const used = usedMeasurements(fitted)
  const coverage = coverageOf(used)
  return {
    calibration: toCalibration(fitted, coverage),
    document: toDocument(fitted, used, coverage),
    rows,
    points: made.map((measurement) => toPoint(measurement, methodIds)),
  }
}
