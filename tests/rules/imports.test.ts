import { readFileSync } from 'node:fs'
import { posix } from 'node:path'
import ts from 'typescript'
import { expect, test } from 'vitest'
import { sources } from '../support/sources.ts'

interface Rule {
  /** Folders and files of src that may be imported; with `(types)`, by `import type` only. */
  readonly src: readonly string[]
  /** Packages, exact or up to `*`. */
  readonly packages: readonly string[]
}

const HTTP_PACKAGES = [
  'fastify',
  '@fastify/*',
  'lru-cache',
  'prom-client',
  'zod',
  'csv-*',
  'fastest-levenshtein',
  'canonicalize',
  'node:*',
]

const TABLE: Readonly<Record<string, Rule>> = {
  domain: { src: [], packages: [] },
  hydro: { src: [], packages: [] },
  geo: { src: ['domain'], packages: ['@turf/*', 'flatbush'] },
  advisory: { src: ['domain', 'hydro'], packages: [] },
  passages: { src: ['domain', 'hydro', 'geo', 'advisory'], packages: ['d3-array'] },
  calibration: { src: ['domain', 'hydro', 'advisory'], packages: ['d3-*'] },
  limits: { src: ['domain', 'hydro', 'advisory'], packages: [] },
  threads: { src: ['passages', 'limits'], packages: ['piscina', 'node:*'] },
  jobs: { src: ['domain', 'limits', 'threads', 'store (types)'], packages: ['pg-boss', 'node:*'] },
  report: { src: ['domain', 'advisory', 'calibration', 'limits', 'store (types)'], packages: ['d3-*'] },
  store: { src: ['domain', 'geo'], packages: ['kysely', 'better-sqlite3', 'pg', 'node:*'] },
  access: { src: ['domain', 'store (types)'], packages: ['node:*'] },
  http: {
    src: [
      'domain',
      'geo',
      'advisory',
      'passages',
      'calibration',
      'limits',
      'report',
      'access',
      'jobs (types)',
      'store (types)',
      'threads (types)',
    ],
    packages: HTTP_PACKAGES,
  },
  'config.ts': { src: [], packages: ['zod', 'node:net', 'node:os'] },
  'app.ts': { src: ['http', 'config.ts (types)'], packages: ['fastify'] },
  'parts.ts': { src: ['*'], packages: ['node:*'] },
  'server.ts': { src: ['*'], packages: ['*'] },
  'verify.ts': { src: ['*'], packages: ['node:*'] },
  'keys.ts': { src: ['*'], packages: ['node:*'] },
  'copies.ts': { src: ['*'], packages: ['node:*'] },
}

interface Import {
  readonly name: string
  readonly isType: boolean
}

function importsOf(text: string): Import[] {
  return ts.preProcessFile(text, true, true).importedFiles.map(({ fileName, pos }) => {
    const before = text.slice(0, pos)
    const start = Math.max(before.lastIndexOf('import'), before.lastIndexOf('export'))
    return { name: fileName, isType: /^(import|export) type\b/.test(text.slice(start)) }
  })
}

const allows = (list: readonly string[], name: string): boolean =>
  list.some((entry) => (entry.endsWith('*') ? name.startsWith(entry.slice(0, -1)) : entry === name))

/** What a file imports against the table, as sentences. */
function violations(path: string, text: string): string[] {
  const owner = path.split('/')[0] ?? path
  const rule = TABLE[owner]
  if (!rule) return [`${path}: ${owner} has no row in the table of imports`]
  return importsOf(text).flatMap(({ name, isType }) => {
    const complaint = [`${path} imports ${name}`]
    if (!name.startsWith('.')) return allows(rule.packages, name) ? [] : complaint
    const target = posix.join(posix.dirname(path), name).split('/')[0] ?? ''
    const isAllowed =
      target === owner || allows(rule.src, target) || (isType && rule.src.includes(`${target} (types)`))
    return isAllowed ? [] : complaint
  })
}

function hasDynamicImport(text: string): boolean {
  const visit = (node: ts.Node): boolean =>
    (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword) ||
    (ts.forEachChild(node, visit) ?? false)
  return visit(ts.createSourceFile('file.ts', text, ts.ScriptTarget.Latest, true))
}

test('every file imports only what its folder may', () => {
  const files = sources()
  expect(files.length).toBeGreaterThan(20)
  expect(files.flatMap(({ path, text }) => violations(path, text))).toEqual([])
})

test('no file imports dynamically, which the table could not see', () => {
  const found = sources().filter(({ text }) => hasDynamicImport(text))
  expect(found.map(({ path }) => path)).toEqual([])
})

test.each([
  ['hydro/a.ts', "import { b } from '../domain/b.ts'"],
  ['hydro/a.ts', "import type { b } from '../domain/b.ts'"],
  ['hydro/waves/a.ts', "import { b } from '../../advisory/b.ts'"],
  ['domain/a.ts', "import 'node:fs'"],
  ['advisory/a.ts', "export * from '../http/b.ts'"],
  ['advisory/a.ts', "import {\n  b,\n} from 'zod'"],
  ['http/a.ts', "import { b } from '../store/b.ts'"],
  ['http/a.ts', "import { b } from '../hydro/b.ts'"],
  ['http/a.ts', "import type { b } from '../hydro/b.ts'"],
  ['report/a.ts', "import { b } from '../http/b.ts'"],
  ['http/a.ts', "import { b } from 'pino'"],
  ['http/a.ts', "import { b } from 'kysely'"],
  ['access/a.ts', "import { b } from '../store/b.ts'"],
  ['store/a.ts', "import { b } from '../access/b.ts'"],
  ['app.ts', "import { b } from './config.ts'"],
  ['utils/a.ts', ''],
])('in %s the line %j breaks the table', (path, text) => {
  expect(violations(path, text)).toHaveLength(1)
})

test.each([
  ['hydro/waves/a.ts', "import { b } from '../b.ts'"],
  ['http/a.ts', "import type { b } from '../store/b.ts'"],
  ['http/a.ts', "import b from '@fastify/swagger'\nimport { c } from 'csv-parse/sync'\nimport 'node:zlib'"],
  ['store/a.ts', "import pg from 'pg'\nimport { b } from 'kysely'"],
  ['access/a.ts', "import type { b } from '../store/b.ts'"],
  ['app.ts', "import type { b } from './config.ts'"],
  ['server.ts', "import { b } from './geo/b.ts'\nimport { c } from 'pino'"],
])('in %s the line %j keeps to the table', (path, text) => {
  expect(violations(path, text)).toEqual([])
})

test('a dynamic import is seen wherever it stands', () => {
  expect(hasDynamicImport('const f = async () => [await import(name)]')).toBe(true)
  expect(hasDynamicImport("// import('x')\nconst text = 'import(x)'")).toBe(false)
})

// 2026-12-01: a package that only tests were meant to need was missing from the image
test('every package that the service imports is one that is installed with it', () => {
  const { dependencies } = JSON.parse(
    readFileSync(new URL('../../package.json', import.meta.url), 'utf8'),
  ) as { dependencies: Record<string, string> }
  const names = sources().flatMap(({ text }) =>
    importsOf(text)
      .filter(({ name, isType }) => !isType && !name.startsWith('.') && !name.startsWith('node:'))
      .map(({ name }) =>
        name
          .split('/')
          .slice(0, name.startsWith('@') ? 2 : 1)
          .join('/'),
      ),
  )
  expect(new Set(names).size).toBeGreaterThan(10)
  expect([...new Set(names)].filter((name) => !(name in dependencies))).toEqual([])
})
