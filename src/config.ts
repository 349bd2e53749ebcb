import { z } from 'zod'

const WHOLE = /^\d+$/

const whole = (min: number, max: number, fallback: number) => {
  const sentence = { error: `must be a whole number from ${min} to ${max}` }
  const number = z.number(sentence).min(min, sentence).max(max, sentence)
  return z
    .preprocess((text) => (typeof text === 'string' && WHOLE.test(text) ? Number(text) : text), number)
    .default(fallback)
}

const LEVELS = ['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent'] as const

/** Every variable that the service reads; the same names, explained, are in `.env.example`. */
export const Environment = z.object({
  HOST: z
    .string()
    .min(1, { error: 'must be a host name or an address, such as 127.0.0.1' })
    .default('127.0.0.1'),
  PORT: whole(0, 65_535, 8080),
  LOG_LEVEL: z.enum(LEVELS, { error: `must be one of ${LEVELS.join(', ')}` }).default('info'),
  BODY_LIMIT_BYTES: whole(1024, 1_073_741_824, 1_048_576),
  PUBLIC_URL: z
    .url({
      protocol: /^https?$/,
      error: 'must be an absolute http or https URL, such as https://limits.example.org',
    })
    .transform((url) => url.replace(/\/+$/, ''))
    .optional(),
  REQUEST_TIMEOUT_MS: whole(100, 3_600_000, 30_000),
})

/** Settings of one process, fixed from start to stop. */
export interface Config {
  readonly host: string
  readonly port: number
  readonly logLevel: (typeof LEVELS)[number]
  /** Bytes of a decoded body, where a route sets no other limit. */
  readonly bodyLimit: number
  readonly publicUrl: string | undefined
  /** Milliseconds in which a body that is read as a whole has to arrive. */
  readonly requestTimeout: number
}

/** Lists everything that is wrong with the environment, a line each. */
export class ConfigError extends Error {
  constructor(readonly faults: readonly string[]) {
    super(`The environment cannot be used:\n${faults.map((fault) => `  ${fault}`).join('\n')}`)
    this.name = 'ConfigError'
  }
}

/** The environment as a frozen Config. An empty value counts as absent, as in files of `NAME=` lines. */
export function readConfig(environment: Readonly<Record<string, string | undefined>>): Config {
  const given = Object.entries(environment).filter(([, value]) => value !== undefined && value !== '')
  const result = Environment.safeParse(Object.fromEntries(given))
  if (!result.success) {
    throw new ConfigError(result.error.issues.map((issue) => `${issue.path.join('.')} ${issue.message}`))
  }
  const { HOST, PORT, LOG_LEVEL, BODY_LIMIT_BYTES, PUBLIC_URL, REQUEST_TIMEOUT_MS } = result.data
  return Object.freeze({
    host: HOST,
    port: PORT,
    logLevel: LOG_LEVEL,
    bodyLimit: BODY_LIMIT_BYTES,
    publicUrl: PUBLIC_URL,
    requestTimeout: REQUEST_TIMEOUT_MS,
  })
}
