import { describe, expect, test } from 'vitest'
import type { Stretch } from '../../src/limits/plan.ts'
import { evidenceDocument } from '../../src/report/evidence.ts'
import { cssText } from '../../src/report/evidence-style.ts'
import type { EvidenceView } from '../../src/report/evidence-view.ts'
import { marginText, runsText } from '../../src/report/evidence-words.ts'
import { duration } from '../../src/report/format.ts'
import { escaped } from '../../src/report/html.ts'
import {
  VIEWS,
  apart,
  byDirection,
  harrowmere,
  hostileNames,
  longWaterway,
  publication,
  uncertain,
  vessel,
  viewOf,
} from '../support/evidence.ts'
import { badAttributes, elementsOf, parseXml } from '../support/xml.ts'

const sheetOf = (html: string, number: number): string => {
  const from = html.indexOf(`<section class="paper sheet" id="stretch-${number}"`)
  expect(from).toBeGreaterThan(0)
  return html.slice(from, html.indexOf('</section>', from))
}

/** Text of a part of a page, without its tags. */
const textOf = (html: string): string =>
  html
    .replace(/<style>[\s\S]*?<\/style>/g, '')
    .replace(/<[^>]+>/g, ' ')
    .replaceAll('\u00a0', ' ')
    .replace(/\s+/g, ' ')

