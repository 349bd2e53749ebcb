import { execFile } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { promisify } from 'node:util'
import { expect, test } from 'vitest'
import { runKeys, USAGE } from '../../src/access/command.ts'
import { hashOf } from '../../src/access/hash.ts'
import { Fault } from '../../src/domain/fault.ts'
import { openStore } from '../../src/store/open.ts'
import { temporaryFolder } from '../support/stores.ts'

const NOW = '2026-03-01T08:00:00.000Z'

interface Ran {
  readonly code: number
  readonly out: string
  readonly err: string
}

/** The command on a database of its own, at a fixed time. */
function command(url = `sqlite:${temporaryFolder()}/a.db`, now = NOW) {
  return async (line: string): Promise<Ran> => {
    let out = ''
    let err = ''
    const code = await runKeys(line.split(' ').filter(Boolean), {
      openStore: () => openStore(url),
      now: () => new Date(now),
      out: (text) => (out += text),
      err: (text) => (err += text),
    })
    return { code, out, err }
  }
}

test('a new key is the only thing on standard output, and only its hash is kept', async () => {
  const url = `sqlite:${temporaryFolder()}/a.db`
  const { code, out, err } = await command(url)('add --name gate --role write')
  expect(code).toBe(0)
  expect(out).toMatch(/^wl_[A-Za-z0-9_-]{43}\n$/)
  expect(err).toBe('Key gate with role write, valid until it is revoked. It is shown this once:\n')
  const store = await openStore(url)
  expect(await store.findKey(hashOf(out.trim()), NOW)).toEqual({ name: 'gate', role: 'write', created: NOW })
  await store.close()
})

test('a key that ends on a day holds through that day', async () => {
  const run = command()
  const { err } = await run('add --name day --role read --expires 2026-03-31')
  expect(err).toContain('valid before 2026-04-01T00:00:00.000Z')
  expect((await run('add --name time --role read --expires 2026-03-31T12:00:00Z')).err).toContain(
    'valid before 2026-03-31T12:00:00.000Z',
  )
  expect((await run('add --name today --role read --expires 2026-03-01')).code).toBe(0)
})

test('keys are listed with what became of them', async () => {
  const url = `sqlite:${temporaryFolder()}/a.db`
  const run = command(url)
  expect((await run('list')).out).toBe('NAME  ROLE  STATE  CREATED  EXPIRES  REVOKED\n')
  await run('add --name zoe --role publish')
  await run('add --name ann --role read --expires 2026-03-02T00:00:00Z')
  await run('revoke --name zoe')
  const { out, code } = await command(url, '2026-03-02T00:00:00Z')('list')
  expect(code).toBe(0)
  expect(out.split('\n').map((line) => line.split(/ +/))).toEqual([
    ['NAME', 'ROLE', 'STATE', 'CREATED', 'EXPIRES', 'REVOKED'],
    ['ann', 'read', 'expired', NOW, '2026-03-02T00:00:00.000Z', '-'],
    ['zoe', 'publish', 'revoked', NOW, '-', NOW],
    [''],
  ])
})

test('what cannot be done ends with 1 and says why', async () => {
  const run = command()
  await run('add --name ann --role read')
  expect(await run('add --name ann --role read')).toEqual({
    code: 1,
    out: '',
    err: 'There is a key named ann already; names of revoked keys are not used again.\n',
  })
  expect(await run('revoke --name bob')).toEqual({ code: 1, out: '', err: 'There is no key named bob.\n' })
  expect((await run('revoke --name ann')).code).toBe(0)
  expect(await run('revoke --name ann')).toEqual({ code: 1, out: '', err: 'Key ann was revoked before.\n' })
})

test('a database that does not answer ends with 1', async () => {
  const fault = new Fault('store-unavailable', 'The database does not answer')
  const said: string[] = []
  const say = (text: string) => void said.push(text)
  const surroundings = {
    openStore: () => Promise.reject(fault),
    now: () => new Date(NOW),
    out: say,
    err: say,
  }
  expect(await runKeys(['list'], surroundings)).toBe(1)
  expect(said).toEqual(['The database does not answer\n'])
})

test.each([
  ['', 'Say what to do.'],
  ['make', 'There is no command make.'],
  ['list all', 'all is one word too many.'],
  ['list --name ann', '--name does not belong to this command.'],
  ['revoke --name ann --role read', '--role does not belong to this command.'],
  ['revoke', '--name is missing.'],
  ['add --role read', '--name is missing.'],
  ['add --name -x --role read', "Option '--name' argument is ambiguous."],
  ['add --name a/b --role read', '--name cannot be "a/b".'],
  ['add --name ann', '--role must be one of read, write, publish.'],
  ['add --name ann --role admin', '--role must be one of read, write, publish.'],
  ['add --name ann --role read --until 2027-01-01', "Unknown option '--until'."],
  ['add --name ann --role read --expires soon', '--expires cannot be "soon"'],
  ['add --name ann --role read --expires 2027-02-29', '--expires cannot be "2027-02-29"'],
  ['add --name ann --role read --expires 2027-1-1', '--expires cannot be "2027-1-1"'],
  ['add --name ann --role read --expires 2026-02-28', '--expires 2026-02-28 is past already.'],
])('"%s" ends with 2, the reason and how to use it, before any database is opened', async (line, reason) => {
  let err = ''
  const code = await runKeys(line.split(' ').filter(Boolean), {
    openStore: () => expect.fail('the database was opened'),
    now: () => new Date(NOW),
    out: () => expect.fail('something was printed'),
    err: (text) => (err += text),
  })
  expect(code).toBe(2)
  expect(err.startsWith(reason), err).toBe(true)
  expect(err.endsWith(`\n\n${USAGE}`)).toBe(true)
})

test('the script reads DATABASE_URL, prints the key and gives exit codes', async () => {
  const folder = temporaryFolder()
  const script = fileURLToPath(new URL('../../src/keys.ts', import.meta.url))
  const run = async (url: string, ...args: string[]): Promise<Ran> => {
    const env = { ...process.env, DATABASE_URL: url }
    const ended = promisify(execFile)(process.execPath, ['--import', 'tsx', script, ...args], { env })
    return ended.then(
      ({ stdout, stderr }) => ({ code: 0, out: stdout, err: stderr }),
      (error: unknown) => {
        const { code, stdout, stderr } = error as { code: number; stdout: string; stderr: string }
        return { code, out: stdout, err: stderr }
      },
    )
  }
  const made = await run(`sqlite:${folder}/a.db`, 'add', '--name', 'ann', '--role', 'read')
  expect(made).toMatchObject({ code: 0, out: expect.stringMatching(/^wl_\S{43}\n$/) as string })
  expect(await run('mysql://localhost', 'list')).toMatchObject({
    code: 1,
    err: expect.stringContaining('DATABASE_URL must be sqlite:<file>') as string,
  })
  expect((await run(`sqlite:${folder}/a.db`, 'lst')).code).toBe(2)
})
