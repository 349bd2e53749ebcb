import { advise, type Advisory } from '../../src/advisory/advise.ts'
import { assess } from '../../src/advisory/assess.ts'
import type { Decision } from '../../src/advisory/decide.ts'
import type { Effects } from '../../src/advisory/effects.ts'
import { Fault } from '../../src/domain/fault.ts'
import type { FrozenCase } from './cases.ts'

/** What an advisory says: words, which are exact, and figures in SI, in a fixed order; NaN and Infinity among them. */
export interface FrozenAnswer {
  readonly words: string
  readonly figures: readonly number[]
}

const wordsOf = ({ outcome, governing, direction }: Decision): string =>
  `${outcome} ${governing.criterion.id} ${governing.criterion.place} ${direction ?? ''}`

function advisoryWords(advisory: Advisory): string {
  const { decision, byDirection, sign, cautions, uncalibrated, waveMethods, squatMethods } = advisory
  const inRange = [...waveMethods, ...squatMethods].map(({ outside }) => (outside.length === 0 ? '1' : '0'))
  return [
    wordsOf(decision),
    byDirection ? `${wordsOf(byDirection.upstream)}; ${wordsOf(byDirection.downstream)}` : '',
    sign ? `${sign.value} ${sign.unit}` : '',
    uncalibrated ? wordsOf(uncalibrated.decision) : '',
    advisory.criteria.map(({ evaluation }) => (evaluation.isMet ? '1' : '0')).join(''),
    inRange.join(''),
    cautions.map(({ code }) => code).join(' '),
    advisory.effects.regime,
  ].join(', ')
}

function effectFigures(effects: Effects): number[] {
  const { wake } = effects
  return [
    effects.depthFroudeNumber,
    effects.criticalRatio,
    effects.frontWaveHeight,
    effects.sternWaveHeight,
    effects.squat,
    wake.halfAngle,
    wake.period,
    wake.transverseWaveLength,
    ...effects.banks.flatMap((bank) => [bank.waveHeight, bank.drawdown, bank.returnCurrent, bank.waveEnergy]),
  ]
}

function advisoryFigures(advisory: Advisory): number[] {
  const { decision, byDirection, uncalibrated, effects, criteria, waveMethods, squatMethods } = advisory
  return [
    decision.speed,
    decision.overGround,
    ...(byDirection ? [byDirection.upstream.speed, byDirection.downstream.speed] : []),
    ...(uncalibrated ? [uncalibrated.decision.speed, uncalibrated.bankWaveHeight] : []),
    ...criteria.flatMap(({ firstSpeed, evaluation }) => [firstSpeed, evaluation.value ?? NaN]),
    ...waveMethods.flatMap(({ height, firstSpeed }) => [height, firstSpeed]),
    ...squatMethods.map(({ squat }) => squat),
    ...effectFigures(effects),
  ]
}

/** The advisory of a case, and what it says at the speed that is asked about; undefined where the figures clash. */
export function answerOf({
  segment,
  vessel,
  conditions,
  options,
  sailed,
}: FrozenCase): FrozenAnswer | undefined {
  try {
    const advisory = advise(segment, vessel, conditions, options)
    const sailing = { value: sailed, reference: 'through-water' } as const
    const assessed = assess(segment, vessel, conditions, options, sailing)
    return {
      words: [
        advisoryWords(advisory),
        assessed?.verdict,
        assessed?.effects.regime,
        assessed?.cautions.map(({ code }) => code).join(' '),
      ].join(', '),
      figures: [...advisoryFigures(advisory), ...(assessed ? effectFigures(assessed.effects) : [])],
    }
  } catch (error) {
    if (error instanceof Fault && error.code === 'impossible-input') return undefined
    throw error
  }
}
