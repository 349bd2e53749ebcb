import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { answerOf } from '../../scripts/frozen-advisories/answer.ts'
import { frozenCases } from '../../scripts/frozen-advisories/cases.ts'

/** Answers as they were when the laws were last changed on purpose, made by scripts/frozen-advisories.ts. */
const frozen = JSON.parse(readFileSync(new URL('frozen-advisories.json', import.meta.url), 'utf8')) as {
  readonly seed: number
  readonly count: number
  readonly digits: number
  readonly answers: readonly (readonly [string, ...(number | string)[]] | null)[]
}

/** Half a unit of the last digit that is kept, and a little for sums that end just beside a half. */
const TOLERANCE = 0.6 * 10 ** (1 - frozen.digits)

const isSame = (actual: number | undefined, expected: number | string): boolean => {
  if (actual === undefined) return false
  if (typeof expected === 'string') return String(actual) === expected
  return Math.abs(actual - expected) <= TOLERANCE * Math.abs(expected)
}

const cases = frozenCases(frozen.seed, frozen.count)

describe('advisories that were frozen', () => {
  it('are as many as their inputs, and few of them impossible', () => {
    expect(frozen.answers).toHaveLength(frozen.count)
    expect(frozen.answers.filter((answer) => answer === null).length).toBeLessThan(frozen.count / 10)
  })

  it('say the same words and the same figures to the last digit that is kept', () => {
    const differing = frozen.answers.flatMap((expected, i) => {
      const input = cases[i]
      const answer = input && answerOf(input)
      if (!expected || !answer)
        return expected ? [`${i}: now impossible`] : answer ? [`${i}: was impossible`] : []
      const [words, ...figures] = expected
      if (answer.words !== words) return [`${i}: ${answer.words} where it was ${words}`]
      if (answer.figures.length !== figures.length) return [`${i}: another number of figures`]
      return figures.flatMap((figure, k) =>
        isSame(answer.figures[k], figure)
          ? []
          : [`${i}, figure ${k}: ${answer.figures[k]} where it was ${figure}`],
      )
    })
    expect(differing).toEqual([])
  })
})
