import { solveLinear } from '#app/domain/photo/linear-solve.ts'
import { dot, type Vec2, type Vec3 } from '#app/domain/vector.ts'

/** Four points around a figure, one after the other. */
export type Corners = readonly [Vec2, Vec2, Vec2, Vec2]

/**
 * What takes a point of a photo to a point of a plane in space, by its three rows. The third row is the plane's horizon in the
 * photo: it gives 0 on it, and values of one sign for all that lies before it.
 */
export type Homography = readonly [Vec3, Vec3, Vec3]

/** Middle and size of some points, by which they become coordinates of about one. */
interface Frame {
  readonly middle: Vec2
  readonly size: number
}

/** The frame of four corners: their middle, and the mean distance from it over √2 (Hartley's normalisation). */
function frameOf(points: readonly Vec2[]): Frame {
  const mean = (axis: 0 | 1) => points.reduce((sum, point) => sum + point[axis], 0) / points.length
  const middle: Vec2 = [mean(0), mean(1)]
  const away = points.reduce((sum, [x, y]) => sum + Math.hypot(x - middle[0], y - middle[1]), 0) / points.length
  return { middle, size: away / Math.SQRT2 }
}

const inFrame = ({ middle, size }: Frame, [x, y]: Vec2): Vec2 => [(x - middle[0]) / size, (y - middle[1]) / size]

/**
 * The homography that takes four points of a photo to four points of a plane: 8 equations for 8 unknowns, the ninth entry
 * being 1, in normalised coordinates (Hartley and Zisserman, Multiple View Geometry, 4.1, 4.4). The third row is positive at
 * the corners' middle. Null when three of the points lie in one line.
 */
export function homographyOf(photo: Corners, plane: Corners): Homography | null {
  const [from, to] = [frameOf(photo), frameOf(plane)]
  if (!(from.size > 0 && to.size > 0)) return null
  const equations = photo.flatMap((corner, k) => {
    const [x, y] = inFrame(from, corner)
    const [u, v] = inFrame(to, plane[k] ?? [NaN, NaN])
    return [
      [x, y, 1, 0, 0, 0, -u * x, -u * y, u],
      [0, 0, 0, x, y, 1, -v * x, -v * y, v],
    ]
  })
  const solution = solveLinear(equations)
  if (!solution?.every(Number.isFinite)) return null
  const [a = 0, b = 0, c = 0, d = 0, e = 0, f = 0, g = 0, h = 0] = solution
  const [m, n]: Vec2 = to.middle
  const rows: Homography = [
    [to.size * a + m * g, to.size * b + m * h, to.size * c + m],
    [to.size * d + n * g, to.size * e + n * h, to.size * f + n],
    [g, h, 1],
  ]
  return [ofPhoto(rows[0], from), ofPhoto(rows[1], from), ofPhoto(rows[2], from)]
}

/** A row for coordinates of the frame as a row for coordinates of the photo. */
const ofPhoto = ([x, y, one]: Vec3, { middle, size }: Frame): Vec3 => [
  x / size,
  y / size,
  one - (x * middle[0] + y * middle[1]) / size,
]

/** A point of the photo in homogeneous coordinates. */
export const homogeneous = ([x, y]: Vec2): Vec3 => [x, y, 1]

/** How far before the horizon a point of the photo lies: 1 about the corners' middle, 0 on the horizon, below 0 beyond. */
export const beforeHorizon = (homography: Homography, point: Vec2): number => dot(homography[2], homogeneous(point))

/** The point of the plane, m, that a point of the photo shows; of no meaning on or beyond the horizon. */
export function pointOfPlane(homography: Homography, point: Vec2): Vec2 {
  const at = homogeneous(point)
  const before = dot(homography[2], at)
  return [dot(homography[0], at) / before, dot(homography[1], at) / before]
}
