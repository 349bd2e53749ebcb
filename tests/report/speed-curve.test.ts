import { describe, expect, test } from 'vitest'
import { speedCurveSvg } from '../../src/report/speed-curve.ts'
import type { Size } from '../../src/report/chart.ts'
import { CASES, sheetParts, sheetPartsIfAny, wideSet, type Asked } from '../support/sheets.ts'
import { badAttributes, elementsOf, parseXml, textsOf, type Element } from '../support/xml.ts'

const SIZES = ['wide', 'narrow'] as const satisfies readonly Size[]
const SHORT_NAMES = [
  'Rock Manual 2007',
  'Blaauw et al. 1984',
  'Weggel & Sorensen 1986',
  'Kriebel & Seelig 2005',
  'Gates & Herbich 1977',
  'Bhowmik et al. 1991',
  'Maynord 2005',
]

function drawn(
  asked: Asked,
  size: Size,
): { readonly svg: Element; readonly parts: ReturnType<typeof sheetParts> } {
  const parts = sheetParts(asked)
  return { parts, svg: parseXml(speedCurveSvg(parts.curve, parts.advisory, size)) }
}

const marked = (svg: Element, name: string): Element[] =>
  [...elementsOf(svg)].filter(({ attributes }) => name in attributes)

/** Value -> px by the two outermost ticks of an axis. */
function axis(found: readonly (readonly [number, number])[]): (value: number) => number {
  const [first, last] = [found[0]!, found.at(-1)!]
  const slope = (last[1] - first[1]) / (last[0] - first[0])
  return (value) => first[1] + slope * (value - first[0])
}

/** Text of an element that holds nothing else. */
const textOf = ({ children }: Element): string => (typeof children[0] === 'string' ? children[0] : '')

/** Pixels of the ticks of the upper speed axis by what they say: numbers centred on the first row that holds such. */
function groundTicks(svg: Element): [value: number, px: number][] {
  const centred = [...elementsOf(svg)].filter(
    (element) =>
      element.name === 'text' &&
      element.attributes['text-anchor'] === 'middle' &&
      /^\d+(\.\d+)?$/.test(textOf(element)),
  )
  const row = Math.min(...centred.map(({ attributes }) => Number(attributes.y)))
  return centred
    .filter(({ attributes }) => Number(attributes.y) === row)
    .map((element) => [Number(textOf(element)), Number(element.attributes.x)])
}

describe.each(SIZES)('the %s speed curve', (size) => {
  test.each(Object.entries(CASES))(
    'of %s is well-formed XML with a title, a description and a role',
    (_, asked) => {
      const { svg } = drawn(asked, size)
      expect(svg.attributes.role).toBe('img')
      const ids = svg.attributes['aria-labelledby']!.split(' ')
      const named = svg.children.filter((child) => typeof child === 'object').slice(0, 2)
      expect(named.map(({ name }) => name)).toEqual(['title', 'desc'])
      expect(named.map(({ attributes }) => attributes.id)).toEqual(ids)
    },
  )

  test.each(Object.entries(CASES))('of %s names every method and every criterion', (_, asked) => {
    const { svg, parts } = drawn(asked, size)
    const texts = textsOf(svg)
    for (const name of SHORT_NAMES) expect(texts).toContain(name)
    const found = marked(svg, 'data-criterion').map(({ attributes }) => attributes['data-criterion'])
    expect(found.sort()).toEqual(parts.advisory.criteria.map(({ criterion }) => criterion.id).sort())
  })

  test.each(Object.entries(CASES))('of %s marks the recommended speed at its pixel', (_, asked) => {
    const { svg, parts } = drawn(asked, size)
    const { decision } = parts.advisory
    const [line] = marked(svg, 'data-mark').filter(
      ({ attributes }) => attributes['data-mark'] === 'recommended',
    )
    if (decision.outcome === 'no-safe-speed') {
      expect(line).toBeUndefined()
      return
    }
    const stroke = line!.children.find((child) => typeof child === 'object')!
    // a tenth of a pixel is below what a screen shows; ticks are written with two decimals
    const expected = axis(groundTicks(svg))(decision.overGround * 3.6)
    expect(Math.abs(Number(stroke.attributes.x1) - expected)).toBeLessThan(0.1)
    expect(stroke.attributes.x1).toBe(stroke.attributes.x2)
  })

  test.each(Object.entries(CASES))('of %s has axes that cover every figure that counts', (_, asked) => {
    const { svg, parts } = drawn(asked, size)
    const { advisory, curve } = parts
    const heights = [...elementsOf(svg)]
      .filter(({ name, attributes }) => name === 'text' && attributes['text-anchor'] === 'end')
      .map((element) => Number(textOf(element)))
      .filter(Number.isFinite)
    const { intervals } = advisory.decision.situation.waveBands
    const counted = curve.points.flatMap(({ effects, heights: own }) => [
      ...own.flatMap(({ height }, i) => {
        const range = intervals[i]
        return range && effects.speed > range.from && effects.speed <= range.to ? [height] : []
      }),
      effects.banks[advisory.decision.situation.nearer].waveHeight,
    ])
    const highest = Math.max(...counted.filter(Number.isFinite))
    const step = heights[1]! - heights[0]!
    // the last tick may lie up to one step below the end of the axis
    expect(Math.max(...heights) + step).toBeGreaterThanOrEqual(highest)
    const clip = [...elementsOf(svg)].find(({ name }) => name === 'clipPath')!.children[0] as Element
    const right = Number(clip.attributes.x) + Number(clip.attributes.width)
    const { current, direction } = { ...advisory.decision.situation.conditions, ...advisory.decision }
    const along = current === 0 ? 0 : direction === 'downstream' ? current : -current
    const top = (curve.points.at(-1)!.effects.speed + along) * 3.6
    expect(Math.abs(axis(groundTicks(svg))(top) - right)).toBeLessThan(0.2)
  })
})

test('no drawing of any class on any segment has a number that is none', () => {
  const outcomes = new Set<string>()
  let count = 0
  for (const asked of wideSet()) {
    const parts = sheetPartsIfAny(asked)
    if (!parts) continue
    count += 1
    outcomes.add(parts.advisory.decision.outcome)
    for (const size of SIZES) {
      const svg = parseXml(speedCurveSvg(parts.curve, parts.advisory, size))
      expect(badAttributes(svg), JSON.stringify(asked)).toEqual([])
      expect(textsOf(svg).join(' '), JSON.stringify(asked)).not.toMatch(/NaN|undefined|Infinity/)
    }
  }
  expect(count).toBeGreaterThan(250)
  expect([...outcomes].sort()).toEqual(['limited', 'no-safe-speed', 'service-speed'])
})
