import { Ajv2020, type ValidateFunction } from 'ajv/dist/2020.js'
import formats from 'ajv-formats'
import type { Json } from './from-schema.ts'
import type { Operation } from './requests.ts'

export interface Reply {
  readonly statusCode: number
  readonly headers: Readonly<Record<string, unknown>>
  readonly body: string
}

const MOST_LINES = 40

/** Holds replies against what the document says about them. */
export class ReplyCheck {
  readonly #ajv = new Ajv2020({ strict: false, allErrors: false })
  readonly #known = new Map<unknown, ValidateFunction>()

  constructor(document: Json) {
    // both forms of import have it, by the way the package is made
    ;(formats as unknown as (ajv: Ajv2020) => void)(this.#ajv)
    this.#ajv.addSchema({ components: document['components'] }, 'document')
  }

  /** What a reply breaks, as a sentence; undefined when nothing. */
  fault(operation: Operation, { statusCode, headers, body }: Reply): string | undefined {
    if (statusCode >= 500) return `status ${statusCode}: ${body.slice(0, 300)}`
    if (statusCode === 304 || statusCode === 204) return body === '' ? undefined : `${statusCode} with a body`
    const documented =
      operation.responses[String(statusCode)] ??
      (statusCode >= 400 ? operation.responses['default'] : undefined)
    if (!documented) return `status ${statusCode} is not documented`
    const type = String(headers['content-type']).split(';')[0] ?? ''
    const media = documented.content?.[type]
    if (!media) return `${statusCode} as ${type} is not documented`
    if (type.endsWith('ndjson')) {
      for (const line of body.split('\n').slice(0, MOST_LINES)) {
        const fault = line === '' ? undefined : this.#json(media.schema, line)
        if (fault !== undefined) return fault
      }
      return undefined
    }
    return type.endsWith('json') ? this.#json(media.schema, body) : undefined
  }

  #json(schema: unknown, text: string): string | undefined {
    let value: unknown
    try {
      value = JSON.parse(text)
    } catch {
      return `not JSON: ${text.slice(0, 200)}`
    }
    const validate = this.#validator(schema)
    if (validate(value)) return undefined
    const [error] = validate.errors ?? []
    return `${error?.instancePath ?? ''} ${error?.message ?? ''}: ${text.slice(0, 300)}`
  }

  #validator(schema: unknown): ValidateFunction {
    const known = this.#known.get(schema)
    if (known) return known
    const text = JSON.stringify(schema ?? {}).replaceAll('"#/components', '"document#/components')
    const made = this.#ajv.compile(JSON.parse(text) as object)
    this.#known.set(schema, made)
    return made
  }
}
