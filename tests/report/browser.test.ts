import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { VESSEL_CLASSES } from '../../src/domain/vessel-classes.ts'
import { overviewPage } from '../../src/report/overview.ts'
import { segmentSheet } from '../../src/report/sheet.ts'
import { launchBrowser } from '../support/browser.ts'
import { OVERFLOWS, OVERLAPS } from '../support/page-faults.ts'
import { CASES, advisoryOf, changed, demo, sheetParts } from '../support/sheets.ts'

const WIDTHS = [390, 1280] as const

let browser: Browser | undefined

beforeAll(async () => {
  browser = await launchBrowser()
})

afterAll(async () => {
  await browser?.close()
})

/** A long name without a place to break, as a caller may give one. */
const LONG = 'Oberwasserstraßenschifffahrtsamtsbezirksgrenzabschnitt'

const longNames = changed('harrow-town-reach', {
  name: `${LONG} ${LONG}`,
  waterway: LONG,
  source: LONG.repeat(3),
  receptors: Array.from({ length: 12 }, (_, i) => ({
    name: `${LONG} ${i}`,
    kind: 'other',
    side: i % 2 === 0 ? 'left' : 'right',
    distance_m: 17,
    max_wave_height_m: 0.15 + 0.002 * i,
  })),
})

const overview = (): string =>
  overviewPage({
    answered: demo.segments().map((record) => {
      try {
        return { record, answer: advisoryOf({ segment: record, vesselClass: 'coaster' }) }
      } catch (error) {
        return { record, answer: { problem: String(error) } }
      }
    }),
    chosen: { vesselClass: 'coaster', loading: 'laden', waterLevel: 0, signUnit: 'km/h' },
    classes: VESSEL_CLASSES,
    serviceVersion: '1.2.3',
  })

const PAGES: Readonly<Record<string, () => string>> = {
  ...Object.fromEntries(
    Object.entries(CASES).map(([name, asked]) => [
      `the sheet of ${name}`,
      () => segmentSheet(sheetParts(asked)),
    ]),
  ),
  'a sheet with long names': () => segmentSheet(sheetParts({ segment: longNames, vesselClass: 'cemt-i' })),
  'the overview': overview,
}

/** The page at a width, with every request that it made. */
async function opened(html: string, width: number): Promise<{ page: Page; requests: string[] }> {
  const page = await browser!.newPage({ viewport: { width, height: 900 } })
  const requests: string[] = []
  page.on('request', (request) => requests.push(request.url()))
  await page.setContent(html, { waitUntil: 'load' })
  return { page, requests }
}

describe.each(Object.entries(PAGES))('%s', (_, make) => {
  test.each(WIDTHS)(
    'fits %i px: no scrolling aside, no text out of its box, no label on another',
    async (width) => {
      const { page, requests } = await opened(make(), width)
      expect(await page.evaluate('document.documentElement.scrollWidth')).toBeLessThanOrEqual(width)
      expect(await page.evaluate(OVERFLOWS)).toEqual([])
      expect(await page.evaluate(OVERLAPS)).toEqual([])
      expect(requests).toEqual([])
      await page.close()
    },
  )

  test('shows one drawing of each pair at either width', async () => {
    for (const [width, shown] of [
      [390, 'narrow'],
      [1280, 'wide'],
    ] as const) {
      const { page } = await opened(make(), width)
      const visible = await page.evaluate(
        `[...document.querySelectorAll('svg')].filter((svg) => svg.getBoundingClientRect().width > 0).map((svg) => svg.getAttribute('class'))`,
      )
      expect(new Set(visible as string[])).toEqual(new Set([shown]))
      await page.close()
    }
  })

  test('has drawings that the browser parses as files of their own', async () => {
    const html = make()
    const { page } = await opened('', 1280)
    const drawings = html.match(/<svg [\s\S]*?<\/svg>/g) ?? []
    expect(drawings.length).toBeGreaterThan(1)
    const faults = await page.evaluate(
      `${JSON.stringify(drawings)}.map((svg) => new DOMParser().parseFromString(svg, 'image/svg+xml').querySelector('parsererror')?.textContent).filter(Boolean)`,
    )
    expect(faults).toEqual([])
    await page.close()
  })

  test('prints whole A4 pages with no figure cut', async () => {
    const { page } = await opened(make(), 1280)
    const pdf = (await page.pdf({ preferCSSPageSize: true, printBackground: true })).toString('latin1')
    const boxes = [...pdf.matchAll(/\/MediaBox \[0 0 ([\d.]+) ([\d.]+)\]/g)]
    const pages = pdf.match(/\/Type \/Page\b(?!s)/g)?.length ?? 0
    expect(pages).toBeGreaterThan(0)
    expect(boxes.length).toBeGreaterThan(0)
    // 210 mm and 297 mm in points
    for (const [, width, height] of boxes) {
      expect(Math.abs(Number(width) - 595.28)).toBeLessThan(1)
      expect(Math.abs(Number(height) - 841.89)).toBeLessThan(1)
    }
    await page.emulateMedia({ media: 'print' })
    // the printed area of A4 with the margins of the sheet, at 96 px to the inch
    await page.setViewportSize({ width: 680, height: 990 })
    const tallest = await page.evaluate(
      `Math.max(...[...document.querySelectorAll('figure')].map((figure) => figure.getBoundingClientRect().height))`,
    )
    expect(tallest).toBeLessThan(990)
    await page.close()
  })
})
