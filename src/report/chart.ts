import { line as lineShape } from 'd3-shape'
import { attributes, markup, type Markup, type Piece } from './html.ts'
import { textWidth } from './text-width.ts'
import type { Box } from './place.ts'

/** Width a drawing is made for: a desk or a sheet of paper, or a phone. */
export type Size = 'wide' | 'narrow'

/** Widths, px: the measure of the sheet, and a phone less its margins. */
export const WIDTHS: Readonly<Record<Size, number>> = { wide: 720, narrow: 358 }

export const FONT = "Helvetica, Arial, 'Liberation Sans', sans-serif"
export const TEXT_SIZE = 12

/** Colours that colour-blind readers tell apart (Okabe & Ito 2008), without the yellow that paper loses. */
export const COLOURS = {
  blue: '#0072b2',
  vermilion: '#d55e00',
  green: '#009e73',
  purple: '#b0578d',
  sky: '#3a9bd9',
  orange: '#c98500',
  ink: '#1a1a1a',
  grey: '#5a5a5a',
  faint: '#d8d8d8',
  water: '#dcebf5',
  bed: '#e6dccb',
} as const

/** Colours of lines that stand for methods, in the order of the methods. */
export const LINE_COLOURS = [
  COLOURS.blue,
  COLOURS.vermilion,
  COLOURS.green,
  COLOURS.purple,
  COLOURS.sky,
  COLOURS.orange,
  COLOURS.grey,
] as const

export type Anchor = 'start' | 'middle' | 'end'

export interface TextStyle {
  readonly anchor?: Anchor
  readonly size?: number
  readonly isBold?: boolean
  readonly isItalic?: boolean
  readonly fill?: string
  /** a white edge, so that the text stays readable on lines */
  readonly hasHalo?: boolean
  /** degrees, clockwise, about the anchor */
  readonly turn?: number
}

export function label(x: number, y: number, text: string, style: TextStyle = {}): Markup {
  const { anchor = 'start', size = TEXT_SIZE, fill = COLOURS.ink } = style
  const halo = style.hasHalo
    ? { 'paint-order': 'stroke', stroke: '#fff', 'stroke-width': 3, 'stroke-linejoin': 'round' }
    : {}
  const turn = style.turn === undefined ? undefined : rotation(style.turn, x, y)
  const all = attributes({
    x,
    y,
    'text-anchor': anchor === 'start' ? undefined : anchor,
    'font-size': size === TEXT_SIZE ? undefined : size,
    'font-weight': style.isBold ? 700 : undefined,
    'font-style': style.isItalic ? 'italic' : undefined,
    fill: fill === COLOURS.ink ? undefined : fill,
    transform: turn,
    ...halo,
  })
  return markup`<text${all}>${text}</text>`
}

const rotation = (degrees: number, x: number, y: number): string => markup`rotate(${degrees} ${x} ${y})`.text

/** A label on a white plate, for places where lines run. */
export function plated(x: number, y: number, text: string, style: TextStyle = {}): Markup {
  const box = labelBox(x, y, text, style)
  return markup`<rect x="${box.x - 2}" y="${box.y - 1}" width="${box.width + 4}" height="${box.height + 1}" fill="#fff"/>${label(x, y, text, style)}`
}

/** Box that a label takes. */
export function labelBox(x: number, y: number, text: string, style: TextStyle = {}): Box {
  const { anchor = 'start', size = TEXT_SIZE } = style
  const width = textWidth(text, size) * (style.isBold ? 1.06 : 1)
  const left = anchor === 'start' ? x : anchor === 'end' ? x - width : x - width / 2
  return { x: left, y: y - 0.82 * size, width, height: 1.12 * size }
}

export interface Stroke {
  readonly colour?: string
  readonly width?: number
  readonly dash?: string
}

const strokeAttributes = ({ colour = COLOURS.ink, width = 1, dash }: Stroke) =>
  attributes({ stroke: colour, 'stroke-width': width, 'stroke-dasharray': dash })

export function straight(x1: number, y1: number, x2: number, y2: number, stroke: Stroke = {}): Markup {
  return markup`<line x1="${x1}" y1="${y1}" x2="${x2}" y2="${y2}"${strokeAttributes(stroke)}/>`
}

export type Point = readonly [x: number, y: number]

const shape = lineShape<Point>()
  .defined(([x, y]) => Number.isFinite(x) && Number.isFinite(y))
  .digits(1)

/** The `d` of a line through points; it is broken where a point has no value. */
export const pathThrough = (points: readonly Point[]): string => shape(points) ?? ''

export function curved(points: readonly Point[], stroke: Stroke = {}): Markup {
  const d = pathThrough(points)
  return markup`${d !== '' && markup`<path d="${d}" fill="none" stroke-linejoin="round"${strokeAttributes(stroke)}/>`}`
}

export interface Fill extends Stroke {
  readonly fill: string
}

export function polygon(points: readonly Point[], fill: Fill): Markup {
  const d = `${pathThrough(points)}Z`
  const stroke = fill.colour === undefined ? '' : strokeAttributes(fill)
  return markup`<path d="${d}" fill="${fill.fill}"${stroke}/>`
}

export interface Frame {
  readonly width: number
  readonly height: number
  /** what the drawing is, in few words */
  readonly title: string
  /** what it shows, for those who cannot see it */
  readonly description: string
  /** sets the ids of several drawings on one page apart */
  readonly id: string
}

/** A whole drawing, which stands by itself as a file too. */
export function drawing(frame: Frame, content: Piece): Markup {
  const { width, height, id } = frame
  return markup`<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${width} ${height}" width="${width}" height="${height}" role="img" aria-labelledby="${id}-title ${id}-desc" font-family="${FONT}" font-size="${TEXT_SIZE}" fill="${COLOURS.ink}"><title id="${id}-title">${frame.title}</title><desc id="${id}-desc">${frame.description}</desc><rect width="${width}" height="${height}" fill="#fff"/>${content}</svg>`
}

/** Ticks that keep a least distance between one another. */
export function ticksApart(
  scale: { (value: number): number; ticks(count?: number): number[] },
  length: number,
  apart: number,
): number[] {
  return scale.ticks(Math.max(2, Math.floor(length / apart)))
}

/** A filled head of an arrow at a point, pointing in a direction, degrees clockwise from up. */
export function arrowHead(
  x: number,
  y: number,
  degrees: number,
  size = 7,
  fill: string = COLOURS.ink,
): Markup {
  return markup`<path d="M0 0L${size / 2.4} ${size}L${-size / 2.4} ${size}Z" fill="${fill}" transform="translate(${x} ${y}) rotate(${degrees})"/>`
}
