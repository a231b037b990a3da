import { isInside } from '#app/domain/site/geometry.ts'
import type { Cover } from '#app/domain/site/site.ts'
import { cross, normalise, scale, subtract, type Vec2, type Vec3 } from '#app/domain/vector.ts'

/** A plane of a cover's underside: a point on it and its unit normal, which points up. */
export interface Plane {
  readonly point: Vec3
  readonly normal: Vec3
}

/** Corners nearer to one line than this make no plane, m² of twice their area in plan. */
const leastArea = 1e-6

const planes = new WeakMap<Cover, Plane | null>()

/**
 * Plane of the underside, defined by the first three corners; null when these lie in one line in plan ("three heights
 * in one line do not make a plane").
 */
export function coverPlane(cover: Cover): Plane | null {
  const known = planes.get(cover)
  if (known !== undefined) return known
  const plane = planeThrough(cover.corners)
  planes.set(cover, plane)
  return plane
}

function planeThrough([a, b, c]: readonly Vec3[]): Plane | null {
  if (!a || !b || !c) return null
  const across = cross(subtract(b, a), subtract(c, a))
  if (Math.abs(across[2]) < leastArea) return null
  return { point: a, normal: normalise(scale(across, Math.sign(across[2]))) }
}

/** Height of a plane over (x, y), m; the plane has no edges. */
export function planeHeightAt(plane: Plane, x: number, y: number): number {
  const [nx, ny, nz] = plane.normal
  return plane.point[2] - (nx * (x - plane.point[0]) + ny * (y - plane.point[1])) / nz
}

/** Outline of the cover in plan. */
export const coverOutline = (cover: Cover): Vec2[] => cover.corners.map(([x, y]): Vec2 => [x, y])

/** Height of the cover's underside over (x, y), m; null beside the cover and for corners that make no plane. */
export function coverHeightAt(cover: Cover, x: number, y: number): number | null {
  const plane = coverPlane(cover)
  return plane && isInside(coverOutline(cover), x, y) ? planeHeightAt(plane, x, y) : null
}

/** How far the fourth corner lies above the plane of the other three, m (negative: below); 0 for three corners. */
export function coverWarp(cover: Cover): number | null {
  const plane = coverPlane(cover)
  const fourth = cover.corners[3]
  if (!plane) return null
  return fourth ? fourth[2] - planeHeightAt(plane, fourth[0], fourth[1]) : 0
}

/** Slope of a cover: its angle from level, rad; the fall per length in plan (times 12: inches per foot); downhill in plan. */
export interface Slope {
  readonly angle: number
  readonly fall: number
  /** Unit direction downhill; zeros when level. */
  readonly downhill: Vec2
}

/** Slope of the cover's plane; null for corners that make no plane. */
export function coverSlope(cover: Cover): Slope | null {
  const plane = coverPlane(cover)
  if (!plane) return null
  const [nx, ny, nz] = plane.normal
  const sideways = Math.hypot(nx, ny)
  const downhill: Vec2 = sideways === 0 ? [0, 0] : [nx / sideways, ny / sideways]
  return { angle: Math.atan2(sideways, nz), fall: sideways / nz, downhill }
}
