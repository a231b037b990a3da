import { cross, dot, normalise, type Vec2, type Vec3 } from '#app/domain/vector.ts'
import { edgeDirections, faceNormal, type DrawnSolid } from '#app/drawing/axonometric/solid.ts'
import type { Projection } from '#app/drawing/axonometric/projection.ts'

/** Things may touch by this much and still be apart, m. */
const slack = 1e-6

interface Looked {
  readonly solid: DrawnSolid
  readonly x: Vec2
  readonly y: Vec2
  readonly depth: number
  readonly normals: readonly Vec3[]
  readonly edges: readonly Vec3[]
}

const rangeOf = (points: readonly Vec3[], axis: Vec3): Vec2 => {
  let [low, high] = [Infinity, -Infinity]
  for (const point of points) {
    const at = dot(point, axis)
    if (at < low) low = at
    if (at > high) high = at
  }
  return [low, high]
}

function look(solid: DrawnSolid, { right, up, toEye }: Projection): Looked {
  const [near, far] = rangeOf(solid.corners, toEye)
  return {
    solid,
    x: rangeOf(solid.corners, right),
    y: rangeOf(solid.corners, up),
    depth: (near + far) / 2,
    normals: solid.faces.map((face) => faceNormal(solid, face)).filter((normal) => dot(normal, normal) > 0.5),
    edges: edgeDirections(solid),
  }
}

/**
 * Which of two convex solids lies behind the other as the eye sees them: −1 the first, 1 the second, 0 neither. A plane
 * that parts them, square to a face of one or to two edges, has one of them on the eye's side: that one cannot be hidden
 * by the other. Solids that run into each other are told by their middles.
 */
export function whichIsBehind(a: DrawnSolid, b: DrawnSolid, projection: Projection): -1 | 0 | 1 {
  return behind(look(a, projection), look(b, projection), projection.toEye)
}

const meet = (a: Vec2, b: Vec2): boolean => a[0] < b[1] - slack && b[0] < a[1] - slack

function behind(a: Looked, b: Looked, toEye: Vec3): -1 | 0 | 1 {
  if (!meet(a.x, b.x) || !meet(a.y, b.y)) return 0
  for (const axis of partingAxes(a, b)) {
    const facing = dot(axis, toEye)
    const [ra, rb] = [rangeOf(a.solid.corners, axis), rangeOf(b.solid.corners, axis)]
    const order = ra[1] <= rb[0] + slack ? 1 : rb[1] <= ra[0] + slack ? -1 : 0
    if (order === 0) continue
    if (Math.abs(facing) < 1e-9) return 0
    return order * facing > 0 ? -1 : 1
  }
  return a.depth < b.depth ? -1 : 1
}

function* partingAxes(a: Looked, b: Looked): Generator<Vec3> {
  yield [0, 0, 1]
  yield* a.normals
  yield* b.normals
  for (const one of a.edges) {
    for (const other of b.edges) {
      const axis = normalise(cross(one, other))
      if (dot(axis, axis) > 0.5) yield axis
    }
  }
}

/** Solids in the order in which they are painted, the hidden first, as indexes. Where three hide each other in a ring, the farthest begins. */
export function paintingOrder(solids: readonly DrawnSolid[], projection: Projection): number[] {
  const looked = solids.map((solid) => look(solid, projection))
  const after = looked.map((): number[] => [])
  const waits = looked.map(() => 0)
  looked.forEach((a, i) => {
    for (let k = i + 1; k < looked.length; k++) {
      const b = looked[k]
      const order = b ? behind(a, b, projection.toEye) : 0
      if (order === 0) continue
      const [first, second] = order === -1 ? [i, k] : [k, i]
      after[first]?.push(second)
      waits[second] = (waits[second] ?? 0) + 1
    }
  })
  return released(looked, after, waits)
}

function released(looked: readonly Looked[], after: readonly number[][], waits: number[]): number[] {
  const left = new Set(looked.keys())
  const order: number[] = []
  const farthest = (among: Iterable<number>) =>
    [...among].reduce((best, i) => ((looked[i]?.depth ?? 0) < (looked[best]?.depth ?? 0) ? i : best))
  let free = [...left].filter((i) => waits[i] === 0)
  while (left.size > 0) {
    const next = free.length > 0 ? farthest(free) : farthest(left)
    free = free.filter((i) => i !== next)
    left.delete(next)
    order.push(next)
    for (const i of after[next] ?? []) {
      waits[i] = (waits[i] ?? 0) - 1
      if (waits[i] === 0 && left.has(i)) free.push(i)
    }
  }
  return order
}
