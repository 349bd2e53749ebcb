const waiting: (() => void)[] = []
let isArmed = false

function pass(): void {
  waiting.shift()?.()
  isArmed = waiting.length > 0
  if (isArmed) setImmediate(pass)
}

/**
 * Waits for a turn of the event loop, of which each piece of long work gets one after the other: between two requests that
 * are answered at once lies one piece at most, however many streams there are.
 */
export function turn(): Promise<void> {
  return new Promise((resolve) => {
    waiting.push(resolve)
    if (isArmed) return
    isArmed = true
    setImmediate(pass)
  })
}
