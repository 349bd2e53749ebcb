import { describe, expect, test } from 'vitest'
import { crossSectionSvg } from '../../src/report/cross-section.ts'
import { planSvg } from '../../src/report/plan.ts'
import { segmentSheet } from '../../src/report/sheet.ts'
import { CASES, changed, sheetParts, sheetPartsIfAny, wideSet } from '../support/sheets.ts'
import { badAttributes, elementsOf, parseXml, textsOf } from '../support/xml.ts'

const HOSTILE = `<script>alert("1")</script> & 'quoted' \u0007`

/** The drawings of a page, as they stand in it. */
const drawings = (html: string): string[] => html.match(/<svg [\s\S]*?<\/svg>/g) ?? []

describe('the sheet', () => {
  test.each(Object.entries(CASES))(
    'of %s holds three drawings for each width, all well formed',
    (_, asked) => {
      const found = drawings(segmentSheet(sheetParts(asked)))
      expect(found).toHaveLength(6)
      const ids = found.flatMap((svg) =>
        [...elementsOf(parseXml(svg))].flatMap(({ attributes }) =>
          attributes.id === undefined ? [] : [attributes.id],
        ),
      )
      expect(new Set(ids).size).toBe(ids.length)
    },
  )

  test.each(Object.entries(CASES))(
    'of %s lists every criterion, method, caution and assumption',
    (_, asked) => {
      const { advisory, ...parts } = sheetParts(asked)
      const html = segmentSheet({ advisory, ...parts })
      const rows = html.match(/<tr[ >]/g)?.length ?? 0
      const { criteria, waveMethods, squatMethods, assumptions, cautions } = advisory
      expect(rows).toBe(4 + criteria.length + waveMethods.length + squatMethods.length + assumptions.length)
      for (const { code } of cautions) expect(html).toContain(`<small>${code}</small>`)
      for (const part of [parts.serviceVersion, parts.inputHash, parts.made]) expect(html).toContain(part)
      expect(html).toContain('This is a computed advisory.')
      expect(html).not.toMatch(/NaN|undefined|Infinity/)
    },
  )

  test('says the recommended speed in km/h and in knots, the sign and what governs', () => {
    const html = segmentSheet(sheetParts(CASES['a canal section']!))
    expect(html).toContain('7.27 <small>km/h</small>')
    expect(html).toContain('3.93\u00a0kn')
    expect(html).toContain('<b>7</b>km/h')
    expect(html).toContain('Wave height, nearer bank: 0.30\u00a0m (stern wave), limit 0.30\u00a0m')
  })

  test('says without a safe speed what would have to change, and never a figure that looks kept', () => {
    const html = segmentSheet(sheetParts(CASES['no safe speed']!))
    expect(html).toContain('No safe speed')
    expect(html).toContain('Wave height, Bathing steps')
    expect(html).toContain('it is 0.154\u00a0m, at most 0.150\u00a0m being allowed')
    expect(html).not.toContain('Recommended maximum speed over ground')
  })

  test('says what a current does in both directions', () => {
    const html = segmentSheet(sheetParts(CASES['a current']!))
    expect(html).toContain('going upstream')
    expect(html).toMatch(/downstream: 11\.11\u00a0km\/h/)
  })

  test('escapes every name that a caller gave', () => {
    const record = changed('harrow-town-reach', {
      name: HOSTILE,
      waterway: HOSTILE,
      datum: HOSTILE,
      source: HOSTILE,
      gauge_id: HOSTILE,
      receptors: [{ name: HOSTILE, kind: 'other', side: 'left', distance_m: 17, max_wave_height_m: 0.1 }],
    })
    const parts = sheetParts({ segment: record, vesselClass: 'cemt-i', options: { applyPostedLimit: false } })
    const html = segmentSheet(parts)
    expect(html).not.toContain('<script')
    expect(html).not.toContain('\u0007')
    expect(html).toContain('&lt;script&gt;alert(&quot;1&quot;)&lt;/script&gt; &amp; &#39;quoted&#39;')
    for (const svg of drawings(html)) parseXml(svg)
  })

  test('fetches nothing and runs nothing', () => {
    const html = segmentSheet(sheetParts(CASES.stations!))
    expect(html).not.toMatch(/<script|<link|<img|<iframe|@import|url\((?!#)|\son[a-z]+=/)
    expect(html.match(/https?:\/\/[^"\s]+/g)).toEqual(Array(6).fill('http://www.w3.org/2000/svg'))
  })
})

test('no section and no plan of any class on any segment has a number that is none', () => {
  let count = 0
  for (const asked of wideSet()) {
    const parts = sheetPartsIfAny(asked)
    if (!parts) continue
    count += 1
    for (const size of ['wide', 'narrow'] as const) {
      for (const text of [
        crossSectionSvg(parts.advisory, size),
        planSvg(parts.record, parts.advisory, size),
      ]) {
        const svg = parseXml(text)
        expect(badAttributes(svg), JSON.stringify(asked)).toEqual([])
        expect(textsOf(svg).join(' ')).not.toMatch(/NaN|undefined|Infinity/)
      }
    }
  }
  expect(count).toBeGreaterThan(250)
})

describe('the section', () => {
  test('has the hull off centre at the scale that it states', () => {
    const svg = crossSectionSvg(sheetParts(CASES.stations!).advisory, 'wide')
    const texts = textsOf(parseXml(svg))
    expect(texts).toEqual(expect.arrayContaining(['width 52\u00a0m', '22\u00a0m', '30\u00a0m', '3.8\u00a0m']))
    expect(texts).toContain('Heights drawn 2 times as large as widths')
  })

  test('says draught, squat, clearance and drawdown', () => {
    const { advisory } = sheetParts(CASES.stations!)
    const { squat, underKeelClearance, drawdown } = advisory.effects
    const texts = textsOf(parseXml(crossSectionSvg(advisory, 'narrow'))).join('\n')
    expect(texts).toContain('draught 2.5\u00a0m')
    expect(texts).toContain(`squat ${squat.toFixed(2)}`)
    expect(texts).toContain(`clearance ${underKeelClearance.toFixed(2)}`)
    expect(texts).toContain(`drawdown ${drawdown.toFixed(2)}`)
  })
})

describe('the plan', () => {
  test('marks the station that governs, and only that', () => {
    const { record, advisory } = sheetParts(CASES.stations!)
    const svg = parseXml(planSvg(record, advisory, 'wide'))
    const found = [...elementsOf(svg)].filter(
      ({ attributes }) => attributes['data-part'] === 'governing-station',
    )
    expect(found).toHaveLength(1)
    expect(textsOf(found[0]!)).toEqual(['governs: km\u00a018.150, depth 3.8\u00a0m'])
  })

  test('has both ends, the flow and every receptor', () => {
    const { record, advisory } = sheetParts(CASES['no safe speed']!)
    const svg = parseXml(planSvg(record, advisory, 'narrow'))
    const parts = [...elementsOf(svg)].flatMap(({ attributes }) => attributes['data-part'] ?? [])
    expect(parts.filter((part) => part === 'receptor')).toHaveLength(2)
    expect(parts).toContain('flow')
    expect(textsOf(svg)).toEqual(
      expect.arrayContaining(['km\u00a07.100', 'km\u00a08.900', 'N', 'Town moorings']),
    )
  })

  test('draws the lines of the banks where the registry holds them', () => {
    const asked = CASES['no safe speed']!
    const { advisory, record } = sheetParts(asked)
    const bank = (shift: number) => ({
      line: { type: 'LineString', coordinates: record.line.map(([lon, lat]) => [lon, lat + shift]) },
    })
    const given = {
      ...record,
      properties: { ...record.properties, banks: { left: bank(0.002), right: bank(-0.002) } },
    }
    expect(planSvg(given, advisory, 'wide')).not.toBe(planSvg(record, advisory, 'wide'))
    const strange = {
      ...record,
      properties: { ...record.properties, banks: { left: { line: 'north' }, right: { line: [1] } } },
    }
    expect(planSvg(strange, advisory, 'wide')).toBe(planSvg(record, advisory, 'wide'))
  })

  test.each([
    [
      'a line of one place',
      [
        [3, 54],
        [3, 54],
      ],
    ],
    [
      'a line over the antimeridian',
      [
        [179.99, 10],
        [-179.99, 10.01],
      ],
    ],
    [
      'a line at the pole',
      [
        [0, 89.99],
        [120, 90],
      ],
    ],
  ] as const)('has numbers for %s', (_, line) => {
    const { record, advisory } = sheetParts(CASES.stations!)
    const svg = parseXml(planSvg({ ...record, line }, advisory, 'wide'))
    expect(badAttributes(svg)).toEqual([])
  })
})

test('a squat that runs away near the critical speed is drawn on the bed and said in words', () => {
  const parts = sheetParts({
    segment: 'harrow-head-cut',
    vesselClass: 'coaster',
    loading: 'empty',
    conditions: { waterLevel: 0.7, current: 0.6 },
  })
  expect(parts.advisory.effects.underKeelClearance).toBeLessThan(-10)
  const texts = textsOf(parseXml(crossSectionSvg(parts.advisory, 'narrow')))
  expect(texts).toContain('keel under way: on the bed')
  expect(texts).toContain('bed: depth 3.3\u00a0m, clearance none')
  expect(segmentSheet(parts)).not.toMatch(/−\d{2,}\.\d\d\u00a0m/)
})
