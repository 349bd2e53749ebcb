import { readFileSync } from 'node:fs'
import { pino } from 'pino'
import { z } from 'zod'
import { buildApp } from '../src/app.ts'
import { readConfig } from '../src/config.ts'
import type { App, Routes } from '../src/http/app-type.ts'
import { acceptLines, bodyStream, readLines } from '../src/http/lines.ts'
import { sendStream } from '../src/http/stream.ts'
import { AdvisoryRequest } from '../src/http/request.ts'
import { serviceParts } from '../src/parts.ts'

/** The service with bare routes beside its own, each the least that any service must do for the same bytes. */

const reply: unknown = JSON.parse(
  readFileSync(new URL('../openapi/examples/createAdvisory.reply.json', import.meta.url), 'utf8'),
)
const compact: unknown = JSON.parse(
  readFileSync(new URL('../openapi/examples/createAdvisoryMatrix.reply.json', import.meta.url), 'utf8'),
)

const text = JSON.stringify(reply)

/** Same hooks, same validation and same reply bytes as an advisory, and no hydraulics; the second has them ready. */
const echo: Routes = (app) => {
  const schema = { body: AdvisoryRequest, response: { 200: z.unknown() } }
  app.post('/bench/echo', { schema }, () => reply)
  app.post('/bench/echo-ready', { schema }, (_request, response) =>
    response.type('application/json; charset=utf-8').send(text),
  )
}

async function* bareLines(stream: ReturnType<typeof bodyStream>, answer: unknown): AsyncGenerator<string> {
  for await (const lines of readLines(stream)) {
    let text = ''
    for (const line of lines) {
      if (line.text === undefined || line.text === '') continue
      const input = JSON.parse(line.text) as object
      if (Object.keys(input).length > 0) text += `${JSON.stringify(answer)}\n`
    }
    yield text
  }
}

/** Reads, parses, stringifies and writes the same bytes as the stream of advisories. */
const bareStream: Routes = (app) => {
  void app.register((scope: App, _options, done) => {
    acceptLines(scope)
    scope.post('/bench/stream', (request, response) => {
      const isCompact = request.url.endsWith('compact')
      return sendStream(response, bareLines(bodyStream(request), isCompact ? compact : reply))
    })
    done()
  })
}

/** The same bytes as an advisory of a segment, made beforehand. */
const still: Routes = (app) => {
  app.get('/bench/still', (_request, response) => response.type('application/json; charset=utf-8').send(text))
}

/** CPU time of this process so far, s: what a request costs, whatever else the machine does. */
const cpu: Routes = (app) => {
  app.get('/bench/cpu', () => {
    const { user, system } = process.cpuUsage()
    return (user + system) / 1e6
  })
}

const parts = serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:' }))
const app = buildApp({
  ...parts,
  routes: [...parts.routes, echo, bareStream, still, cpu],
  log: pino({ level: 'silent' }),
})
process.stdout.write(`${await app.listen({ host: '127.0.0.1', port: 0 })}\n`)
process.on('SIGTERM', () => void app.close())
