import { spawnSync } from 'node:child_process'
import { existsSync, readdirSync, statSync } from 'node:fs'
import { fileURLToPath } from 'node:url'

const root = fileURLToPath(new URL('..', import.meta.url))

/** Time of the latest change below a folder, in milliseconds. */
function latestChange(folder) {
  const names = readdirSync(folder, { recursive: true, encoding: 'utf8' })
  return Math.max(...names.map((name) => statSync(`${folder}/${name}`).mtimeMs))
}

/** Path of a program of the service, built when the sources are newer. */
export function built(name) {
  const program = `${root}dist/${name}.js`
  // The image has no sources: what it was built with is all there is.
  const hasSources = existsSync(`${root}src`)
  const isCurrent =
    existsSync(program) && (!hasSources || statSync(program).mtimeMs >= latestChange(`${root}src`))
  if (!isCurrent) {
    const compiler = `${root}node_modules/typescript/bin/tsc`
    const { status } = spawnSync(process.execPath, [compiler, '-p', 'tsconfig.build.json'], {
      cwd: root,
      stdio: 'inherit',
    })
    if (status !== 0) process.exit(status ?? 1)
  }
  return program
}
