/**
 * Multiplies each number in src/hydro by 1.01, one at a time, and runs the tests that can see it: each change must fail
 * a test. Works on copies in a temporary directory, never on the working tree.
 *
 *   npm run mutate                     all of src/hydro
 *   npm run mutate -- waves/ root      the files whose path contains one of the words
 *   npm run mutate -- --list           what would be changed, and what is exempt by which rule
 *
 * Exit 1 when a change survives that has no reason in `mutate-reasons.ts`.
 */
import { type ChildProcess, fork } from 'node:child_process'
import {
  cpSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  realpathSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs'
import { tmpdir } from 'node:os'
import { dirname, join, relative, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import ts from 'typescript'
import { createVitest, type Vitest } from 'vitest/node'
import { REASONS } from './mutate-reasons.ts'

const ROOT = resolve(import.meta.dirname, '..')
/** Where sources and tests are read: a copy as well, so that an edit to the working tree meanwhile changes nothing. */
let base = ROOT
const WORKERS = 2
/** A change that sets a loop turning for ever counts as noticed after this long, s. */
const PATIENCE = 90

interface Mutant {
  /** below the root */
  readonly file: string
  readonly start: number
  readonly end: number
  readonly line: number
  readonly literal: string
  readonly mutated: string
  /** the line of source it stands on, trimmed */
  readonly text: string
}

interface Order {
  readonly file: string
  readonly source: string
  /** test files in two stages: the file's own first, the others only if those pass */
  readonly stages: readonly (readonly string[])[]
}

interface ExemptionRule {
  readonly name: string
  readonly reason: string
  applies(node: ts.NumericLiteral): boolean
}

const isBitOperator = (kind: ts.SyntaxKind): boolean =>
  [ts.SyntaxKind.LessThanLessThanToken, ts.SyntaxKind.BarToken, ts.SyntaxKind.AmpersandToken].includes(kind)

/** Number.EPSILON, or a product with it. */
const hasEpsilon = (node: ts.Node): boolean => /^[^+]*\bNumber\.EPSILON\b/.test(node.getText())

const EXEMPTIONS: readonly ExemptionRule[] = [
  { name: 'zero', reason: '0 times 1.01 is 0', applies: (node) => Number(node.text) === 0 },
  {
    name: 'index',
    reason: 'an array index that is no integer is a crash, not a wrong figure',
    applies(node) {
      let at: ts.Node = node
      while (ts.isBinaryExpression(at.parent)) at = at.parent
      return ts.isElementAccessExpression(at.parent) && at.parent.argumentExpression === at
    },
  },
  {
    name: 'counter',
    reason: 'the step or start of a counter',
    applies: ({ parent }) =>
      (ts.isBinaryExpression(parent) &&
        parent.operatorToken.kind === ts.SyntaxKind.PlusEqualsToken &&
        Number(parent.right.getText()) === 1) ||
      (ts.isVariableDeclaration(parent) && ts.isForStatement(parent.parent.parent)) ||
      (ts.isCallExpression(parent) && parent.expression.getText().endsWith('.slice')),
  },
  {
    name: 'bits',
    reason: 'an operand of a bit operator is cut to an integer again',
    applies: ({ parent }) => ts.isBinaryExpression(parent) && isBitOperator(parent.operatorToken.kind),
  },
  {
    name: 'direction',
    reason: 'the sign of a walk to the left or right, compared or multiplied as -1 or 1',
    applies: (node) =>
      (ts.isBinaryExpression(node.parent) && node.parent.left.getText() === 'direction') ||
      (node.getSourceFile().fileName.endsWith('section.ts') && /poolSide\(.*-?1\)/.test(enclosingCall(node))),
  },
  {
    name: 'rounding',
    reason: 'a tolerance in units of the last place: a per cent of it is below anything that a test can tell',
    applies: (node) =>
      Number(node.text) <= 1e-8 || (ts.isBinaryExpression(node.parent) && hasEpsilon(node.parent)),
  },
]

function enclosingCall(node: ts.Node): string {
  let at = node.parent
  while (ts.isPrefixUnaryExpression(at)) at = at.parent
  return ts.isCallExpression(at) ? at.getText() : ''
}

/** Every numeric literal of a file outside types, with the rule that exempts it, if any. */
function literalsOf(file: string): { mutant: Mutant; exemption: ExemptionRule | undefined }[] {
  const text = readFileSync(join(base, file), 'utf8')
  const source = ts.createSourceFile(file, text, ts.ScriptTarget.Latest, true)
  const lines = text.split('\n')
  const found: { mutant: Mutant; exemption: ExemptionRule | undefined }[] = []
  const visit = (node: ts.Node): void => {
    if (ts.isTypeNode(node)) return
    if (ts.isNumericLiteral(node)) {
      const start = node.getStart()
      const { line } = source.getLineAndCharacterOfPosition(start)
      const mutated = String(Number(node.text) * 1.01)
      found.push({
        mutant: {
          file,
          start,
          end: node.end,
          line: line + 1,
          literal: node.getText(),
          mutated,
          text: (lines[line] ?? '').trim(),
        },
        exemption: EXEMPTIONS.find((rule) => rule.applies(node)),
      })
    }
    ts.forEachChild(node, visit)
  }
  visit(source)
  return found
}

function filesBelow(folder: string, ending: string): string[] {
  return readdirSync(join(base, folder), { recursive: true, encoding: 'utf8' })
    .filter((name) => name.endsWith(ending))
    .map((name) => `${folder}/${name}`)
    .sort()
}

/** Every file that a file imports, directly or not, below the root. */
function importsOf(file: string, seen = new Set<string>()): Set<string> {
  if (seen.has(file)) return seen
  seen.add(file)
  const text = readFileSync(join(base, file), 'utf8')
  for (const { fileName } of ts.preProcessFile(text, true, true).importedFiles) {
    if (fileName.startsWith('.')) importsOf(relative(base, resolve(base, dirname(file), fileName)), seen)
  }
  return seen
}

/** The test files that can see a source file: its own, then the others that import it. */
function stagesOf(file: string, reach: ReadonlyMap<string, ReadonlySet<string>>): string[][] {
  const own = file.replace(/^src\//, 'tests/').replace(/\.ts$/, '.test.ts')
  const seeing = [...reach].filter(([, imports]) => imports.has(file)).map(([test]) => test)
  const others = seeing.filter((test) => test !== own)
  return [seeing.filter((test) => test === own), others].filter((stage) => stage.length > 0)
}

/** A copy of what the tests need, with node_modules linked. */
function copyOfTree(parent: string, name: string): string {
  const copy = join(parent, name)
  for (const part of ['src', 'tests', 'package.json', 'tsconfig.json']) {
    cpSync(join(ROOT, part), join(copy, part), { recursive: true })
  }
  symlinkSync(join(ROOT, 'node_modules'), join(copy, 'node_modules'))
  return copy
}

/** A process of its own, with a copy of its own, so that one that hangs can be ended. */
class Worker {
  private child: ChildProcess
  constructor(private readonly copy: string) {
    this.child = this.start()
  }

  private start(): ChildProcess {
    const child = fork(fileURLToPath(import.meta.url), ['--worker', this.copy], {
      execArgv: ['--import', 'tsx'],
      stdio: ['ignore', 'ignore', 'inherit', 'ipc'],
      detached: true,
    })
    children.add(child)
    child.on('exit', () => children.delete(child))
    return child
  }

  /** Whether a test failed with this source in place. */
  async notices(order: Order): Promise<boolean> {
    return new Promise((answer) => {
      const { child } = this
      const done = (isNoticed: boolean): void => {
        clearTimeout(timer)
        child.removeAllListeners('message')
        answer(isNoticed)
      }
      const timer = setTimeout(() => {
        endGroup(child)
        this.child = this.start()
        done(true)
      }, PATIENCE * 1000)
      child.once('message', (isNoticed) => {
        done(isNoticed === true)
      })
      child.send(order)
    })
  }

  end(): void {
    endGroup(this.child)
  }
}

const children = new Set<ChildProcess>()

/** Ends a worker with the processes that its tests run in. */
function endGroup(child: ChildProcess): void {
  if (child.pid !== undefined && child.exitCode === null) {
    try {
      process.kill(-child.pid, 'SIGKILL')
    } catch {
      // already gone
    }
  }
}

/** The worker's side: one vitest for all changes, which forgets the changed file between them. */
async function serve(copy: string): Promise<void> {
  const vitest = await createVitest('test', {
    root: copy,
    config: false,
    watch: false,
    include: ['tests/**/*.test.ts'],
    reporters: [{}],
    bail: 1,
    maxWorkers: 1,
    testTimeout: 60_000,
  })
  process.on('message', (order: Order) => {
    void trial(vitest, copy, order).then((isNoticed) => process.send?.(isNoticed))
  })
}

async function trial(vitest: Vitest, copy: string, order: Order): Promise<boolean> {
  const path = join(copy, order.file)
  const original = readFileSync(path, 'utf8')
  writeFileSync(path, order.source)
  vitest.invalidateFile(path)
  try {
    for (const stage of order.stages) {
      const specifications = await vitest.globTestSpecifications(stage.map((test) => join(copy, test)))
      if (specifications.length < stage.length) throw new Error(`not all found: ${stage.join(' ')}`)
      const { testModules, unhandledErrors } = await vitest.runTestSpecifications(specifications, false)
      // the result also holds what earlier runs left of other files: only this stage counts
      const asked = new Set(specifications.map(({ moduleId }) => moduleId))
      const own = testModules.filter(({ moduleId }) => asked.has(moduleId))
      if (own.length < asked.size) throw new Error(`not all ran: ${stage.join(' ')}`)
      if (unhandledErrors.length > 0 || own.some((module) => module.state() !== 'passed')) return true
    }
    return false
  } finally {
    writeFileSync(path, original)
    vitest.invalidateFile(path)
  }
}

const place = (mutant: Mutant): string => `${mutant.file}:${mutant.line}`

const reasonFor = (mutant: Mutant): string | undefined =>
  REASONS.find(
    (entry) =>
      mutant.file === `src/hydro/${entry.file}` &&
      mutant.text.includes(entry.text) &&
      (entry.literal === undefined || entry.literal === mutant.literal),
  )?.reason

/** The changes to make in the files whose path contains one of the words, all of them without a word. */
function changesIn(words: readonly string[], isListOnly: boolean): Mutant[] {
  const files = filesBelow('src/hydro', '.ts').filter(
    (file) => words.length === 0 || words.some((word) => file.includes(word)),
  )
  const literals = files.flatMap(literalsOf)
  const list = (mutants: readonly Mutant[]): void => {
    if (isListOnly)
      for (const mutant of mutants) console.log(`  ${place(mutant)}  ${mutant.literal}  ${mutant.text}`)
  }
  for (const rule of EXEMPTIONS) {
    const exempt = literals.filter(({ exemption }) => exemption === rule).map(({ mutant }) => mutant)
    console.log(`exempt: ${exempt.length} ${rule.name} (${rule.reason})`)
    list(exempt)
  }
  const mutants = literals.filter(({ exemption }) => !exemption).map(({ mutant }) => mutant)
  console.log(`${mutants.length} changes in ${files.length} files`)
  list(mutants)
  return mutants
}

/** Makes each change in turn and tells which of them no test noticed; undefined when the workers cannot be trusted. */
async function survivorsOf(
  mutants: readonly Mutant[],
  workers: readonly Worker[],
): Promise<Mutant[] | undefined> {
  const reach = new Map(filesBelow('tests/hydro', '.test.ts').map((test) => [test, importsOf(test)]))
  const sources = new Map(mutants.map(({ file }) => [file, readFileSync(join(base, file), 'utf8')]))
  const isSound = async (): Promise<boolean> => {
    const results = await Promise.all(workers.map((worker) => canTell(worker, [...reach.keys()])))
    return results.every(Boolean)
  }
  if (!(await isSound())) return undefined

  const survivors: Mutant[] = []
  const queue = [...mutants]
  let done = 0
  const work = async (worker: Worker): Promise<void> => {
    for (let mutant = queue.shift(); mutant; mutant = queue.shift()) {
      const source = sources.get(mutant.file) ?? ''
      const changed = source.slice(0, mutant.start) + mutant.mutated + source.slice(mutant.end)
      const isNoticed = await worker.notices({
        file: mutant.file,
        source: changed,
        stages: stagesOf(mutant.file, reach),
      })
      done += 1
      if (!isNoticed) {
        survivors.push(mutant)
        console.log(`survived: ${place(mutant)}  ${mutant.literal} -> ${mutant.mutated}  ${mutant.text}`)
        console.log(`          ${reasonFor(mutant) ?? 'NO REASON'}`)
      }
      if (done % 25 === 0) console.log(`${done} of ${mutants.length}, ${survivors.length} survived`)
    }
  }
  await Promise.all(workers.map(work))
  if (!(await isSound())) return undefined
  return survivors
}

/**
 * Whether a worker tells a changed source from a sound one: a wrong g must be noticed, and must leave no trace in the
 * runs of other tests and of the same tests after it.
 */
async function canTell(worker: Worker, tests: readonly string[]): Promise<boolean> {
  const file = 'src/hydro/constants.ts'
  const source = sourceOf(file)
  const wrong = source.replace('9.80665', '9.9047165')
  if (!(await worker.notices({ file, source: wrong, stages: [['tests/hydro/froude.test.ts']] }))) return false
  if (await worker.notices({ file, source, stages: [['tests/hydro/smoothstep.test.ts']] })) return false
  return !(await worker.notices({ file, source, stages: [['tests/hydro/froude.test.ts'], tests] }))
}

const sourceOf = (file: string): string => readFileSync(join(base, file), 'utf8')

async function main(words: readonly string[], isListOnly: boolean): Promise<number> {
  if (isListOnly) {
    changesIn(words, true)
    return 0
  }
  const parent = realpathSync(mkdtempSync(join(tmpdir(), 'mutate-')))
  process.once('exit', () => {
    for (const child of children) endGroup(child)
    rmSync(parent, { recursive: true, force: true })
  })
  for (const signal of ['SIGINT', 'SIGTERM'] as const) process.once(signal, () => process.exit(130))
  base = copyOfTree(parent, 'base')
  const mutants = changesIn(words, false)
  const workers = Array.from({ length: WORKERS }, (_, i) => {
    const copy = join(parent, `copy-${i}`)
    cpSync(base, copy, { recursive: true, verbatimSymlinks: true })
    return new Worker(copy)
  })
  const survivors = await survivorsOf(mutants, workers)
  if (survivors === undefined) {
    console.error('no result: the tests of tests/hydro fail without a change, or a changed g goes unnoticed')
    return 2
  }
  const unexplained = survivors.filter((mutant) => reasonFor(mutant) === undefined)
  console.log(
    `${mutants.length} changes: ${mutants.length - survivors.length} noticed, ${survivors.length} survived, ` +
      `${unexplained.length} of them without a reason`,
  )
  return unexplained.length > 0 ? 1 : 0
}

const [first, ...rest] = process.argv.slice(2)
if (first === '--worker') await serve(rest[0]!)
else {
  const words = process.argv.slice(2)
  process.exit(
    await main(
      words.filter((word) => !word.startsWith('--')),
      words.includes('--list'),
    ),
  )
}
