import { expect, test } from 'vitest'
import { turn } from '../../src/http/turns.ts'

test('between two rounds of the event loop one piece of long work has its turn, in the order of asking', async () => {
  const order: string[] = []
  let rounds = 0
  const count = (): void => {
    rounds += 1
    if (rounds < 20) setImmediate(count)
  }
  setImmediate(count)
  const piece = async (name: string): Promise<void> => {
    for (let i = 0; i < 3; i += 1) {
      await turn()
      order.push(`${name}${rounds}`)
    }
  }
  await Promise.all([piece('a'), piece('b'), piece('c')])
  expect(order.map((entry) => entry[0])).toEqual(['a', 'b', 'c', 'a', 'b', 'c', 'a', 'b', 'c'])
  // nine pieces, each in a round of its own
  expect(new Set(order.map((entry) => entry.slice(1))).size).toBe(9)
})
