import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { clockJumps, threadsKilled } from './faults/inside.ts'
import type { Result } from './faults/result.ts'
import { killed, terminated } from './faults/stopping.ts'
import { databaseGone, diskFull } from './faults/storage.ts'

/** Lets the service meet every fault that it must survive, and tells what was lost: fails unless that is nothing. */

const folder = mkdtempSync(join(tmpdir(), 'faults-'))
const SCENARIOS: readonly (() => Promise<Result>)[] = [
  () => terminated(folder),
  () => killed(folder, 10),
  () => databaseGone(3),
  () => diskFull(folder),
  threadsKilled,
  () => clockJumps(folder),
]

let failures = 0
try {
  for (const scenario of SCENARIOS) {
    const { name, acknowledged, lost, wrong, note } = await scenario()
    failures += lost.length + wrong.length
    process.stdout.write(
      `${name}: ${acknowledged} writes acknowledged, ${lost.length} lost, ${wrong.length} wrong answers\n  ${note}\n`,
    )
    for (const what of [...lost, ...wrong].slice(0, 5)) process.stdout.write(`  ! ${what}\n`)
  }
} finally {
  rmSync(folder, { recursive: true, force: true })
}
process.stdout.write(failures === 0 ? 'Nothing was lost.\n' : `${failures} failures.\n`)
process.exitCode = failures === 0 ? 0 : 1
