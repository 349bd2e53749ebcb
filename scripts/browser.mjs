import { existsSync } from 'node:fs'
import { spawnSync } from 'node:child_process'

/** The tests look at pages in Debian's Chromium: installs it where it is missing and may be, else says what to do. */

const CHROMIUM = '/usr/bin/chromium'

if (!existsSync(CHROMIUM)) {
  const isRoot = process.getuid?.() === 0
  if (isRoot) {
    process.stdout.write(
      'Installing the browser that the tests look at pages with: apt-get install chromium\n',
    )
    spawnSync('apt-get', ['update'], { stdio: 'ignore' })
    spawnSync('apt-get', ['install', '-y', '--no-install-recommends', 'chromium', 'fonts-liberation'], {
      stdio: 'ignore',
    })
  }
  if (!existsSync(CHROMIUM)) {
    process.stderr.write('The tests need the Debian package chromium: apt-get install chromium\n')
    process.exit(1)
  }
}
