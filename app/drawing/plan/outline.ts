import type { Vec2 } from '#app/domain/vector.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'

const figure = (value: number): number => Math.round(value * 100) / 100

/** SVG path of a polygon given in site m, in drawing px. */
export const outlinePath = (outline: readonly Vec2[], view: PlanView): string =>
  `M${outline.map((corner) => toScreen(view, corner).map(figure).join(' ')).join('L')}Z`

/** Twice the signed area of a polygon: positive when it runs counter-clockwise, m². */
const doubleArea = (outline: readonly Vec2[]): number =>
  outline.reduce((sum, [x, y], i) => {
    const [nextX, nextY] = outline[(i + 1) % outline.length] ?? [x, y]
    return sum + x * nextY - nextX * y
  }, 0)

/** An edge of the floor on the drawing: where it starts, its length, px, and its directions along and outward. */
export interface ScreenEdge {
  readonly from: Vec2
  readonly length: number
  readonly along: Vec2
  readonly outward: Vec2
}

/** The edge of a polygon that starts at a corner; null when there is no such corner or the edge has no length. */
export function edgeOnScreen(outline: readonly Vec2[], corner: number, view: PlanView): ScreenEdge | null {
  const a = outline[corner]
  const b = outline[(corner + 1) % outline.length]
  if (!a || !b) return null
  const from = toScreen(view, a)
  const to = toScreen(view, b)
  const length = Math.hypot(to[0] - from[0], to[1] - from[1])
  if (length === 0) return null
  const along: Vec2 = [(to[0] - from[0]) / length, (to[1] - from[1]) / length]
  const side = doubleArea(outline) > 0 ? 1 : -1
  return { from, length, along, outward: [-along[1] * side, along[0] * side] }
}

/** A point of an edge's own frame, px along it and outward of it, on the drawing. */
export const onEdge = (edge: ScreenEdge, along: number, outward: number): Vec2 => [
  edge.from[0] + edge.along[0] * along + edge.outward[0] * outward,
  edge.from[1] + edge.along[1] * along + edge.outward[1] * outward,
]
