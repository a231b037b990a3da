import type { Vec2 } from '#app/domain/vector.ts'
import type { Ring } from '#app/drawing/heat/rings.ts'

/**
 * A place on a line where its figure may stand: a point in site m and the line's direction there in degrees, counter-
 * clockwise from +x, −90 to 90 so that the figure reads upright (on a drawing with y down it is turned by −angleDeg).
 */
export interface LinePlace {
  readonly x: number
  readonly y: number
  readonly angleDeg: number
  /** How much the line turns under the figure, degrees: 0 is straight. */
  readonly bend: number
}

/** Distance between the points a line is judged at, m. */
const step = 0.08
/** Points on either side that lie under a figure. */
const reach = 3
/** Least distance between two places offered on one level, m, and how many are offered. */
const apart = 0.6
const offered = 24

/** Points of the ring at equal distance along it. */
function resample(ring: Ring): Vec2[] {
  const points: Vec2[] = []
  let carry = 0
  for (let i = 0; i + 1 < ring.length; i++) {
    const [ax, ay] = ring[i] ?? [NaN, NaN]
    const [bx, by] = ring[i + 1] ?? [NaN, NaN]
    const [dx, dy] = [bx - ax, by - ay]
    const length = Math.sqrt(dx * dx + dy * dy)
    let along = carry
    for (; along < length; along += step) points.push([ax + (along / length) * dx, ay + (along / length) * dy])
    carry = along - length
  }
  return points
}

const direction = (a: Vec2, b: Vec2): number => (Math.atan2(b[1] - a[1], b[0] - a[0]) * 180) / Math.PI

const turn = (from: number, to: number): number => Math.abs(((to - from + 540) % 360) - 180)

/** The angle of a line, whichever way it was drawn, between −90 and 90 degrees. */
const upright = (angle: number): number => (angle > 90 ? angle - 180 : angle <= -90 ? angle + 180 : angle)

/** A point of a resampled ring and how much the ring turns around it. */
interface Candidate {
  readonly points: readonly Vec2[]
  readonly i: number
  readonly bend: number
}

/** The points of a ring that have the floor under their whole figure. */
function candidatesOn(points: readonly Vec2[], isInside: (x: number, y: number) => boolean): Candidate[] {
  const count = points.length
  const at = (i: number): Vec2 => points[(i + count) % count] ?? [NaN, NaN]
  const along = points.map((point, i) => direction(point, at(i + 1)))
  const bends = along.map((angle, i) => turn(along[(i + count - 1) % count] ?? angle, angle))
  const outside = points.map(([x, y]) => (isInside(x, y) ? 0 : 1))
  // Sums over the points under a figure, kept up from one point to the next.
  let [out, bend] = [0, 0]
  for (let k = -reach; k <= reach; k++) {
    out += outside[(k + count) % count] ?? 0
    if (Math.abs(k) < reach) bend += bends[(k + count) % count] ?? 0
  }
  const found: Candidate[] = []
  for (let i = 0; i < count; i++) {
    if (out === 0) found.push({ points, i, bend })
    out += (outside[(i + 1 + reach) % count] ?? 0) - (outside[(i - reach + count) % count] ?? 0)
    bend += (bends[(i + reach) % count] ?? 0) - (bends[(i - reach + 1 + count) % count] ?? 0)
  }
  return found
}

function placeAt({ points, i, bend }: Candidate): LinePlace {
  const at = (k: number): Vec2 => points[(k + points.length) % points.length] ?? [NaN, NaN]
  const [x, y] = at(i)
  return { x, y, angleDeg: upright(direction(at(i - reach), at(i + reach))), bend }
}

/** Places for the figure of one level, the straightest first, all inside the floor. */
export function placesOnRing(rings: readonly Ring[], isInside: (x: number, y: number) => boolean): LinePlace[] {
  const found = rings
    .map(resample)
    .filter((points) => points.length >= 4 * reach)
    .flatMap((points) => candidatesOn(points, isInside))
    .sort((a, b) => a.bend - b.bend)
  const chosen: LinePlace[] = []
  for (const candidate of found) {
    if (chosen.length === offered) break
    const [x, y] = candidate.points[candidate.i] ?? [NaN, NaN]
    if (chosen.every((other) => (other.x - x) ** 2 + (other.y - y) ** 2 >= apart * apart))
      chosen.push(placeAt(candidate))
  }
  return chosen
}
