import { readFileSync } from 'node:fs'
import { decide } from '../src/advisory/decide.ts'
import { shifted } from '../src/advisory/shifted-inputs.ts'
import type { Inputs } from '../src/advisory/uncertainty.ts'
import { findVesselClass } from '../src/domain/vessel-classes.ts'
import { vesselOfClass } from '../src/domain/vessel-of.ts'
import type { Vessel } from '../src/domain/vessel.ts'
import { readFeature, type FeatureWire } from '../src/http/feature-in.ts'
import { DEFAULT_OPTIONS } from '../src/http/options.schema.ts'
import { toRegistrySegment } from '../src/http/to-registry-segment.ts'
import { drawsOf, SHIFTED_FIELDS } from '../src/limits/samples.ts'
import { evaluateCells } from '../src/limits/evaluate.ts'
import { cellCount, type Study } from '../src/limits/study.ts'

const ROUNDS = 9
const WARM_ROUNDS = 3
const SAMPLES = 200

const WATERWAY = new URL('../openapi/examples/harrowmere-navigation.geojson', import.meta.url)

function vesselOf(id: string): Vessel {
  const found = findVesselClass(id)
  if (!found) throw new Error(`There is no class ${id}`)
  return vesselOfClass(found, 'laden', {})
}

/** The demo waterway, one station a segment, with every input uncertain. */
function aStudy(currents: readonly number[]): Study {
  const { features } = JSON.parse(readFileSync(WATERWAY, 'utf8')) as { features: FeatureWire[] }
  const segments = features.map((feature) => {
    const { content } = readFeature(feature, '#', false)
    if (!content) throw new Error('The demo waterway cannot be read')
    const { segment } = toRegistrySegment(content.properties, content)
    const ofOneStation = { ...segment, stations: [segment.stations[0]] as const }
    return {
      id: content.id,
      chainageFrom: 0,
      chainageTo: 0,
      length: content.length,
      segment: ofOneStation,
      options: { ...DEFAULT_OPTIONS, applyPostedLimit: false },
      waveHeightLogSd: 0.4,
    }
  })
  return {
    segments,
    vessels: ['cemt-i', 'passenger-vessel', 'recreational-rb'].map(vesselOf),
    waterLevels: [0, 0.2],
    currents,
    directions: currents.length > 1 ? ['upstream', 'downstream'] : [null],
    uncertainty: {
      samples: SAMPLES,
      seed: 1,
      percentiles: [5, 50, 95],
      spreads: {
        depth_m: { kind: 'standard-deviation', size: 0.1 },
        width_m: { kind: 'half-range', size: 1 },
        bank_distance_m: { kind: 'standard-deviation', size: 0.5 },
        draught_m: { kind: 'standard-deviation', size: 0.05 },
        current_mps: { kind: 'standard-deviation', size: 0.05 },
      },
    },
  }
}

/** The samples of every segment, vessel and level as inputs of their own, in the first current of the study. */
function sampledInputs({ segments, vessels, waterLevels, uncertainty }: Study): Inputs[] {
  if (!uncertainty) throw new RangeError('The study of the bench is uncertain')
  const draws = drawsOf(uncertainty)
  return segments.flatMap(({ segment, options, waveHeightLogSd = 0 }) =>
    vessels.flatMap((vessel) =>
      waterLevels.flatMap((waterLevel) =>
        Array.from({ length: SAMPLES }, (_, i) => {
          const conditions = { waterLevel, current: 0, isWaterLevelGiven: true, isCurrentGiven: true }
          const given: Inputs = { segment, vessel, conditions, options }
          const scaled = shifted(given, 'wave_height', waveHeightLogSd * (draws.waveHeight[i] ?? NaN))
          return SHIFTED_FIELDS.reduce(
            (inputs, field) => shifted(inputs, field, draws.shifts[field]?.[i] ?? 0),
            scaled,
          )
        }),
      ),
    ),
  )
}

/** The same samples by single decisions. */
function decideEach(samples: readonly Inputs[]): number {
  for (const { segment, vessel, conditions, options } of samples) decide(segment, vessel, conditions, options)
  return samples.length
}

function evaluateAll(study: Study): number {
  const impossible = evaluateCells(study, 0, cellCount(study)).filter(({ problem }) => problem)
  if (impossible.length > 0) throw new Error('A cell of the bench has no answer')
  return cellCount(study) * (SAMPLES + 1)
}

/** Per second of the processor. */
function rate(work: () => number): number {
  const start = process.cpuUsage()
  const count = work()
  return (count / process.cpuUsage(start).user) * 1e6
}

const median = (values: readonly number[]): number =>
  [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? NaN

function against(study: Study): string {
  const rates: number[] = []
  const ratios: number[] = []
  const samples = sampledInputs(study)
  for (let round = -WARM_ROUNDS; round < ROUNDS; round += 1) {
    const whole = rate(() => evaluateAll(study))
    const single = rate(() => decideEach(samples))
    if (round < 0) continue
    rates.push(whole)
    ratios.push(whole / single)
  }
  return `${median(ratios).toFixed(2)} of decide (${Math.round(median(rates))}/s)`
}

/** Evaluations of a study, a sample of a cell each, against single decisions of the same inputs, in one thread. */
export function studyRows(): { what: string; value: string; bar: string }[] {
  return [
    { what: 'study, one current', value: against(aStudy([0])), bar: '0.90' },
    { what: 'study, three currents both ways', value: against(aStudy([-0.3, 0, 0.3])), bar: '' },
  ]
}
