import { describe, expect, test } from 'vitest'
import { Fault } from '../../src/domain/fault.ts'
import { VESSEL_CLASSES } from '../../src/domain/vessel-classes.ts'
import type { SegmentRecord } from '../../src/store/registry.ts'
import { overviewPage, type OverviewParts } from '../../src/report/overview.ts'
import type { Answered } from '../../src/report/overview-rows.ts'
import { advisoryOf, demo } from '../support/sheets.ts'
import { badAttributes, parseXml, textsOf } from '../support/xml.ts'

function answered(vesselClass: string): Answered[] {
  return demo.segments().map((record) => {
    try {
      return { record, answer: advisoryOf({ segment: record, vesselClass }) }
    } catch (error) {
      if (error instanceof Fault) return { record, answer: { problem: error.message } }
      throw error
    }
  })
}

function partsOf(list: readonly Answered[], vesselClass = 'cemt-iv'): OverviewParts {
  return {
    answered: list,
    chosen: { vesselClass, loading: 'laden', waterLevel: -0.25, signUnit: 'km/h' },
    classes: VESSEL_CLASSES,
    serviceVersion: '1.2.3',
  }
}

/** The demo waterway again and again, each copy a little to the east. */
function many(count: number): Answered[] {
  const base = answered('cemt-iv')
  return Array.from({ length: count }, (_, i) => {
    const own = base[i % base.length]!
    const shift = Math.floor(i / base.length) * 0.01
    const record: SegmentRecord = {
      ...own.record,
      id: `${own.record.id}-${i}`,
      line: own.record.line.map(([lon, lat]) => [lon + shift, lat] as const),
    }
    return { ...own, record }
  })
}

const drawings = (html: string): string[] => html.match(/<svg [\s\S]*?<\/svg>/g) ?? []

describe('the overview', () => {
  test('holds a form that asks by GET for class, loading and level, as chosen', () => {
    const html = overviewPage(partsOf(answered('cemt-iv')))
    expect(html).toContain('<form method="get" action="/">')
    expect(html).toContain('<option value="cemt-iv" selected>CEMT IV motor vessel</option>')
    expect(html).toContain('<option value="laden" selected>')
    expect(html).toMatch(/name="water_level_m"[^>]*value="-0.25"/)
    expect(html.match(/<option /g)).toHaveLength(VESSEL_CLASSES.length + 2)
  })

  test('links every segment to its sheet, and to the layer and the interface, with what is chosen', () => {
    const html = overviewPage(partsOf(answered('cemt-iv')))
    const query = 'vessel_class=cemt-iv&amp;loading=laden&amp;water_level_m=-0.25&amp;sign_unit=km%2Fh'
    for (const { id } of demo.segments()) expect(html).toContain(`href="/v1/segments/${id}/sheet?${query}"`)
    expect(html).toContain(`href="/v1/advisories.geojson?${query}"`)
    expect(html).toContain('href="/docs"')
  })

  test('labels lines with the value of the sign, and says which have no safe speed or no answer', () => {
    const texts = (vesselClass: string) =>
      textsOf(parseXml(drawings(overviewPage(partsOf(answered(vesselClass))))[0]!))
    expect(texts('cemt-iv')).toEqual(expect.arrayContaining(['8', '×', 'no safe speed']))
    const html = overviewPage(partsOf(answered('coaster'), 'coaster'))
    expect(html).toContain('no answer')
    expect(html).toContain('The draught of the class, 5 m, is not below the depth')
    expect(texts('coaster')).toEqual(expect.arrayContaining(['?', 'no answer']))
  })

  test.each([0, 1, 12, 700])('draws %i segments without a number that is none', (count) => {
    const html = overviewPage(partsOf(many(count)))
    for (const svg of drawings(html)) expect(badAttributes(parseXml(svg))).toEqual([])
    expect(html).not.toMatch(/NaN|undefined|Infinity/)
  })

  test('of 10,000 segments caps its table, says so, thins its labels and stays under a megabyte', () => {
    const html = overviewPage(partsOf(many(10_000)))
    expect(html.match(/\/sheet\?/g)).toHaveLength(200)
    expect(html).toContain('The first 200 of 10\u202f000 segments are listed')
    expect(html.length).toBeLessThan(1_000_000)
    expect(drawings(html)[0]!.match(/<text/g)!.length).toBeLessThan(400)
  })

  test('escapes names, and ids in addresses', () => {
    const [first] = answered('cemt-i')
    const record = { ...first!.record, id: 'a"b', properties: { name: '<script>"x"', waterway: "<b>'" } }
    const html = overviewPage(partsOf([{ ...first!, record }]))
    expect(html).not.toContain('<script')
    expect(html).not.toContain('<b>&#39;')
    expect(html).toContain('/v1/segments/a%22b/sheet')
  })
})
