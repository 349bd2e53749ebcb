// Loaded before the service: on each SIGUSR2 the time of day jumps, a day forward, then two back, then a day forward again.
const JUMPS = [86_400_000, -172_800_000, 86_400_000]
const Real = Date
let offset = 0
let count = 0
globalThis.Date = class extends Real {
  constructor(...parts) {
    super(...(parts.length === 0 ? [Real.now() + offset] : parts))
  }
  static now() {
    return Real.now() + offset
  }
}
process.on('SIGUSR2', () => {
  offset += JUMPS[count % JUMPS.length]
  count += 1
  process.stdout.write(
    `${JSON.stringify({ level: 30, msg: `the clock says ${new Date().toISOString()}` })}\n`,
  )
})
