import { CRITERION_IDS, type CriterionId } from '../advisory/criteria/criterion.ts'
import { COLOURS, LINE_COLOURS, WIDTHS, drawing, label, straight, type Stroke } from './chart.ts'
import type { Markup } from './html.ts'
import { markup } from './html.ts'
import { tagMark } from './speed-labels.ts'
import type { Strip } from './evidence-strip-rows.ts'
import { textWidth } from './text-width.ts'
import { CRITERION_NAMES } from './words.ts'

/** A line of a strip: told apart by dashes and a letter, so that no colour is needed. */
export interface LineStyle {
  readonly letter: string
  readonly name: string
  readonly stroke: Stroke & { readonly colour: string }
}

const DASHES = ['7 2', '2 2', '9 2 2 2', '5 3', '12 3', '1.5 3', '9 2 2 2 2 2', '4 2 1 2', '3 4', '14 3 3 3']

/** The ceiling of each criterion, the same on every strip. */
export const CEILING_STYLES: Readonly<Record<CriterionId, LineStyle>> = Object.fromEntries(
  CRITERION_IDS.map((id, i): [CriterionId, LineStyle] => [
    id,
    {
      letter: 'ABCDEFGHIJ'[i] ?? '',
      name: {
        ...CRITERION_NAMES,
        'bank-wave-height': 'Wave height at a bank',
        'receptor-wave-height': 'Wave height at a place',
      }[id],
      stroke: {
        colour: LINE_COLOURS[i % LINE_COLOURS.length] ?? COLOURS.grey,
        width: 1.5,
        dash: DASHES[i] ?? '',
      },
    },
  ]),
) as Record<CriterionId, LineStyle>

export const CRITICAL_STYLE: LineStyle = {
  letter: 'V',
  name: 'Critical speed',
  stroke: { colour: COLOURS.grey, width: 1.1 },
}

export const TODAY_STYLE: LineStyle = {
  letter: 'T',
  name: 'Posted today',
  stroke: { colour: COLOURS.ink, width: 2.2, dash: '1 2' },
}

export const LIMIT_STROKE: Stroke = { width: 3.6 }

/** A kept limit: white inside the line. */
export const keptLine = (x1: number, y: number, x2: number): Markup =>
  markup`${straight(x1, y, x2, y, { width: 5 })}${straight(x1, y, x2, y, { width: 2, colour: '#fff' })}`

export const hatchPattern = (id: string): Markup =>
  markup`<pattern id="${id}" width="9" height="9" patternUnits="userSpaceOnUse" patternTransform="rotate(45)"><rect width="1.2" height="9" fill="#9a9a9a"/></pattern>`

/** Criteria that govern a segment of a strip, in their order. */
export function governingOf({ segments }: Strip): CriterionId[] {
  const found = new Set(segments.map(({ governing }) => governing))
  return CRITERION_IDS.filter((id) => found.has(id))
}

interface KeyEntry {
  readonly name: string
  readonly mark: (x: number, y: number) => Markup | readonly Markup[]
}

const LENGTH = 30
const ROW = 19

const lineEntry = ({ letter, name, stroke }: LineStyle, note = ''): KeyEntry => ({
  name: `${name}${note}`,
  mark: (x, y) => [straight(x, y, x + LENGTH, y, stroke), tagMark(x + LENGTH / 2, y, letter, stroke.colour)],
})

function entriesOf(strip: Strip, hatch: string): KeyEntry[] {
  return [
    { name: 'Limit', mark: (x, y) => straight(x, y, x + LENGTH, y, LIMIT_STROKE) },
    { name: 'Limit kept as posted', mark: (x, y) => keptLine(x, y, x + LENGTH) },
    {
      name: 'No limit can be proposed',
      mark: (x, y) =>
        markup`<rect x="${x}" y="${y - 6}" width="${LENGTH}" height="12" fill="url(#${hatch})" stroke="#777"/>`,
    },
    lineEntry(TODAY_STYLE),
    lineEntry(CRITICAL_STYLE),
    ...governingOf(strip).map((id) => lineEntry(CEILING_STYLES[id])),
  ]
}

/** What the lines of a strip stand for. */
export function stripKey(strip: Strip, id: string): string {
  const hatch = `${id}-hatch`
  let x = 2
  let y = 10
  const marks = entriesOf(strip, hatch).map(({ name, mark }) => {
    const width = LENGTH + 6 + textWidth(name, 11) + 16
    if (x + width - 16 > WIDTHS.wide) {
      x = 2
      y += ROW
    }
    const content = markup`<g>${mark(x, y)}${label(x + LENGTH + 6, y + 4, name, { size: 11 })}</g>`
    x += width
    return content
  })
  const frame = {
    width: WIDTHS.wide,
    height: y + 11,
    id,
    title: 'Key',
    description: 'What the lines and areas of the strip stand for.',
  }
  return drawing(frame, [hatchPattern(hatch), marks]).text
}
