/** Text that is markup already: everything else is escaped when it is put into a page. */
export class Markup {
  constructor(readonly text: string) {}
}

/** What a page may be put together from. */
export type Piece = Markup | string | number | false | undefined | readonly Piece[]

const NAMED: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
}

/** Characters that XML does not allow, lone surrogates among them: a reader would refuse the whole drawing. */
const FORBIDDEN = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f-\u009f\ufffe\uffff]|\p{Cs}/gu

/** Overrides of the writing direction, which would turn round what follows a name. */
const TURNING = /[\u202a-\u202e\u2066-\u2069]/g

/** A text as it may stand in an element or a quoted attribute. */
export function escaped(text: string): string {
  return text
    .replace(FORBIDDEN, '\ufffd')
    .replace(TURNING, '')
    .replace(/[&<>"']/g, (character) => NAMED[character] ?? character)
}

/** A coordinate with two decimals, no trailing zeros and no negative zero. */
function written(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`A drawing has no place for ${value}`)
  return String(Math.round(value * 100) / 100 + 0)
}

function textOf(piece: Piece): string {
  if (piece === undefined || piece === false) return ''
  if (piece instanceof Markup) return piece.text
  if (typeof piece === 'number') return written(piece)
  return typeof piece === 'string' ? escaped(piece) : piece.map(textOf).join('')
}

/**
 * Markup with values put in: texts escaped, numbers as coordinates of two decimals, lists one after another, undefined
 * and false left out.
 *
 * @throws RangeError when a number is not finite
 */
export function markup(parts: TemplateStringsArray, ...values: readonly Piece[]): Markup {
  let text = parts[0] ?? ''
  values.forEach((value, i) => {
    text += textOf(value) + (parts[i + 1] ?? '')
  })
  return new Markup(text)
}

/** Attributes of an element, those without a value left out. */
export function attributes(values: Readonly<Record<string, string | number | undefined>>): Markup {
  const given = Object.entries(values).filter(([, value]) => value !== undefined)
  return new Markup(given.map(([name, value]) => ` ${name}="${textOf(value)}"`).join(''))
}
