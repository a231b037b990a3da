import type { PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** How the drawing is enlarged and shifted against the view that shows all: px' = size · px + shift. */
export interface ViewTransform {
  readonly size: number
  readonly x: number
  readonly y: number
}

/** The whole plan. */
export const wholePlan: ViewTransform = { size: 1, x: 0, y: 0 }

const smallest = 0.4
const largest = 16

/** Larger by a factor about a point of the drawing that stays where it is, px; within 0.4 and 16 times. */
export function enlarge(transform: ViewTransform, factor: number, [px, py]: Vec2): ViewTransform {
  const size = Math.min(largest, Math.max(smallest, transform.size * factor))
  const by = size / transform.size
  return { size, x: px - (px - transform.x) * by, y: py - (py - transform.y) * by }
}

/** Shifted by px of the screen. */
export const shift = (transform: ViewTransform, dx: number, dy: number): ViewTransform => ({
  ...transform,
  x: transform.x + dx,
  y: transform.y + dy,
})

/** Two fingers: what lay under them stays under them. */
export function pinch(
  transform: ViewTransform,
  before: readonly [Vec2, Vec2],
  after: readonly [Vec2, Vec2],
): ViewTransform {
  const middle = ([a, b]: readonly [Vec2, Vec2]): Vec2 => [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2]
  const apart = ([a, b]: readonly [Vec2, Vec2]) => Math.max(1, Math.hypot(a[0] - b[0], a[1] - b[1]))
  const [from, to] = [middle(before), middle(after)]
  return enlarge(shift(transform, to[0] - from[0], to[1] - from[1]), apart(after) / apart(before), to)
}

/** The size at which the plan is at 1:50 on a screen of 96 px per inch, about the middle of the drawing. */
export function atTrueSize(whole: PlanView): ViewTransform {
  const pxPerMetre = 96 / 0.0254 / 50
  return enlarge(wholePlan, pxPerMetre / whole.scale, [whole.width / 2, whole.height / 2])
}

/** The view that a transform makes of the view of the whole plan. */
export const transformedView = (whole: PlanView, transform: ViewTransform): PlanView => ({
  ...whole,
  scale: whole.scale * transform.size,
  x0: whole.x0 * transform.size + transform.x,
  y0: whole.y0 * transform.size + transform.y,
})

/** CSS transform that shows `wanted` while the drawing is still drawn at `drawn`. */
export function interimTransform(drawn: ViewTransform, wanted: ViewTransform): string {
  const by = wanted.size / drawn.size
  return `matrix(${by}, 0, 0, ${by}, ${wanted.x - drawn.x * by}, ${wanted.y - drawn.y * by})`
}
