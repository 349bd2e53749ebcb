import { z } from 'zod'

// Only plain decimals: no empty text, white space, hexadecimal or exponent, which a number constructor would take.
const DECIMAL = /^-?(?:\d+(?:\.\d+)?|\.\d+)$/

const toNumber = (text: unknown): unknown =>
  typeof text === 'string' && DECIMAL.test(text) ? Number(text) : text
const toBoolean = (text: unknown): unknown => (text === 'true' ? true : text === 'false' ? false : text)

// Preprocess steps, unlike transforms, leave the schema that follows to describe the parameter in the documentation.

/** A decimal number in a query or path, bounds included. */
export const numberParameter = (min: number, max: number) =>
  z.preprocess(toNumber, z.number().min(min).max(max))

/** A whole number in a query or path, bounds included. */
export const integerParameter = (min: number, max: number) =>
  z.preprocess(toNumber, z.int().min(min).max(max))

/** `true` or `false`, in those letters. */
export const booleanParameter = () => z.preprocess(toBoolean, z.boolean())

/** One of a list of words. */
export const enumParameter = <const Values extends readonly [string, ...string[]]>(values: Values) =>
  z.enum(values)
