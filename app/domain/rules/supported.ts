import type { Support, SupportReason } from '#app/domain/layout/supports.ts'
import { findingOf, heaterRule, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { houseRules } from '#app/domain/rules/house-rules.ts'
import { formatLength } from '#app/domain/units.ts'

/**
 * The heater hangs from structure that is there: within its mount's reach, with something above every suspension eye,
 * and by a mount that holds its tilt. A heater goes where its support is, so the support's place has no tolerance here.
 */
export function supported(check: HeaterCheck): Finding {
  const { support, site, heater } = check
  const { outcome, reason, nearest, distance, reach } = support
  const source = check.model.mountReach[heater.mount] === undefined ? houseRules.chainSidewaysLimit.source : undefined
  const rule = heaterRule(check, 'supported', 'hard stop', 'm', source)
  const outcomes = { held: 'pass', 'not held': 'fails', 'cannot tell': 'cannot tell' } as const
  const beyond = reason === 'out of reach' || reason === 'an eye has no member' || reason === 'held'
  const far = nearest && reason !== 'held' ? [[heater.x, heater.y, heater.lowestPoint], [...nearest.point, heater.lowestPoint]] as const : null // prettier-ignore
  return findingOf(rule, outcomes[outcome], {
    title: titleOf(support, heater.mount),
    value: distance,
    limit: reach,
    margin: beyond && reach !== null && distance !== null ? reach - distance : null,
    tolerance: beyond ? 0 : null,
    remedy: reason === 'held' ? null : remedyOf(support, site.displayUnits),
    nearest: far && { from: far[0], to: far[1] },
  })
}

function titleOf({ reason, nearest, ids }: Support, mount: string): string {
  const thing = nearest?.kind ?? { 'wall bracket': 'wall', 'pole clamp': 'pole' }[mount] ?? 'member'
  const titles: Record<SupportReason, string> = {
    held: `Held by ${ids.join(' and ')}`,
    'nothing to fix to': `No ${thing} to fix it to`,
    'out of reach': thing === 'member' ? 'No member above it' : `No ${thing} within reach`,
    'an eye has no member': 'A suspension eye has no member above it',
    'support too low': `The ${thing} is lower than the heater`,
    'tilt not held': `The tilt is not held by ${mount}`,
    'not in a bay': 'Not in a bay between members',
    'no cover above': 'No cover for a recess box',
    'reach not stated': `The manual states no reach for ${mount}`,
    'eyes not stated': 'The manual states no suspension eyes',
    'height not known': `The height of the ${thing} is not known`,
  }
  return titles[reason]
}

function remedyOf({ reason, nearest }: Support, units: 'metric' | 'imperial'): string {
  if (reason === 'tilt not held') return 'Set the tilt to 0°, or choose a mount that holds it.'
  if (reason === 'reach not stated' || reason === 'eyes not stated') return 'Enter it from the manual.'
  if (reason === 'height not known') return 'Enter the height of its underside.'
  if (!nearest) return 'Add a support to the site, or choose another mount.'
  const away = formatLength(nearest.distance, units)
  if (reason === 'support too low') return `Lower the heater. Nearest is ${nearest.name}, ${away} away.`
  const rail = nearest.kind === 'member' ? ', or add a rail between members' : ''
  return `Nearest is ${nearest.name}, ${away} away. Move it there${rail}.`
}
