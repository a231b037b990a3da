import type { Vec2 } from '#app/domain/vector.ts'
import { isClear, patch, type Patch } from '#app/drawing/plan/occupied.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'

/** Directions in which a figure is tried about the middle of its line, and how far from it, in heights of letters. */
const directions = 16
const rounds = [1.3, 2.2, 3.4, 4.8, 6.5]

/** The room that a figure takes when its middle stands at a place, px. */
export const figurePatch = ([x, y]: Vec2, text: string, pen: Pen): Patch =>
  patch(x, y, textWidth(text, pen.text, 600), pen.text)

/**
 * Where the figure of a line between two places stands, px: beside its middle, square to it first, as near as it is clear
 * of everything taken; in the first place of all when none is.
 */
export function placeFigure(from: Vec2, to: Vec2, text: string, taken: readonly Patch[], pen: Pen): Vec2 {
  const [x, y]: Vec2 = [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2]
  const square = Math.atan2(to[1] - from[1], to[0] - from[0]) + Math.PI / 2
  const half = textWidth(text, pen.text, 600) / 2
  const spots = rounds.flatMap((round) =>
    Array.from({ length: directions }, (_, i): Vec2 => {
      const step = (i % 2 === 0 ? 1 : -1) * Math.ceil(i / 2)
      const angle = square + (step * 2 * Math.PI) / directions
      const [dx, dy] = [Math.cos(angle), Math.sin(angle)]
      const out = round * pen.text
      return [x + dx * (out + half * Math.abs(dx)), y + dy * out]
    }),
  )
  return spots.find((spot) => isClear(figurePatch(spot, text, pen), taken, 2 * pen.k)) ?? spots[0] ?? [x, y]
}
