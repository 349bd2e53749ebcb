/** JSON in which the order of fields does not matter: names sorted at every level, absent fields not written. */
export function canonical(value: unknown): string {
  return JSON.stringify(value, (_name, part: unknown) => (isFields(part) ? sorted(part) : part))
}

const isFields = (value: unknown): value is Readonly<Record<string, unknown>> =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

const sorted = (fields: Readonly<Record<string, unknown>>): Record<string, unknown> =>
  Object.fromEntries(Object.entries(fields).sort(([a], [b]) => (a < b ? -1 : 1)))

/** Names, sorted, of the fields that two contents do not have in common. */
export function changedNames(
  before: Readonly<Record<string, unknown>>,
  after: Readonly<Record<string, unknown>>,
): readonly string[] {
  const names = new Set([...Object.keys(before), ...Object.keys(after)])
  return [...names].filter((name) => canonical(before[name]) !== canonical(after[name])).sort()
}
