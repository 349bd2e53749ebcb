import { readdirSync, readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'

export interface Source {
  /** Path below `src`, with `/`. */
  readonly path: string
  readonly text: string
}

const root = fileURLToPath(new URL('../../src/', import.meta.url))

/** Every TypeScript file of the service. */
export function sources(): Source[] {
  const names = readdirSync(root, { recursive: true, encoding: 'utf8' }).filter((name) =>
    name.endsWith('.ts'),
  )
  return names
    .sort()
    .map((name) => ({ path: name.replaceAll('\\', '/'), text: readFileSync(root + name, 'utf8') }))
}
