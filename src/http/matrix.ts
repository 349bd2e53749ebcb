import type { FastifyReply, FastifyRequest } from 'fastify'
import { z } from 'zod'
import { adviseBriefly } from '../advisory/advise.ts'
import { Fault } from '../domain/fault.ts'
import type { Conditions, Options } from '../domain/conditions.ts'
import type { Segment } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'
import type { Registry, SegmentRecord } from '../store/registry.ts'
import type { Routes } from './app-type.ts'
import { MatrixRow } from './compact.schema.ts'
import { COMPACT_COLUMNS, toCompactRow, toProblemRow, type CompactRow } from './compact.ts'
import { csvRow } from './csv-write.ts'
import { Id, Label, Text } from './fields.ts'
import { toFiniteJson } from './json.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { ConditionsFields, OptionsFields, toConditions, toOptions } from './options.schema.ts'
import { problemResponses } from './problems.ts'
import { optionsOn, resolveSegment, segmentNotFound, segmentOf } from './request.ts'
import { SegmentFields, type SegmentWire } from './segment.schema.ts'
import type { Watch } from './metrics.ts'
import type { Service } from './service.ts'
import { sendStream } from './stream.ts'
import { turn } from './turns.ts'
import { toVessel, VesselFields } from './vessel.schema.ts'

const MAX_CELLS = 2_000_000
const MAX_BODY_BYTES = 16 * 1024 * 1024
/** Rows that are made before the caller is given what there is. */
const ROWS_AT_ONCE = 100

const MatrixRequest = z
  .strictObject({
    label: Label,
    segments: z
      .union([
        z.literal('all'),
        z.strictObject({ label: Label, waterway: Text }),
        z
          .array(z.union([Id, SegmentFields]))
          .min(1)
          .max(20000),
      ])
      .describe('"all", those of a waterway, or ids and descriptions'),
    vessels: z.array(VesselFields).min(1).max(2000),
    conditions: z.array(ConditionsFields).min(1).max(2000).optional().describe('default [{}]'),
    options: OptionsFields.optional(),
  })
  .meta({ id: 'MatrixRequest', description: 'Every segment with every vessel in all conditions.' })

type MatrixWire = z.output<typeof MatrixRequest>

const CELL_COLUMNS = [
  'segment_index',
  'vessel_index',
  'condition_index',
  ...COMPACT_COLUMNS.filter((column) => column !== 'line'),
] as const

/** A segment of the matrix: what it is, or why it is none. */
interface MatrixSegment {
  readonly segment?: Segment
  readonly record?: SegmentRecord
  /** with the calibration of this segment */
  readonly options?: Options
  readonly fault?: Fault
  readonly label?: string | undefined
}

function chosenSegments(wire: MatrixWire, registry: Registry): MatrixSegment[] {
  const { segments } = wire
  if (segments === 'all' || !Array.isArray(segments)) {
    const filter = segments === 'all' ? {} : { waterway: segments.waterway }
    return registry.segments(filter).map((record) =>
      matrixSegment(() => ({
        record,
        segment: segmentOf(record),
        options: optionsOn(toOptions(wire.options), wire.options, record.properties, registry),
      })),
    )
  }
  return segments.map((item) => {
    const own: SegmentWire = typeof item === 'string' ? { id: item } : item
    if (own.id !== undefined && !registry.findSegment(own.id)) throw segmentNotFound(own.id, registry)
    const stored = own.id === undefined ? {} : (registry.findSegment(own.id)?.properties ?? {})
    const calibrated = own.calibration_id === undefined ? stored : own
    const options = optionsOn(toOptions(wire.options), wire.options, calibrated, registry)
    return { ...matrixSegment(() => ({ ...resolveSegment(own, registry), options })), label: own.label }
  })
}

/** A segment that cannot be is a row in every cell, not the end of the matrix. */
function matrixSegment(
  make: () => { segment: Segment; record?: SegmentRecord; options: Options },
): MatrixSegment {
  try {
    return make()
  } catch (error) {
    if (error instanceof Fault && error.code === 'impossible-input') return { fault: error }
    throw error
  }
}

interface Cell {
  readonly segment: MatrixSegment
  readonly vessel: Vessel
  readonly conditions: Conditions
  readonly label: string | null
}

