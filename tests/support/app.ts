import { pino } from 'pino'
import { onTestFinished } from 'vitest'
import { buildApp } from '../../src/app.ts'
import type { App, Routes } from '../../src/http/app-type.ts'

export interface TestApp {
  readonly app: App
  /** Every line the service logged, parsed. */
  readonly logged: Record<string, unknown>[]
}

export interface TestSettings {
  readonly bodyLimit?: number
  readonly requestTimeout?: number
  readonly publicUrl?: string
  readonly trustedProxies?: readonly string[]
  readonly install?: (app: App) => void
  readonly isReady?: () => { registryRevision: number; database: string } | undefined
}

/** The real service with the routes of a test; it closes itself when the test ends. */
export function buildTestApp(routes: readonly Routes[] = [], settings: TestSettings = {}): TestApp {
  const logged: Record<string, unknown>[] = []
  const log = pino(
    { level: 'info' },
    { write: (line: string) => void logged.push(JSON.parse(line) as Record<string, unknown>) },
  )
  const app = buildApp({
    log,
    config: {
      bodyLimit: settings.bodyLimit ?? 1_048_576,
      requestTimeout: settings.requestTimeout ?? 5_000,
      publicUrl: settings.publicUrl,
      trustedProxies: settings.trustedProxies ?? [],
    },
    routes,
    ...(settings.install && { installs: [settings.install] }),
    versions: { service: '1.2.3', methods: '4' },
    isReady: settings.isReady ?? (() => ({ registryRevision: 7, database: 'none' })),
  })
  onTestFinished(async () => {
    app.server.closeAllConnections()
    await app.close()
  })
  return { app, logged }
}
