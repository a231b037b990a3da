import { estimateOf, sigmaOf, type Estimate } from '#app/domain/photo/estimate.ts'
import { beforeHorizon, pointOfPlane, type Homography } from '#app/domain/photo/homography.ts'
import type { Measurement, PhotoMarks, PhotoPlane, Placed } from '#app/domain/photo/measurements.ts'
import { markInputs, planeInputCount, planeInputs, planeOf, refusePlane } from '#app/domain/photo/plane-inputs.ts'
import { refuse, type Refusal } from '#app/domain/photo/refusal.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** A photo's own id and what is marked in it. */
export interface MarkedPhoto {
  readonly id: string
  readonly marks: PhotoMarks
}

/** Share of a figure that its standard error may be: beyond it first order says nothing, and nobody should build by it. */
const roughest = 0.25

/** The plane that a mark is said to lie in, with its homography; or why nothing is measured in it. */
export function planeNamed(
  { marks }: MarkedPhoto,
  id: string,
): { readonly plane: PhotoPlane; readonly homography: Homography } | Refusal {
  const plane = marks.planes.find((each) => each.id === id)
  if (!plane) return refuse('no plane', 'Say which plane the mark lies in.')
  const refused = refusePlane(plane)
  if (refused) return refused
  const homography = planeOf([...plane.corners.flat(), plane.width, plane.depth])
  return homography ? { plane, homography } : refuse('corners in line', 'The four corners do not make a plane.')
}

/** Why a mark is not in front of the camera in its plane; null when it is. */
export function refuseMark(homography: Homography, plane: PhotoPlane, mark: Vec2, which: string): Refusal | null {
  if (!mark.every(Number.isFinite)) return refuse('not finite', `${which} has no place in the photo.`)
  if (beforeHorizon(homography, mark) > 0) return null
  return refuse('beyond horizon', `${which} lies beyond the horizon of ${plane.name}: it cannot be in that plane.`)
}

/** The length from one point of the photo to another in a plane; null when one is beyond the horizon. */
function lengthBetween(homography: Homography, a: Vec2, b: Vec2): number | null {
  if (!(beforeHorizon(homography, a) > 0 && beforeHorizon(homography, b) > 0)) return null
  const [p, q] = [pointOfPlane(homography, a), pointOfPlane(homography, b)]
  return Math.hypot(p[0] - q[0], p[1] - q[1])
}

/** A figure with its error, refused when the error leaves nothing of it. */
export function notTooRough(estimate: Estimate | null, what: string): Estimate | Refusal {
  if (estimate && sigmaOf(estimate) <= roughest * Math.abs(estimate.value)) return estimate
  const share = estimate ? `${Math.round((100 * sigmaOf(estimate)) / Math.abs(estimate.value))} %` : 'all of it'
  return refuse(
    'too rough',
    `A click of error changes ${what} by ${share}. Mark nearer to the camera, or farther apart.`,
  )
}

/**
 * A length between two marks of one plane, m, with its error from every click and from the reference's tolerance.
 * Refused across planes, beyond the horizon, and where the error is more than a quarter of it.
 */
export function lengthInPlane(
  photo: MarkedPhoto,
  { id, from, to }: Pick<Extract<Measurement, { kind: 'length' }>, 'id' | 'from' | 'to'>,
): Estimate | Refusal {
  if (from.plane !== to.plane) return refuse('other plane', acrossPlanes(photo, from, to))
  const found = planeNamed(photo, from.plane)
  if ('refused' in found) return found
  const { plane, homography } = found
  const refused =
    refuseMark(homography, plane, from.at, 'The first mark') ?? refuseMark(homography, plane, to.at, 'The second mark')
  if (refused) return refused
  if (Math.hypot(from.at[0] - to.at[0], from.at[1] - to.at[1]) < 1) {
    return refuse('marks together', 'Both marks are in one place. Move one of them.')
  }
  const sigma = photo.marks.clickSigma
  const inputs = [
    ...planeInputs(photo.id, plane, sigma),
    ...markInputs(`${photo.id} ${id} from`, from.at, sigma),
    ...markInputs(`${photo.id} ${id} to`, to.at, sigma),
  ]
  const estimate = estimateOf(inputs, (values) => {
    const moved = planeOf(values)
    const [ax = NaN, ay = NaN, bx = NaN, by = NaN] = values.slice(planeInputCount)
    return moved && lengthBetween(moved, [ax, ay], [bx, by])
  })
  return notTooRough(estimate, 'the length')
}

function acrossPlanes({ marks }: MarkedPhoto, from: Placed, to: Placed): string {
  const name = (id: string) => marks.planes.find((plane) => plane.id === id)?.name ?? 'no plane'
  return `One mark lies in ${name(from.plane)}, the other in ${name(to.plane)}. A photo gives no length across planes: mark both ends in one.`
}

/** The point of a plane, m from its first corner along its width and depth, that a mark shows; with its error. */
export function pointInPlane(
  photo: MarkedPhoto,
  { at, plane: planeId }: Placed,
): { readonly x: Estimate; readonly y: Estimate } | Refusal {
  const found = planeNamed(photo, planeId)
  if ('refused' in found) return found
  const refused = refuseMark(found.homography, found.plane, at, 'The mark')
  if (refused) return refused
  const sigma = photo.marks.clickSigma
  const inputs = [...planeInputs(photo.id, found.plane, sigma), ...markInputs(`${photo.id} point`, at, sigma)]
  const along = (axis: 0 | 1) =>
    estimateOf(inputs, (values) => {
      const moved = planeOf(values)
      const [px = NaN, py = NaN] = values.slice(planeInputCount)
      return moved && beforeHorizon(moved, [px, py]) > 0 ? pointOfPlane(moved, [px, py])[axis] : null
    })
  const [x, y] = [along(0), along(1)]
  return x && y ? { x, y } : refuse('too rough', 'The mark is too near the horizon of its plane.')
}
