import { Markup, markup, type Piece } from './html.ts'

/** Type and rules that every page shares. Nothing is fetched: fonts are those of the reader's machine. */
const BASE_STYLE = `
:root { color-scheme: light; --ink: #1a1a1a; --grey: #5a5a5a; --rule: #b9b9b9; --faint: #e4e4e4; --tint: #f4f4f1; }
* { box-sizing: border-box; }
html { -webkit-text-size-adjust: 100%; text-size-adjust: 100%; }
body { margin: 0; background: #ecebe7; color: var(--ink); font: 15px/1.45 Helvetica, Arial, "Liberation Sans", sans-serif; }
h1, h2, h3 { font-family: Georgia, "Liberation Serif", "Times New Roman", serif; line-height: 1.2; margin: 0; overflow-wrap: anywhere; }
p { margin: 0 0 .6em; }
a { color: #00558c; }
svg { display: block; max-width: 100%; height: auto; }
table { border-collapse: collapse; width: 100%; font-variant-numeric: tabular-nums; font-size: 13px; line-height: 1.35; }
th, td { text-align: left; vertical-align: top; padding: 4px 8px 4px 0; border-bottom: 1px solid var(--faint); overflow-wrap: anywhere; }
thead th { border-bottom: 1.5px solid var(--ink); vertical-align: bottom; font-weight: 700; }
td.figure, th.figure { text-align: right; white-space: nowrap; }
.muted { color: var(--grey); }
@media print { body { background: #fff; font-size: 9.5pt; } a { color: inherit; text-decoration: none; } }
`

/** A whole page. `style` is our own text, never a caller's. */
export function page(title: string, style: string, body: Piece): string {
  const sheet = new Markup(`${BASE_STYLE}${style}`)
  return `<!doctype html>\n${
    markup`<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><meta name="robots" content="noindex"><title>${title}</title><style>${sheet}</style></head><body>${body}</body></html>`
      .text
  }\n`
}
