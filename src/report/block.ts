import { markup, type Markup, type Piece } from './html.ts'

/** A particular in a block, as on a drawing. */
export function item(name: string, value: Piece, isDouble = false): Markup {
  return markup`<div${isDouble && markup` class="double"`}><dt>${name}</dt><dd>${value}</dd></div>`
}