function cellRow({ segment: chosen, vessel, conditions, label }: Cell, watch: Watch): CompactRow {
  if (!chosen.segment || !chosen.options)
    return toProblemRow(chosen.fault ?? new Fault('internal', 'No segment'), label)
  try {
    const { segment, record, options } = chosen
    const brief = adviseBriefly(segment, vessel, conditions, options)
    watch.advised(brief)
    const inputs = { segment, vessel, conditions, options, ...(record && { record }) }
    return toCompactRow(brief, inputs, label)
  } catch (error) {
    if (!(error instanceof Fault)) throw error
    return { ...toProblemRow(error, label), segment_id: chosen.record?.id ?? null }
  }
}

/** Labels of the parts of a cell, outermost first. */
function labelOf(...labels: readonly (string | undefined)[]): string | null {
  const given = labels.filter((label) => label !== undefined)
  return given.length > 0 ? given.join(' / ') : null
}

/** The three axes of a matrix and what all its cells share. */
function axesOf(wire: MatrixWire, registry: Registry) {
  return {
    segments: chosenSegments(wire, registry),
    vessels: wire.vessels.map((vessel) => ({ vessel: toVessel(vessel, registry), label: vessel.label })),
    conditions: (wire.conditions ?? [{}]).map((item) => ({
      conditions: toConditions(item, registry),
      label: 'label' in item ? item.label : undefined,
    })),
  }
}

async function* cells(
  { segments, vessels, conditions }: ReturnType<typeof axesOf>,
  toText: (indices: readonly [number, number, number], row: CompactRow) => string,
  watch: Watch,
): AsyncGenerator<string> {
  let text = ''
  let made = 0
  for (const [i, segment] of segments.entries()) {
    for (const [j, vessel] of vessels.entries()) {
      for (const [k, condition] of conditions.entries()) {
        const label = labelOf(segment.label, vessel.label, condition.label)
        const { conditions: water } = condition
        const cell = { segment, vessel: vessel.vessel, conditions: water, label }
        text += toText([i, j, k], cellRow(cell, watch))
        made += 1
        if (made % ROWS_AT_ONCE !== 0) continue
        yield text
        text = ''
        // other requests have their turn
        await turn()
      }
    }
  }
  if (text !== '') yield text
}

function toJsonLine([i, j, k]: readonly [number, number, number], row: CompactRow): string {
  const { line: _, ...rest } = row
  return `${toFiniteJson({ segment_index: i, vessel_index: j, condition_index: k, ...rest })}\n`
}

function toCsvLine([i, j, k]: readonly [number, number, number], row: CompactRow): string {
  const indices = { segment_index: i, vessel_index: j, condition_index: k }
  return csvRow(CELL_COLUMNS.map((column) => ({ ...row, ...indices })[column]))
}

async function* prefixed(head: string, rows: AsyncGenerator<string>): AsyncGenerator<string> {
  yield head
  yield* rows
}

async function respond(
  request: FastifyRequest,
  reply: FastifyReply,
  wire: MatrixWire,
  service: Service,
): Promise<FastifyReply> {
  const format = negotiate(request, reply, ['ndjson', 'csv'])
  // Before the first row goes out, so that an unknown id is a problem in every form of the reply.
  const axes = axesOf(wire, await service.store.current())
  const count = axes.segments.length * axes.vessels.length * axes.conditions.length
  if (count > MAX_CELLS) {
    throw new Fault(
      'too-many-cells',
      `The matrix has ${count} cells; at most ${MAX_CELLS} are answered at once`,
      {
        facts: { limit: MAX_CELLS, cells: count },
      },
    )
  }
  return format === 'csv'
    ? sendStream(reply, prefixed(csvRow(CELL_COLUMNS), cells(axes, toCsvLine, service.watch)))
    : sendStream(reply, cells(axes, toJsonLine, service.watch))
}

/** Every segment with every vessel in all conditions, as rows. */
export function matrixRoutes(service: Service): Routes {
  return (app) => {
    app.post('/v1/advisories/matrix', {
      bodyLimit: MAX_BODY_BYTES,
      config: { place: 'stream' },
      schema: {
        operationId: 'createAdvisoryMatrix',
        tags: ['batches'],
        summary: 'Answer every segment with every vessel in all conditions, as rows.',
        description:
          'Segments outermost, conditions innermost. A cell that cannot be answered is a row with `problem_code`.',
        querystring: z.strictObject({ format: formatParameter(['ndjson', 'csv']) }),
        body: MatrixRequest,
        response: {
          200: {
            description: 'One row for each cell.',
            content: {
              'application/x-ndjson': { schema: MatrixRow },
              'text/csv': { schema: z.string() },
            },
          },
          ...problemResponses(400, 404, 406, 413, 415, 422),
        },
      },
      handler: (request, reply) => respond(request, reply, request.body, service),
    })
  }
}
