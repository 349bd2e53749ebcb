import { readFileSync } from 'node:fs'
import { availableParallelism } from 'node:os'
import { inflateSync } from 'node:zlib'
import type { Cell } from './limits/cell.ts'
import { chunksOf, partOf } from './limits/chunks.ts'
import type { RecordWire } from './http/record.ts'
import { Verification, type VerificationWire } from './http/verification.ts'
import { serviceVersion } from './parts.ts'
import { StudyPool } from './threads/study-pool.ts'

/** `npm run verify -- record.json`: recomputes the record of a limit plan, without a database. */

const USAGE = `Usage: npm run verify -- record.json [HASH]

Recomputes the record of a limit plan and says whether every figure comes out again. The record is what
GET /v1/limit-plans/{id}/record gives. HASH is the one that was published with the plan, sha256: and 64 digits, as it
stands on the evidence: a record alone cannot tell that it is the one that was published. The status is 0 when it is reproduced, 1 when it is not, and 2 when the file
cannot be read as a record.
`

function readRecord(path: string): RecordWire {
  const record = JSON.parse(readFileSync(path, 'utf8')) as Partial<RecordWire> | null
  const parts = ['plan', 'study', 'inputs', 'results', 'record_hash'] as const
  const missing = parts.filter((part) => record?.[part] === undefined)
  if (missing.length > 0)
    throw new Error(`it has no ${missing.join(', ')}: it is not the record of a limit plan`)
  return record as RecordWire
}

async function verify(record: RecordWire, recordHash: string | undefined): Promise<VerificationWire> {
  const { study } = record.inputs
  const verification = new Verification(record)
  const pool = new StudyPool(availableParallelism())
  const chunks = chunksOf(study)
  let done = 0
  try {
    const computing = chunks.map(async ([from, to]) => {
      const { content } = await pool.compute(partOf(study, from, to))
      done += 1
      if (process.stderr.isTTY) process.stderr.write(`\r${done} of ${chunks.length} parts`)
      return content
    })
    for (const content of computing)
      verification.add(JSON.parse(inflateSync(await content).toString()) as Cell[])
  } finally {
    await pool.close()
    if (process.stderr.isTTY) process.stderr.write('\r')
  }
  return verification.conclude(serviceVersion(), recordHash === undefined ? undefined : { recordHash })
}

function report(record: RecordWire, found: VerificationWire, recordHash: string | undefined): string {
  const { figures, published_with: published, recomputed_with: recomputed } = found
  const number = record.publication?.number
  return [
    `${record.plan.name}${number === undefined ? ' (draft)' : `, published as ${number}`}`,
    `${found.verdict}: ${found.text}`,
    `record hash    ${found.record_hash}`,
    `computed hash  ${found.computed_hash}`,
    recordHash === undefined
      ? 'Compare it with the hash that was published: a record alone cannot tell that it is the one.'
      : `published hash ${recordHash}`,
    `published with service ${published.service_version}, methods ${published.method_version}; recomputed with service ${recomputed.service_version}, methods ${recomputed.method_version}`,
    `${figures.compared} figures compared, ${figures.equal} equal, ${figures.different} different, by at most ${found.largest_difference_mps} m/s`,
    ...found.differences.map(
      ({ pointer, field, published: was, recomputed: is }) =>
        `  ${pointer} ${field}: ${JSON.stringify(was)}, now ${JSON.stringify(is)}`,
    ),
    '',
  ].join('\n')
}

const HASH = /^sha256:[0-9a-f]{64}$/
const [path, hash, ...rest] = process.argv.slice(2)
const isHash = hash === undefined || HASH.test(hash)
if (path === undefined || !isHash || rest.length > 0 || path === '--help') {
  process.stderr.write(USAGE)
  process.exitCode = 2
} else {
  try {
    const record = readRecord(path)
    const found = await verify(record, hash)
    process.stdout.write(report(record, found, hash))
    process.exitCode = found.verdict === 'reproduced' ? 0 : 1
  } catch (error) {
    process.stderr.write(
      `${path} cannot be verified: ${error instanceof Error ? error.message : String(error)}\n`,
    )
    process.exitCode = 2
  }
}
