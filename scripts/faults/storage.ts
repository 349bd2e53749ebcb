import { execFileSync } from 'node:child_process'
import { mkdirSync } from 'node:fs'
import { setTimeout as wait } from 'node:timers/promises'
import { startPostgres } from '../../tests/support/postgres.ts'
import { startService } from '../load/service-process.ts'
import type { Result } from './result.ts'
import { asker, ledger, lostOf, shown, writer } from './writers.ts'

const WRITERS = 4

const statusOf = async (url: string): Promise<number> => (await fetch(url)).status

async function until(holds: () => Promise<boolean>, seconds: number): Promise<boolean> {
  const end = performance.now() + seconds * 1000
  while (performance.now() < end) {
    if (await holds()) return true
    await wait(50)
  }
  return false
}

/** PostgreSQL that stops and starts under load, without a restart of the service. */
export async function databaseGone(rounds: number): Promise<Result> {
  const server = await startPostgres()
  try {
    const service = await startService({ environment: { DATABASE_URL: server.url } })
    const { url } = service
    const book = ledger()
    let isOver = false
    const over = (): boolean => isOver
    const working = [
      ...Array.from({ length: WRITERS }, (_, i) => writer(url, `w${i}`, over, book)),
      asker(url, over, book),
    ]
    const wrong: string[] = []
    for (let round = 1; round <= rounds; round += 1) {
      await wait(1000)
      await server.stop()
      const isTold = await until(async () => (await statusOf(`${url}/health/ready`)) === 503, 10)
      if (!isTold) wrong.push(`round ${round}: ready without a database`)
      if ((await statusOf(`${url}/health/live`)) !== 200) wrong.push(`round ${round}: not alive`)
      if (!(await (await fetch(`${url}/metrics`)).text()).includes('washlimit_database_up 0'))
        wrong.push(`round ${round}: figures do not tell`)
      await wait(500)
      await server.start()
      if (!(await until(async () => (await statusOf(`${url}/health/ready`)) === 200, 20)))
        wrong.push(`round ${round}: not ready again`)
    }
    await wait(500)
    isOver = true
    await Promise.all(working)
    const lost = await lostOf(url, book)
    service.child.kill('SIGTERM')
    const code = await service.ended()
    if (code !== 0) wrong.push(`ended with ${code}`)
    return {
      name: `PostgreSQL gone and back, ${rounds} times`,
      acknowledged: book.acknowledged.length,
      lost,
      wrong: [...wrong, ...book.wrong],
      note: shown(book),
    }
  } finally {
    await server.remove()
  }
}

/** A small file system of its own; undefined where this process may not mount one. */
function smallDisk(folder: string, size: string): boolean {
  mkdirSync(folder, { recursive: true })
  try {
    execFileSync('mount', ['-t', 'tmpfs', '-o', `size=${size}`, 'tmpfs', folder], { stdio: 'ignore' })
    return true
  } catch {
    return false
  }
}

/** A disk that fills up under writes: they are refused, reads go on, and room makes them succeed again. */
export async function diskFull(folder: string): Promise<Result> {
  const name = 'disk full (SQLite)'
  const disk = `${folder}/disk`
  if (!smallDisk(disk, '3m'))
    return {
      name,
      acknowledged: 0,
      lost: [],
      wrong: [],
      note: 'NOT RUN: only root may mount a small file system',
    }
  try {
    const service = await startService({ environment: { DATABASE_URL: `sqlite:${disk}/registry.db` } })
    const { url } = service
    const book = ledger()
    const wrong: string[] = []
    let isOver = false
    const over = (): boolean => isOver
    const working = [
      ...Array.from({ length: WRITERS }, (_, i) => writer(url, `w${i}`, over, book)),
      asker(url, over, book),
    ]
    const isFull = (): Promise<boolean> => Promise.resolve((book.replies.get('503 storage-full') ?? 0) > 20)
    if (!(await until(isFull, 60))) wrong.push('the disk did not fill')
    for (const path of ['/v1/segments/w0', '/v1/segments/w0/advisory?vessel_class=cemt-ii', '/health/ready'])
      if ((await statusOf(url + path)) !== 200) wrong.push(`${path} is not answered while the disk is full`)
    const before = book.acknowledged.length
    execFileSync('mount', ['-o', 'remount,size=64m', disk])
    if (!(await until(() => Promise.resolve(book.acknowledged.length > before + 50), 20)))
      wrong.push('no write succeeds after room was made')
    isOver = true
    await Promise.all(working)
    const lost = await lostOf(url, book)
    service.child.kill('SIGTERM')
    const code = await service.ended()
    if (code !== 0) wrong.push(`ended with ${code}`)
    return {
      name,
      acknowledged: book.acknowledged.length,
      lost,
      wrong: [...wrong, ...book.wrong],
      note: shown(book),
    }
  } finally {
    execFileSync('umount', ['-l', disk])
  }
}
