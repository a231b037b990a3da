import { cross, dot, normalise, subtract, type Vec2, type Vec3 } from '#app/domain/vector.ts'

/** A convex thing to draw: its corners, and its faces as indexes of corners, counter-clockwise seen from outside. */
export interface DrawnSolid {
  readonly corners: readonly Vec3[]
  readonly faces: readonly (readonly number[])[]
}

/** A prism over a convex outline in plan (either way round) from heights below to heights above, one for each corner. */
export function prismOf(
  outline: readonly Vec2[],
  low: readonly number[] | number,
  high: readonly number[] | number,
): DrawnSolid {
  // prettier-ignore
  const area = outline.reduce((sum, [x, y], i) => {
    const [nx, ny] = outline[(i + 1) % outline.length] ?? [x, y]
    return sum + x * ny - nx * y
  }, 0)
  const order = outline.map((_, i) => (area >= 0 ? i : outline.length - 1 - i))
  const at = (heights: readonly number[] | number, i: number) => (typeof heights === 'number' ? heights : (heights[i] ?? 0)) // prettier-ignore
  const ring = (heights: readonly number[] | number) =>
    order.map((i): Vec3 => [outline[i]?.[0] ?? 0, outline[i]?.[1] ?? 0, at(heights, i)])
  const n = outline.length
  const bottom = Array.from({ length: n }, (_, i) => i)
  const sides = bottom.map((i) => [i, (i + 1) % n, n + ((i + 1) % n), n + i])
  return {
    corners: [...ring(low), ...ring(high)],
    faces: [bottom.toReversed(), bottom.map((i) => n + i), ...sides],
  }
}

/** A box from its centre, its axes and half its sizes. */
export function boxOf(
  centre: Vec3,
  axes: readonly [Vec3, Vec3, Vec3],
  half: readonly [number, number, number],
): DrawnSolid {
  // prettier-ignore
  const [u, v, w] = axes
  const right = dot(cross(u, v), w) >= 0
  const signs = [[-1, -1], [1, -1], [1, 1], [-1, 1]] as const // prettier-ignore
  const ring = (c: number) =>
    signs.map(([a, b]): Vec3 => {
      const [p, q, r] = [a * half[0], b * half[1], c * half[2]]
      return [
        centre[0] + p * u[0] + q * v[0] + r * w[0],
        centre[1] + p * u[1] + q * v[1] + r * w[1],
        centre[2] + p * u[2] + q * v[2] + r * w[2],
      ]
    })
  const faces = [[3, 2, 1, 0], [4, 5, 6, 7], [0, 1, 5, 4], [1, 2, 6, 5], [2, 3, 7, 6], [3, 0, 4, 7]] // prettier-ignore
  return { corners: [...ring(-1), ...ring(1)], faces: right ? faces : faces.map((face) => face.toReversed()) }
}

/** Outward direction of a face; zeros for one without area. */
export function faceNormal({ corners }: DrawnSolid, face: readonly number[]): Vec3 {
  const points = face.flatMap((i) => (corners[i] ? [corners[i]] : []))
  const [a, b] = points
  if (!a || !b) return [0, 0, 0]
  for (const c of points.slice(2)) {
    const normal = cross(subtract(b, a), subtract(c, a))
    if (dot(normal, normal) > 1e-16) return normalise(normal)
  }
  return [0, 0, 0]
}

/** The faces of a solid that the eye sees. */
export const facesSeen = (solid: DrawnSolid, toEye: Vec3): (readonly number[])[] =>
  solid.faces.filter((face) => dot(faceNormal(solid, face), toEye) > 1e-9)

/** Directions of a solid's edges, each once. */
export function edgeDirections({ corners, faces }: DrawnSolid): Vec3[] {
  const found: Vec3[] = []
  for (const face of faces) {
    face.forEach((from, i) => {
      const [a, b] = [corners[from], corners[face[(i + 1) % face.length] ?? 0]]
      if (!a || !b) return
      const edge = normalise(subtract(b, a))
      if (!found.some((known) => Math.abs(dot(known, edge)) > 1 - 1e-9)) found.push(edge)
    })
  }
  return found
}
