import { bayOf, type Bay } from '#app/domain/layout/bay.ts'
import { findingOf, heaterRule, judgedBy, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { Member, Site } from '#app/domain/site/site.ts'
import { isCombustible } from '#app/domain/site/solids.ts'
import { toleranceOf } from '#app/domain/site/tolerance.ts'

/**
 * A recess box lies in a bay, its body clear of every member by the side clearance. It is set out from the members
 * beside it, so half the bay's width carries the tolerance. Null for other mounts.
 */
export function recessBay(check: HeaterCheck): Finding | null {
  if (check.heater.mount !== 'recess box') return null
  const rule = heaterRule(check, 'recess-bay', 'hard stop', 'm')
  const bay = bayOf(check.site, check.body)
  const sides = [bay?.left, bay?.right].flatMap((side) => side ?? [])
  if (!bay || sides.length === 0) {
    return findingOf(rule, 'cannot tell', {
      title: 'No members of the ceiling given',
      remedy: 'Enter the members of the ceiling.',
    })
  }
  const left = sides.map((side) => ({ ...side, limit: sideClearance(check, isCombustible(side.member.material)) }))
  const tight = left.reduce((a, b) => (b.clear - (b.limit ?? 0) < a.clear - (a.limit ?? 0) ? b : a))
  const limit = left.some((side) => side.limit === null) ? null : tight.limit
  const across = tight.clear < 0
  return judgedBy(
    rule,
    {
      fails: across ? `Recess box lies across ${tight.member.name}` : `Too near in its bay: ${tight.member.name}`,
      'measure first': `Tight in its bay: ${tight.member.name}`,
      pass: 'Clear in its bay',
      'cannot tell': 'The manual states no side clearance',
    },
    {
      value: tight.clear,
      limit,
      margin: limit === null ? null : tight.clear - limit,
      tolerance: toleranceOf((site) => halfWidth(site, bay), check.site, check.house.rules.toleranceUnstated, sides.map(({ member }) => ({ of: 'member', id: member.id }))), // prettier-ignore
      remedy: 'Move it to the middle of a bay between members.',
    },
  )
}

function sideClearance({ model }: HeaterCheck, combustible: boolean): number | null {
  const given = combustible ? model.clearanceToCombustible : model.clearanceToNoncombustible
  return given?.side ?? null
}

/** Half the clear width between both members of the bay, wherever they have moved; beside one member, its place. */
function halfWidth(site: Site, bay: Bay): number | null {
  const moved = [bay.left, bay.right].map((side) => site.members.find(({ id }) => id === side?.member.id))
  const [left, right] = moved
  if (left && right) return (acrossTo(left, right) - (left.width + right.width) / 2) / 2
  const only = left ?? right
  const before = (bay.left ?? bay.right)?.member
  return only && before ? acrossTo(before, only) - only.width / 2 : null
}

/** Distance between the axes of two members, square to the first, from the middle of the second, m. */
function acrossTo(member: Member, other: Member): number {
  const [dx, dy] = [member.to[0] - member.from[0], member.to[1] - member.from[1]]
  const [x, y] = [
    (other.from[0] + other.to[0]) / 2 - member.from[0],
    (other.from[1] + other.to[1]) / 2 - member.from[1],
  ]
  return Math.abs(x * dy - y * dx) / (Math.hypot(dx, dy) || 1)
}
