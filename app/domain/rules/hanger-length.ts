import { hangScheduleOf, type Hanger } from '#app/domain/layout/hanging.ts'
import { heaterRule, judgedBy, type HeaterCheck, type Rule } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { ThingOf } from '#app/domain/site/dimension.ts'
import { undersideAt } from '#app/domain/site/member.ts'
import type { Site } from '#app/domain/site/site.ts'
import { toleranceOf } from '#app/domain/site/tolerance.ts'
import { formatLength } from '#app/domain/units.ts'

/**
 * Each hanger of chain or rods can be made: its fittings go between eye and member, and its turnbuckle takes up what
 * whole links leave. Too short: a short bracket of that length. Null for other mounts and without anything above an eye.
 */
export function hangerLength(check: HeaterCheck): Finding | null {
  const { site, heater, model, hanging } = check
  const schedule = hangScheduleOf(site, heater, model, hanging)
  const [first] = schedule?.hangers ?? []
  if (!schedule || !first) return null
  const rule = heaterRule(check, 'hanger-length', 'soft', 'm', 'Hanging data in Rules')
  const beyond = schedule.hangers.find(({ outcome }) => outcome === 'beyond the turnbuckle')
  if (beyond) return beyondTurnbuckle(rule, beyond, hanging)
  const shortest = schedule.hangers.reduce((a, b) => (b.length < a.length ? b : a), first)
  const least = hanging.hardwareAllowance - hanging.shortens
  const others = model.mounts.filter((mount) => mount === 'ceiling bracket' || mount === 'beam clamp')
  const bracket = formatLength(shortest.length, site.displayUnits)
  return judgedBy(
    rule,
    {
      fails: `Too short for ${heater.mount}: use a short bracket`,
      'measure first': `Nearly too short for ${heater.mount}`,
      pass: 'Hangers can be made',
      'cannot tell': 'Hangers cannot be told',
    },
    {
      value: shortest.length,
      limit: least,
      margin: shortest.length - least,
      tolerance: lengthTolerance(site, shortest),
      remedy: `A bracket of ${bracket} from underside to eye${others.length > 0 ? ` (offered: ${others.join(', ')})` : ', by the maker'}, or hang it lower.`,
    },
  )
}

const beyondTurnbuckle = (rule: Rule, { residual, left }: Hanger, { lengthens, shortens }: HeaterCheck['hanging']) =>
  judgedBy(
    rule,
    {
      fails: "More than the turnbuckle's range: another hanger",
      'measure first': "Near the turnbuckle's range",
      pass: 'Hangers can be made',
      'cannot tell': 'Hangers cannot be told',
    },
    {
      value: Math.abs(residual),
      limit: residual > 0 ? lengthens : shortens,
      margin: -Math.abs(left),
      tolerance: 0,
      remedy: 'Take chain of a smaller pitch, a rod, or a turnbuckle of more range.',
    },
  )

/** How uncertain the sizes of member and cover leave the hanger's length, m; null when its height cannot be told. */
function lengthTolerance(site: Site, { memberId, anchor, eye, sideways }: Hanger): number | null {
  const member = site.members.find(({ id }) => id === memberId)
  if (!member) return null
  const thing: ThingOf = 'follows' in member.underside ? { of: 'cover', id: member.underside.follows } : { of: 'member', id: memberId } // prettier-ignore
  const length = (moved: Site) => {
    const same = moved.members.find(({ id }) => id === memberId)
    const underside = same ? undersideAt(moved, same, anchor[0], anchor[1]) : null
    return underside === null ? null : Math.hypot(sideways, underside - eye[2])
  }
  return toleranceOf(length, site, [thing])
}
