import type { Uncertain } from '#app/domain/photo/estimate.ts'
import { homographyOf, type Corners, type Homography } from '#app/domain/photo/homography.ts'
import type { PhotoPlane } from '#app/domain/photo/measurements.ts'
import { refuseCorners } from '#app/domain/photo/rectangle-corners.ts'
import { refuse, type Refusal } from '#app/domain/photo/refusal.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** A tolerance is taken as two standard errors (house rule: 19 of 20 lie within). */
export const sigmasOfTolerance = 2

/** Names of the inputs that are clicks start with this. */
const click = 'mark'

/** Whether an input is a click: the others are sizes of a reference. */
export const isClick = (name: string): boolean => name.startsWith(click)

/** The two coordinates of a mark as inputs. */
export const markInputs = (name: string, [x, y]: Vec2, sigma: number): Uncertain[] => [
  { name: `${click} ${name} x`, value: x, sigma },
  { name: `${click} ${name} y`, value: y, sigma },
]

/** A size of a reference as an input. One name and size in two photos is one thing, measured once. */
export const sizeInput = (plane: PhotoPlane, which: string, value: number, tolerance: number): Uncertain => ({
  name: `size ${plane.name.toLowerCase()} ${which} ${value}`,
  value,
  sigma: tolerance / sigmasOfTolerance,
})

/** Inputs of a plane: eight of its corners, then its width and depth. `planeOf` takes them in this order. */
export const planeInputs = (photoId: string, plane: PhotoPlane, clickSigma: number): Uncertain[] => [
  ...plane.corners.flatMap((corner, k) => markInputs(`${photoId} ${plane.id} corner ${k + 1}`, corner, clickSigma)),
  sizeInput(plane, 'width', plane.width, plane.tolerance),
  sizeInput(plane, 'depth', plane.depth, plane.tolerance),
]

/** How many inputs a plane has. */
export const planeInputCount = 10

/** The homography of a plane from the values of its inputs; null when there is none. */
export function planeOf(values: readonly number[]): Homography | null {
  const [ax = NaN, ay = NaN, bx = NaN, by = NaN, cx = NaN, cy = NaN, dx = NaN, dy = NaN, width = 0, depth = 0] = values
  const photo: Corners = [[ax, ay], [bx, by], [cx, cy], [dx, dy]] // prettier-ignore
  const plane: Corners = [[0, 0], [width, 0], [width, depth], [0, depth]] // prettier-ignore
  return width > 0 && depth > 0 ? homographyOf(photo, plane) : null
}

/** Why a plane measures nothing; null when it does. */
export function refusePlane({ name, corners, width, depth, tolerance }: PhotoPlane): Refusal | null {
  if (![width, depth, tolerance].every(Number.isFinite)) return refuse('not finite', `A size of ${name} is no number.`)
  if (!(width > 0 && depth > 0)) return refuse('no size', `Both sides of ${name} need a size above 0.`)
  return refuseCorners(corners)
}
