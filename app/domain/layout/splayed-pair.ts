import { facingMembers } from '#app/domain/layout/facing-members.ts'
import { undersideAt } from '#app/domain/site/member.ts'
import type { Site } from '#app/domain/site/site.ts'
import { degrees, type Vec2, type Vec3 } from '#app/domain/vector.ts'

/** One hanger of a splayed pair: from an eye up to a member beside it. Lengths m. */
export interface SplayedLeg {
  readonly memberId: string
  readonly name: string
  /** The point of the member's axis that it goes to, in plan. */
  readonly point: Vec2
  /** How far that is sideways of the eye. */
  readonly sideways: number
  /** The member's underside there; null when not known. */
  readonly underside: number | null
}

/** Both hangers of an eye, on one line through it in plan; null where no member has another opposite. */
export function splayedLegs(site: Site, [x, y]: Vec2 | Vec3): readonly [SplayedLeg, SplayedLeg] | null {
  const facing = facingMembers(site.members, [x, y])
  if (!facing) return null
  const [near, far] = facing.map(({ member, point, distance }): SplayedLeg => {
    const underside = undersideAt(site, member, point[0], point[1])
    return { memberId: member.id, name: member.name, point, sideways: distance, underside }
  })
  return near && far ? [near, far] : null
}

/** Angle of a hanger from plumb that goes `sideways` aside and `rise` up, degrees; 90 or more when it does not rise. */
export const splayAngleDeg = (sideways: number, rise: number): number => degrees(Math.atan2(sideways, rise))

/** A hanger of a pair, as statics see it: how far aside and how far up its member is, m. */
interface Reaches {
  readonly sideways: number
  readonly rise: number
}

/**
 * A splayed pair under a weight, N: the length of each hanger, √(δ² + Δz²), m, and its tension, N. The hangers pull to
 * either side in one plane, so T1 sin φ1 = T2 sin φ2 and T1 cos φ1 + T2 cos φ2 = W (equilibrium of a point; any textbook
 * of statics): T1 = W sin φ2 / sin(φ1 + φ2), and W / (2 cos φ) for equal ones. Two plumb hangers carry half each.
 * Infinite for level ones.
 */
export function splayedPair([a, b]: readonly [Reaches, Reaches], weight: number): readonly [PairHanger, PairHanger] {
  const [lengthA, lengthB] = [Math.hypot(a.sideways, a.rise), Math.hypot(b.sideways, b.rise)]
  const across = a.sideways * b.rise + b.sideways * a.rise
  const even = a.sideways === 0 && b.sideways === 0
  const share = (other: number, own: number) => (even ? weight / 2 : (weight * other * own) / across)
  return [
    { length: lengthA, tension: share(b.sideways, lengthA) },
    { length: lengthB, tension: share(a.sideways, lengthB) },
  ]
}

/** A hanger of a pair: its length, m, and what pulls in it, N. */
export interface PairHanger {
  readonly length: number
  readonly tension: number
}
