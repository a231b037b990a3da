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
  for (const [i, a] of ring.entries()) {
    const b = ring[i + 1]
    if (!b) break
    const length = Math.hypot(b[0] - a[0], b[1] - a[1])
    let along = carry
    for (; along < length; along += step) {
      const t = along / length
      points.push([a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])])
    }
    carry = along - length
  }
  return points
}

const direction = (a: Vec2, b: Vec2): number => (Math.atan2(b[1] - a[1], b[0] - a[0]) * 180) / Math.PI

const turn = (from: number, to: number): number => Math.abs(((to - from + 540) % 360) - 180)

/** The angle of a line, whichever way it was drawn, between −90 and 90 degrees. */
const upright = (angle: number): number => (angle > 90 ? angle - 180 : angle <= -90 ? angle + 180 : angle)

function placesOf(points: readonly Vec2[], isInside: (x: number, y: number) => boolean): LinePlace[] {
  const count = points.length
  const at = (i: number): Vec2 => points[(i + count) % count] ?? [NaN, NaN]
  const inside = points.map(([x, y]) => isInside(x, y))
  const along = points.map((point, i) => direction(point, at(i + 1)))
  const bends = along.map((angle, i) => turn(along[(i + count - 1) % count] ?? angle, angle))
  const under = (i: number, k: number) => (i + k + count) % count
  const around = Array.from({ length: 2 * reach + 1 }, (_, k) => k - reach)
  return points.flatMap(([x, y], i) => {
    if (!around.every((k) => inside[under(i, k)])) return []
    const bend = around.slice(1, -1).reduce((sum, k) => sum + (bends[under(i, k)] ?? 0), 0)
    return [{ x, y, angleDeg: upright(direction(at(i - reach), at(i + reach))), bend }]
  })
}

/** Places for the figure of one level, the straightest first, all inside the floor. */
export function placesOnRing(rings: readonly Ring[], isInside: (x: number, y: number) => boolean): LinePlace[] {
  const found = rings
    .map(resample)
    .filter((points) => points.length >= 4 * reach)
    .flatMap((points) => placesOf(points, isInside))
    .sort((a, b) => a.bend - b.bend)
  const chosen: LinePlace[] = []
  for (const place of found) {
    if (chosen.length === offered) break
    if (chosen.every((other) => Math.hypot(other.x - place.x, other.y - place.y) >= apart)) chosen.push(place)
  }
  return chosen
}
