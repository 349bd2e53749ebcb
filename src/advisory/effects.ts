import type { Side } from '../domain/segment.ts'
import { FRESH_WATER_DENSITY, SEA_WATER_DENSITY } from '../hydro/constants.ts'
import { waveEnergy } from '../hydro/energy.ts'
import { lengthFroudeNumber } from '../hydro/froude.ts'
import { frontWaveHeight, meanDrawdown } from '../hydro/primary-wave.ts'
import { cuspPeriodAt, firstArrival, wakeAt, type Wake } from '../hydro/wedge.ts'
import { bankWave } from './criteria/bank-wave.ts'
import { bankDrawdown, bankReturnCurrent, bankSternWave } from './primary.ts'
import { regimeAt, type Regime } from './regime.ts'
import { secondaryWave } from './secondary-wave.ts'
import type { Situation } from './situation.ts'
import { squatAt } from './squat.ts'

/** What a passage does at one bank. SI; NaN where a figure does not apply or cannot be evaluated. */
export interface BankEffects {
  readonly side: Side
  /** sailing line to the waterline at the actual level, m */
  readonly distance: number
  readonly waveHeight: number
  readonly drawdown: number
  readonly returnCurrent: number
  /** J per metre of crest */
  readonly waveEnergy: number
  /** s after the bow passes abeam */
  readonly firstArrival: number
}

/** What a passage does at a speed. SI; NaN where a figure does not apply or cannot be evaluated. */
export interface Effects {
  /** through the water, m/s */
  readonly speed: number
  readonly depthFroudeNumber: number
  readonly lengthFroudeNumber: number
  readonly criticalRatio: number
  readonly regime: Regime
  readonly blockageRatio: number
  readonly returnCurrent: number
  readonly drawdown: number
  readonly frontWaveHeight: number
  readonly sternWaveHeight: number
  readonly squat: number
  readonly underKeelClearance: number
  readonly wake: Wake
  readonly bankWaveHeight: number
  readonly bankWaveEnergy: number
  readonly banks: readonly [BankEffects, BankEffects]
}

const densityOf = ({ setting }: Situation): number =>
  setting.isInland ? FRESH_WATER_DENSITY : SEA_WATER_DENSITY

/** Energy of the secondary waves at both banks alone, as in `effectsAt`, J per metre of crest; NaN where it is unknown. */
export function waveEnergies(situation: Situation, speed: number): readonly [number, number] {
  const { distances, depth } = situation.section
  const period = cuspPeriodAt(speed, depth)
  const density = densityOf(situation)
  const at = (distance: number) =>
    waveEnergy(secondaryWave(situation, speed, distance).height, period, density)
  return [at(distances[0]), at(distances[1])]
}

function bankEffects(situation: Situation, index: 0 | 1, speed: number, wake: Wake): BankEffects {
  const { isConfined } = situation.setting
  const distance = situation.section.distances[index]
  const secondary = secondaryWave(situation, speed, distance).height
  return {
    side: situation.segment.banks[index].side,
    distance,
    waveHeight: bankWave(situation, index, speed).height,
    drawdown: isConfined ? bankDrawdown(situation, index, speed) : NaN,
    returnCurrent: isConfined ? bankReturnCurrent(situation, index, speed) : NaN,
    waveEnergy: waveEnergy(secondary, wake.period, densityOf(situation)),
    firstArrival: firstArrival(distance, speed, wake.halfAngle),
  }
}

/**
 * Everything that a passage does at a speed; figures of the whole passage are the highest over the banks.
 *
 * @param speed  through the water, m/s, > 0
 */
export function effectsAt(situation: Situation, speed: number): Effects {
  const { setting, vessel, section, nearer } = situation
  const wake = wakeAt(speed, section.depth)
  const banks = [bankEffects(situation, 0, speed, wake), bankEffects(situation, 1, speed, wake)] as const
  const near = banks[nearer]
  const squat = squatAt(situation, speed)
  const isConfined = setting.isConfined
  return {
    speed,
    depthFroudeNumber: wake.froudeNumber,
    lengthFroudeNumber: lengthFroudeNumber(speed, vessel.length),
    criticalRatio: speed / setting.criticalSpeed,
    regime: regimeAt(situation, speed),
    blockageRatio: isConfined ? setting.blockage : NaN,
    returnCurrent: near.returnCurrent,
    drawdown: near.drawdown,
    frontWaveHeight: isConfined
      ? frontWaveHeight(Math.abs(meanDrawdown(setting, speed)), near.drawdown)
      : NaN,
    sternWaveHeight: isConfined ? bankSternWave(situation, nearer, speed) : NaN,
    squat,
    underKeelClearance: section.depth - vessel.draught - squat,
    wake,
    bankWaveHeight: Math.max(banks[0].waveHeight, banks[1].waveHeight),
    bankWaveEnergy: Math.max(banks[0].waveEnergy, banks[1].waveEnergy),
    banks,
  }
}
