/** Columns that a CSV of advisory requests may have, each with the field that it fills. */
const COLUMN_PATHS = {
  label: 'label',
  segment_id: 'segment.id',
  depth_m: 'segment.depth_m',
  width_m: 'segment.width_m',
  bank_distance_m: 'segment.bank_distance_m',
  left_distance_m: 'segment.banks.left.distance_m',
  right_distance_m: 'segment.banks.right.distance_m',
  bank_kind: 'segment.bank_kind',
  bottom_width_m: 'segment.cross_section.bottom_width_m',
  slope_h_per_v: 'segment.cross_section.slope_h_per_v',
  max_wave_height_m: 'options.limits.max_bank_wave_height_m',
  min_under_keel_clearance_m: 'segment.min_under_keel_clearance_m',
  confinement: 'segment.confinement',
  vessel_class: 'vessel.class',
  loading: 'vessel.loading',
  length_m: 'vessel.length_m',
  beam_m: 'vessel.beam_m',
  draught_m: 'vessel.draught_m',
  block_coefficient: 'vessel.block_coefficient',
  hull: 'vessel.hull',
  max_speed_kmh: 'vessel.max_speed_kmh',
  water_level_m: 'conditions.water_level_m',
  current_mps: 'conditions.current_mps',
  direction: 'conditions.direction',
  sign_unit: 'options.sign_unit',
  sign_step: 'options.sign_step',
} as const

export const CSV_COLUMNS = Object.keys(COLUMN_PATHS)

const TEXT_COLUMNS = new Set([
  'label',
  'segment_id',
  'bank_kind',
  'confinement',
  'vessel_class',
  'loading',
  'hull',
  'direction',
  'sign_unit',
])

const NUMBER = /^[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?$/

type Tree = { [key: string]: Tree | string | number }

/** A cell as the field it fills takes it: text that is no number stays text, and is refused as such. */
function valueOf(column: string, cell: string): string | number {
  return !TEXT_COLUMNS.has(column) && NUMBER.test(cell) ? Number(cell) : cell
}

function put(tree: Tree, path: readonly string[], value: string | number): void {
  const [key = '', ...rest] = path
  if (rest.length === 0) {
    tree[key] = value
    return
  }
  const below = tree[key]
  const branch: Tree = typeof below === 'object' ? below : {}
  tree[key] = branch
  put(branch, rest, value)
}

/** A row of CSV as an advisory request; empty cells are fields left out. */
export function requestOfRow(fields: Readonly<Record<string, string>>): unknown {
  const request: Tree = { segment: {}, vessel: {} }
  for (const [column, path] of Object.entries(COLUMN_PATHS)) {
    const cell = fields[column]?.trim()
    if (cell !== undefined && cell !== '') put(request, path.split('.'), valueOf(column, cell))
  }
  const { segment } = request
  if (typeof segment === 'object' && typeof segment['banks'] === 'object') {
    // either distance will do beside the width, but a bank has two sides
    segment['banks'] = { left: {}, right: {}, ...segment['banks'] }
  }
  return request
}

const POINTERS = new Map(
  Object.entries(COLUMN_PATHS).map(([column, path]) => [`#/${path.replaceAll('.', '/')}`, column]),
)

/** The column that a pointer into the request stands for. */
export function columnOfPointer(pointer: string): string {
  return POINTERS.get(pointer) ?? pointer.replace(/^#\/?/, '')
}
