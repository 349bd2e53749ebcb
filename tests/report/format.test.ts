import { describe, expect, test } from 'vitest'
import {
  atMostFigure,
  chainage,
  count,
  cut,
  figure,
  kmh,
  knots,
  length,
  percent,
} from '../../src/report/format.ts'

describe('figures', () => {
  test('have a fixed number of decimals, a minus sign, and no negative zero', () => {
    expect(figure(2, 2)).toBe('2.00')
    expect(figure(-0.256, 2)).toBe('−0.26')
    expect(figure(-0.001, 2)).toBe('0.00')
  })

  test.each([undefined, NaN, Infinity])('of %s are a dash', (value) => {
    expect(figure(value, 2)).toBe('–')
    expect(kmh(value)).toBe('–')
  })

  test('of a greatest speed are rounded down, a whole step short of its last bit is not', () => {
    expect(atMostFigure(7.2799, 2)).toBe('7.27')
    expect(atMostFigure(0.1 + 0.2, 1)).toBe('0.3')
    expect(atMostFigure(0.29999999999999993, 1)).toBe('0.3')
    expect(kmh(10 / 3.6)).toBe('10.00\u00a0km/h')
    expect(knots(1852 / 3600)).toBe('1.00\u00a0kn')
  })

  test('of margins are never printed larger than they are', () => {
    expect(percent(-15000)).toBe('far below')
    expect(percent(0.1799)).toBe('17\u00a0%')
    expect(percent(-0.034)).toBe('−4\u00a0%')
    expect(percent(-1e-12)).toBe('0\u00a0%')
  })

  test('of lengths keep the decimals that they have', () => {
    expect(length(27.5)).toBe('27.5\u00a0m')
    expect(length(4)).toBe('4\u00a0m')
    expect(chainage(8900)).toBe('km\u00a08.900')
    expect(chainage(-120)).toBe('km\u00a0−0.120')
    expect(count(10000)).toBe('10\u202f000')
  })
})

test('a long text is cut with an ellipsis', () => {
  expect(cut('Boat club pontoons', 10)).toBe('Boat club…')
  expect(cut('short', 10)).toBe('short')
})
