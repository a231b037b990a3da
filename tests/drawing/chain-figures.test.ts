import { describe, expect, it } from 'vitest'
import { screenPen } from '#app/drawing/pen.ts'
import { chainFigures, type ChainFigure, type ChainStop } from '#app/drawing/plan/chain-figures.ts'
import { textWidth } from '#app/drawing/text/widths.ts'

const pen = screenPen('dusk')
const stopsAt = (...px: readonly number[]): ChainStop[] => px.map((at) => ({ px: at, metres: at / 10 }))
const metres = (length: number) => length.toFixed(2)
const width = (text: string) => textWidth(text, pen.text, 500)

/** From where to where a figure reaches along the chain, px. */
function reachOf({ text, place, at }: ChainFigure): readonly [number, number] {
  if (place === 'before') return [at - width(text), at]
  return place === 'after' ? [at, at + width(text)] : [at - width(text) / 2, at + width(text) / 2]
}

describe('figures of a chain of dimensions', () => {
  it('stand above what is long enough for them', () => {
    expect(chainFigures(stopsAt(0, 100, 200), metres, pen)).toEqual([
      { text: '10.00', place: 'above', at: 50 },
      { text: '10.00', place: 'above', at: 150 },
    ])
  })
  it('stand outside ends that are too short, where the drawing has room', () => {
    const figures = chainFigures(stopsAt(100, 110, 300, 312), metres, pen, 400)
    expect(figures.map(({ text, place }) => [text, place])).toEqual([
      ['1.00', 'before'],
      ['19.00', 'above'],
      ['1.20', 'after'],
    ])
  })
  it('never leave the drawing', () => {
    const figures = chainFigures(stopsAt(10, 20, 190, 200), metres, pen, 210)
    expect(figures).toHaveLength(3)
    for (const figure of figures) {
      const [from, to] = reachOf(figure)
      expect(from).toBeGreaterThanOrEqual(0)
      expect(to).toBeLessThanOrEqual(210)
    }
  })
  it('do not come back to the edge from a dimension that is off the drawing', () => {
    const [first] = chainFigures(stopsAt(-60, -50, 150), metres, pen, 210)
    expect(first).toMatchObject({ text: '1.00', place: 'before' })
  })
  it('of equal dimensions too short for their own are one, and none meets another', () => {
    const equal = chainFigures(stopsAt(0, 60, 80, 100, 120, 140, 200), metres, pen, 300)
    expect(equal.filter(({ place }) => place === 'below')).toEqual([{ text: '4 × 2.00', place: 'below', at: 100 }])
    const uneven = chainFigures(stopsAt(0, 60, 78, 97, 115, 134, 200), metres, pen, 300)
    const spans = uneven.filter(({ place }) => place === 'below').map(reachOf)
    expect(spans.length).toBeGreaterThan(0)
    for (const [i, [from]] of spans.entries()) expect(from).toBeGreaterThan(spans[i - 1]?.[1] ?? 0)
  })
})
