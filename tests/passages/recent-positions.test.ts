import { expect, test } from 'vitest'
import { RecentPositions } from '../../src/passages/recent-positions.ts'

test('what is kept of a vessel is bounded by the span, and by 4096 times', () => {
  const sparse = new RecentPositions(600)
  for (let time = 0; time < 10_000; time += 10) sparse.accept({ time, lon: 4, lat: 52 })
  expect(sparse.size).toBe(61)
  expect([sparse.has(9390), sparse.has(9380), sparse.has(9395)]).toEqual([true, false, false])
  const dense = new RecentPositions(600)
  for (let time = 0; time < 100; time += 0.01) dense.accept({ time, lon: 4, lat: 52 })
  expect(dense.size).toBe(4096)
})

test('the positions next to a time are those accepted, in whatever order they came', () => {
  const recent = new RecentPositions(600)
  expect([recent.newest, recent.isLate(-1e9), recent.around(0)]).toEqual([
    -Infinity,
    false,
    [undefined, undefined],
  ])
  recent.accept({ time: 100, lon: 1, lat: 51 })
  recent.refuse({ time: 50, lon: 2, lat: 52 })
  recent.accept({ time: 20, lon: 3, lat: 53 })
  recent.refuse({ time: 110, lon: 4, lat: 54 })
  const [first, second] = [
    { time: 20, lon: 3, lat: 53 },
    { time: 100, lon: 1, lat: 51 },
  ]
  expect(recent.around(60)).toEqual([first, second])
  expect(recent.around(120)).toEqual([second, undefined])
  expect(recent.around(10)).toEqual([undefined, first])
  expect([recent.newest, recent.isLate(-490), recent.isLate(-490.1)]).toEqual([110, false, true])
  expect([20, 50, 100, 110].every((time) => recent.has(time))).toBe(true)
})
