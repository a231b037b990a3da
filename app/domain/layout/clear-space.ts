import type { Body } from '#app/domain/layout/body.ts'
import { boundsApart, boundsOf, leastAlong, type Extent } from '#app/domain/site/convex.ts'
import type { Plane } from '#app/domain/site/cover.ts'
import { gapBetween, type Gap } from '#app/domain/site/gap.ts'
import { add, dot, scale, subtract, type Vec3 } from '#app/domain/vector.ts'

/** How far a body box is grown outward from its faces, m: back (above at tilt 0), sides, ends; the open face stays. */
export interface Growth {
  readonly above: number
  readonly side: number
  readonly end: number
}

const none: Growth = { above: 0, side: 0, end: 0 }

/** The tilted body as a solid, grown outward from its faces. */
function bodySolid(body: Body, growth: Growth = none): Extent {
  const { centre, u, v, w, half } = body
  const ends = half.u + growth.end
  const sides = half.v + growth.side
  const back = half.w + growth.above
  return {
    middle: centre,
    farthest: (d) => {
      const along = dot(d, u) > 0 ? ends : -ends
      const across = dot(d, v) > 0 ? sides : -sides
      const down = dot(d, w) > 0 ? half.w : -back
      return [
        centre[0] + along * u[0] + across * v[0] + down * w[0],
        centre[1] + along * u[1] + across * v[1] + down * w[1],
        centre[2] + along * u[2] + across * v[2] + down * w[2],
      ]
    },
  }
}

/** Corners of the tilted body. */
export function bodyCorners({ centre, u, v, w, half }: Body): Vec3[] {
  const signs = [-1, 1] as const
  return signs.flatMap((i) =>
    signs.flatMap((j) =>
      signs.map((k) => add(add(add(centre, scale(u, i * half.u)), scale(v, j * half.v)), scale(w, k * half.w))),
    ),
  )
}

/**
 * Distance from the body's worst corner up to a plane, square to the plane, m; negative when a corner is above it:
 * n·(c − p) − Σ half_i |n·axis_i|.
 */
export function gapUpTo(body: Body, plane: Plane): number {
  const { centre, u, v, w, half } = body
  const n = plane.normal
  const reach = half.u * Math.abs(dot(n, u)) + half.v * Math.abs(dot(n, v)) + half.w * Math.abs(dot(n, w))
  return dot(n, subtract(plane.point, centre)) - reach
}

/** The worst corner for a plane above and the point of the plane square above it. */
export function nearestOnPlane(body: Body, plane: Plane): { from: Vec3; to: Vec3 } {
  const from = bodySolid(body).farthest(plane.normal)
  return { from, to: add(from, scale(plane.normal, dot(plane.normal, subtract(plane.point, from)))) }
}

export type Face = 'above' | 'side' | 'end'

/** How an obstacle lies about the body: which face lets it pass most easily, by how much, and what is left of it. */
export interface Lie {
  readonly face: Face
  /** Distance outward from that face, or the bare distance from the body when it lies beyond no face, m. */
  readonly value: number
  /** The clearance of that face, m. */
  readonly limit: number
  readonly margin: number
}

/**
 * How one convex obstacle lies about the body. It passes when it lies wholly beyond one face by that face's clearance,
 * or else clear of the box grown by all of them; what lies wholly in front of the open face is for the beam's clearance.
 */
export function lieAbout(body: Body, obstacle: Extent, clearance: Growth): Lie | null {
  const faces = beyondFaces(body, obstacle)
  if (faces.front >= 0) return null
  const all = (['above', 'side', 'end'] as const).map((face): Lie => {
    const [value, limit] = [faces[face], clearance[face]]
    return { face, value, limit, margin: value - limit }
  })
  const best = all.reduce((a, b) => (b.margin > a.margin ? b : a))
  if (best.margin >= 0) return best
  const grown = gapBetween(bodySolid(body, clearance), obstacle).distance
  if (grown > 0) return { ...best, value: gapToBody(body, obstacle).distance, margin: grown }
  if (best.value >= 0) return best
  return besideNoFace(all, gapToBody(body, obstacle).distance)
}

/** An obstacle that lies beyond no face: its bare distance against the clearance that it comes nearest to keeping. */
function besideNoFace(all: readonly Lie[], value: number): Lie | null {
  const within = all.filter(({ limit }) => limit > value)
  const [first, ...rest] = within.length > 0 ? within : all
  if (!first) return null
  const best = rest.reduce((a, b) => (b.margin > a.margin ? b : a), first)
  return { ...best, value, margin: value < best.limit ? value - best.limit : best.margin }
}

/** How far the obstacle lies wholly beyond each face, m; negative where part of it does not. */
function beyondFaces({ centre, u, v, w, half }: Body, obstacle: Extent): Record<Face | 'front', number> {
  const beyond = (n: Vec3, reach: number) => leastAlong(obstacle, n) - dot(n, centre) - reach
  const both = (n: Vec3, reach: number) => Math.max(beyond(n, reach), beyond(scale(n, -1), reach))
  return {
    above: beyond(scale(w, -1), half.w),
    side: both(v, half.v),
    end: both(u, half.u),
    front: beyond(w, half.w),
  }
}

/** The body and an obstacle are at least this far apart, m: the most that a face of the body sets them apart, or 0. */
export function apartAtLeast(body: Body, obstacle: Extent): number {
  return Math.max(0, ...Object.values(beyondFaces(body, obstacle)))
}

const bareSolids = new WeakMap<Body, Extent>()

function bareSolid(body: Body): Extent {
  const known = bareSolids.get(body) ?? bodySolid(body)
  bareSolids.set(body, known)
  return known
}

/** A bound of the distance between the body and an obstacle from their bounds alone, m: quick, and never too great. */
export const boundsFromBody = (body: Body, obstacle: Extent): number =>
  boundsApart(boundsOf(bareSolid(body)), boundsOf(obstacle))

/** Least distance from the body to an obstacle with its pair of points; 0 when they share a point. */
export const gapToBody = (body: Body, obstacle: Extent): Gap => gapBetween(bareSolid(body), obstacle)

/** Distance of a point from the body, m; 0 inside. */
export function distanceFromBody({ centre, u, v, w, half }: Body, point: Vec3): number {
  const d = subtract(point, centre)
  const along = Math.max(0, Math.abs(dot(d, u)) - half.u)
  const across = Math.max(0, Math.abs(dot(d, v)) - half.v)
  const down = Math.max(0, Math.abs(dot(d, w)) - half.w)
  return Math.sqrt(along * along + across * across + down * down)
}

/** The point of the body nearest to a point. */
export function nearestOfBody({ centre, u, v, w, half }: Body, point: Vec3): Vec3 {
  const d = subtract(point, centre)
  const held = (axis: Vec3, reach: number) => scale(axis, Math.min(reach, Math.max(-reach, dot(d, axis))))
  return add(centre, add(held(u, half.u), add(held(v, half.v), held(w, half.w))))
}
