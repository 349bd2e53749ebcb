import { constants } from 'node:zlib'
import compress from '@fastify/compress'
import type { App } from './app-type.ts'

const COMPRESSIBLE = /^text\/|^application\/(?:[\w.-]+\+)?(?:x-nd)?json(?:;|$)|^image\/svg\+xml/

/** Gzip for replies that ask for it. Each piece of a stream is flushed, so that a line is never held back. */
export function installCompression(app: App): void {
  void app.register(compress, {
    globalDecompression: false,
    encodings: ['gzip', 'identity'],
    threshold: 1024,
    customTypes: COMPRESSIBLE,
    zlibOptions: { flush: constants.Z_SYNC_FLUSH },
  })
}
