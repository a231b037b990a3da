import type { Solid } from '#app/domain/flux/solid.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/** A stretch of an element: distances from its centre along u, m. */
export interface Stretch {
  readonly from: number
  readonly to: number
}

/**
 * What a point sees of an element lies in a triangle: x = p + μ (c − p) + σ u, 0 ≤ μ ≤ 1, |σ| ≤ μ·L/2. The ratio σ/μ is the
 * place on the element, so a convex solid, cut out of the triangle by linear conditions in μ and σ, hides one stretch.
 */
type Place = readonly [mu: number, sigma: number]

/** The part of a convex polygon where a·μ + b·σ ≤ c. */
function clipped(polygon: readonly Place[], a: number, b: number, c: number): Place[] {
  const kept: Place[] = []
  polygon.forEach((from, i) => {
    const to = polygon[(i + 1) % polygon.length] ?? from
    const d1 = c - a * from[0] - b * from[1]
    const d2 = c - a * to[0] - b * to[1]
    if (d1 >= 0) kept.push(from)
    if (d1 >= 0 === d2 >= 0) return
    const t = d1 / (d1 - d2)
    kept.push([from[0] + t * (to[0] - from[0]), from[1] + t * (to[1] - from[1])])
  })
  return kept
}

/** The stretch between the extreme ratios σ/μ; all of it when the point itself is inside. */
function stretchAt(places: readonly Place[], half: number): Stretch | null {
  let from = Infinity
  let to = -Infinity
  for (const [mu, sigma] of places) {
    if (mu < 1e-9) return { from: -half, to: half }
    from = Math.min(from, sigma / mu)
    to = Math.max(to, sigma / mu)
  }
  return to - from > 1e-12 ? { from: Math.max(from, -half), to: Math.min(to, half) } : null
}

/** Twice the area of a polygon: a touch is not a shadow. */
function areaOf(polygon: readonly Place[]): number {
  return Math.abs(
    polygon.reduce((sum, [x, y], i) => {
      const next = polygon[(i + 1) % polygon.length]
      return next ? sum + x * next[1] - next[0] * y : sum
    }, 0),
  )
}

const dotOf = (a: Vec3, b: Vec3) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2]

/** Where the line σ = s·μ for s at the two tangents from the point meets an upright cylinder's surface. */
function tangents(a: readonly number[], b: readonly number[], c: readonly number[], radius: number): Place[] {
  const product = (p: readonly number[], q: readonly number[]) => (p[0] ?? 0) * (q[0] ?? 0) + (p[1] ?? 0) * (q[1] ?? 0)
  const outside = product(a, a) - radius * radius
  if (outside <= 0) return []
  const ab = product(a, b)
  const ac = product(a, c)
  const square = ac * ac - outside * product(c, c)
  const linear = ab * ac - outside * product(b, c)
  const constant = ab * ab - outside * product(b, b)
  const under = linear * linear - square * constant
  if (under < 0 || square === 0) return []
  return [-1, 1].map((sign): Place => {
    const s = (-linear + sign * Math.sqrt(under)) / square
    const d = [(b[0] ?? 0) + s * (c[0] ?? 0), (b[1] ?? 0) + s * (c[1] ?? 0)]
    const mu = -product(a, d) / product(d, d)
    return [mu, s * mu]
  })
}

/** Corners, edge crossings and tangent places of the polygon's part inside an upright cylinder. */
function cylinderPlaces(polygon: readonly Place[], solid: Extract<Solid, { kind: 'cylinder' }>, rays: Rays): Place[] {
  const a = [rays.point[0] - solid.centre[0], rays.point[1] - solid.centre[1]] as const
  const [b, c] = [rays.toCentre, rays.u]
  const at = ([mu, sigma]: Place) => [a[0] + mu * b[0] + sigma * c[0], a[1] + mu * b[1] + sigma * c[1]] as const
  const found: Place[] = polygon.filter((place) => Math.hypot(...at(place)) <= solid.radius)
  polygon.forEach((from, i) => {
    const to = polygon[(i + 1) % polygon.length] ?? from
    const [x, y] = at(from)
    const [dx, dy] = [at(to)[0] - x, at(to)[1] - y]
    const square = dx * dx + dy * dy
    const linear = x * dx + y * dy
    const under = linear * linear - square * (x * x + y * y - solid.radius * solid.radius)
    if (square === 0 || under <= 0) return
    for (const sign of [-1, 1]) {
      const t = (-linear + sign * Math.sqrt(under)) / square
      if (t > 0 && t < 1) found.push([from[0] + t * (to[0] - from[0]), from[1] + t * (to[1] - from[1])])
    }
  })
  const holds = (place: Place) => {
    const z = rays.point[2] + place[0] * b[2] + place[1] * c[2]
    const inTriangle = place[0] > 0 && place[0] <= 1 && Math.abs(place[1]) <= place[0] * rays.half
    return inTriangle && z >= solid.low[2] && z <= solid.high[2]
  }
  return [...found, ...tangents(a, b, c, solid.radius).filter(holds)]
}

/** What a point looks at: the point, the vector to the element's centre, the element's direction and half length. */
export interface Rays {
  readonly point: Vec3
  readonly toCentre: Vec3
  readonly u: Vec3
  readonly half: number
}

/** Whether the box round the triangle of rays and the box round the solid overlap. */
function mayMeet(solid: Solid, { point, toCentre, u, half }: Rays): boolean {
  return [0, 1, 2].every((k) => {
    const from = point[k] ?? 0
    const end = from + (toCentre[k] ?? 0)
    const reach = Math.abs(u[k] ?? 0) * half
    const low = Math.min(from, end - reach)
    const high = Math.max(from, end + reach)
    return high >= (solid.low[k] ?? 0) && low <= (solid.high[k] ?? 0)
  })
}

/** The stretch of an element that a solid hides from a point; null when it hides none. Exact for every solid. */
export function hiddenStretch(solid: Solid, rays: Rays): Stretch | null {
  if (!mayMeet(solid, rays)) return null
  const { point, toCentre, u, half } = rays
  const seen: Place[] = [
    [0, 0],
    [1, -half],
    [1, half],
  ]
  if (solid.kind === 'cylinder') {
    const below = clipped(seen, toCentre[2], u[2], solid.high[2] - point[2])
    const between = clipped(below, -toCentre[2], -u[2], point[2] - solid.low[2])
    if (areaOf(between) < 1e-12 * half) return null
    return stretchAt(cylinderPlaces(between, solid, rays), half)
  }
  const hidden = solid.faces.reduce<Place[]>(
    (polygon, { normal, offset }) =>
      polygon.length === 0
        ? polygon
        : clipped(polygon, dotOf(normal, toCentre), dotOf(normal, u), offset - dotOf(normal, point)),
    seen,
  )
  return areaOf(hidden) < 1e-12 * half ? null : stretchAt(hidden, half)
}
