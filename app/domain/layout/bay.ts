import { bodyCorners } from '#app/domain/layout/clear-space.ts'
import type { Body } from '#app/domain/layout/body.ts'
import type { Member, Site } from '#app/domain/site/site.ts'
import { nearestOnSegment } from '#app/domain/site/geometry.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** A member beside a body: the clear way between them in plan, square to the member, m; negative when they overlap. */
interface BesideMember {
  readonly member: Member
  readonly clear: number
  /** +1 when the member lies to the left of its own direction as seen from the body, else −1. */
  readonly side: 1 | -1
}

/** Where a recess box sits between members. */
export interface Bay {
  /** The nearest member on either side; null where there is none. */
  readonly left: BesideMember | null
  readonly right: BesideMember | null
  /** Clear width between both members, m; null without one of them. */
  readonly width: number | null
  /** How much of that width the body takes, m. */
  readonly bodyWidth: number
}

/** The bay between members that a body lies in, in plan; null on a site without members alongside it. */
export function bayOf(site: Site, body: Body): Bay | null {
  const corners = bodyCorners(body).map(([x, y]): Vec2 => [x, y])
  const beside = site.members.flatMap((member) => besideMember(member, corners, [body.centre[0], body.centre[1]]) ?? [])
  const nearest = (side: 1 | -1) =>
    beside
      .filter((found) => found.side === side)
      .reduce<BesideMember | null>((a, b) => (a && a.clear <= b.clear ? a : b), null)
  const [left, right] = [nearest(1), nearest(-1)]
  const first = left ?? right
  if (!first) return null
  const bodyWidth = extent(first.member, corners)
  return { left, right, bodyWidth, width: left && right ? left.clear + bodyWidth + right.clear : null }
}

/** Unit direction square to the member in plan, to its left. */
function leftOf({ from, to }: Member): Vec2 {
  const length = Math.hypot(to[0] - from[0], to[1] - from[1]) || 1
  return [-(to[1] - from[1]) / length, (to[0] - from[0]) / length]
}

function extent(member: Member, corners: readonly Vec2[]): number {
  const [nx, ny] = leftOf(member)
  const across = corners.map(([x, y]) => x * nx + y * ny)
  return Math.max(...across) - Math.min(...across)
}

/** The member beside the body; null when it ends before it comes alongside. */
function besideMember(member: Member, corners: readonly Vec2[], centre: Vec2): BesideMember | null {
  const [nx, ny] = leftOf(member)
  const alongside = corners.some(([x, y]) => {
    const { along } = nearestOnSegment(member.from, member.to, x, y)
    return along > 0 && along < 1
  })
  if (!alongside) return null
  const across = (centre[0] - member.from[0]) * nx + (centre[1] - member.from[1]) * ny
  const clear = Math.abs(across) - extent(member, corners) / 2 - member.width / 2
  return { member, clear, side: across <= 0 ? 1 : -1 }
}
