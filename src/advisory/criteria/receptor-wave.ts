import type { Receptor, Station } from '../../domain/segment.ts'
import { WAVE_METHODS } from '../../hydro/waves/all.ts'
import { bankSternWave, sternWaveFirstSpeed } from '../primary.ts'
import { secondaryFirstSpeed, secondaryWave } from '../secondary-wave.ts'
import type { Situation } from '../situation.ts'
import { atMost, type Criterion, type Evaluation, type Origin } from './criterion.ts'
import { POLICY } from './policy.ts'

/** Bank on whose side a receptor lies; without known sides, the nearer one. */
export function bankOfReceptor(situation: Situation, receptor: Receptor): 0 | 1 {
  const [first, second] = situation.segment.banks
  if (receptor.side === first.side) return 0
  return receptor.side === second.side ? 1 : situation.nearer
}

/** Whether a receptor counts at a station: everywhere, or where it lies. */
export const isAt = (receptor: Receptor, station: Station): boolean =>
  receptor.station === undefined || receptor.station === station.index

function limitOf(situation: Situation, receptor: Receptor): { limit: number; origin: Origin } {
  const requested = situation.options.limits.maxReceptorWaveHeight
  if (requested !== undefined) return { limit: requested, origin: 'request' }
  if (receptor.maxWaveHeight !== undefined) return { limit: receptor.maxWaveHeight, origin: 'segment' }
  return { limit: POLICY.mooredCraftWaveHeight, origin: 'policy' }
}

function evaluateReceptor(
  situation: Situation,
  receptor: Receptor,
  bank: 0 | 1,
  limit: number,
  speed: number,
): Evaluation {
  const secondary = secondaryWave(situation, speed, receptor.distance)
  const stern = bankSternWave(situation, bank, speed)
  const isStern = stern >= secondary.height
  return atMost(
    Math.max(stern, secondary.height),
    limit,
    isStern ? 'stern-wave' : WAVE_METHODS[secondary.method]?.id,
  )
}

/** The higher of secondary and stern wave at the distance of a receptor. */
export function receptorWaveCriterion(situation: Situation, receptor: Receptor, index: number): Criterion {
  const bank = bankOfReceptor(situation, receptor)
  const { limit, origin } = limitOf(situation, receptor)
  return {
    id: 'receptor-wave-height',
    place: `receptor-${index}`,
    sense: 'at-most',
    unit: 'm',
    origin,
    firstSpeed: (from, to, most = Infinity) => {
      const stern = sternWaveFirstSpeed(situation, bank, limit, from)
      const span = { from, to, most: Math.min(most, stern) }
      const first = Math.min(stern, secondaryFirstSpeed(situation, limit, receptor.distance, span))
      return first < to ? first : Infinity
    },
    evaluate: (speed) => evaluateReceptor(situation, receptor, bank, limit, speed),
  }
}
