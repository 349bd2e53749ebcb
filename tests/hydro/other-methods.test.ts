import { expect, it } from 'vitest'
import { OTHER_METHODS } from '../../src/hydro/other-methods.ts'

it('the laws of the primary wave declare that they end at the critical speed, and the others no bound on it', () => {
  const bounded = OTHER_METHODS.filter(({ range }) =>
    range.some(({ quantity }) => quantity === 'critical_ratio'),
  )
  expect(bounded.map(({ id }) => id)).toEqual(['schijf-return-current', 'rock-manual-primary-wave'])
  for (const { range } of bounded) expect(range).toEqual([{ quantity: 'critical_ratio', max: 1 }])
})
