import type { MethodDescription } from '../hydro/method.ts'
import { OTHER_METHODS } from '../hydro/other-methods.ts'
import { SQUAT_METHODS } from '../hydro/squat/all.ts'
import { WAVE_METHODS } from '../hydro/waves/all.ts'

/** Version of the methods together: rises whenever a figure moves for the same input. */
export const METHOD_VERSION = '2'

/** Every method of the service as data. */
export const METHODS: readonly MethodDescription[] = [...WAVE_METHODS, ...SQUAT_METHODS, ...OTHER_METHODS]

const ids = (methods: readonly MethodDescription[]): [string, ...string[]] => {
  const [first, ...rest] = methods.map((method) => method.id)
  if (first === undefined) throw new RangeError('A family of methods has at least one')
  return [first, ...rest]
}

export const WAVE_METHOD_IDS = ids(WAVE_METHODS)
export const METHOD_KINDS = [
  'wave-height',
  'squat',
  'primary-wave',
  'critical-speed',
  'wake-geometry',
  'bank-stability',
] as const satisfies readonly MethodDescription['kind'][]
