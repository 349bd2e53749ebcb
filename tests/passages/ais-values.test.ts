import fc from 'fast-check'
import { expect, test } from 'vitest'
import {
  angleOf,
  latitudeOf,
  longitudeOf,
  mobileInWords,
  navigationStatusOf,
  shipTypeOf,
  sizeWithin,
  speedOf,
  wrappedCourseOf,
} from '../../src/passages/ais-values.ts'
import { detachedText, isMissing, nameOf, numberOf, REFUSED, textOf } from '../../src/passages/cells.ts'
import { eniOf, mmsiOf, mobileOfMmsi, UNREADABLE } from '../../src/passages/identity.ts'

// ITU-R M.1371-5, messages 1 and 5: what is sent for "not available", in the units of publications
test.each([
  ['speed 1023', speedOf, 102.3],
  ['speed 1022, or more', speedOf, 102.2],
  ['course 3600', angleOf, 360],
  ['course 3601, not used', angleOf, 360.1],
  ['heading 511', angleOf, 511],
  ['latitude 91 degrees', latitudeOf, 91],
  ['longitude 181 degrees', longitudeOf, 181],
  ['dimension 0', sizeWithin(1, 500), 0],
  ['dimension beyond any vessel', sizeWithin(1, 500), 1022],
  ['draught 0', sizeWithin(0.05, 30), 0],
])('%s is not available', (_name, of, value) => {
  expect(of(value)).toBeNaN()
})

test.each([
  [speedOf, 10, 5.144444444444445],
  [speedOf, 102.1, 52.52477777777778],
  [speedOf, 0, 0],
  [angleOf, 359.9, 359.9],
  [angleOf, 0, 0],
  [latitudeOf, -90, -90],
  [longitudeOf, 180, 180],
  [sizeWithin(0.05, 30), 25.5, 25.5],
])('what is available is kept', (of, value, expected) => {
  expect(of(value)).toBeCloseTo(expected, 12)
})

// rows of 2020-12-31 with a heading that tells the course: -55.4 beside 358, -111.4 beside 297, -145.4 beside 259
test.each([
  [-55.4, 354.2],
  [-111.4, 298.2],
  [-145.4, 264.2],
  [-49.6, NaN],
  [-204.8, 204.8],
  [12.5, 12.5],
  [360, NaN],
])('a course of %d is %d where its highest bit was taken for a sign', (course, expected) => {
  const found = wrappedCourseOf(course)
  if (Number.isNaN(expected)) expect(found).toBeNaN()
  else expect(found).toBeCloseTo(expected, 9)
})

test.each([
  ['1', 1],
  ['-94.81267', -94.81267],
  ['+5', 5],
  ['.5', 0.5],
  ['1e-5', 0.00001],
  ['0e5', 0],
  ['511.0', 511],
  [' 12.5 ', 12.5],
  ['1e308', 1e308],
  [12.5, 12.5],
])('%j is the number %d', (cell, value) => {
  expect(numberOf(cell)).toBe(value)
})

test('a plain decimal is the double that is nearest to it, as by the reader of the language', () => {
  fc.assert(
    fc.property(
      fc.bigInt({ min: -(10n ** 17n), max: 10n ** 17n }),
      fc.nat(18),
      fc.boolean(),
      (digits, decimals, isNegative) => {
        const text = String(digits < 0n ? -digits : digits).padStart(decimals + 1, '0')
        const whole = text.slice(0, text.length - decimals)
        const cell = `${isNegative ? '-' : ''}${whole}${decimals > 0 ? '.' : ''}${text.slice(text.length - decimals)}`
        expect(numberOf(cell)).toBe(Number(cell))
      },
    ),
    { numRuns: 2000 },
  )
  expect([numberOf('0.1'), numberOf('-0'), numberOf('29.98765'), numberOf('007.50'), numberOf('5.')]).toEqual(
    [0.1, -0, 29.98765, 7.5, 5],
  )
  expect(['.', '-', '-.', '1.2.3', '1-2'].map(numberOf)).toEqual(Array.from({ length: 5 }, () => REFUSED))
})

test.each([
  '',
  ' ',
  '\t',
  '\u00a0',
  'Unknown',
  'UNDEFINED',
  'Unknown value',
  'null',
  'None',
  'NaN',
  'n/a',
  ' NA ',
])('%j is no number, and no mistake', (cell) => {
  expect(numberOf(cell)).toBeNaN()
  expect(textOf(cell)).toBeUndefined()
  expect(isMissing(cell)).toBe(true)
})

test.each([
  'x',
  '12 kn',
  '12,5',
  '1.234,5',
  '0x10',
  '0X10',
  '0b1',
  '0o7',
  '1_000',
  'Infinity',
  '-Infinity',
  '+Infinity',
  '1e999',
  '-',
  '.',
  '1\0',
  '\0',
  '1.2.3',
  '١٢',
  '9'.repeat(400),
  'x'.repeat(65_000),
  Infinity,
])('a figure of %j is refused', (cell) => {
  expect(numberOf(cell)).toBe(REFUSED)
})

