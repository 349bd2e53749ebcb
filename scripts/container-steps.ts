import { execFileSync, spawn } from 'node:child_process'
import { once } from 'node:events'
import {
  chmodSync,
  cpSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  rmSync,
  statSync,
} from 'node:fs'
import { createServer, type AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { basename, dirname, join } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { fileURLToPath } from 'node:url'

/**
 * Runs the steps of docker/Dockerfile without Docker, each stage in an empty folder of its own, then starts the result as its
 * user and asks whether it is healthy. The base image is the machine: its Node, its packages.
 */

const ROOT = fileURLToPath(new URL('..', import.meta.url))

interface Step {
  readonly word: string
  readonly rest: string
}

/** Instructions with their continued lines joined, comments left out. */
function stepsOf(text: string): Step[] {
  const lines = text.replace(/^\s*#.*\n/gm, '').replaceAll(/\\\n\s*/g, '')
  return lines.split('\n').flatMap((line) => {
    const [, word, rest] = /^([A-Z]+)\s+(.*)$/.exec(line) ?? []
    return word === undefined || rest === undefined ? [] : [{ word, rest }]
  })
}

/** The file system of one stage. */
class Stage {
  readonly root = mkdtempSync(join(tmpdir(), 'container-'))
  workdir = '/'
  user: number | undefined
  command: string[] = []
  check: string[] = []
  readonly environment: Record<string, string> = {}

  constructor() {
    chmodSync(this.root, 0o755)
  }

  path(name: string): string {
    return join(this.root, name.startsWith('/') ? name : join(this.workdir, name))
  }
}

/** Where the machine differs from the base image: its headers of Node, its way to the registry of packages. */
const MACHINE: Readonly<Record<string, string | undefined>> = {
  npm_config_nodedir: join(dirname(process.execPath), '..'),
  ...Object.fromEntries(
    Object.entries(process.env).filter(([name]) =>
      /^(https?_proxy|no_proxy|npm_config_registry|node_extra_ca_certs)$/i.test(name),
    ),
  ),
}

const log = (text: string): void => void process.stdout.write(`${text}\n`)

function run(stage: Stage, command: string): void {
  const isRoot = process.getuid?.() === 0
  // packages of the machine are part of what stands for the base image
  const isThere =
    command.startsWith('apt-get') && existsSync('/usr/bin/g++') && existsSync('/usr/bin/python3')
  if (isThere) {
    log('  the packages are there')
    return
  }
  if (!isRoot && /\b(apt-get|chown)\b/.test(command)) throw new Error(`Only root can run: ${command}`)
  execFileSync('sh', ['-ec', command], {
    cwd: stage.path('.'),
    env: { PATH: process.env['PATH'], HOME: stage.root, ...stage.environment, ...MACHINE },
    stdio: ['ignore', 'ignore', 'inherit'],
  })
}

function copy(stage: Stage, rest: string, stages: ReadonlyMap<string, Stage>): void {
  const [, from, names = ''] = /^(?:--from=(\S+)\s+)?(.*)$/.exec(rest) ?? []
  const words = names.split(/\s+/)
  const target = words.pop() ?? '.'
  for (const word of words) {
    const source = from === undefined ? join(ROOT, word) : stages.get(from)?.path(word)
    if (source === undefined) throw new Error(`There is no stage ${from}`)
    const isFolder = statSync(source).isDirectory()
    const place = stage.path(target)
    cpSync(source, isFolder ? place : join(place, basename(source)), {
      recursive: true,
      verbatimSymlinks: true,
    })
  }
}

function perform(stage: Stage, { word, rest }: Step, stages: ReadonlyMap<string, Stage>): void {
  if (word === 'WORKDIR') {
    stage.workdir = rest
    mkdirSync(stage.path('.'), { recursive: true })
  } else if (word === 'RUN') run(stage, rest)
  else if (word === 'COPY') copy(stage, rest, stages)
  else if (word === 'USER') stage.user = Number(rest.split(':')[0])
  else if (word === 'CMD') stage.command = JSON.parse(rest) as string[]
  else if (word === 'HEALTHCHECK') stage.check = JSON.parse(rest.slice(rest.indexOf('CMD') + 3)) as string[]
  else if (word === 'ENV') {
    for (const [, name = '', value = ''] of rest.matchAll(/(\w+)=(\S+)/g)) stage.environment[name] = value
  } else if (word !== 'VOLUME' && word !== 'EXPOSE') throw new Error(`${word} is not understood`)
}

async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1')
  await once(server, 'listening')
  const { port } = server.address() as AddressInfo
  server.close()
  return port
}

/** Starts what the last stage holds, as its user, and runs its health check until it succeeds. */
async function start(stage: Stage): Promise<void> {
  const port = await freePort()
  // the machine is no container: only this address, and the demo instead of a key
  const env = { PATH: process.env['PATH'], ...stage.environment, HOST: '127.0.0.1', PORT: String(port) }
  const [program = '', ...parameters] = stage.command
  const options = {
    cwd: stage.path('.'),
    env,
    ...(process.getuid?.() === 0 && { uid: stage.user, gid: stage.user }),
  }
  const child = spawn(program, parameters, { ...options, stdio: ['ignore', 'ignore', 'inherit'] })
  try {
    for (let attempt = 1; ; attempt += 1) {
      const [name = '', ...rest] = stage.check
      const check = spawn(name, rest, { ...options, stdio: 'ignore' })
      const [code] = (await once(check, 'exit')) as [number]
      if (code === 0) break
      if (attempt === 40 || child.exitCode !== null) throw new Error('The service does not become healthy')
      await wait(250)
    }
    const ready: unknown = await (await fetch(`http://127.0.0.1:${port}/health/ready`)).json()
    const page = await fetch(`http://127.0.0.1:${port}/`)
    log(`healthy as user ${stage.user}: ${JSON.stringify(ready)}; overview ${page.status}`)
    if (!page.ok) throw new Error('The overview is not answered')
    const writable = execFileSync(
      'find',
      [stage.root, '-writable', '-not', '-path', '*/data*', '-type', 'd'],
      {
        ...options,
        encoding: 'utf8',
      },
    ).trim()
    if (process.getuid?.() === 0 && writable !== '') throw new Error(`Its user may write to ${writable}`)
  } finally {
    child.kill('SIGTERM')
    const [code] = (await once(child, 'exit')) as [number | null]
    log(`stopped with ${code}`)
  }
}

const stages = new Map<string, Stage>()
let stage: Stage | undefined
try {
  for (const step of stepsOf(readFileSync(join(ROOT, 'docker/Dockerfile'), 'utf8'))) {
    log(`${step.word} ${step.rest.slice(0, 110)}`)
    if (step.word === 'FROM') {
      stage = new Stage()
      stages.set(/ AS (\S+)$/.exec(step.rest)?.[1] ?? 'final', stage)
    } else if (stage) perform(stage, step, stages)
  }
  if (!stage) throw new Error('The file has no stage')
  const size = execFileSync('du', ['-sm', stage.root], { encoding: 'utf8' }).split('\t')[0] ?? ''
  log(`${size} MB on top of the base image`)
  await start(stage)
} finally {
  for (const { root } of stages.values()) rmSync(root, { recursive: true, force: true })
}
