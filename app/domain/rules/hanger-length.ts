import { hangerTolerance } from '#app/domain/layout/hanger-tolerance.ts'
import { hangScheduleOf, type Hanger } from '#app/domain/layout/hanging.ts'
import type { HangingData } from '#app/domain/layout/hanging-data.ts'
import { heaterRule, judgedBy, type HeaterCheck, type Rule } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { formatLength } from '#app/domain/units.ts'

/**
 * Each hanger of chain or rods can be made: its fittings go between eye and member, and its turnbuckle takes up what
 * whole links leave. Too short: a short bracket of that length. Null for other mounts and without anything above an eye.
 */
export function hangerLength(check: HeaterCheck): Finding | null {
  const { site, heater, model, house } = check
  const { hanging, rules } = house
  const schedule = hangScheduleOf(site, heater, model, house)
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
      tolerance: hangerTolerance(site, shortest, rules.toleranceUnstated),
      remedy: `A bracket of ${bracket} from underside to eye${others.length > 0 ? ` (offered: ${others.join(', ')})` : ', by the maker'}, or hang it lower.`,
    },
  )
}

const beyondTurnbuckle = (rule: Rule, { residual, left }: Hanger, { lengthens, shortens }: HangingData) =>
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
