/** Largest length of each class of cargo vessel by what it is likely to be, m (own choice, between the sizes of the classes). */
const INLAND_CARGO = [
  [47, 'cemt-i'],
  [67, 'cemt-ii'],
  [82, 'cemt-iii'],
  [97, 'cemt-iv'],
  [140, 'cemt-va'],
  [200, 'cemt-vb'],
] as const
const SEA_GOING_CARGO = [
  [125, 'coaster'],
  [200, 'handysize'],
  [Infinity, 'panamax'],
] as const
const RECREATIONAL = [
  [7.5, 'recreational-ra'],
  [12, 'recreational-rb'],
  [Infinity, 'recreational-rc'],
] as const
const CONVOYS = [
  [115, 'tow-1-jumbo'],
  [220, 'tow-4-jumbo'],
  [Infinity, 'tow-15-jumbo'],
] as const

/** Beam above which a cargo vessel of an inland length is taken for a sea-going one, m: 11.4 of CEMT Va and a rounding. */
const INLAND_BEAM = 12
/** Length below which a vessel of unknown type is taken for a pleasure craft, m (own choice). */
const PLEASURE_LENGTH = 24

type Steps = readonly (readonly [to: number, id: string])[]

function byLength(steps: Steps, length: number): string | undefined {
  return steps.find(([to]) => length <= to)?.[1]
}

function cargoClass(length: number, beam: number): string {
  const inland = beam > INLAND_BEAM ? undefined : byLength(INLAND_CARGO, length)
  return inland ?? byLength(SEA_GOING_CARGO, length) ?? 'cemt-iv'
}

function pleasureClass(length: number): string {
  return byLength(RECREATIONAL, length) ?? 'recreational-rb'
}

/** Class of a convoy by the length of its barges together, m. */
export function convoyClass(length: number): string {
  return byLength(CONVOYS, length) ?? 'tow-4-jumbo'
}

/** Ship types of vessels that push or tow others and report their own hull. */
export const isTowboat = (shipType: number): boolean => shipType === 31 || shipType === 32 || shipType === 52

type Trade = 'cargo' | 'passenger' | 'pleasure' | 'sailing' | 'fast' | 'work' | 'service' | 'naval'

/** Trades of the ship types that are told one by one. */
const SINGLE_TYPES: Readonly<Record<number, Trade>> = {
  30: 'work',
  31: 'work',
  32: 'work',
  33: 'work',
  34: 'work',
  35: 'naval',
  36: 'sailing',
  37: 'pleasure',
  50: 'service',
  51: 'service',
  52: 'work',
  53: 'work',
  54: 'work',
  55: 'service',
  58: 'service',
  59: 'work',
}
/** Trades of the ship types that are told by their first digit. */
const DECADES: Readonly<Record<number, Trade>> = {
  2: 'fast',
  4: 'fast',
  6: 'passenger',
  7: 'cargo',
  8: 'cargo',
}

/** Lengths between a small and a large one of a trade, m (own choice). */
const LARGE_WORK = 60
const LARGE_NAVAL = 40
const LARGE_FAST = 12
const LARGE_SAILING = 12

const CLASSES: Readonly<Record<Trade, (length: number, beam: number) => string>> = {
  cargo: cargoClass,
  passenger: () => 'passenger-vessel',
  pleasure: pleasureClass,
  sailing: (length) => (length > LARGE_SAILING ? 'recreational-rd' : pleasureClass(length)),
  fast: (length) => (length > LARGE_FAST ? 'patrol-boat' : 'planing-boat'),
  work: (length, beam) => (length > LARGE_WORK ? cargoClass(length, beam) : 'tug'),
  service: () => 'patrol-boat',
  naval: (length) => (length > LARGE_NAVAL ? 'coaster' : 'patrol-boat'),
}

/**
 * The class whose form and speeds stand in for a vessel's.
 *
 * @param shipType  of ITU-R M.1371, 1 to 99; NaN when it is not known
 * @param length  m; NaN when it is not known
 * @param beam  m; NaN when it is not known
 * @returns id of a built-in class
 * @holds ship types tell the trade, not the hull: a type 79 or 89 may be an inland or a sea-going vessel, told by size
 * @source ship types: ITU-R M.1371-5, table 53; their classes: own choice
 */
export function classOf(shipType: number, length: number, beam: number): string {
  const trade = SINGLE_TYPES[shipType] ?? DECADES[Math.floor(shipType / 10)]
  return CLASSES[trade ?? (length > PLEASURE_LENGTH ? 'cargo' : 'pleasure')](length, beam)
}
