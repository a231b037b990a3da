import { radians, type Vec2, type Vec3 } from '#app/domain/vector.ts'

/** The four corners that a site can be looked at from, as the plan lies: its x to the right, its y up. */
export const corners = ['lower left', 'lower right', 'upper right', 'upper left'] as const
export type Corner = (typeof corners)[number]

/** How far the eye is turned from a side of the plan towards its corner, and how far it looks down, degrees. */
export const turnedDeg = 30
export const downDeg = 30

/** Where the eye stands: counter-clockwise from +x in plan, degrees. */
const azimuths: Record<Corner, number> = {
  'lower left': 270 - turnedDeg,
  'lower right': 270 + turnedDeg,
  'upper right': 90 - turnedDeg,
  'upper left': 90 + turnedDeg,
}

/** A parallel projection square to the direction of view: its right and up on the drawing, and towards the eye. */
export interface Projection {
  readonly right: Vec3
  readonly up: Vec3
  readonly toEye: Vec3
}

/** The projection from a corner. All parallel lines stay parallel, and lengths along one direction keep their ratios. */
export function projectionFrom(corner: Corner): Projection {
  const [turn, down] = [radians(azimuths[corner]), radians(downDeg)]
  const [ca, sa, ce, se] = [Math.cos(turn), Math.sin(turn), Math.cos(down), Math.sin(down)]
  return { right: [-sa, ca, 0], up: [-ca * se, -sa * se, ce], toEye: [ca * ce, sa * ce, se] }
}

/** Where a projection lies on a drawing: px = x0 + scale × (right · p), y0 − scale × (up · p). */
export interface AxonometricView {
  readonly projection: Projection
  readonly scale: number
  readonly x0: number
  readonly y0: number
  readonly width: number
  readonly height: number
}

const dot = (a: Vec3, b: Vec3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2]

/** A point of the site on the drawing, px. */
export const toDrawing = ({ projection, scale, x0, y0 }: AxonometricView, point: Vec3): Vec2 => [
  x0 + scale * dot(projection.right, point),
  y0 - scale * dot(projection.up, point),
]

/** A view in which all points fit in `width` and, where given, `height` px with `margin` around; else as high as they are. */
export function axonometricView(
  points: readonly Vec3[],
  corner: Corner,
  room: { readonly width: number; readonly height?: number; readonly margin: number },
): AxonometricView {
  const projection = projectionFrom(corner)
  const xs = points.map((point) => dot(projection.right, point))
  const ys = points.map((point) => dot(projection.up, point))
  const [left, right, low, high] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)]
  const inner = Math.max(1, room.width - 2 * room.margin)
  const byWidth = inner / Math.max(0.1, right - left)
  const tall = room.height === undefined ? Infinity : Math.max(1, room.height - 2 * room.margin)
  const scale = Math.min(byWidth, tall / Math.max(0.1, high - low))
  const height = room.height ?? scale * (high - low) + 2 * room.margin
  const x0 = room.width / 2 - (scale * (left + right)) / 2
  const y0 = height / 2 + (scale * (low + high)) / 2
  return { projection, scale, x0, y0, width: room.width, height }
}

/** SVG transform from plan metres at a height to the drawing. */
export function planeTransform(view: AxonometricView, z: number): string {
  const { projection, scale } = view
  const [x, y] = toDrawing(view, [0, 0, z])
  const numbers = [scale * projection.right[0], -scale * projection.up[0], scale * projection.right[1], -scale * projection.up[1], x, y] // prettier-ignore
  return `matrix(${numbers.map((each) => Math.round(each * 1e4) / 1e4).join(' ')})`
}
