import { setTimeout as wait } from 'node:timers/promises'
import { expect, it } from 'vitest'
import { inOrder } from '../../src/http/in-order.ts'

async function* numbers(count: number, ended?: () => void): AsyncGenerator<number> {
  try {
    for (let i = 0; i < count; i += 1) {
      await wait(0)
      yield i
    }
  } finally {
    ended?.()
  }
}

it('hands results on in the order of the items, whichever is ready first', async () => {
  const results: number[] = []
  const work = async (item: number) => {
    await wait(item % 3 === 0 ? 6 : 0)
    return item * 10
  }
  for await (const result of inOrder(numbers(9), work, 4)) results.push(result)
  expect(results).toEqual([0, 10, 20, 30, 40, 50, 60, 70, 80])
})

it('works on as many items at a time as it is told, and no more', async () => {
  let working = 0
  let most = 0
  const work = async () => {
    working += 1
    most = Math.max(most, working)
    await wait(40)
    working -= 1
  }
  let results = 0
  for await (const _ of inOrder(numbers(8), work, 3)) results += 1
  expect(results).toBe(8)
  expect(most).toBe(3)
})

it('hands a result on while the source has nothing new', async () => {
  async function* stalling(): AsyncGenerator<string> {
    yield 'first'
    await new Promise(() => undefined)
  }
  const results = inOrder(stalling(), (item) => Promise.resolve(item), 4)
  expect(await results.next()).toEqual({ done: false, value: 'first' })
})

it('fails with the first work that fails, and ends the source', async () => {
  let isEnded = false
  const work = (item: number) => (item === 2 ? Promise.reject(new Error('no')) : Promise.resolve(item))
  const results = inOrder(
    numbers(9, () => {
      isEnded = true
    }),
    work,
    2,
  )
  const seen: number[] = []
  await expect(
    (async () => {
      for await (const result of results) seen.push(result)
    })(),
  ).rejects.toThrow('no')
  expect(seen).toEqual([0, 1])
  expect(isEnded).toBe(true)
})

it('ends the source when it is given up', async () => {
  let isEnded = false
  for await (const result of inOrder(
    numbers(9, () => {
      isEnded = true
    }),
    (item) => Promise.resolve(item),
    2,
  )) {
    if (result === 1) break
  }
  expect(isEnded).toBe(true)
})

it('fails at once when the source does, whatever is still worked on', async () => {
  let fail: (error: Error) => void = () => undefined
  async function* failing(): AsyncGenerator<number> {
    yield 0
    yield 1
    await new Promise((_, reject) => {
      fail = reject
    })
  }
  const work = (item: number) => (item === 0 ? Promise.resolve(0) : new Promise<number>(() => undefined))
  const results = inOrder(failing(), work, 4)
  expect(await results.next()).toEqual({ done: false, value: 0 })
  const second = results.next()
  await wait(5)
  fail(new Error('gone'))
  await expect(second).rejects.toThrow('gone')
})