// names of ITU-R M.1371-5, table 53, in the words of the Danish Maritime Authority
test.each(
  Object.entries({
    WIG: 20,
    Fishing: 30,
    Towing: 31,
    'Towing long/wide': 32,
    Dredging: 33,
    Diving: 34,
    Military: 35,
    Sailing: 36,
    Pleasure: 37,
    HSC: 40,
    Pilot: 50,
    SAR: 51,
    Tug: 52,
    'Port tender': 53,
    'Anti-pollution': 54,
    'Law enforcement': 55,
    Medical: 58,
    'Not party to conflict': 59,
    Passenger: 60,
    Cargo: 70,
    Tanker: 80,
    Other: 90,
    Undefined: NaN,
    Reserved: NaN,
    '': NaN,
    '52': 52,
    '52.0': 52,
    '99': 99,
    '0': NaN,
    '100': NaN,
    '255': NaN,
    '1004': 70,
    '1024': 80,
    '1025': 31,
    '1001': 30,
    '1012': 60,
    '1019': 37,
    '1008': NaN,
    '31.5': NaN,
    '-1': NaN,
    constructor: NaN,
    __proto__x: NaN,
  }),
)('ship type %s is %d', (text, code) => {
  expect(shipTypeOf(text)).toBe(code)
})

// ITU-R M.1371-5, message 1, navigational status
test.each(
  Object.entries({
    'Under way using engine': 0,
    'At anchor': 1,
    'Not under command': 2,
    'Restricted maneuverability': 3,
    'Constrained by her draught': 4,
    Moored: 5,
    moored: 5,
    Aground: 6,
    'Engaged in fishing': 7,
    'Under way sailing': 8,
    'power-driven vessel towing astern': 11,
    'power-driven vessel pushing ahead or towing alongside': 12,
    'Reserved for future use [13]': NaN,
    'Unknown value': NaN,
    '': NaN,
    '0.0': 0,
    '0': 0,
    '12.0': 12,
    '15': 15,
    '16': NaN,
    '-1': NaN,
  }),
)('navigational status %s is %d', (text, code) => {
  expect(navigationStatusOf(text)).toBe(code)
})

test.each([
  ['Class A', 'vessel'],
  ['B', 'vessel'],
  ['', 'vessel'],
  ['Unknown', 'vessel'],
  ['Base Station', 'base-station'],
  ['AtoN', 'aid-to-navigation'],
  ['SAR Airborne', 'aircraft'],
  ['Search and Rescue Transponder', 'distress-beacon'],
  ['Man Overboard Device', 'distress-beacon'],
])('a mobile of type "%s" is a %s', (text, mobile) => {
  expect(mobileInWords(text)).toBe(mobile)
})

// formats of ITU-R M.585; 003669882 is a row of the open sample that lost its zeros
test.each([
  ['299123456', '299123456', 'vessel'],
  ['299123456.0', '299123456', 'vessel'],
  [' 299123456 ', '299123456', 'vessel'],
  [299123456, '299123456', 'vessel'],
  ['003669882', '003669882', 'base-station'],
  ['3669882', '003669882', 'base-station'],
  ['2579999.0', '002579999', 'base-station'],
  ['992191234', '992191234', 'aid-to-navigation'],
  ['111232506', '111232506', 'aircraft'],
  ['970012345', '970012345', 'distress-beacon'],
  ['972012345', '972012345', 'distress-beacon'],
  ['974012345', '974012345', 'distress-beacon'],
  ['982191234', '982191234', 'vessel'],
  ['821912345', '821912345', 'vessel'],
  ['112345678', '112345678', 'vessel'],
])('MMSI %j is %s, a %s', (cell, mmsi, mobile) => {
  expect(mmsiOf(cell)).toBe(mmsi)
  expect(mobileOfMmsi(mmsi)).toBe(mobile)
})

test.each([
  '36612345',
  '1234567890',
  '36612345x',
  '3.66123456e8',
  '-299123456',
  'IMO0000000',
  '\0',
  '36612345６',
])('an MMSI of %j cannot be read', (cell) => {
  expect(mmsiOf(cell)).toBe(UNREADABLE)
})

test.each(['', ' ', '0', '0.0', '000000000', 'Unknown'])('an MMSI of "%s" is none', (cell) => {
  expect(mmsiOf(cell)).toBeUndefined()
})

test.each([
  ['02325678', '02325678'],
  ['2325678', '02325678'],
  ['2325678.0', '02325678'],
  [2325678, '02325678'],
  ['', undefined],
  ['00000000', undefined],
  ['123456', UNREADABLE],
  ['023256789', UNREADABLE],
])('ENI %j is %s', (cell, eni) => {
  expect(eniOf(cell)).toBe(eni)
})

test('a name ends where AIS filled it up, and a name of nothing else is none', () => {
  expect(nameOf('NORDLYS@@@@@@@@@@@@')).toBe('NORDLYS')
  expect(nameOf('@@@@@@@@@@@@@@@@@@@@')).toBeUndefined()
  expect(nameOf(' A VERY LONG VESSEL NAME ')).toBe('A VERY LONG VESSEL NAME')
  expect(detachedText('A VERY LONG VESSEL NAME')).toBe('A VERY LONG VESSEL NAME')
})
