import type { App } from './app-type.ts'

/** What is no page of ours is nothing that a browser should run, frame or guess the type of. */
export const BROWSER_HEADERS = {
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'no-referrer',
  'x-frame-options': 'SAMEORIGIN',
  'cross-origin-opener-policy': 'same-origin',
  'x-permitted-cross-domain-policies': 'none',
} as const

/** For replies that bring no policy of their own: a drawing sets styles in its elements, everything else needs nothing. */
export const DATA_POLICY = "default-src 'none'; style-src 'unsafe-inline'; frame-ancestors 'self'"

/** half a year, s: where callers come over TLS they are told never to come without */
const TRANSPORT = 'max-age=15552000'

/**
 * Headers that keep browsers from making more of a reply than it is.
 *
 * @param publicUrl  address that callers use; with https they are told to keep to it
 */
export function installSecurityHeaders(app: App, publicUrl: string | undefined): void {
  const isSecure = publicUrl?.startsWith('https:') === true
  app.addHook('onRequest', (_request, reply, done) => {
    void reply.headers(BROWSER_HEADERS)
    if (isSecure) void reply.header('strict-transport-security', TRANSPORT)
    done()
  })
  app.addHook('onSend', (_request, reply, _payload, done) => {
    if (!reply.hasHeader('content-security-policy')) void reply.header('content-security-policy', DATA_POLICY)
    done()
  })
}
