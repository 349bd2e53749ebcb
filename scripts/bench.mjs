import { spawnSync } from 'node:child_process'
import { mkdirSync, rmSync, symlinkSync } from 'node:fs'
import { fileURLToPath } from 'node:url'

/** Compiles the sources as the service runs them and measures that: a loader would be measured with them. */

const root = fileURLToPath(new URL('..', import.meta.url))
const built = `${root}dist/bench`

function run(...parameters) {
  const { status } = spawnSync(process.execPath, parameters, { cwd: root, stdio: 'inherit' })
  if (status !== 0) process.exit(status ?? 1)
}

// a link of an earlier run would be written through
rmSync(built, { recursive: true, force: true })
run(
  'node_modules/typescript/bin/tsc',
  '-p',
  'tsconfig.json',
  '--noEmit',
  'false',
  '--outDir',
  built,
  '--rootDir',
  root,
)
// what the sources read beside themselves
mkdirSync(`${built}/openapi`, { recursive: true })
for (const name of ['openapi/examples', 'openapi/openapi.json', 'package.json']) {
  symlinkSync(`${root}${name}`, `${built}/${name}`)
}
run(`${built}/bench/run.js`)
