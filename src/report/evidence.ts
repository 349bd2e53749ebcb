import { annexes } from './evidence-annex.ts'
import { stretchCase } from './evidence-case.ts'
import { registerOf, type Register } from './evidence-register.ts'
import { rulesPart } from './evidence-rules.ts'
import { stretchSheet } from './evidence-sheet.ts'
import { panelsOf, stripPanelSvg } from './evidence-strip.ts'
import { stripsOf, type Strip } from './evidence-strip-rows.ts'
import { stripKey } from './evidence-strip-style.ts'
import { evidenceStyle } from './evidence-style.ts'
import { stretchTable } from './evidence-table.ts'
import { STATE_NAMES, titleOf, titlePage } from './evidence-title.ts'
import type { EvidenceView } from './evidence-view.ts'
import { directionText, groupName } from './evidence-words.ts'
import { Markup, markup } from './html.ts'
import { page } from './page.ts'

const RECIPE =
  'To print or to make a PDF: print this page from a browser on A4 paper, upright, at 100 %, with default margins, background graphics on and the headers and footers of the browser off; pages, their heads and their numbers are set here.'

/** Stretches of a plan whose table needs no page of its own. */
const SHORT = 5

const drawn = (svg: string): Markup => new Markup(`<div class="wide-drawing">${svg}</div>`)

function stripNote(view: EvidenceView, strip: Strip): string {
  const cells = strip.isWhole
    ? 'the lowest over the vessels, levels and currents of the group'
    : 'of the vessel, level and current that govern the stretch'
  const given =
    view.rules.percentile === null
      ? ''
      : ' at the inputs as given, without the scatter that the limit allows for'
  return `Ceilings of the criteria that govern somewhere (letters), ${cells}${given}; critical speed of the vessel that each segment allows least. Lines above the frame are not drawn.`
}

function stripPart(view: EvidenceView, strip: Strip, number: number): Markup {
  const id = `strip-${number + 1}`
  const panels = panelsOf(strip)
  const name = strip.waterway ?? 'Segments without a waterway'
  return markup`<h3>${name} · ${groupName(view, strip.groupId)} · ${directionText(strip.direction)}</h3>${panels.map(
    (panel, i) =>
      markup`<figure>${i === 0 && drawn(stripKey(strip, `${id}-key`))}${drawn(stripPanelSvg(view, strip, panel, `${id}-${i + 1}`))}${
        i === panels.length - 1 && markup`<figcaption>${stripNote(view, strip)}</figcaption>`
      }</figure>`,
  )}`
}

function contents(): Markup {
  const parts = [
    ['rules', 'How the limits were drawn'],
    ['plan', 'The plan along the waterway'],
    ['stretches', 'Stretches'],
    ['stretch-1', 'Sheets, one for each stretch'],
  ]
  const rest = ['Cautions', 'Assumptions', 'Vessels', 'Segments', 'Methods and versions']
  return markup`<nav aria-label="Parts"><p class="small">Parts: ${parts.map(([id = '', title = ''], i) => markup`<a href="#${id}">${String(i + 1)} ${title}</a>, `)}${rest.map(
    (title, i) => {
      const letter = 'ABCDE'[i] ?? ''
      return markup`${i > 0 && ', '}<a href="#annex-${letter.toLowerCase()}">Annex ${letter} ${title}</a>`
    },
  )}.</p></nav>`
}

/** Pieces of a list made one by one, between which others may have their turn. */
function* oneByOne<Item, Piece>(
  items: readonly Item[],
  make: (item: Item, index: number) => Piece,
): Generator<undefined, Piece[]> {
  const pieces: Piece[] = []
  for (const [index, item] of items.entries()) {
    pieces.push(make(item, index))
    yield
  }
  return pieces
}

function* body(view: EvidenceView): Generator<undefined, Markup> {
  const cases = yield* oneByOne(view.plan.stretches, (_, index) => stretchCase(view, index))
  const isShort = cases.length <= SHORT
  const register: Register = registerOf(cases)
  const strips = yield* oneByOne(stripsOf(view), (strip, i) => stripPart(view, strip, i))
  const sheets = yield* oneByOne(cases, (own) => stretchSheet(view, register, own))
  const mark =
    view.state !== 'published' &&
    markup`<div class="watermark ${view.state}" aria-hidden="true">${STATE_NAMES[view.state]}</div>`
  return markup`${mark}<main class="${view.state}"><p class="recipe">${RECIPE}</p>${titlePage(view, register)}<section class="paper" id="rules">${contents()}<h2>1 How the limits were drawn</h2>${rulesPart(view)}</section><section class="paper strips" id="plan"><h2>2 The plan along the waterway</h2>${strips}</section><section class="paper${isShort && ' follows'}" id="stretches"><h2>3 Stretches</h2>${stretchTable(view, register)}</section>${sheets}${annexes(view, register)}</main>`
}

/**
 * The evidence of a limit plan as a document to read, print, sign and file, made in steps: a plan of many stretches takes
 * seconds.
 *
 * @param view  the plan with the study it was drawn from, and its publication where it has one
 * @returns HTML that fetches nothing and runs nothing
 */
export function* evidenceSteps(view: EvidenceView): Generator<undefined, string> {
  return page(`${titleOf(view)}: evidence of a limit plan`, evidenceStyle(view), yield* body(view))
}

/** The evidence of a limit plan, made at once. */
export function evidenceDocument(view: EvidenceView): string {
  const steps = evidenceSteps(view)
  for (;;) {
    const step = steps.next()
    if (step.done === true) return step.value
  }
}
