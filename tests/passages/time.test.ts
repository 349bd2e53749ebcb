import fc from 'fast-check'
import { expect, test } from 'vitest'
import { epochOf, lacksZone, timeText } from '../../src/passages/time.ts'

const ZONED = { isZoneless: false, isDayFirst: false }
const US = { isZoneless: true, isDayFirst: false }
const DANISH = { isZoneless: true, isDayFirst: true }

// literals of `date -u -d … +%s`
test.each([
  ['2022-01-03T00:00:03Z', 1641168003],
  ['2022-01-03t00:00:03z', 1641168003],
  ['2024-07-12 00:00:03Z', 1720742403],
  ['2024-07-12T02:00:03+02:00', 1720742403],
  ['2024-07-11T18:30:03-05:30', 1720742403],
  ['2024-07-12 00:00:03+00', 1720742403],
  ['2024-07-12 05:45:03+0545', 1720742403],
  ['2024-02-29T12:34:56Z', 1709210096],
  ['2000-03-01T00:00:00-00:00', 951868800],
  ['1999-12-31T23:59:59Z', 946684799],
  ['1970-01-01T00:00:00Z', 0],
  ['2022-01-03T00:00:03.5Z', 1641168003.5],
  ['2022-01-03T00:00:03.123+01:00', 1641164403.123],
  ['2022-01-03T00:00:03.123456789Z', 1641168003.123456],
  ['0000-01-01T00:00:00Z', -62167219200],
  ['9999-12-31T23:59:59Z', 253402300799],
])('%s is %d s', (text, time) => {
  expect(epochOf(text, ZONED)).toBe(time)
  expect(epochOf(text, DANISH)).toBe(time)
})

test.each([
  ['2022-01-03T00:00:03', US, 1641168003],
  ['2024-07-12 00:00:03', US, 1720742403],
  ['2022-01-03T00:00:03.25', US, 1641168003.25],
  ['01/06/2018 00:00:00', DANISH, 1527811200],
  ['29/02/2024 12:34:56', DANISH, 1709210096],
  ['29/02/2024 12:34:56.5', DANISH, 1709210096.5],
  ['2024-07-12 00:00:03', DANISH, 1720742403],
])('%s of a publication is UTC', (text, form, time) => {
  expect(epochOf(text, form)).toBe(time)
})

test('a time without a zone is none outside the publications, and is told from other mistakes', () => {
  for (const text of ['2022-01-03T00:00:03', '2024-07-12 00:00:03', '2022-01-03T00:00:03.25']) {
    expect(epochOf(text, ZONED), text).toBeNaN()
    expect(lacksZone(text), text).toBe(true)
  }
  for (const text of ['01/06/2018 00:00:00', '2022-02-30T00:00:00', '2022-01-03', 'x']) {
    expect(lacksZone(text), text).toBe(false)
  }
})

test('days come first only where the publication has them so', () => {
  expect(epochOf('01/06/2018 00:00:00', US)).toBeNaN()
})

test.each([
  '31/02/2018 00:00:00',
  '29/02/2023 00:00:00',
  '29/02/1900 00:00:00',
  '00/01/2018 00:00:00',
  '01/13/2018 00:00:00',
  '01/00/2018 00:00:00',
  '2022-02-30T00:00:00Z',
  '2022-04-31T00:00:00Z',
  '2022-01-03T24:00:00Z',
  '2022-01-03T00:60:00Z',
  '2016-12-31T23:59:60Z',
  '2022-01-03T00:00:03.Z',
  '2022-01-03T00:00:03,5Z',
  '2022-01-03T00:00:03+24:00',
  '2022-01-03T00:00:03+01:60',
  '2022-01-03T00:00:03+1',
  '2022-01-03T00:00:03Zx',
  '2022-01-03T00:00:0',
  '2022-01-03',
  '2022-1-3T00:00:03Z',
  '1641168003',
  '20220103T000003Z',
  '',
  '\0',
  '٢٠٢٢-01-03T00:00:03Z',
  'Infinity',
])('%s is no time', (text) => {
  expect(epochOf(text, DANISH)).toBeNaN()
})

test('a long text is refused at once', () => {
  expect(epochOf(`2022-01-03T00:00:03.${'1'.repeat(65_000)}x`, DANISH)).toBeNaN()
})

test('every second of these years is read as the calendar of the platform has it', () => {
  const seconds = fc.integer({ min: -62167219200, max: 253402300799 })
  fc.assert(
    fc.property(seconds, (second) => {
      const text = new Date(second * 1000).toISOString()
      expect(epochOf(text, ZONED)).toBe(second)
      expect(epochOf(text.slice(0, 19), US)).toBe(second)
    }),
  )
})

test.each([
  [1641168003, '2022-01-03T00:00:03Z'],
  [1641168003.5, '2022-01-03T00:00:03.5Z'],
  [1641168003.12, '2022-01-03T00:00:03.12Z'],
  [1641168003.1234, '2022-01-03T00:00:03.123Z'],
  [1641168010.9996, '2022-01-03T00:00:11Z'],
  [1641168010, '2022-01-03T00:00:10Z'],
  [0, '1970-01-01T00:00:00Z'],
])('%d s is written %s', (time, text) => {
  expect(timeText(time)).toBe(text)
})
