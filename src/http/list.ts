import { z } from 'zod'

export const Link = z
  .object({
    rel: z.enum(['self', 'next']),
    href: z.string().describe('path and query, from the root of the service'),
  })
  .meta({ id: 'Link', description: 'Where this page or the next one is.' })

/** Schema of a list page with items of one kind. */
export function listOf<Item extends z.ZodType>(id: string, item: Item) {
  return z
    .object({ items: z.array(item), links: z.array(Link) })
    .meta({ id, description: 'A page of a list; the last page has no link `next`.' })
}

export interface Page<Item> {
  readonly items: readonly Item[]
  readonly links: readonly z.input<typeof Link>[]
}

/** A page of a list. Leave `next` out on the last one. */
export function list<Item>(self: string, items: readonly Item[], next?: string): Page<Item> {
  const links: z.input<typeof Link>[] = [{ rel: 'self', href: self }]
  if (next !== undefined) links.push({ rel: 'next', href: next })
  return { items, links }
}
