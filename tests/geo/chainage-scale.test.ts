import { expect, test } from 'vitest'
import { chainageScale } from '../../src/geo/chainage-scale.ts'

test('without chainages they count metres from the start', () => {
  const scale = chainageScale(1234)
  expect([scale.chainageAt(0), scale.chainageAt(617), scale.chainageAt(1234)]).toEqual([0, 617, 1234])
  expect(scale.findings).toEqual([])
})

test('chainages may fall and may count other metres than the line has', () => {
  const scale = chainageScale(1000, 5200, 4180)
  expect(scale.chainageAt(0)).toBe(5200)
  expect(scale.chainageAt(500)).toBe(4690)
  expect(scale.chainageAt(1000)).toBe(4180)
  expect(scale.distanceAt(4690)).toBe(500)
  expect(scale.findings).toEqual([])
})

test('a chainage given at the start alone rises with the line', () => {
  expect(chainageScale(1000, 700).chainageAt(1000)).toBe(1700)
})

test('a chainage far from the measured length is a remark with both figures', () => {
  const [remark] = chainageScale(1000, 0, 1609).findings
  expect(remark).toMatchObject({
    level: 'remark',
    code: 'chainage-differs-from-length',
    facts: { chainage_span_m: 1609, length_m: 1000 },
  })
  expect(remark?.detail).toBe(
    'The chainages are 1609 m apart, the line is 1000 m long: chainages along it are scaled',
  )
})

test('two equal chainages are a fault', () => {
  expect(chainageScale(1000, 50, 50).findings[0]).toMatchObject({
    level: 'fault',
    code: 'chainage-without-span',
    kind: 'clash',
  })
})
