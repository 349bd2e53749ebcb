import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { evidenceDocument } from '../../src/report/evidence.ts'
import { launchBrowser } from '../support/browser.ts'
import { VIEWS, harrowmere, hostileNames } from '../support/evidence.ts'
import { OVERFLOWS, OVERLAPS, smallerThan } from '../support/page-faults.ts'

/** Printed width of A4 with margins of 12 mm, at 96 px to the inch. */
const PAPER = 703
/** 8 pt, less a hundredth for what scaling leaves, at 96 px to the inch. */
const SMALLEST = 10.66

let browser: Browser | undefined

beforeAll(async () => {
  browser = await launchBrowser()
})

afterAll(async () => {
  await browser?.close()
})

async function opened(html: string, width: number): Promise<Page> {
  const page = await browser!.newPage({ viewport: { width, height: 900 } })
  await page.setContent(html, { waitUntil: 'load' })
  return page
}

/** Widths and heights of the pages of a PDF, pt. */
async function printed(page: Page): Promise<[number, number][]> {
  const pdf = (await page.pdf({ preferCSSPageSize: true, printBackground: true })).toString('latin1')
  const pages = pdf.match(/\/Type \/Page\b(?!s)/g)?.length ?? 0
  const boxes = [...pdf.matchAll(/\/MediaBox \[0 0 ([\d.]+) ([\d.]+)\]/g)]
  expect(boxes).toHaveLength(pages)
  return boxes.map(([, width, height]) => [Number(width), Number(height)])
}

describe.each(Object.entries(VIEWS))('the evidence of %s', (_, make) => {
  test('fits a desk and a phone without scrolling aside, and asks for nothing', async () => {
    const html = evidenceDocument(make())
    for (const width of [390, 1280]) {
      const page = await browser!.newPage({ viewport: { width, height: 900 } })
      const requests: string[] = []
      page.on('request', (request) => requests.push(request.url()))
      await page.setContent(html, { waitUntil: 'load' })
      expect(await page.evaluate('document.documentElement.scrollWidth')).toBeLessThanOrEqual(width)
      expect(requests).toEqual([])
      if (width === 1280) {
        expect(await page.evaluate(OVERFLOWS)).toEqual([])
        expect(await page.evaluate(OVERLAPS)).toEqual([])
      }
      await page.close()
    }
  })

  test('has on paper no text out of its box, no label on another, none below 8 pt', async () => {
    const page = await opened(evidenceDocument(make()), PAPER)
    await page.emulateMedia({ media: 'print' })
    expect(await page.evaluate('document.documentElement.scrollWidth')).toBeLessThanOrEqual(PAPER)
    expect(await page.evaluate(OVERFLOWS)).toEqual([])
    expect(await page.evaluate(OVERLAPS)).toEqual([])
    expect(await page.evaluate(smallerThan(SMALLEST))).toEqual([])
    await page.close()
  })
})

test('the drawings of hostile names are files of their own that the browser parses', async () => {
  const drawings = evidenceDocument(hostileNames()).match(/<svg [\s\S]*?<\/svg>/g) ?? []
  const page = await opened('', 1280)
  const faults = await page.evaluate(
    `${JSON.stringify(drawings)}.map((svg) => new DOMParser().parseFromString(svg, 'image/svg+xml').querySelector('parsererror')?.textContent).filter(Boolean)`,
  )
  expect(drawings.length).toBeGreaterThan(2)
  expect(faults).toEqual([])
  await page.close()
})

test('the evidence prints upright A4: a title, rules, strips and table of a page each, a page for each sheet, annexes', async () => {
  const view = harrowmere()
  const page = await opened(evidenceDocument(view), 1280)
  const all = await printed(page)
  // 210 mm and 297 mm in points
  for (const [width, height] of all) {
    expect(Math.abs(width - 595.28)).toBeLessThan(1)
    expect(Math.abs(height - 841.89)).toBeLessThan(1)
  }
  await page.addStyleTag({ content: '.paper:not(.annexes) { display: none }' })
  const annexes = (await printed(page)).length
  expect(annexes).toBeGreaterThan(1)
  expect(all).toHaveLength(4 + view.plan.stretches.length + annexes)
  await page.close()
})

test('the mark of a draft stands on every page of paper', async () => {
  const page = await opened(evidenceDocument(harrowmere()), PAPER)
  await page.emulateMedia({ media: 'print' })
  // a box that is fixed is printed on each page
  const position = await page.evaluate(`getComputedStyle(document.querySelector('.watermark')).position`)
  const box = await page.evaluate(`document.querySelector('.watermark').getBoundingClientRect().width`)
  expect(position).toBe('fixed')
  expect(box).toBeGreaterThan(300)
  await page.close()
})
