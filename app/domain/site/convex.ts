import { add, cross, dot, scale, subtract, type Vec2, type Vec3 } from '#app/domain/vector.ts'

/** A convex body, known by its farthest point in any direction. `middle` is any point inside. */
export interface Extent {
  readonly middle: Vec3
  readonly farthest: (direction: Vec3) => Vec3
}

/**
 * Where a ray is inside a solid, in multiples of its direction, 0 or more. It misses when `enter` is greater than
 * `leave`; by how much tells how wide it misses, without a jump where it begins to hit.
 */
interface Stretch {
  enter: number
  leave: number
}

/** A convex solid that also knows where a ray is inside it. */
export interface Convex extends Extent {
  readonly alongRay: (from: Vec3, direction: Vec3) => Stretch
}

/** What a stretch is cut to when a ray runs beside a bound for ever. */
const never = 1e9

/** Keeps of a stretch what lies where `distance` (at the start, growing by `rate` along the ray) is not positive. */
function keepBelow(stretch: Stretch, distance: number, rate: number): void {
  if (rate === 0) {
    if (distance > 0) stretch.leave = Math.min(stretch.leave, -never * distance)
  } else if (rate < 0) stretch.enter = Math.max(stretch.enter, -distance / rate)
  else stretch.leave = Math.min(stretch.leave, -distance / rate)
}

/** Solid box along the site's axes, each range from low to high, m. */
export function axisBox(x: Vec2, y: Vec2, z: Vec2): Convex {
  const ranges = [x, y, z] as const
  return {
    middle: [(x[0] + x[1]) / 2, (y[0] + y[1]) / 2, (z[0] + z[1]) / 2],
    farthest: (d) => [d[0] > 0 ? x[1] : x[0], d[1] > 0 ? y[1] : y[0], d[2] > 0 ? z[1] : z[0]],
    alongRay: (from, direction) => {
      const stretch = { enter: 0, leave: Infinity }
      for (const axis of [0, 1, 2] as const) {
        keepBelow(stretch, from[axis] - ranges[axis][1], direction[axis])
        keepBelow(stretch, ranges[axis][0] - from[axis], -direction[axis])
      }
      return stretch
    },
  }
}

/** Upright cylinder, m. */
export function uprightCylinder(centre: Vec2, radius: number, z: Vec2): Convex {
  return {
    middle: [centre[0], centre[1], (z[0] + z[1]) / 2],
    farthest: ([dx, dy, dz]) => {
      const sideways = Math.hypot(dx, dy)
      const out = sideways > 0 ? radius / sideways : 0
      return [centre[0] + dx * out, centre[1] + dy * out, dz > 0 ? z[1] : z[0]]
    },
    alongRay: (from, direction) => {
      const stretch = { enter: 0, leave: Infinity }
      keepBelow(stretch, from[2] - z[1], direction[2])
      keepBelow(stretch, z[0] - from[2], -direction[2])
      keepInside(stretch, [from[0] - centre[0], from[1] - centre[1]], direction, radius)
      return stretch
    },
  }
}

/** Keeps of a stretch what lies within a circle about the origin, in plan. */
function keepInside(stretch: Stretch, [x, y]: Vec2, [dx, dy]: Vec3, radius: number): void {
  const a = dx * dx + dy * dy
  const c = x * x + y * y - radius * radius
  if (a === 0) {
    if (c > 0) stretch.leave = Math.min(stretch.leave, -never * c)
    return
  }
  const middle = -(x * dx + y * dy) / a
  const squared = middle * middle - c / a
  const half = Math.sign(squared) * Math.sqrt(Math.abs(squared))
  stretch.enter = Math.max(stretch.enter, middle - half)
  stretch.leave = Math.min(stretch.leave, middle + half)
}

/** A corner of an outline in plan with the lowest and highest point of the solid over it, m. */
export interface Upright {
  readonly at: Vec2
  readonly low: number
  readonly high: number
}

/**
 * Solid with upright sides over a convex outline (corners counter-clockwise), between two planes through the corners'
 * low and high points. Throws below three corners.
 */
export function uprightPrism(corners: readonly Upright[]): Convex {
  const low = corners.map(({ at, low }): Vec3 => [at[0], at[1], low])
  const high = corners.map(({ at, high }): Vec3 => [at[0], at[1], high])
  const points = [...low, ...high]
  const [first] = points
  if (!first || corners.length < 3) throw new RangeError('A prism needs three corners')
  const faces = [
    ...low.map((from, i) => sideBound(from, low[(i + 1) % low.length] ?? from)),
    capBound(high, 1),
    capBound(low, -1),
  ]
  return {
    middle: scale(points.reduce(add), 1 / points.length),
    farthest: (d) => farthestOf(points, first, d),
    alongRay: (from, direction) => {
      const stretch = { enter: 0, leave: Infinity }
      for (const { normal, reach } of faces) keepBelow(stretch, dot(normal, from) - reach, dot(normal, direction))
      return stretch
    },
  }
}

/** All points with normal·p ≤ reach. */
interface Bound {
  readonly normal: Vec3
  readonly reach: number
}

function sideBound(from: Vec3, to: Vec3): Bound {
  const normal: Vec3 = [to[1] - from[1], from[0] - to[0], 0]
  return { normal, reach: dot(normal, from) }
}

function capBound([a, b, c]: readonly Vec3[], up: 1 | -1): Bound {
  if (!a || !b || !c) throw new RangeError('A prism needs three corners')
  const normal = scale(cross(subtract(b, a), subtract(c, a)), up)
  return { normal, reach: dot(normal, a) }
}

function farthestOf(points: readonly Vec3[], first: Vec3, d: Vec3): Vec3 {
  let best = first
  let most = dot(first, d)
  for (const p of points) {
    const reach = p[0] * d[0] + p[1] * d[1] + p[2] * d[2]
    if (reach > most) {
      most = reach
      best = p
    }
  }
  return best
}

/** The box along the site's axes that just holds a solid. */
export interface Bounds {
  readonly low: Vec3
  readonly high: Vec3
}

const bounds = new WeakMap<Extent, Bounds>()

/** The bounds of a solid; kept for as long as the solid is. */
export function boundsOf(solid: Extent): Bounds {
  const known = bounds.get(solid)
  if (known) return known
  const reach = (axis: 0 | 1 | 2, sign: 1 | -1) =>
    solid.farthest([axis === 0 ? sign : 0, axis === 1 ? sign : 0, axis === 2 ? sign : 0])[axis]
  const found: Bounds = {
    low: [reach(0, -1), reach(1, -1), reach(2, -1)],
    high: [reach(0, 1), reach(1, 1), reach(2, 1)],
  }
  bounds.set(solid, found)
  return found
}

/** Distance between two boxes along the site's axes, m: what they hold is at least as far apart; 0 when they meet. */
export function boundsApart(a: Bounds, b: Bounds): number {
  const x = Math.max(0, a.low[0] - b.high[0], b.low[0] - a.high[0])
  const y = Math.max(0, a.low[1] - b.high[1], b.low[1] - a.high[1])
  const z = Math.max(0, a.low[2] - b.high[2], b.low[2] - a.high[2])
  return Math.sqrt(x * x + y * y + z * z)
}

/** Least value of n·p over the solid. */
export const leastAlong = (solid: Extent, n: Vec3): number => dot(solid.farthest([-n[0], -n[1], -n[2]]), n)
