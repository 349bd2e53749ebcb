import type { SquatMethod } from '../method.ts'
import { barrass1979 } from './barrass-1979.ts'
import { barrass2004 } from './barrass-2004.ts'
import { eryuzlu1994 } from './eryuzlu-1994.ts'
import { huuska1976 } from './huuska-1976.ts'
import { icorels1980 } from './icorels-1980.ts'
import { norrbin1986 } from './norrbin-1986.ts'
import { romisch1989 } from './romisch-1989.ts'
import { schijfDrawdown } from './schijf-drawdown.ts'
import { tuck1966 } from './tuck-1966.ts'
import { yoshimura1986 } from './yoshimura-1986.ts'

/** The squat methods, in the order in which they are reported. */
export const SQUAT_METHODS: readonly SquatMethod[] = [
  barrass1979,
  barrass2004,
  icorels1980,
  huuska1976,
  eryuzlu1994,
  romisch1989,
  yoshimura1986,
  norrbin1986,
  tuck1966,
  schijfDrawdown,
]
