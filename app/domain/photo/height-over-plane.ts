import { estimateOf, type Estimate } from '#app/domain/photo/estimate.ts'
import { beforeHorizon, homogeneous, type Homography } from '#app/domain/photo/homography.ts'
import { notTooRough, planeNamed, refuseMark, type MarkedPhoto } from '#app/domain/photo/length-in-plane.ts'
import type { Measurement, PhotoPlane, Upright } from '#app/domain/photo/measurements.ts'
import { markInputs, planeInputCount, planeInputs, planeOf, sizeInput } from '#app/domain/photo/plane-inputs.ts'
import { refuse, type Refusal } from '#app/domain/photo/refusal.ts'
import { cross, dot, normalise, type Vec2, type Vec3 } from '#app/domain/vector.ts'

type Vertical = NonNullable<PhotoPlane['vertical']>

/** A foot nearer than this, px, to where plumb lines meet stands straight under or over the camera. */
const underCamera = 12

/** How far beside the plumb line through its foot a top may lie, as a share of the height in the photo. */
const offPlumb = 0.1

const middleOf = ({ foot, top }: Upright): Vec2 => [(foot[0] + top[0]) / 2, (foot[1] + top[1]) / 2]
const lengthPx = ({ foot, top }: Upright): number => Math.hypot(top[0] - foot[0], top[1] - foot[1])

/** Where plumb lines meet in the photo, homogeneous: on both edges. May lie at infinity. */
const plumbPoint = (a: Upright, b: Upright): Vec3 =>
  normalise(
    cross(
      normalise(cross(homogeneous(a.foot), homogeneous(a.top))),
      normalise(cross(homogeneous(b.foot), homogeneous(b.top))),
    ),
  )

/**
 * α times the height of an edge's top over its foot, from αZ = −|b×t| / ((l̂·b)|v×t|) with the sign of the side on which the
 * top lies (Criminisi, Reid and Zisserman, Single View Metrology, IJCV 40, 2000): b foot, t top, v plumb point, l̂ horizon.
 */
function scaledHeight(homography: Homography, plumb: Vec3, { foot, top }: Upright): number {
  const [b, t] = [homogeneous(foot), homogeneous(top)]
  const [bt, vt] = [cross(b, t), cross(plumb, t)]
  return -dot(bt, vt) / (dot(homography[2], b) * dot(vt, vt))
}

function refuseUprights(homography: Homography, plane: PhotoPlane, { known, other, height }: Vertical): Refusal | null {
  const feet = [
    [known.foot, 'The foot of the known height'],
    [other.foot, 'The foot of the second upright'],
  ] as const
  for (const [foot, which] of feet) {
    const refused = refuseMark(homography, plane, foot, which)
    if (refused) return refused
  }
  if (![...known.top, ...other.top, height].every(Number.isFinite)) {
    return refuse('not finite', 'The top of an upright has no place in the photo.')
  }
  if (!(height > 0)) return refuse('no size', 'The known height has to be above 0.')
  if (lengthPx(known) < 3 || lengthPx(other) < 3) {
    return refuse('marks together', 'Foot and top of an upright are in one place: it is seen from its end.')
  }
  return inOneLine(known, other)
}

/** Two uprights in one line of the photo do not show where plumb lines meet. */
function inOneLine(a: Upright, b: Upright): Refusal | null {
  const off = (of: Upright, [x, y]: Vec2) =>
    Math.abs((of.top[0] - of.foot[0]) * (y - of.foot[1]) - (of.top[1] - of.foot[1]) * (x - of.foot[0])) / lengthPx(of)
  const size = Math.max(lengthPx(a), lengthPx(b))
  if (off(a, middleOf(b)) > 0.02 * size || off(b, middleOf(a)) > 0.02 * size) return null
  return refuse(
    'uprights in line',
    'Both uprights lie in one line of the photo. Take a second one farther to the side.',
  )
}

function refuseOffPlumb(plumb: Vec3, asked: Upright): Refusal | null {
  const { foot, top } = asked
  const away = Math.hypot(plumb[0] - foot[0] * plumb[2], plumb[1] - foot[1] * plumb[2])
  if (away <= underCamera * Math.abs(plumb[2])) {
    return refuse('along view', 'The height is seen from its end: it stands straight under the camera.')
  }
  const line = cross(homogeneous(foot), plumb)
  const beside = Math.abs(dot(line, homogeneous(top))) / Math.hypot(line[0], line[1])
  if (beside <= Math.max(6, offPlumb * lengthPx(asked))) return null
  return refuse(
    'not plumb',
    `The top lies ${Math.round(beside)} px beside the plumb line through the foot. Mark the point straight above the foot.`,
  )
}

const upright = ([ax = NaN, ay = NaN, bx = NaN, by = NaN]: readonly number[]): Upright => ({
  foot: [ax, ay],
  top: [bx, by],
})

/** The height from the values of all inputs in the order of `heightOverPlane`; null when there is none. */
function heightFrom(values: readonly number[]): number | null {
  const homography = planeOf(values)
  const after = values.slice(planeInputCount)
  const [known, other, asked] = [upright(after.slice(0)), upright(after.slice(4)), upright(after.slice(8))]
  const height = after[12] ?? NaN
  if (!homography || !(beforeHorizon(homography, asked.foot) > 0 && beforeHorizon(homography, known.foot) > 0)) {
    return null
  }
  const plumb = plumbPoint(known, other)
  const scale = scaledHeight(homography, plumb, known)
  return (height * scaledHeight(homography, plumb, asked)) / scale
}

/**
 * The height of a top over its foot in a plane, m, below the plane negative, with its error from every click, the
 * rectangle's and the known height's tolerance. The foot's place in the plane has to be seen or worked out by eye.
 */
export function heightOverPlane(
  photo: MarkedPhoto,
  { id, foot, top }: Pick<Extract<Measurement, { kind: 'height' }>, 'id' | 'foot' | 'top'>,
): Estimate | Refusal {
  const found = planeNamed(photo, foot.plane)
  if ('refused' in found) return found
  const { plane, homography } = found
  const { vertical } = plane
  if (!vertical) {
    return refuse('no upright', `Heights over ${plane.name} need an upright of known height and a second upright.`)
  }
  const refused =
    refuseUprights(homography, plane, vertical) ?? refuseMark(homography, plane, foot.at, 'The foot of the height')
  if (refused) return refused
  if (!top.every(Number.isFinite)) return refuse('not finite', 'The top has no place in the photo.')
  const off = refuseOffPlumb(plumbPoint(vertical.known, vertical.other), { foot: foot.at, top })
  if (off) return off
  const sigma = photo.marks.clickSigma
  const { known, other, height, tolerance } = vertical
  const marked = (name: string, at: Vec2) => markInputs(`${photo.id} ${name}`, at, sigma)
  const inputs = [
    ...planeInputs(photo.id, plane, sigma),
    ...marked(`${plane.id} known foot`, known.foot),
    ...marked(`${plane.id} known top`, known.top),
    ...marked(`${plane.id} other foot`, other.foot),
    ...marked(`${plane.id} other top`, other.top),
    ...marked(`${id} foot`, foot.at),
    ...marked(`${id} top`, top),
    sizeInput(plane, 'height', height, tolerance),
  ]
  return notTooRough(estimateOf(inputs, heightFrom), 'the height')
}
