import { expect, test } from 'vitest'
import { heldAt, heldAtPlaces, heldFor } from '../../src/hydro/held.ts'
import { aSetting } from '../support/setting.ts'

test('a figure of a setting is computed once for it, and anew for another', () => {
  const asked: number[] = []
  const depthOf = heldFor(({ depth }) => {
    asked.push(depth)
    return depth
  })
  const [shallow, deep] = [aSetting({ depth: 3 }), aSetting({ depth: 5 })]
  expect([depthOf(shallow), depthOf(shallow), depthOf(deep), depthOf(shallow)]).toEqual([3, 3, 5, 3])
  expect(asked).toEqual([3, 5, 3])
})

test('a figure at a speed is computed anew at another speed, and of something else at the same speed', () => {
  const asked: number[] = []
  const ratio = heldAt(({ depth }: { readonly depth: number }, speed: number) => {
    asked.push(speed)
    return speed / depth
  })
  const [a, b] = [{ depth: 2 }, { depth: 4 }]
  expect([ratio(a, 2), ratio(a, 2), ratio(a, 3), ratio(b, 3), ratio(b, 3)]).toEqual([1, 1, 1.5, 0.75, 0.75])
  expect(asked).toEqual([2, 3, 3])
})

test('a figure beside is held at the last two places, whichever of them is asked for first', () => {
  const asked: number[] = []
  const sum = heldAtPlaces((of: { readonly one: number }, speed: number, place: number) => {
    asked.push(place)
    return of.one + speed + place
  })
  const of = { one: 1 }
  expect([sum(of, 2, 10), sum(of, 2, 20), sum(of, 2, 10), sum(of, 2, 20)]).toEqual([13, 23, 13, 23])
  expect(asked).toEqual([10, 20])
  expect([sum(of, 2, 30), sum(of, 2, 20), sum(of, 2, 10), sum(of, 3, 10)]).toEqual([33, 23, 13, 14])
  expect(sum({ one: 5 }, 3, 10)).toBe(18)
})
