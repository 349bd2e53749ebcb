import type { FaultItem } from '../domain/fault.ts'
import {
  COLUMNS,
  type Column,
  columnOf,
  type Field,
  FIELDS,
  type Publication,
  publicationOf,
} from './columns.ts'

/** Where the fields of a log stand in its rows. */
export interface Layout {
  /** index of the cell of each field; -1 where the log does not have it */
  readonly columns: Readonly<Record<Field, number>>
  /** as they are written in the header */
  readonly names: readonly string[]
  /** not recognised, in order, each once */
  readonly ignoredColumns: readonly string[]
  readonly publication: Publication | undefined
  /** times without a zone are UTC */
  readonly isZoneless: boolean
  /** times may be DD/MM/YYYY HH:MM:SS */
  readonly isDayFirst: boolean
}

export type LayoutResult =
  | { readonly layout: Layout; readonly errors?: undefined }
  | { readonly errors: readonly FaultItem[]; readonly layout?: undefined }

const namesOf = (field: Field): readonly string[] =>
  COLUMNS.find((column) => column.field === field)?.names ?? []

/** No field anywhere: where reading a header begins. */
function noColumns(): Record<Field, number> {
  return Object.fromEntries(FIELDS.map((field) => [field, -1])) as Record<Field, number>
}

function missingOf(columns: Readonly<Record<Field, number>>): FaultItem[] {
  const missing = COLUMNS.filter(({ field, required }) => required && columns[field] < 0).map(
    ({ field, names }): FaultItem => ({
      parameter: field,
      code: 'required',
      detail: `is a required column; it is recognised as ${names.join(', ')}, in either letter case`,
      allowed: names,
    }),
  )
  if (columns.mmsi >= 0 || columns.eni >= 0) return missing
  const allowed = [...namesOf('mmsi'), ...namesOf('eni')]
  const detail = `or eni is a required column, as one of them tells vessels apart; they are recognised as ${allowed.join(', ')}`
  return [...missing, { parameter: 'mmsi', code: 'required', detail, allowed }]
}

const clash = (name: string, first: string, { field, names }: Column): FaultItem => ({
  parameter: name,
  code: 'clash',
  detail: `is a second column for ${field}, beside ${first}; keep one of them`,
  allowed: names,
})

/**
 * Where the fields of a log are, by the names in its header.
 *
 * @param names  cells of the header, in order
 * @param line  physical line of the header, from 1
 */
export function layoutOf(names: readonly string[], line: number): LayoutResult {
  const columns = noColumns()
  const ignored = new Set<string>()
  const errors: FaultItem[] = []
  const written = names.map((name) => name.trim())
  let publication: Publication | undefined
  for (const [index, name] of written.entries()) {
    const column = columnOf(name)
    if (!column) {
      if (name !== '') ignored.add(name)
    } else if (columns[column.field] >= 0) {
      errors.push(clash(name, written[columns[column.field]] ?? '', column))
    } else {
      columns[column.field] = index
      publication ??= publicationOf(column, name)
    }
  }
  errors.push(...missingOf(columns))
  if (errors.length > 0) return { errors: errors.map((item) => ({ ...item, line })) }
  return { layout: layoutWith(columns, written, [...ignored], publication) }
}

/** A layout whose times are written as in the publication, when it is one. */
export function layoutWith(
  columns: Readonly<Record<Field, number>>,
  names: readonly string[],
  ignoredColumns: readonly string[],
  publication: Publication | undefined,
): Layout {
  return {
    columns,
    names,
    ignoredColumns,
    publication,
    isZoneless: publication !== undefined,
    isDayFirst: publication === 'danish',
  }
}
