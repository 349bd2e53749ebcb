import { expect, test } from 'vitest'
import { ConfigError, readConfig } from '../src/config.ts'

test('an empty environment gives the defaults, frozen', () => {
  const config = readConfig({ PATH: '/bin', PUBLIC_URL: '' })
  expect(config).toEqual({
    host: '127.0.0.1',
    port: 8080,
    logLevel: 'info',
    bodyLimit: 1_048_576,
    publicUrl: undefined,
    requestTimeout: 30_000,
  })
  expect(Object.isFrozen(config)).toBe(true)
})

test('given values are read, and a URL loses the slash at its end', () => {
  const config = readConfig({ PORT: '0', PUBLIC_URL: 'https://limits.example.org/', LOG_LEVEL: 'debug' })
  expect(config).toMatchObject({ port: 0, publicUrl: 'https://limits.example.org', logLevel: 'debug' })
})

test('every bad value is listed in plain words', () => {
  const environment = {
    PORT: '80a',
    LOG_LEVEL: 'loud',
    BODY_LIMIT_BYTES: '1e6',
    PUBLIC_URL: 'limits.example.org',
    REQUEST_TIMEOUT_MS: '-1',
  }
  let faults: readonly string[] = []
  try {
    readConfig(environment)
  } catch (error) {
    if (error instanceof ConfigError) faults = error.faults
  }
  expect(faults).toEqual([
    'PORT must be a whole number from 0 to 65535',
    'LOG_LEVEL must be one of fatal, error, warn, info, debug, trace, silent',
    'BODY_LIMIT_BYTES must be a whole number from 1024 to 1073741824',
    'PUBLIC_URL must be an absolute http or https URL, such as https://limits.example.org',
    'REQUEST_TIMEOUT_MS must be a whole number from 100 to 3600000',
  ])
})

test.each(['', '65536', '0x50', ' 80', '8.5'])('a port of "%s" is never read as another number', (text) => {
  if (text === '') expect(readConfig({ PORT: text }).port).toBe(8080)
  else expect(() => readConfig({ PORT: text })).toThrow('PORT must be a whole number')
})
