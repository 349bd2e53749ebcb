import type { WaveMethod } from '../method.ts'
import { bhowmik1991 } from './bhowmik-1991.ts'
import { blaauw1984 } from './blaauw-1984.ts'
import { gatesHerbich1977 } from './gates-herbich-1977.ts'
import { kriebelSeelig2005 } from './kriebel-seelig-2005.ts'
import { maynord2005 } from './maynord-2005.ts'
import { rockManual2007 } from './rock-manual-2007.ts'
import { weggelSorensen1986 } from './weggel-sorensen-1986.ts'

/** The wave-height methods, in the order in which they are reported. */
export const WAVE_METHODS: readonly WaveMethod[] = [
  rockManual2007,
  blaauw1984,
  weggelSorensen1986,
  kriebelSeelig2005,
  gatesHerbich1977,
  bhowmik1991,
  maynord2005,
]
