import { spawnSync } from 'node:child_process'
import { existsSync, symlinkSync } from 'node:fs'
import { fileURLToPath } from 'node:url'

/** Compiles the sources as the service runs them and measures that: a loader would be measured with them. */

const root = fileURLToPath(new URL('..', import.meta.url))
const built = `${root}dist/bench`

function run(...parameters) {
  const { status } = spawnSync(process.execPath, parameters, { cwd: root, stdio: 'inherit' })
  if (status !== 0) process.exit(status ?? 1)
}

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
for (const name of ['openapi', 'package.json']) {
  if (!existsSync(`${built}/${name}`)) symlinkSync(`${root}${name}`, `${built}/${name}`)
}
run(`${built}/bench/run.js`)
