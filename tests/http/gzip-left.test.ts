import { once } from 'node:events'
import { request as httpRequest, type IncomingMessage } from 'node:http'
import type { AddressInfo } from 'node:net'
import { gzipSync } from 'node:zlib'
import { expect, test } from 'vitest'
import { buildService } from '../support/service.ts'

// 2026-12: a log that was refused for its query, in gzip that broke off, ended the process
test.each(['/v1/advisories/stream?x=1', '/v1/passages/check?detail=all'])(
  'gzip that breaks off in a body that nobody reads any more harms nobody: %s',
  async (path) => {
    const { app } = buildService()
    await app.listen({ host: '127.0.0.1', port: 0 })
    const { port } = app.server.address() as AddressInfo
    const whole = gzipSync('time,lat,lon,sog_kn,mmsi\n'.repeat(100))
    for (const cut of [whole.length - 4, 10]) {
      const sender = httpRequest({
        port,
        host: '127.0.0.1',
        method: 'POST',
        path,
        headers: { 'content-type': 'text/csv', 'content-encoding': 'gzip' },
      })
      sender.end(whole.subarray(0, cut))
      const [reply] = (await once(sender, 'response')) as [IncomingMessage]
      expect(reply.statusCode).toBe(400)
      await reply.toArray()
    }
    expect((await app.inject('/health/live')).statusCode).toBe(200)
  },
)
