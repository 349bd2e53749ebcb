import { z } from 'zod'
import type { PlanRecord } from '../store/job-records.ts'
import { writeCsv, type CsvCell } from './csv-write.ts'
import type { StretchWire } from './limit-plans.schema.ts'
import { Link } from './list.ts'
import { contentOf, publicationOf } from './plan-reply.ts'
import type { StudyInputs } from './study-of.ts'

const COLUMNS = [
  'index',
  'group_id',
  'direction',
  'waterway',
  'chainage_from_m',
  'chainage_to_m',
  'length_m',
  'segment_ids',
  'outcome',
  'limit_value',
  'limit_unit',
  'limit_kmh',
  'limit_kn',
  'ceiling_kmh',
  'lowest_maximum_kmh',
  'margin_mps',
  'governing_segment_id',
  'governing_station_chainage_m',
  'governing_vessel_class',
  'governing_loading',
  'governing_water_level_m',
  'governing_current_mps',
  'governing_direction',
  'governing_criterion',
  'today_kmh',
  'travel_time_s',
  'travel_time_today_s',
  'passages',
  'exceeding_ratio',
  'cautions',
] as const

type Row = Record<(typeof COLUMNS)[number], CsvCell>

function governingColumns(governing: StretchWire['governing']) {
  return {
    governing_segment_id: governing?.segment_id ?? null,
    governing_station_chainage_m: governing?.station_chainage_m ?? null,
    governing_vessel_class: governing?.vessel_class ?? null,
    governing_loading: governing?.loading ?? null,
    governing_water_level_m: governing?.water_level_m ?? null,
    governing_current_mps: governing?.current_mps ?? null,
    governing_direction: governing?.direction ?? null,
    governing_criterion: governing?.criterion ?? null,
  }
}

function speedColumns({ limit, limit_speed, ceiling, lowest_maximum, margin_mps }: StretchWire) {
  return {
    limit_value: limit?.value ?? null,
    limit_unit: limit?.unit ?? null,
    limit_kmh: limit_speed?.kmh ?? null,
    limit_kn: limit_speed?.kn ?? null,
    ceiling_kmh: ceiling?.kmh ?? null,
    lowest_maximum_kmh: lowest_maximum?.kmh ?? null,
    margin_mps: margin_mps ?? null,
  }
}

/** A stretch as a flat row: every column present, null where it does not apply. */
function toRow(stretch: StretchWire): Row {
  return {
    index: stretch.index,
    group_id: stretch.group_id,
    direction: stretch.direction,
    waterway: stretch.waterway ?? null,
    chainage_from_m: stretch.chainage_from_m,
    chainage_to_m: stretch.chainage_to_m,
    length_m: stretch.length_m,
    segment_ids: stretch.segment_ids,
    outcome: stretch.outcome,
    ...speedColumns(stretch),
    ...governingColumns(stretch.governing),
    today_kmh: stretch.today?.kmh ?? null,
    travel_time_s: stretch.travel_time_s ?? null,
    travel_time_today_s: stretch.travel_time_today_s ?? null,
    passages: stretch.passages ?? null,
    exceeding_ratio: stretch.exceeding_ratio ?? null,
    cautions: stretch.cautions.map(({ code }) => code),
  }
}

/** The stretches of a plan as CSV. */
export const planCsv = (plan: PlanRecord): string => writeCsv(COLUMNS, contentOf(plan).stretches.map(toRow))

const Position = z.tuple([z.number(), z.number()])

export const LimitPlanCollection = z
  .object({
    type: z.literal('FeatureCollection'),
    features: z.array(
      z.object({
        type: z.literal('Feature'),
        id: z.int().min(0).max(1e6).describe('index of the stretch'),
        geometry: z.object({
          type: z.literal('MultiLineString'),
          coordinates: z.array(z.array(Position)).describe('a sailing line for each segment, from upstream'),
        }),
        properties: z.record(z.string(), z.unknown()),
      }),
    ),
    links: z.array(Link),
    numberReturned: z.int().min(0).max(1e9),
    numberMatched: z.int().min(0).max(1e9),
  })
  .meta({ id: 'LimitPlanCollection', description: 'The stretches of a plan on the map.' })

interface Feature {
  readonly id: string
  readonly geometry: { readonly coordinates: [number, number][] }
}

/** The stretches of a plan as GeoJSON, on the sailing lines of the time when its study was made. */
export function planGeoJson(
  plan: PlanRecord,
  { segments }: Pick<StudyInputs, 'segments'>,
  url: string,
): z.output<typeof LimitPlanCollection> {
  const lines = new Map(
    (segments as unknown as readonly Feature[]).map(({ id, geometry }) => [id, geometry.coordinates]),
  )
  const { stretches } = contentOf(plan)
  const number = publicationOf(plan)?.number
  return {
    type: 'FeatureCollection',
    features: stretches.map((stretch) => ({
      type: 'Feature',
      id: stretch.index,
      geometry: {
        type: 'MultiLineString',
        coordinates: stretch.segment_ids.map((id) => lines.get(id) ?? []),
      },
      properties: { plan: plan.name, state: plan.state, number: number ?? null, ...toRow(stretch) },
    })),
    links: [{ rel: 'self', href: url }],
    numberReturned: stretches.length,
    numberMatched: stretches.length,
  }
}
