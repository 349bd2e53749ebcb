import { shipOf, type KINDS, type Ship } from './fleet.ts'
import type { Leg } from './sail.ts'

/** A vessel whose track is written down, so that a log of any seed has every case in it. */
export interface Planted {
  readonly ship: Ship
  /** s after the start of the log */
  readonly start: number
  readonly legs: readonly Leg[]
}

const planted = (
  kind: keyof typeof KINDS,
  [number, name]: readonly [number, string],
  start: number,
  ...legs: Leg[]
): Planted => ({ ship: shipOf(kind, number, name), start, legs })

/** Vessels with a planted exceedance, or with none. */
const ORDINARY: readonly Planted[] = [
  planted('cargo', [1, 'HARROW WREN'], 0, {
    segment: 'harrow-upper-reach',
    direction: 'downstream',
    from: 850,
    offset: 3,
    phases: [
      ['within', 3],
      ['exceeds', 6],
      ['within', 2],
    ],
  }),
  // what laden and empty bear differs: above both, then above the one only
  planted('unknownTanker', [2, 'MERE HERON'], 240, {
    segment: 'harrow-long-pound',
    direction: 'upstream',
    from: 3450,
    offset: -8,
    phases: [
      ['within', 2],
      ['depends-on-draught', 2],
      ['exceeds', 4],
      ['depends-on-draught', 1],
      ['within', 2],
    ],
  }),
  planted('unknownCargo', [3, 'QUAY MARTIN'], 420, {
    segment: 'harrow-long-pound',
    direction: 'downstream',
    from: 940,
    offset: 6,
    phases: [
      ['within', 2],
      ['depends-on-draught', 5],
      ['within', 2],
    ],
  }),
  planted(
    'tripBoat',
    [4, 'ALDER QUEEN'],
    600,
    {
      segment: 'harrow-alder-bend',
      direction: 'downstream',
      from: 1550,
      offset: 0,
      phases: [['within', 3]],
    },
    {
      segment: 'harrow-town-reach',
      direction: 'downstream',
      from: 90,
      offset: -4,
      phases: [
        ['within', 4],
        ['exceeds', 3],
      ],
    },
  ),
  planted('cruiser', [5, 'LITTLE TEAL'], 900, {
    segment: 'harrow-head-cut',
    direction: 'upstream',
    from: 1810,
    offset: -2,
    phases: [
      ['within', 2],
      ['exceeds', 5],
    ],
  }),
  planted('yacht', [6, 'REED OTTER'], 1500, {
    segment: 'harrow-upper-reach',
    direction: 'upstream',
    from: 1650,
    offset: -5,
    phases: [['within', 7]],
  }),
  // without a convoy in its row the hull of the towboat is all that is known
  planted('towboat', [7, 'IRON BADGER'], 1200, {
    segment: 'harrow-tideway',
    direction: 'downstream',
    from: 950,
    offset: 15,
    current: 0.4,
    phases: [['within', 7]],
  }),
  planted('tow', [8, 'IRON BEAVER'], 1800, {
    segment: 'harrow-tideway',
    direction: 'upstream',
    from: 2750,
    offset: 20,
    current: 0.4,
    phases: [
      ['within', 2],
      ['exceeds', 5],
      ['within', 1],
    ],
  }),
  // so near to the reeds that what stands there governs, and not the bank
  planted('yacht', [17, 'REED WARBLER'], 1950, {
    segment: 'harrow-tideway',
    direction: 'upstream',
    from: 2700,
    offset: -74,
    phases: [
      ['within', 2],
      ['exceeds', 3],
    ],
  }),
  planted('ship', [9, 'SALTINGS TRADER'], 2100, {
    segment: 'harrow-docks',
    direction: 'downstream',
    from: 90,
    offset: 12,
    phases: [
      ['within', 1],
      ['exceeds', 4],
    ],
  }),
  planted('deepTanker', [10, 'DEEP PINTAIL'], 2400, {
    segment: 'harrow-head-cut',
    direction: 'downstream',
    from: 640,
    offset: 1,
    phases: [['no-safe-speed', 4]],
  }),
]

/** Vessels whose tracks are awkward. */
const AWKWARD: readonly Planted[] = [
  // an hour without a report in the middle of an exceedance: two events, two passages
  planted(
    'smallCargo',
    [11, 'HARROW GREBE'],
    2700,
    { segment: 'harrow-long-pound', direction: 'downstream', from: 100, offset: 9, phases: [['exceeds', 4]] },
    {
      segment: 'harrow-long-pound',
      direction: 'downstream',
      from: 1900,
      offset: 9,
      phases: [['exceeds', 4]],
      pause: 3600,
    },
  ),
  // turns round: a passage each way
  planted(
    'emptyCargo',
    [12, 'LOCK WAGTAIL'],
    3000,
    { segment: 'harrow-town-reach', direction: 'downstream', from: 700, offset: 5, phases: [['within', 4]] },
    {
      segment: 'harrow-town-reach',
      direction: 'upstream',
      from: 1010,
      offset: -6,
      phases: [['exceeds', 4]],
      pause: 240,
    },
  ),
  // one report above the maximum is no event
  planted('emptyCargo', [13, 'FEN DUNLIN'], 3600, {
    segment: 'harrow-upper-reach',
    direction: 'upstream',
    from: 3100,
    offset: 2,
    phases: [
      ['within', 3],
      ['exceeds', 1],
      ['within', 2],
    ],
  }),
]

/** Vessels whose tracks the log disturbs, by what is done to them. */
export const DISTURBED = {
  /** a row twice and two rows in the wrong order, both within an event, and rows far too late */
  unordered: planted('emptySmallCargo', [14, 'COPPER CURLEW'], 3900, {
    segment: 'harrow-long-pound',
    direction: 'upstream',
    from: 2650,
    offset: -12,
    phases: [
      ['within', 2],
      ['exceeds', 6],
      ['within', 1],
    ],
  }),
  /** positions that no vessel reaches in the time */
  jumping: planted('smallCargo', [15, 'MARSH LAPWING'], 4500, {
    segment: 'harrow-long-pound',
    direction: 'downstream',
    from: 1850,
    offset: -7,
    phases: [['within', 7]],
  }),
  /** figures that AIS marks as not available */
  silent: planted('cruiser', [16, 'OAT SISKIN'], 4800, {
    segment: 'harrow-tideway',
    direction: 'downstream',
    from: 2000,
    offset: -30,
    phases: [['within', 7]],
  }),
} as const satisfies Readonly<Record<string, Planted>>

export const PLANTED: readonly Planted[] = [...ORDINARY, ...AWKWARD]
