import { readFileSync } from 'node:fs'
import { expect, test } from 'vitest'
import { Environment, readConfig } from '../../src/config.ts'

const example = readFileSync(new URL('../../.env.example', import.meta.url), 'utf8')
const assigned = [...example.matchAll(/^([A-Z_]+)=(.*)$/gm)].map(([, name = '', value = '']) => ({
  name,
  value,
}))

test('.env.example and the configuration name the same variables', () => {
  expect(assigned.map(({ name }) => name).sort()).toEqual(Object.keys(Environment.shape).sort())
})

test('.env.example holds the defaults', () => {
  const given = Object.fromEntries(assigned.map(({ name, value }) => [name, value]))
  expect(readConfig(given)).toEqual(readConfig({}))
})

test('every variable in .env.example has a comment above it', () => {
  for (const { name } of assigned) expect(example, name).toMatch(new RegExp(`^# .+\\n${name}=`, 'm'))
})
