import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, expect, onTestFinished, test } from 'vitest'
import { launchBrowser } from '../support/browser.ts'
import { registryService } from '../support/registry-service.ts'

let browser: Browser | undefined

beforeAll(async () => {
  browser = await launchBrowser()
})

afterAll(async () => {
  await browser?.close()
})

/** A site that has nothing but an empty page; its origin. */
async function site(): Promise<string> {
  const server = createServer((_request, response) => {
    response.writeHead(200, { 'content-type': 'text/html' }).end('<!doctype html><title>A page</title>')
  })
  await new Promise<void>((listening) => server.listen(0, '127.0.0.1', listening))
  onTestFinished(() => {
    server.closeAllConnections()
    server.close()
  })
  return `http://127.0.0.1:${(server.address() as AddressInfo).port}`
}

/** What a script of a page gets from a call, run in the page: the reply as far as it may read it, or the refusal. */
const call = (url: string, init: object): string => `fetch(${JSON.stringify(url)}, ${JSON.stringify(init)})
  .then(async (reply) => {
    const { outcome } = await reply.json()
    return { status: reply.status, outcome, etag: reply.headers.get('etag'), revision: reply.headers.get('registry-revision') }
  })
  .catch((error) => error.name)`

async function calledFrom(origin: string, url: string, init: object = {}): Promise<unknown> {
  const page = await browser!.newPage()
  try {
    await page.goto(`${origin}/`)
    return await page.evaluate(call(url, init))
  } finally {
    await page.close()
  }
}

test('a page of an origin that is allowed reads advisories, one of another origin does not', async () => {
  const [allowed, other] = [await site(), await site()]
  const { app } = registryService({ DEMO: 'true', CORS_ORIGINS: allowed })
  const service = await app.listen({ host: '127.0.0.1', port: 0 })
  const kept = `${service}/v1/segments/harrow-long-pound/advisory?vessel_class=cemt-iv`
  const etag: unknown = expect.stringMatching(/^(W\/)?".+"$/)
  expect(await calledFrom(allowed, kept)).toEqual({ status: 200, outcome: 'limited', etag, revision: '1' })
  expect(await calledFrom(other, kept)).toBe('TypeError')

  // JSON makes the browser ask first
  const posted = {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({
      segment: { depth_m: 4, width_m: 55, bank_distance_m: 27.5 },
      vessel: { class: 'cemt-va', draught_m: 2.8 },
    }),
  }
  const asked = `${service}/v1/advisories`
  expect(await calledFrom(allowed, asked, posted)).toMatchObject({ status: 200, outcome: 'limited' })
  expect(await calledFrom(other, asked, posted)).toBe('TypeError')
})

test('without allowed origins no page of another origin reads anything', async () => {
  const page = await site()
  const { app } = registryService({ DEMO: 'true' })
  const service = await app.listen({ host: '127.0.0.1', port: 0 })
  const kept = `${service}/v1/segments/harrow-long-pound/advisory?vessel_class=cemt-iv`
  expect((await fetch(kept)).status).toBe(200)
  expect(await calledFrom(page, kept)).toBe('TypeError')
})
