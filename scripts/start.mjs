import { spawn } from 'node:child_process'
import { built } from './built.mjs'

const child = spawn(process.execPath, [built('server')], { stdio: 'inherit' })
for (const signal of ['SIGTERM', 'SIGINT', 'SIGHUP']) process.on(signal, () => child.kill(signal))
child.on('exit', (code, signal) => process.exit(code ?? (signal === null ? 1 : 0)))
