import { spawnSync } from 'node:child_process'
import { built } from './built.mjs'

const { status } = spawnSync(process.execPath, [built('copies'), ...process.argv.slice(2)], {
  stdio: 'inherit',
})
process.exit(status ?? 1)
