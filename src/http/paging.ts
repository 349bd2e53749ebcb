import { z } from 'zod'
import { ID_PATTERN } from './fields.ts'
import { list, type Page } from './list.ts'
import { integerParameter } from './parameters.ts'

const DEFAULT_LIMIT = 100

const encodeCursor = (id: string): string => Buffer.from(id, 'utf8').toString('base64url')
const decodeCursor = (cursor: string): string => Buffer.from(cursor, 'base64url').toString('utf8')

/** A damaged cursor would otherwise end the list early, or start it again, without a word. */
function isCursor(text: string): boolean {
  const id = decodeCursor(text)
  return ID_PATTERN.test(id) && encodeCursor(id) === text
}

/** Query parameters of every list. */
export const PAGE_FIELDS = {
  limit: integerParameter(1, 1000).optional().describe('items on a page, default 100'),
  cursor: z
    .string()
    .max(200)
    .refine(isCursor, { error: 'must be as the link `next` has it', params: { code: 'pattern' } })
    .optional()
    .describe('as the link `next` has it'),
} as const

interface PageQuery {
  readonly limit?: number | undefined
  readonly cursor?: string | undefined
}

/** One page of items in the order of their ids, and the address of the next. */
export interface Slice<Item> {
  readonly items: readonly Item[]
  readonly next?: string
}

/**
 * Cuts a page out of a list. The cursor names the last id seen, so that items added or removed meanwhile neither repeat
 * nor hide others.
 *
 * @param items  n items in rising order of `idOf`
 * @param url    path and query of this page
 */
export function slice<Item>(
  items: readonly Item[],
  idOf: (item: Item) => string,
  query: PageQuery,
  url: string,
): Slice<Item> {
  const after = query.cursor === undefined ? '' : decodeCursor(query.cursor)
  const rest = items.filter((item) => idOf(item) > after)
  const page = rest.slice(0, query.limit ?? DEFAULT_LIMIT)
  const last = page.at(-1)
  if (!last || rest.length === page.length) return { items: page }
  const [path = '', search = ''] = url.split('?')
  const parameters = new URLSearchParams(search)
  parameters.set('cursor', encodeCursor(idOf(last)))
  return { items: page, next: `${path}?${parameters.toString()}` }
}

/** A page of a plain list, items sorted by id. */
export function pageOf<Item extends { readonly id: string }, Reply>(
  items: readonly Item[],
  query: PageQuery,
  url: string,
  toReply: (item: Item) => Reply,
): Page<Reply> {
  const sorted = [...items].sort((a, b) => (a.id < b.id ? -1 : 1))
  const page = slice(sorted, (item) => item.id, query, url)
  return list(url, page.items.map(toReply), page.next)
}

/** A page of a list that is read from the database page by page. */
export async function storedPage<Item extends { readonly id: string }, Reply>(
  read: (page: { readonly after?: string; readonly limit: number }) => Promise<readonly Item[]>,
  query: PageQuery,
  url: string,
  toReply: (item: Item) => Reply,
): Promise<Page<Reply>> {
  const limit = query.limit ?? DEFAULT_LIMIT
  const after = query.cursor === undefined ? {} : { after: decodeCursor(query.cursor) }
  // one more than is shown tells whether there is a next page
  const items = await read({ ...after, limit: limit + 1 })
  const page = slice(items, (item) => item.id, { ...query, limit }, url)
  return list(url, page.items.map(toReply), page.next)
}
