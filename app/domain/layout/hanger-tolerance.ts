import type { Hanger } from '#app/domain/layout/hanging.ts'
import type { ThingOf } from '#app/domain/site/dimension.ts'
import { undersideAt } from '#app/domain/site/member.ts'
import type { Site } from '#app/domain/site/site.ts'
import { toleranceOf } from '#app/domain/site/tolerance.ts'

/** How uncertain the sizes of member and cover leave the hanger's length, m; null when its height cannot be told. */
export function hangerTolerance(
  site: Site,
  { memberId, anchor, eye, sideways }: Hanger,
  bareTolerance: number,
): number | null {
  const member = site.members.find(({ id }) => id === memberId)
  if (!member) return null
  const thing: ThingOf = 'follows' in member.underside ? { of: 'cover', id: member.underside.follows } : { of: 'member', id: memberId } // prettier-ignore
  const length = (moved: Site) => {
    const same = moved.members.find(({ id }) => id === memberId)
    const underside = same ? undersideAt(moved, same, anchor[0], anchor[1]) : null
    return underside === null ? null : Math.hypot(sideways, underside - eye[2])
  }
  return toleranceOf(length, site, bareTolerance, [thing])
}
