import type { Vec2 } from '#app/domain/vector.ts'

/** Nearest point of a segment to a point: the point, how far along the segment it lies (0 to 1) and its distance, m. */
export interface NearestOnSegment {
  readonly point: Vec2
  readonly along: number
  readonly distance: number
}

/** Nearest point of the segment from–to to (x, y): t = clamp((p−a)·(b−a)/|b−a|²). A segment of no length is its start. */
export function nearestOnSegment(from: Vec2, to: Vec2, x: number, y: number): NearestOnSegment {
  const dx = to[0] - from[0]
  const dy = to[1] - from[1]
  const squared = dx * dx + dy * dy
  const raw = squared === 0 ? 0 : ((x - from[0]) * dx + (y - from[1]) * dy) / squared
  const along = Math.min(1, Math.max(0, raw))
  const point: Vec2 = [from[0] + along * dx, from[1] + along * dy]
  return { point, along, distance: Math.hypot(x - point[0], y - point[1]) }
}

/** Signed area of an outline, m²; positive when its corners run counter-clockwise. */
export function areaOf(outline: readonly Vec2[]): number {
  let twice = 0
  outline.forEach((a, i) => {
    const b = outline[(i + 1) % outline.length] ?? a
    twice += a[0] * b[1] - b[0] * a[1]
  })
  return twice / 2
}

/** Least distance from (x, y) to the outline's edges, m, whichever side the point is on; infinite without corners. */
export function distanceToOutline(outline: readonly Vec2[], x: number, y: number): number {
  let least = Infinity
  outline.forEach((a, i) => {
    const b = outline[(i + 1) % outline.length] ?? a
    least = Math.min(least, nearestOnSegment(a, b, x, y).distance)
  })
  return least
}

/** Points nearer to an edge than this count as on it, m. */
const onEdge = 1e-9

/** True when (x, y) lies inside the outline or on its edge; corners in either order, even-odd for crossing outlines. */
export function isInside(outline: readonly Vec2[], x: number, y: number): boolean {
  let inside = false
  for (let i = 0, j = outline.length - 1; i < outline.length; j = i++) {
    const a = outline[i]
    const b = outline[j]
    if (!a || !b) continue
    if (nearestOnSegment(a, b, x, y).distance <= onEdge) return true
    const crosses = a[1] > y !== b[1] > y
    if (crosses && x < ((b[0] - a[0]) * (y - a[1])) / (b[1] - a[1]) + a[0]) inside = !inside
  }
  return inside
}

/** Twice the signed area of the triangle a, b, c: positive when c lies to the left of a → b. */
const turnOf = (a: Vec2, b: Vec2, c: Vec2): number => (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])

/** True when the segments a–b and c–d cross at a point inside both. */
function segmentsCross(a: Vec2, b: Vec2, c: Vec2, d: Vec2): boolean {
  return turnOf(a, b, c) * turnOf(a, b, d) < 0 && turnOf(c, d, a) * turnOf(c, d, b) < 0
}

/** The first two edges of the outline that cross each other, by the index of their first corner; null when none do. */
export function crossingEdges(outline: readonly Vec2[]): readonly [number, number] | null {
  const edges = outline.map((a, i): readonly [Vec2, Vec2] => [a, outline[(i + 1) % outline.length] ?? a])
  for (const [i, [a, b]] of edges.entries()) {
    const k = edges.findIndex(([c, d], at) => at > i && segmentsCross(a, b, c, d))
    if (k >= 0) return [i, k]
  }
  return null
}

/** True when two edges of the outline cross each other, so that it has no inside to speak of. */
export const crossesItself = (outline: readonly Vec2[]): boolean => crossingEdges(outline) !== null

/** True when two convex outlines share a point: no edge of either separates them. */
export function convexOutlinesMeet(a: readonly Vec2[], b: readonly Vec2[]): boolean {
  return !separatedByAnEdge(a, b) && !separatedByAnEdge(b, a)
}

function separatedByAnEdge(a: readonly Vec2[], b: readonly Vec2[]): boolean {
  const sign = Math.sign(areaOf(a)) || 1
  return a.some((from, i) => {
    const to = a[(i + 1) % a.length] ?? from
    return (from[0] !== to[0] || from[1] !== to[1]) && b.every((p) => sign * turnOf(from, to, p) < 0)
  })
}

/**
 * The outline cut into convex pieces, corners counter-clockwise: itself when it is convex, else triangles (ear
 * clipping). An outline that crosses itself gives pieces of no meaning.
 */
export function convexPieces(outline: readonly Vec2[]): Vec2[][] {
  const rest = areaOf(outline) < 0 ? [...outline].reverse() : [...outline]
  if (rest.every((b, i) => turnOf(cornerAt(rest, i - 1), b, cornerAt(rest, i + 1)) >= 0)) return [rest]
  const pieces: Vec2[][] = []
  while (rest.length > 3) {
    const ear = Math.max(
      0,
      rest.findIndex((_, i) => isEar(rest, i)),
    )
    pieces.push([cornerAt(rest, ear - 1), cornerAt(rest, ear), cornerAt(rest, ear + 1)])
    rest.splice(ear, 1)
  }
  return [...pieces, rest]
}

const cornerAt = (outline: readonly Vec2[], i: number): Vec2 => outline[(i + outline.length) % outline.length] ?? [0, 0]

function isEar(outline: readonly Vec2[], i: number): boolean {
  const [a, b, c] = [cornerAt(outline, i - 1), cornerAt(outline, i), cornerAt(outline, i + 1)]
  if (turnOf(a, b, c) <= 0) return false
  return outline.every(
    (p) => p === a || p === b || p === c || turnOf(a, b, p) < 0 || turnOf(b, c, p) < 0 || turnOf(c, a, p) < 0,
  )
}
