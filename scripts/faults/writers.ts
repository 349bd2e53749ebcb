/** A write that the service acknowledged. */
interface Acknowledged {
  readonly id: string
  readonly revision: number
  readonly depth: number
}

/** What came of writing and asking while something failed. */
export interface Ledger {
  readonly acknowledged: Acknowledged[]
  /** replies by status and code: `201`, `503 stopping` */
  readonly replies: Map<string, number>
  /** replies that no caller should see */
  readonly wrong: string[]
  /** requests whose connection ended without a reply */
  cut: number
}

export const ledger = (): Ledger => ({ acknowledged: [], replies: new Map(), wrong: [], cut: 0 })

const feature = (depth: number): string =>
  JSON.stringify({
    type: 'Feature',
    geometry: { type: 'LineString', coordinates: [[3, 54], [3.01, 54], [3.02, 54.001]] }, // prettier-ignore
    properties: { name: 'Canal', depth_m: depth, width_m: 60, bank_distance_m: 30, source: 'x'.repeat(180) },
  })

const count = (replies: Map<string, number>, name: string): void =>
  void replies.set(name, (replies.get(name) ?? 0) + 1)

// a segment that is there from a round before is asked for with its revision first
const ALLOWED = new Set(['revision-required', 'store-unavailable', 'storage-full', 'stopping', 'overloaded'])

async function nameOf(reply: Response): Promise<{ name: string; code: string | undefined }> {
  if (reply.status < 400) return { name: String(reply.status), code: undefined }
  const { code } = (await reply.json()) as { code: string }
  return { name: `${reply.status} ${code}`, code }
}

let depths = 0

/** Writes one segment again and again, each time with another depth, until told to end. */
export async function writer(url: string, id: string, until: () => boolean, book: Ledger): Promise<void> {
  let isThere = false
  while (!until()) {
    depths += 1
    const depth = 4 + depths / 100_000
    try {
      const reply = await fetch(`${url}/v1/segments/${id}`, {
        method: 'PUT',
        headers: { 'content-type': 'application/geo+json', ...(isThere && { 'if-match': '*' }) },
        body: feature(depth),
      })
      isThere = reply.status !== 404 && (isThere || [200, 201, 428].includes(reply.status))
      const { name, code } = await nameOf(reply)
      count(book.replies, name)
      if (code !== undefined && !ALLOWED.has(code)) book.wrong.push(`PUT ${id}: ${name}`)
      if (code === undefined) {
        await reply.text()
        book.acknowledged.push({ id, depth, revision: Number(reply.headers.get('etag')?.slice(1, -1)) })
      } else if (code !== 'overloaded') await new Promise((go) => setTimeout(go, 20))
    } catch {
      book.cut += 1
      await new Promise((go) => setTimeout(go, 20))
    }
  }
}

const ADVISORY = JSON.stringify({
  segment: { depth_m: 4, width_m: 55, bank_distance_m: 27.5 },
  vessel: { class: 'cemt-va', draught_m: 2.8 },
})

/** Asks the same advisory again and again; another answer than the first is wrong. */
export async function asker(
  url: string,
  until: () => boolean,
  book: Ledger,
  headers: Readonly<Record<string, string>> = {},
): Promise<void> {
  let first: string | undefined
  while (!until()) {
    try {
      const reply = await fetch(`${url}/v1/advisories`, {
        method: 'POST',
        headers: { 'content-type': 'application/json', ...headers },
        body: ADVISORY,
      })
      const text = await reply.text()
      const code = reply.ok ? undefined : (JSON.parse(text) as { code: string }).code
      count(book.replies, code === undefined ? String(reply.status) : `${reply.status} ${code}`)
      if (code === undefined) {
        first ??= text
        if (text !== first) book.wrong.push('another advisory')
      } else if (!ALLOWED.has(code)) book.wrong.push(`advisory: ${reply.status} ${code}`)
    } catch {
      book.cut += 1
      await new Promise((go) => setTimeout(go, 20))
    }
    await new Promise((go) => setTimeout(go, 2))
  }
}

/** Acknowledged writes that are not there as they were written. */
export async function lostOf(url: string, { acknowledged }: Ledger): Promise<string[]> {
  const lost: string[] = []
  for (const { id, revision, depth } of acknowledged) {
    const reply = await fetch(`${url}/v1/segments/${id}?revision=${revision}`)
    const shown = reply.ok
      ? ((await reply.json()) as { properties: { depth_m: number } }).properties.depth_m
      : `${reply.status} ${await reply.text()}`
    if (shown !== depth) lost.push(`${id} revision ${revision}: ${shown} in place of ${depth}`)
  }
  return lost
}

export const shown = ({ replies, cut }: Ledger): string =>
  [...replies]
    .sort()
    .map(([name, times]) => `${times} × ${name}`)
    .concat(cut > 0 ? [`${cut} without a reply`] : [])
    .join(', ')
