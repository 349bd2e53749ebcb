import type { Direction } from '../domain/segment.ts'
import type { Caution } from './caution.ts'
import { situationCautions } from './cautions-of-situation.ts'
import { bedCaution, currentCaution, speedCautions } from './cautions-of-speed.ts'
import type { Effects } from './effects.ts'
import type { Situation } from './situation.ts'

const LOCAL_RULES: Caution = {
  code: 'local-rules-apply',
  severity: 'info',
  text: 'This is a computed advisory, not an order. Local rules, posted signs and the judgement of licensed navigators and engineers come first.',
}

/** All cautions of a vessel at a speed, the deferral to local rules first. */
export function cautionsAt(
  situation: Situation,
  effects: Effects,
  direction: Direction | undefined,
): Caution[] {
  const bed = bedCaution(situation, effects, direction)
  const current = currentCaution(situation, direction)
  return [
    LOCAL_RULES,
    ...speedCautions(situation, effects),
    ...situationCautions(situation),
    ...(bed ? [bed] : []),
    ...(current ? [current] : []),
  ]
}
