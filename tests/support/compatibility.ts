type Json = Readonly<Record<string, unknown>>
type Mode = 'request' | 'reply'

/** Two documents of one interface: what callers were promised, and what they get now. */
interface Both {
  readonly before: Json
  readonly after: Json
}

const isObject = (value: unknown): value is Json =>
  typeof value === 'object' && value !== null && !Array.isArray(value)
const object = (value: unknown): Json => (isObject(value) ? value : {})
const list = (value: unknown): readonly unknown[] => (Array.isArray(value) ? value : [])

/**
 * Everything in a later OpenAPI document that breaks a caller of an earlier one, as sentences with the place in front.
 * Additions are none: paths, operations, statuses, media types, optional parameters and fields, fields of replies,
 * wider bounds and more values in requests, more values of codes in replies.
 */
export function breaks(before: unknown, after: unknown): string[] {
  const both = { before: object(before), after: object(after) }
  return pairs(both.before['paths'], both.after['paths'], '').flatMap((path) =>
    'broken' in path
      ? [path.broken]
      : pairs(path.before, path.after, `${path.place} `).flatMap((operation) =>
          'broken' in operation ? [operation.broken] : operationBreaks(operation, both),
        ),
  )
}

type Pair = { before: unknown; after: unknown; place: string; name: string }

/** Members of an earlier object with what they are now; a sentence for each that is gone. */
function pairs(before: unknown, after: unknown, place: string): (Pair | { broken: string })[] {
  const now = object(after)
  return Object.entries(object(before)).map(([name, value]) =>
    Object.hasOwn(now, name)
      ? { name, before: value, after: now[name], place: `${place}${name}` }
      : { broken: `${place}${name}: removed` },
  )
}

function operationBreaks({ before, after, place }: Pair, both: Both): string[] {
  const [old, now] = [object(before), object(after)]
  const responses = pairs(old['responses'], now['responses'], `${place} `)
  return [
    ...parameterBreaks(old, now, place, both),
    ...bodyBreaks(old['requestBody'], now['requestBody'], place, both),
    ...responses.flatMap((reply) =>
      'broken' in reply ? [reply.broken] : contentBreaks(reply, 'reply', both),
    ),
  ]
}

function parameterBreaks(old: Json, now: Json, place: string, both: Both): string[] {
  const named = (operation: Json) =>
    Object.fromEntries(
      list(operation['parameters'])
        .map(object)
        .map((parameter) => [`${String(parameter['in'])} ${String(parameter['name'])}`, parameter]),
    )
  const [earlier, later] = [named(old), named(now)]
  const required = Object.keys(later)
    .filter((name) => later[name]?.['required'] === true && earlier[name]?.['required'] !== true)
    .map((name) => `${place} ${name}: newly required`)
  const compared = pairs(earlier, later, `${place} `).flatMap((pair) =>
    'broken' in pair
      ? [pair.broken]
      : new Comparison('request', both).run(
          object(pair.before)['schema'],
          object(pair.after)['schema'],
          pair.place,
        ),
  )
  return [...required, ...compared]
}

function bodyBreaks(before: unknown, after: unknown, place: string, both: Both): string[] {
  const [old, now] = [object(before), object(after)]
  const isNewlyRequired = now['required'] === true && old['required'] !== true
  return [
    ...(isNewlyRequired ? [`${place} body: newly required`] : []),
    ...contentBreaks({ before: old, after: now, place: `${place} body`, name: 'body' }, 'request', both),
  ]
}

function contentBreaks({ before, after, place }: Pair, mode: Mode, both: Both): string[] {
  return pairs(object(before)['content'], object(after)['content'], `${place} `).flatMap((media) =>
    'broken' in media
      ? [media.broken]
      : new Comparison(mode, both).run(
          object(media.before)['schema'],
          object(media.after)['schema'],
          `${media.place} #`,
        ),
  )
}

const LOWER = ['minimum', 'exclusiveMinimum', 'minLength', 'minItems', 'minProperties']
const UPPER = ['maximum', 'exclusiveMaximum', 'maxLength', 'maxItems', 'maxProperties']
const FORMS = ['pattern', 'format', 'multipleOf']

/** Fields of replies whose values callers are told to expect more of. */
const isOpenEnded = (place: string): boolean => /\/(code|slug|\w+_code)(\[\])?$/.test(place)

const typesOf = (schema: Json): readonly string[] | undefined =>
  schema['type'] === undefined ? undefined : ([schema['type']].flat() as string[])
const valuesOf = (schema: Json): readonly unknown[] | undefined =>
  'const' in schema ? [schema['const']] : Array.isArray(schema['enum']) ? schema['enum'] : undefined
const branchesOf = (schema: Json): readonly unknown[] | undefined => {
  const union = schema['anyOf'] ?? schema['oneOf']
  return Array.isArray(union) ? union : undefined
}

/** Holds one schema against a later one; a schema may contain itself, so each pair of names is looked at once. */
class Comparison {
  readonly #mode: Mode
  readonly #both: Both
  readonly #seen = new Set<string>()

  constructor(mode: Mode, both: Both) {
    this.#mode = mode
    this.#both = both
  }

