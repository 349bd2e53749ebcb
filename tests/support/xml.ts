/** An element of an XML document. */
export interface Element {
  readonly name: string
  readonly attributes: Readonly<Record<string, string>>
  readonly children: readonly (Element | string)[]
}

const NAME = '[A-Za-z_][A-Za-z0-9_:.-]*'
const TAG = new RegExp(`<(/?)(${NAME})((?:\\s+${NAME}="[^"<]*")*)\\s*(/?)>`, 'y')
const ATTRIBUTE = new RegExp(`(${NAME})="([^"<]*)"`, 'g')
const TEXT = /[^<]+/y
const ENTITY = /&(?:amp|lt|gt|quot|#39|#x?[0-9a-fA-F]+);/g
const NAMED: Readonly<Record<string, string>> = {
  '&amp;': '&',
  '&lt;': '<',
  '&gt;': '>',
  '&quot;': '"',
  '&#39;': "'",
}

/** A text with its entities resolved; a bare ampersand and a character that XML does not allow are faults. */
function resolved(text: string): string {
  if (text.replaceAll(ENTITY, '').includes('&')) throw new Error(`Bare ampersand in ${text}`)
  if (/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]|\p{Cs}/u.test(text)) {
    throw new Error(`A character that XML does not allow in ${JSON.stringify(text)}`)
  }
  return text.replaceAll(ENTITY, (entity) => NAMED[entity] ?? entity)
}

function attributesOf(text: string): Record<string, string> {
  const found: Record<string, string> = {}
  for (const [, name = '', value = ''] of text.matchAll(ATTRIBUTE)) {
    if (name in found) throw new Error(`Attribute ${name} is given twice`)
    found[name] = resolved(value)
  }
  return found
}

/** Parses one element with everything in it, as strictly as XML asks for what drawings use of it. */
export function parseXml(text: string): Element {
  const root = { name: '', attributes: {}, children: [] as (Element | string)[] }
  const open = [root]
  let at = 0
  while (at < text.length) {
    const parent = open.at(-1)!
    TEXT.lastIndex = at
    const plain = TEXT.exec(text)
    if (plain) {
      parent.children.push(resolved(plain[0]))
      at = TEXT.lastIndex
      continue
    }
    TAG.lastIndex = at
    const tag = TAG.exec(text)
    if (!tag) throw new Error(`Not well formed at ${text.slice(at, at + 80)}`)
    at = TAG.lastIndex
    const [, slash, name = '', attributes = '', isEmpty] = tag
    if (slash === '/') {
      if (open.pop()?.name !== name) throw new Error(`</${name}> closes nothing`)
      continue
    }
    const element = { name, attributes: attributesOf(attributes), children: [] }
    parent.children.push(element)
    if (isEmpty !== '/') open.push(element)
  }
  const [first, ...rest] = root.children
  if (open.length !== 1 || rest.length > 0 || typeof first !== 'object') throw new Error('Not one element')
  return first
}

/** An element and all below it. */
export function* elementsOf(element: Element): Generator<Element> {
  yield element
  for (const child of element.children) if (typeof child === 'object') yield* elementsOf(child)
}

/** Every text below an element. */
export const textsOf = (element: Element): string[] =>
  [...elementsOf(element)].flatMap(({ children }) => children.filter((child) => typeof child === 'string'))

/** Attributes in which a number was not one. */
export const badAttributes = (element: Element): string[] =>
  [...elementsOf(element)].flatMap(({ name, attributes }) =>
    Object.entries(attributes)
      .filter(([key, value]) => !key.startsWith('aria') && /NaN|undefined|Infinity|\bnull\b/.test(value))
      .map(([key, value]) => `${name} ${key}="${value.slice(0, 60)}"`),
  )
