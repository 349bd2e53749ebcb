import { writeFileSync } from 'node:fs'
import { answerOf } from './frozen-advisories/answer.ts'
import { frozenCases } from './frozen-advisories/cases.ts'

/**
 * Writes what the service says today to several hundred inputs, so that a change which is to move no figure can be held
 * against it:
 *
 *   npx tsx scripts/frozen-advisories.ts
 *
 * It is run anew only where a figure is meant to move.
 */

const SEED = 20_260_101
const COUNT = 280
const DIGITS = 12

/** A figure with its digits; what JSON has no number for as text. */
const written = (figure: number): number | string =>
  Number.isFinite(figure) ? Number(figure.toPrecision(DIGITS)) : String(figure)

const lines = frozenCases(SEED, COUNT).map((input) => {
  const answer = answerOf(input)
  return JSON.stringify(answer ? [answer.words, ...answer.figures.map(written)] : null)
})
const head = `{"seed":${SEED},"count":${COUNT},"digits":${DIGITS},"answers":[`
writeFileSync(
  new URL('../tests/advisory/frozen-advisories.json', import.meta.url),
  `${head}\n${lines.join(',\n')}\n]}\n`,
)
