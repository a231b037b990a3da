/**
 * Neighbouring cells of a row and the stretch of an element that they see, one after another in `figures`: the row, the
 * first column and the one after the last, where the stretch begins and ends (shares of the element's length along u),
 * and the share of its radiation that arrives.
 */
export interface Spans {
  count: number
  figures: Float64Array
}

/** Figures per span. */
export const spanSize = 6

export const emptySpans = (): Spans => ({ count: 0, figures: new Float64Array(600) })

/** Adds a span after the others. */
export function addSpan(
  spans: Spans,
  row: number,
  first: number,
  end: number,
  from: number,
  to: number,
  share: number,
): void {
  const at = spanSize * spans.count++
  if (at === spans.figures.length) {
    const more = new Float64Array(2 * at)
    more.set(spans.figures)
    spans.figures = more
  }
  const { figures } = spans
  figures[at] = row
  figures[at + 1] = first
  figures[at + 2] = end
  figures[at + 3] = from
  figures[at + 4] = to
  figures[at + 5] = share
}
