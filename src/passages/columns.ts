/** Publications of AIS logs whose times are UTC and carry no zone. */
export type Publication = 'marinecadastre' | 'danish' | 'norwegian'

/** What a column of a log can be, in the order of the contract; the last seven are ours. */
export const FIELDS = [
  'time',
  'mmsi',
  'eni',
  'vessel_name',
  'lat',
  'lon',
  'sog_kn',
  'cog_deg',
  'heading_deg',
  'nav_status',
  'ship_type',
  'length_m',
  'beam_m',
  'draught_m',
  'type_of_mobile',
  'vessel_class',
  'loading',
  'convoy_length_m',
  'convoy_beam_m',
  'convoy_draught_m',
  'water_level_m',
  'current_mps',
] as const
export type Field = (typeof FIELDS)[number]

/** How a field is recognised in the header of a log, or among the keys of an object, and what it holds. */
export interface Column {
  readonly field: Field
  /** Names in lower case; headers are compared without regard to letter case. Ours is the first. */
  readonly names: readonly string[]
  /** Those of the names that belong to a publication with times in UTC without a zone. */
  readonly publications?: Readonly<Record<string, Publication>>
  /** null where the field is a text or a code */
  readonly unit: string | null
  /** what is read as not known, in words */
  readonly missing: string
  readonly required: boolean
}

/** Texts that mark a value as missing, beside an empty one, in lower case. */
export const MISSING_MARKS: ReadonlySet<string> = new Set([
  'unknown',
  'undefined',
  'unknown value',
  'null',
  'none',
  'nan',
  'na',
  'n/a',
])

const EMPTY = 'empty, Unknown, Undefined, Unknown value, null, None, NaN, NA, N/A'

/**
 * Fields of a log: names stand here only when they belong to a publication or state their
 * unit.
 *
 * @source names: MarineCadastre.gov AIS data dictionary (`BaseDateTime` and, since 2024, `base_date_time`), Danish
 *   Maritime Authority AIS data (`# Timestamp`), Norwegian Coastal Administration (`date_time_utc`); others: own choice
 * @source missing: ITU-R M.1371-5, annex 8, messages 1 and 5; marks in words: own choice from the publications
 */
export const COLUMNS: readonly Column[] = [
  {
    field: 'time',
    names: [
      'time',
      'timestamp',
      'datetime',
      'date_time',
      'basedatetime',
      'base_date_time',
      '# timestamp',
      'date_time_utc',
    ],
    publications: {
      basedatetime: 'marinecadastre',
      base_date_time: 'marinecadastre',
      '# timestamp': 'danish',
      date_time_utc: 'norwegian',
    },
    unit: 'RFC 3339 with a zone; UTC without one under basedatetime, base_date_time, # timestamp (also DD/MM/YYYY HH:MM:SS) and date_time_utc',
    missing: EMPTY,
    required: true,
  },
  { field: 'mmsi', names: ['mmsi'], unit: null, missing: `${EMPTY}, 0`, required: false },
  { field: 'eni', names: ['eni', 'eni_number'], unit: null, missing: `${EMPTY}, 0`, required: false },
  {
    field: 'vessel_name',
    names: ['vessel_name', 'vesselname', 'ship_name', 'shipname', 'name'],
    unit: null,
    missing: EMPTY,
    required: false,
  },
  {
    field: 'lat',
    names: ['lat', 'latitude'],
    unit: 'deg',
    missing: `${EMPTY}, 91 or beyond 90 either way, 0 together with lon 0`,
    required: true,
  },
  {
    field: 'lon',
    names: ['lon', 'longitude', 'lng', 'long'],
    unit: 'deg',
    missing: `${EMPTY}, 181 or beyond 180 either way, 0 together with lat 0`,
    required: true,
  },
  {
    field: 'sog_kn',
    names: ['sog_kn', 'sog', 'sog_knots', 'speed_kn', 'speed_knots', 'speed_over_ground_kn'],
    unit: 'kn',
    missing: `${EMPTY}, 102.2 or more`,
    required: true,
  },
  {
    field: 'cog_deg',
    names: ['cog_deg', 'cog', 'course_over_ground', 'course_over_ground_deg'],
    unit: 'deg',
    missing: `${EMPTY}, 360 or more`,
    required: false,
  },
  {
    field: 'heading_deg',
    names: ['heading_deg', 'heading', 'true_heading'],
    unit: 'deg',
    missing: `${EMPTY}, 360 or more (511)`,
    required: false,
  },
  {
    field: 'nav_status',
    names: [
      'nav_status',
      'status',
      'navstatus',
      'navigational status',
      'navigational_status',
      'navigation_status',
    ],
    unit: null,
    missing: `${EMPTY}, anything but 0 to 15 or their names`,
    required: false,
  },
  {
    field: 'ship_type',
    names: ['ship_type', 'vesseltype', 'vessel_type', 'ship type', 'shiptype'],
    unit: null,
    missing: `${EMPTY}, 0, anything but 1 to 99 or their names`,
    required: false,
  },
  {
    field: 'length_m',
    names: ['length_m', 'length'],
    unit: 'm',
    missing: `${EMPTY}, 0, outside 1 to 500`,
    required: false,
  },
  {
    field: 'beam_m',
    names: ['beam_m', 'width', 'width_m'],
    unit: 'm',
    missing: `${EMPTY}, 0, outside 0.3 to 100`,
    required: false,
  },
  {
    field: 'draught_m',
    names: ['draught_m', 'draught', 'draft', 'draft_m'],
    unit: 'm',
    missing: `${EMPTY}, 0, outside 0.05 to 30`,
    required: false,
  },
  {
    field: 'type_of_mobile',
    names: ['type_of_mobile', 'type of mobile', 'transceiverclass', 'transcieverclass', 'transceiver'],
    unit: null,
    missing: `${EMPTY}: a vessel, unless the MMSI says otherwise`,
    required: false,
  },
  { field: 'vessel_class', names: ['vessel_class'], unit: null, missing: EMPTY, required: false },
  { field: 'loading', names: ['loading'], unit: null, missing: EMPTY, required: false },
  {
    field: 'convoy_length_m',
    names: ['convoy_length_m'],
    unit: 'm',
    missing: `${EMPTY}, 0`,
    required: false,
  },
  { field: 'convoy_beam_m', names: ['convoy_beam_m'], unit: 'm', missing: `${EMPTY}, 0`, required: false },
  {
    field: 'convoy_draught_m',
    names: ['convoy_draught_m'],
    unit: 'm',
    missing: `${EMPTY}, 0`,
    required: false,
  },
  { field: 'water_level_m', names: ['water_level_m'], unit: 'm', missing: EMPTY, required: false },
  { field: 'current_mps', names: ['current_mps'], unit: 'm/s', missing: EMPTY, required: false },
]

const BY_NAME: ReadonlyMap<string, Column> = new Map(
  COLUMNS.flatMap((column) => column.names.map((name) => [name, column] as const)),
)

/** The field that a header cell or a key names; undefined when it is not recognised. */
export function columnOf(name: string): Column | undefined {
  return BY_NAME.get(name) ?? BY_NAME.get(name.trim().toLowerCase())
}

/** The publication that a name belongs to, when times under it are UTC without a zone. */
export function publicationOf(column: Column, name: string): Publication | undefined {
  return column.publications?.[name.trim().toLowerCase()]
}