  run(before: unknown, after: unknown, place: string): string[] {
    const names = `${String(object(before)['$ref'])} ${String(object(after)['$ref'])}`
    if ('$ref' in object(before) && this.#seen.has(names)) return []
    this.#seen.add(names)
    const old = resolved(before, this.#both.before)
    const now = resolved(after, this.#both.after)
    if (branchesOf(old) ?? branchesOf(now)) return this.#union(old, now, place)
    return [
      ...this.#types(old, now, place),
      ...this.#values(old, now, place),
      ...(this.#mode === 'request' ? narrowedBounds(old, now, place) : []),
      ...this.#fields(old, now, place),
      ...this.#items(old, now, place),
    ]
  }

  #fits(before: unknown, after: unknown, place: string): boolean {
    return new Comparison(this.#mode, this.#both).run(before, after, place).length === 0
  }

  /** Every earlier branch is among the later ones; in a reply every later one is among the earlier ones too. */
  #union(old: Json, now: Json, place: string): string[] {
    const [earlier, later] = [branchesOf(old) ?? [old], branchesOf(now) ?? [now]]
    const lost = earlier.filter((a) => !later.some((b) => this.#fits(a, b, place)))
    const added = later.filter((b) => !earlier.some((a) => this.#fits(a, b, place)))
    return [
      ...(lost.length > 0 ? [`${place}: ${lost.length} alternatives removed or changed`] : []),
      ...(this.#mode === 'reply' && added.length > 0 ? [`${place}: ${added.length} alternatives new`] : []),
    ]
  }

  #types(old: Json, now: Json, place: string): string[] {
    const [earlier, later] = [typesOf(old), typesOf(now)]
    const [narrow, wide] = this.#mode === 'request' ? [earlier, later] : [later, earlier]
    if (wide === undefined) return []
    const covers = (type: string) => wide.includes(type) || (type === 'integer' && wide.includes('number'))
    if (narrow?.every(covers) === true) return []
    return [`${place}: type ${earlier?.join() ?? 'any'} became ${later?.join() ?? 'any'}`]
  }

  #values(old: Json, now: Json, place: string): string[] {
    const [earlier, later] = [valuesOf(old), valuesOf(now)]
    const found: string[] = []
    if (later && !earlier && this.#mode === 'request') found.push(`${place}: now one of a list`)
    if (earlier && !later && this.#mode === 'reply') found.push(`${place}: no longer one of a list`)
    if (!earlier || !later) return found
    for (const value of earlier)
      if (!later.includes(value)) found.push(`${place}: value ${String(value)} removed`)
    if (this.#mode === 'request' || isOpenEnded(place)) return found
    for (const value of later)
      if (!earlier.includes(value)) found.push(`${place}: value ${String(value)} new`)
    return found
  }

  #fields(old: Json, now: Json, place: string): string[] {
    const fields = pairs(old['properties'], now['properties'], `${place}/`).flatMap((field) =>
      'broken' in field ? [field.broken] : this.run(field.before, field.after, field.place),
    )
    const [earlier, later] = [list(old['required']), list(now['required'])]
    const [must, may, words] =
      this.#mode === 'request'
        ? [later, earlier, 'newly required']
        : [earlier, later, 'no longer in every reply']
    const required = must
      .filter((name) => !may.includes(name) && (this.#mode === 'request' || hasField(now, name)))
      .map((name) => `${place}/${String(name)}: ${words}`)
    return [...fields, ...required, ...this.#others(old, now, place)]
  }

  /** Members that are not named. */
  #others(old: Json, now: Json, place: string): string[] {
    const [earlier, later] = [old['additionalProperties'], now['additionalProperties']]
    if (this.#mode === 'request' && earlier !== false && later === false)
      return [`${place}: now takes named fields alone`]
    return isObject(earlier) && isObject(later) ? this.run(earlier, later, `${place}/*`) : []
  }

  #items(old: Json, now: Json, place: string): string[] {
    const [earlier, later] = [list(old['prefixItems']), list(now['prefixItems'])]
    const count = earlier.length === later.length ? [] : [`${place}: a list of another length`]
    const places = earlier
      .slice(0, later.length)
      .flatMap((item, i) => this.run(item, later[i], `${place}/${i}`))
    const rest = isObject(old['items']) || isObject(now['items'])
    return [...count, ...places, ...(rest ? this.run(old['items'], now['items'], `${place}[]`) : [])]
  }
}

const hasField = (schema: Json, name: unknown): boolean =>
  Object.hasOwn(object(schema['properties']), String(name))

/** A schema behind its reference, with what stands beside the reference. */
function resolved(schema: unknown, document: Json): Json {
  const { $ref, ...beside } = object(schema)
  if (typeof $ref !== 'string') return beside
  const target = $ref
    .replace(/^#\//, '')
    .split('/')
    .reduce<unknown>((value, key) => object(value)[key], document)
  return { ...resolved(target, document), ...beside }
}

function narrowedBounds(old: Json, now: Json, place: string): string[] {
  const isNarrower = (name: string, sign: 1 | -1): boolean => {
    const [earlier, later] = [old[name], now[name]]
    return typeof later === 'number' && (typeof earlier !== 'number' || sign * later > sign * earlier)
  }
  const narrower = [
    ...LOWER.filter((name) => isNarrower(name, 1)),
    ...UPPER.filter((name) => isNarrower(name, -1)),
    ...FORMS.filter((name) => now[name] !== undefined && now[name] !== old[name]),
  ]
  return narrower.map(
    (name) =>
      `${place}: ${name} became ${JSON.stringify(now[name])}, from ${JSON.stringify(old[name] ?? null)}`,
  )
}
