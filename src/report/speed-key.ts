import type { Advisory } from '../advisory/advise.ts'
import { COLOURS, WIDTHS, label, straight } from './chart.ts'
import { metres } from './format.ts'
import { markup, type Markup } from './html.ts'
import type { Layout } from './speed-axes.ts'
import { LETTERS, lineColour, tagMark } from './speed-labels.ts'
import type { Samples } from './speed-samples.ts'
import { fitted, textWidth } from './text-width.ts'
import { methodShortName } from './words.ts'

interface Entry {
  readonly letter: string
  readonly name: string
  readonly note: string
  /** the note in one word or figure */
  readonly value: string
  readonly line: (x: number, y: number) => Markup | readonly Markup[]
  readonly colour: string
}

const LENGTH = 24
const ROW = 29
const BRIEF_ROW = 15.5

function entriesOf(samples: Samples, advisory: Advisory): Entry[] {
  const methods = samples.methods.map((method, i): Entry => {
    const report = advisory.waveMethods[i]
    const isIn = report?.outside.length === 0
    const isEver = method.counts?.includes(true) === true
    const height = metres(report?.height)
    return {
      letter: LETTERS[i] ?? '',
      name: methodShortName(method.id),
      note: isIn ? `${height}, in range` : isEver ? `${height}, out of range` : `${height}, never in range`,
      value: isIn ? height : 'out',
      colour: lineColour(i),
      line: (x, y) =>
        straight(x, y, x + LENGTH, y, {
          colour: lineColour(i),
          width: isEver ? 1.8 : 1.2,
          ...(!isEver && { dash: '4 3' }),
        }),
    }
  })
  const { sternWaveHeight, banks } = advisory.effects
  const near = banks[advisory.decision.situation.nearer]
  const own: Entry[] = [
    {
      letter: 'W',
      name: 'Wave at the bank',
      note: `${metres(near.waveHeight)}, combined`,
      value: metres(near.waveHeight),
      colour: COLOURS.ink,
      line: (x, y) => straight(x, y, x + LENGTH, y, { colour: '#c9c9c9', width: 9 }),
    },
  ]
  if (samples.stern.values.some(Number.isFinite)) {
    own.push({
      letter: 'S',
      name: 'Stern wave',
      note: metres(sternWaveHeight),
      value: metres(sternWaveHeight),
      colour: COLOURS.ink,
      line: (x, y) => [
        straight(x, y, x + LENGTH, y, { width: 3.4 }),
        straight(x, y, x + LENGTH, y, { colour: '#fff', width: 1.4 }),
      ],
    })
  }
  if (samples.governing) {
    own.push({
      letter: 'G',
      name: samples.governing.name,
      note: 'where the limit governs',
      value: 'governs',
      colour: COLOURS.ink,
      line: (x, y) => straight(x, y, x + LENGTH, y, { width: 2, dash: '9 3 2 3' }),
    })
  }
  return [...own, ...methods]
}

function entryAt(
  { letter, name, note, line, colour }: Entry,
  x: number,
  y: number,
  width: number,
  size: number,
): Markup {
  const left = x + LENGTH + 6
  const room = width - LENGTH - 6
  return markup`<g>${line(x, y)}${tagMark(x + LENGTH / 2, y, letter, colour)}${label(left, y, fitted(name, room, size), { size })}${label(left, y + 13, fitted(note, room, 11), { size: 11, fill: COLOURS.grey })}</g>`
}

/** An entry on one line. */
function briefEntryAt({ letter, name, value, line, colour }: Entry, x: number, y: number): Markup {
  const left = x + LENGTH + 6
  const right = WIDTHS.wide - 1
  const room = right - left - textWidth(value, 11) - 6
  return markup`<g>${line(x, y)}${tagMark(x + LENGTH / 2, y, letter, colour)}${label(left, y + 4, fitted(name, room, 11), { size: 11 })}${label(right, y + 4, value, { size: 11, anchor: 'end', fill: COLOURS.grey })}</g>`
}

const HEAD = 22

/** Height of the key beside the field, px. */
export const keyHeight = (samples: Samples, isBrief = false): number =>
  HEAD + (isBrief ? BRIEF_ROW : ROW) * (samples.methods.length + 2 + (samples.governing ? 1 : 0)) + 10

/** What each letter and line stands for: beside the field, or below it on a phone. */
export function speedKey(
  samples: Samples,
  advisory: Advisory,
  layout: Layout,
  below: number,
  isBrief = false,
): { readonly content: Markup; readonly bottom: number } {
  const entries = entriesOf(samples, advisory)
  const isSafe = advisory.decision.outcome !== 'no-safe-speed'
  const head = isSafe ? 'At the recommended speed' : 'At the minimum steerage speed'
  if (layout.size === 'wide') {
    const x = layout.right + 14
    const content = markup`${label(x, layout.top + 8, head, { size: 11, isBold: true })}${entries.map(
      (entry, i) =>
        isBrief
          ? briefEntryAt(entry, x, layout.top + HEAD + 4 + BRIEF_ROW * i)
          : entryAt(entry, x, layout.top + HEAD + 8 + ROW * i, WIDTHS.wide - x, 12),
    )}`
    return { content, bottom: layout.top + keyHeight(samples, isBrief) }
  }
  const half = WIDTHS.narrow / 2
  const content = markup`${label(4, below + 6, head, { size: 11, isBold: true })}${entries.map((entry, i) =>
    entryAt(entry, 4 + half * (i % 2), below + HEAD + 8 + ROW * Math.floor(i / 2), half - 5, 11),
  )}`
  return { content, bottom: below + HEAD + ROW * Math.ceil(entries.length / 2) }
}
