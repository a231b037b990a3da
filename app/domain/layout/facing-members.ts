import { nearestOnSegment } from '#app/domain/site/geometry.ts'
import type { Member } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** A member to one side of a place: its point on the line through the place, and how far away that is in plan, m. */
export interface FacingMember {
  readonly member: Member
  readonly point: Vec2
  readonly distance: number
}

/** A place this near to a member is under it, not beside it, m. */
const underIt = 1e-6

/**
 * Two members on either side of a place, so that their points and the place lie on one line in plan: the nearest member
 * that has another one opposite, and the first that a line square to it meets there. The nearer one first; null where
 * no member has another opposite.
 */
export function facingMembers(members: readonly Member[], [x, y]: Vec2): readonly [FacingMember, FacingMember] | null {
  const beside = members
    .map((member): FacingMember => ({ member, ...nearestOnSegment(member.from, member.to, x, y) }))
    .filter(({ distance }) => distance > underIt)
    .sort((a, b) => a.distance - b.distance)
  for (const near of beside) {
    const others = members.filter((member) => member !== near.member)
    const opposite = firstMet(others, [x, y], [x - near.point[0], y - near.point[1]])
    if (opposite) return opposite.distance < near.distance ? [opposite, near] : [near, opposite]
  }
  return null
}

/** The first member that a line from a place in a direction in plan meets; null when it meets none. */
export function firstMet(members: readonly Member[], [x, y]: Vec2, [dx, dy]: Vec2): FacingMember | null {
  const length = Math.hypot(dx, dy)
  let first: FacingMember | null = null
  if (length === 0) return null
  const [ux, uy] = [dx / length, dy / length]
  for (const member of members) {
    const [ex, ey] = [member.to[0] - member.from[0], member.to[1] - member.from[1]]
    const [qx, qy] = [member.from[0] - x, member.from[1] - y]
    const across = ux * ey - uy * ex
    if (Math.abs(across) < 1e-9 * Math.hypot(ex, ey)) continue
    const distance = (qx * ey - qy * ex) / across
    const along = (qx * uy - qy * ux) / across
    const meets = distance > underIt && along >= -1e-9 && along <= 1 + 1e-9
    if (!meets || (first && first.distance <= distance)) continue
    first = { member, point: [x + ux * distance, y + uy * distance], distance }
  }
  return first
}
