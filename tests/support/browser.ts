import { existsSync } from 'node:fs'
import { chromium, type Browser } from 'playwright-core'

const CHROMIUM = '/usr/bin/chromium'

/** Starts the browser of the system, without a window and without calls of its own. */
export function launchBrowser(): Promise<Browser> {
  if (!existsSync(CHROMIUM)) {
    throw new Error(`${CHROMIUM} is missing: install it with "apt-get install chromium"`)
  }
  return chromium.launch({
    executablePath: CHROMIUM,
    args: [
      '--headless',
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
    ],
  })
}
