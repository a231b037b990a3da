import { coverPlane, planeHeightAt } from '#app/domain/site/cover.ts'
import { nearestOnSegment } from '#app/domain/site/geometry.ts'
import type { Member, Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/**
 * Height of the member's underside at the point of its axis nearest to (x, y), m. Null when it follows a cover that is
 * not there or makes no plane.
 */
export function undersideAt(site: Site, member: Member, x: number, y: number): number | null {
  const nearest = nearestOnSegment(member.from, member.to, x, y)
  const { underside } = member
  if ('from' in underside) return underside.from + nearest.along * (underside.to - underside.from)
  const cover = site.covers.find(({ id }) => id === underside.follows)
  const plane = cover ? coverPlane(cover) : null
  return plane && planeHeightAt(plane, nearest.point[0], nearest.point[1])
}

/** A member and its point nearest to a place in plan. `distance` is sideways from its axis (or beyond its end), m. */
export interface NearestMember {
  readonly member: Member
  readonly point: Vec2
  readonly along: number
  readonly distance: number
}

/** The member whose axis passes nearest to (x, y) in plan; the first of equals; null on a site without members. */
export function nearestMember(site: Site, x: number, y: number): NearestMember | null {
  let nearest: NearestMember | null = null
  for (const member of site.members) {
    const found = nearestOnSegment(member.from, member.to, x, y)
    if (!nearest || found.distance < nearest.distance - 1e-9) nearest = { member, ...found }
  }
  return nearest
}

/** Direction of the member's axis in plan, degrees counter-clockwise from +x. */
export const memberDirectionDeg = (member: Member): number =>
  (Math.atan2(member.to[1] - member.from[1], member.to[0] - member.from[0]) * 180) / Math.PI

/** Length of the member in plan, m. */
export const memberLength = (member: Member): number =>
  Math.hypot(member.to[0] - member.from[0], member.to[1] - member.from[1])
