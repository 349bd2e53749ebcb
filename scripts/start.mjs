import { spawn, spawnSync } from 'node:child_process'
import { existsSync, readdirSync, statSync } from 'node:fs'
import { fileURLToPath } from 'node:url'

const root = fileURLToPath(new URL('..', import.meta.url))
const server = `${root}dist/server.js`

/** Time of the latest change below a folder, in milliseconds. */
function latestChange(folder) {
  const names = readdirSync(folder, { recursive: true, encoding: 'utf8' })
  return Math.max(...names.map((name) => statSync(`${folder}/${name}`).mtimeMs))
}

const isBuilt = existsSync(server)
// The image has no sources: what it was built with is all there is.
const hasSources = existsSync(`${root}src`)
if (hasSources && (!isBuilt || statSync(server).mtimeMs < latestChange(`${root}src`))) {
  const compiler = `${root}node_modules/typescript/bin/tsc`
  const { status } = spawnSync(process.execPath, [compiler, '-p', 'tsconfig.build.json'], {
    cwd: root,
    stdio: 'inherit',
  })
  if (status !== 0) process.exit(status ?? 1)
}

const child = spawn(process.execPath, [server], { stdio: 'inherit' })
for (const signal of ['SIGTERM', 'SIGINT', 'SIGHUP']) process.on(signal, () => child.kill(signal))
child.on('exit', (code, signal) => process.exit(code ?? (signal === null ? 1 : 0)))