describe.each(Object.entries(VIEWS))('the evidence of %s', (_, make) => {
  const view = make()
  const html = evidenceDocument(view)

  test('has a row, a sheet and a page head for every stretch', () => {
    const numbers = view.plan.stretches.map((_own, i) => i + 1)
    expect([...html.matchAll(/<tr id="row-(\d+)">/g)].map(([, n]) => Number(n))).toEqual(numbers)
    expect([...html.matchAll(/class="paper sheet" id="stretch-(\d+)"/g)].map(([, n]) => Number(n))).toEqual(
      numbers,
    )
    expect([...html.matchAll(/@page stretch-(\d+) /g)].map(([, n]) => Number(n))).toEqual(numbers)
  })

  test('names every id once, runs nothing and fetches nothing', () => {
    const ids = [...html.matchAll(/ id="([^"]+)"/g)].map(([, id]) => id)
    expect(ids.filter((id, i) => ids.indexOf(id) !== i)).toEqual([])
    expect(html).not.toMatch(/<script|<link|<img|@import|url\((?!#)|\son\w+=/i)
    const links = [...html.matchAll(/(?:href|src)="([^"]+)"/g)].map(([, link]) => link ?? '')
    expect(links.filter((link) => !link.startsWith('#') || !ids.includes(link.slice(1)))).toEqual([])
  })

  test('has drawings that are well formed, with numbers throughout', () => {
    const drawings = html.match(/<svg [\s\S]*?<\/svg>/g) ?? []
    expect(drawings.length).toBeGreaterThan(2)
    for (const drawing of drawings) expect(badAttributes(parseXml(drawing))).toEqual([])
  })

  test('prints the cautions of each stretch on its sheet, or their number where they are notes', () => {
    view.plan.stretches.forEach(({ cautions }, i) => {
      const sheet = sheetOf(html, i + 1)
      for (const { severity, text } of cautions) {
        if (severity !== 'info') expect(sheet).toContain(escaped(text))
      }
      // every computed cell has the note that local rules come first
      if (sheet.includes('<svg ')) expect(sheet).toMatch(/Notes? [\d–, ]+: see Annex A/)
    })
  })
})

test('a draft is marked in the head and across every page, a published plan is not', () => {
  const draft = evidenceDocument(harrowmere())
  expect(draft).toContain('<div class="watermark draft" aria-hidden="true">DRAFT</div>')
  expect(draft).toContain('@top-right { content: "DRAFT – not in force"')
  const published = evidenceDocument(byDirection())
  expect(published).not.toContain('class="watermark')
  expect(published).toContain('@top-right { content: "No. HNC 2026\\2f 14"')
  expect(textOf(published)).not.toContain('DRAFT')
  expect(evidenceDocument(hostileNames())).toContain(
    '<div class="watermark superseded" aria-hidden="true">SUPERSEDED',
  )
})

test('a published plan shows who, since when, in place of what, and the hash of its record', () => {
  const text = textOf(evidenceDocument(byDirection()))
  for (const part of [
    'sha256:0123456789abcdef0123456789abcdef0123456789abcdef0123456789abcdef',
    'Harrowmere Navigation Commission (invented)',
    'E. Alderley, Navigation Engineer',
    'HNC 2026/14',
    'HNC 2019/3',
    '2027-04-01',
    'Drawn after the soundings of March 2026.',
    'This plan is a proposal for the competent authority.',
    'Local rules and licensed professional practice come first',
  ]) {
    expect(text).toContain(part)
  }
  expect(text).not.toContain('computed with other versions')
})

test('a document made with other methods than the plan says so', () => {
  const view: EvidenceView = { ...byDirection(), publication: { ...publication, methodVersion: '3' } }
  expect(textOf(evidenceDocument(view))).toContain(
    'computed with other versions than those the plan was published with',
  )
})

test('names of callers open no element and end no style', () => {
  const html = evidenceDocument(hostileNames())
  expect(html.match(/<\/style>/g)).toHaveLength(1)
  expect(html).not.toContain('<script>')
  expect(html).not.toContain('grenzabschnitt <b>')
  expect(html).toContain('grenzabschnitt &lt;b&gt;0&lt;/b&gt;')
  expect(html).toContain('&lt;script&gt;alert(&quot;1&quot;)&lt;/script&gt; &amp; &lt;/style&gt;&#39;\\')
})

test('the rules say percentile, step, bounds, run length, what is kept, and what is uncertain', () => {
  const text = textOf(evidenceDocument(harrowmere()))
  for (const part of [
    'Percentile 5: the speed that 5 % of the 16 samples of a cell do not reach.',
    'rounded down to steps of 1 km/h. No limit is above 18 km/h. Below 4 km/h no limit is proposed',
    'at least 2000 m long',
    'Posted limits stay on Town Reach.',
    '16 samples of each cell, seed 7, percentiles 5, 50, 95',
    'Depth normal, standard deviation 0.100 m',
    'Bank distance uniform, half range 1.000 m',
    'Wave height lognormal, standard deviation of the logarithm 0.400',
    'In no group: no limit is drawn for them Coaster, laden',
  ]) {
    expect(text).toContain(part)
  }
})

/** The sheet of a stretch by hand on the first segment of the demo. */
function handMade(stretch: Partial<Stretch>): string {
  const view = harrowmere()
  const [first] = view.plan.stretches
  const { limit: _limit, limitSpeed: _speed, ceiling: _ceiling, lowestMaximum: _lowest, ...bare } = first!
  const plan = { ...view.plan, stretches: [{ ...bare, cautions: [], ...stretch }] }
  return textOf(sheetOf(evidenceDocument({ ...view, plan, sampled: undefined }), 1))
}

test('a sheet says what is proposed and why, with figures rounded down', () => {
  const text = handMade({
    outcome: 'limit',
    limit: { value: 10, unit: 'km/h' },
    limitSpeed: 10 / 3.6,
    ceiling: 11 / 3.6,
    // 3.1999 m/s are 11.51964 km/h
    lowestMaximum: 3.1999,
    travelTime: 685.4,
    travelTimeToday: 3725,
  })
  expect(text).toContain(
    'Proposed: at most 10 km/h over ground for Freight, both directions, over 1.904 km (1 segment).',
  )
  expect(text).toContain('allows least: 11.51 km/h at percentile 5, governed by under-keel clearance.')
  expect(text).toContain('This is rounded down to steps of 1 km/h: 11.00 km/h. The limit is lower than that')
  expect(text).toContain('Margin 1.51 km/h')
  expect(text).toContain('Time at limit 11 min 25 s Time today 1 h 2 min')
})

test('a kept limit above its evidence says so, with a margin below zero that is not rounded away', () => {
  const text = handMade({
    outcome: 'kept',
    limit: { value: 10, unit: 'km/h' },
    limitSpeed: 10 / 3.6,
    // 2.7777 m/s are 9.99972 km/h: 0.00028 km/h too little
    lowestMaximum: 2.7777,
    cautions: [{ code: 'kept-above-ceiling', severity: 'warning', text: 'Kept above.' }],
  })
  expect(text).toContain('the posted limit of 10 km/h stays')
  expect(text).toContain('although it is above what this evidence supports')
  expect(text).toContain('Margin −0.01 km/h')
  expect(text).toMatch(/\d+ Warning Kept above\./)
})

test('a stretch below the smallest limit says what its maximum would be and what governs', () => {
  const text = handMade({ outcome: 'below-smallest-limit', lowestMaximum: 1 })
  expect(text).toContain('No speed limit can be proposed for Freight')
  expect(text).toContain('allows least: 3.60 km/h at percentile 5, governed by under-keel clearance.')
  expect(text).toContain('below the smallest limit of 4 km/h, so that no limit is proposed')
  expect(text).toContain('Smallest limit 4.00 km/h')
  expect(handMade({ outcome: 'below-smallest-limit' })).toContain(
    'No speed at which this vessel steers keeps every criterion',
  )
})

test('a vessel without an answer is no vessel without a safe speed', () => {
  const text = textOf(sheetOf(evidenceDocument(apart()), 1))
  expect(text).toContain(
    'that of Coaster, laden, on Head Cut has no answer. What was not found safe counts as not safe',
  )
  // the laden draught of the class and the depth of the segment
  expect(text).toContain('The draught of the class, 5 m, is not below the depth, 2.6 m')
  expect(text).not.toContain('no safe speed')
})

test('a sheet draws the inputs by what they move, the strongest first', () => {
  const html = evidenceDocument(harrowmere())
  const drawing = /<svg [^>]*aria-labelledby="tornado-1-title[\s\S]*?<\/svg>/.exec(html)?.[0] ?? ''
  const groups = [...elementsOf(parseXml(drawing))].filter(({ attributes }) => 'data-input' in attributes)
  const reach = groups.map((group) => {
    const bars = [...elementsOf(group)].filter(({ name }) => name === 'rect')
    const from = Math.min(...bars.map(({ attributes }) => Number(attributes.x)))
    return Math.max(...bars.map(({ attributes }) => Number(attributes.x) + Number(attributes.width))) - from
  })
  expect(groups).toHaveLength(6)
  // the first reaches to the edge for want of a safe speed
  expect(reach[0]).toBe(Math.max(...reach))
  expect(groups.map(({ attributes }) => attributes['data-input'])).toContain('wave_height')
})

test('a strip reads downstream, whichever way the chainage runs, in panels of 24 segments at most', () => {
  const view = longWaterway(30)
  const html = evidenceDocument(view)
  const panels = html.match(/<svg [^>]*aria-labelledby="strip-1-\d+-title[\s\S]*?<\/svg>/g) ?? []
  expect(panels).toHaveLength(3)
  const [whole = '', first = ''] = panels
  // the chainage falls from 400 km: its labels must rise to the left
  const ticks = [...elementsOf(parseXml(whole))].flatMap(({ name, attributes, children }) => {
    const [text] = children
    return name === 'text' && typeof text === 'string' && /^[34]\d\d$/.test(text)
      ? [[Number(attributes.x), Number(text)] as const]
      : []
  })
  const fromLeft = [...ticks].sort(([a], [b]) => a - b).map(([, km]) => km)
  expect(fromLeft.length).toBeGreaterThan(3)
  expect(fromLeft).toEqual([...fromLeft].sort((a, b) => b - a))
  expect(textOf(first)).toContain('Section 15')
  expect(textOf(first)).not.toContain('Section 16')
})

test.each([
  [[], ''],
  [[3], '3'],
  [[1, 2], '1, 2'],
  [[1, 2, 3, 7, 9, 10, 11], '1–3, 7, 9–11'],
])('runsText of %j is %j', (numbers, text) => {
  expect(runsText(numbers)).toBe(text)
})

test.each([
  [0, '0 s'],
  [59.6, '1 min 0 s'],
  [605, '10 min 5 s'],
  [3600, '1 h 0 min'],
  // 2 h 59 min 40 s
  [10_780, '3 h 0 min'],
  [-90, '−1 min 30 s'],
  [NaN, '–'],
])('a time of %d s is written %j', (seconds, text) => {
  expect(duration(seconds).replaceAll('\u00a0', ' ')).toBe(text)
})

test('marginText rounds down on both sides of zero', () => {
  // 0.1 m/s are 0.36 km/h, 0.1027 m/s are 0.36972 km/h
  expect([0.1, 0.1027, -0.1027, -0.1].map((speed) => marginText(speed).replace('\u00a0', ' '))).toEqual([
    '0.36 km/h',
    '0.36 km/h',
    '−0.37 km/h',
    '−0.36 km/h',
  ])
})

test('cssText lets no text end its string', () => {
  expect(cssText('a "b" \\ </style>\n')).toBe('"a \\22 b\\22  \\5c  \\3c \\2f style\\3e \\a "')
})

// 2026-12-01: where nothing makes any speed safe the axis of the bars had no ends
test('a stretch on which no uncertain input makes a speed safe is drawn all the same', () => {
  const { study } = harrowmere()
  const segments = study.segments.filter(({ id }) => id === 'harrow-head-cut')
  const view = viewOf({
    ...study,
    segments,
    vessels: [vessel('cemt-ii')],
    uncertainty: { ...uncertain, spreads: {} },
  })
  expect(view.plan.stretches[0]).toMatchObject({ outcome: 'below-smallest-limit' })
  const html = evidenceDocument(view)
  expect(html).not.toContain('NaN')
  expect(badAttributes(parseXml((/<svg [\s\S]*?<\/svg>/.exec(sheetOf(html, 1)) ?? [''])[0]))).toEqual([])
})
