import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'

/** A place on a chain of dimensions: where it is on the drawing, px along the chain, and the site's coordinate, m. */
export interface ChainStop {
  readonly px: number
  readonly metres: number
}

/**
 * A figure of a chain. `at`, px along the chain, is the figure's middle above or below the line; before and after it,
 * the figure's end that is nearest to the chain.
 */
export interface ChainFigure {
  readonly text: string
  readonly place: 'above' | 'below' | 'before' | 'after'
  readonly at: number
}

interface Span {
  readonly from: number
  readonly to: number
  readonly text: string
  readonly width: number
}

/** Between an end of the chain and a figure outside it, px at 1:1. */
const outside = 8
/** Least room between two figures, and between a figure and the drawing's edge, px at 1:1. */
const apart = 3

/**
 * The figures of a chain, stops in rising px: each above its dimension where it fits; outside an end that is too short,
 * but above it where the drawing, `length` px along the chain, ends first; below the line between others. Equal
 * dimensions in a row that are too short share one figure ("7 × 2.64"); one that would meet another is left out.
 */
export function chainFigures(
  stops: readonly ChainStop[],
  textOf: (metres: number) => string,
  pen: Pen,
  length = Infinity,
): ChainFigure[] {
  const sizeOf = (text: string) => textWidth(text, pen.text, 500)
  const spans = stops.slice(1).map((stop, i): Span => {
    const before = stops[i] ?? stop
    const text = textOf(Math.abs(stop.metres - before.metres))
    return { from: before.px, to: stop.px, text, width: sizeOf(text) }
  })
  const fits = ({ from, to, width }: Span) => width + 6 * pen.k <= to - from
  const above = ({ from, to, text }: Span): ChainFigure => ({ text, place: 'above', at: (from + to) / 2 })
  const first = spans[0]
  const last = spans.length > 1 ? spans.at(-1) : undefined
  return [
    ...(first && !fits(first) ? [atEnd(first, 'before', pen, length)] : []),
    ...spans.filter(fits).map(above),
    ...below(spans.slice(1, -1), fits, sizeOf, apart * pen.k),
    ...(last && !fits(last) ? [atEnd(last, 'after', pen, length)] : []),
  ]
}

function atEnd({ from, to, text, width }: Span, place: 'before' | 'after', pen: Pen, length: number): ChainFigure {
  const at = place === 'before' ? from - outside * pen.k : to + outside * pen.k
  const far = place === 'before' ? at - width : at + width
  const edge = apart * pen.k
  const isOnDrawing = from >= 0 && to <= length
  if (!isOnDrawing || (far >= edge && far <= length - edge)) return { text, place, at }
  const least = edge + width / 2
  return { text, place: 'above', at: Math.max(least, Math.min(length - least, (from + to) / 2)) }
}

/** Figures below the line: runs of equal ones as one, from the first on, as far as they do not meet. */
function below(
  spans: readonly Span[],
  fits: (span: Span) => boolean,
  sizeOf: (text: string) => number,
  gap: number,
): ChainFigure[] {
  const figures: ChainFigure[] = []
  let taken = -Infinity
  for (let i = 0; i < spans.length;) {
    const span = spans[i]
    if (!span) break
    let end = i + 1
    while (!fits(span) && spans[end]?.text === span.text) end++
    const text = end - i > 1 ? `${end - i} × ${span.text}` : span.text
    const at = (span.from + (spans[end - 1] ?? span).to) / 2
    const half = sizeOf(text) / 2
    i = end
    if (fits(span) || at - half < taken + gap) continue
    figures.push({ text, place: 'below', at })
    taken = at + half
  }
  return figures
}
