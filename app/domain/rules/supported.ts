import { splayAngleDeg } from '#app/domain/layout/splayed-pair.ts'
import type { Support, SupportReason } from '#app/domain/layout/supports.ts'
import { findingOf, heaterRule, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { houseFigure } from '#app/domain/rules/house-rules.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'

/** A splayed hanger for one that is unsupported because of its angle; reasons whose figure is a distance. */
const byDistance: readonly SupportReason[] = ['out of reach', 'an eye has no member', 'held']

/**
 * The heater hangs from structure that is there: within its mount's reach, with something above every suspension eye
 * (or, splayed, on either side of it, steep enough), and by a mount that holds its tilt. A heater goes where its support
 * is, so the support's place has no tolerance here.
 */
export function supported(check: HeaterCheck): Finding {
  const { support, site, heater, house } = check
  const { outcome, reason, nearest, distance, reach } = support
  const flat = reason === 'splayed too flat'
  const rule = heaterRule(check, 'supported', 'hard stop', flat ? '°' : 'm', sourceOf(check))
  const outcomes = { held: 'pass', 'not held': 'fails', 'cannot tell': 'cannot tell' } as const
  const beyond = byDistance.includes(reason)
  const far = nearest && reason !== 'held' ? [[heater.x, heater.y, heater.lowestPoint], [...nearest.point, heater.lowestPoint]] as const : null // prettier-ignore
  const [value, limit] = flat ? [flattestOf(support), house.rules.splayAngleDeg] : [distance, reach]
  const margin = (flat || beyond) && limit !== null && value !== null ? limit - value : null
  return findingOf(rule, outcomes[outcome], {
    title: titleOf(support, heater.mount),
    value,
    limit,
    margin,
    tolerance: flat || beyond ? 0 : null,
    remedy: reason === 'held' ? null : remedyOf(support, site.displayUnits, house.rules),
    nearest: far && { from: far[0], to: far[1] },
  })
}

function sourceOf({ support, heater, model, house: { rules } }: HeaterCheck): string | undefined {
  if (heater.splayed && support.eyes.length > 0) {
    return houseFigure(rules, support.reason === 'splayed too flat' ? 'splayAngleDeg' : 'splayReach').source
  }
  return model.mountReach[heater.mount] === undefined ? houseFigure(rules, 'chainSideways').source : undefined
}

/** The largest angle of its splayed hangers from plumb, degrees. */
function flattestOf({ eyes }: Support): number {
  return Math.max(
    ...eyes.flatMap(({ eye, legs }) =>
      (legs ?? []).map(({ sideways, underside }) => splayAngleDeg(sideways, (underside ?? eye[2]) - eye[2])),
    ),
  )
}

function titleOf({ reason, nearest, ids, eyes }: Support, mount: string): string {
  const thing = nearest?.kind ?? { 'wall bracket': 'wall', 'pole clamp': 'pole' }[mount] ?? 'member'
  const splayed = eyes.some(({ legs }) => legs)
  const titles: Record<SupportReason, string> = {
    held: `${splayed ? 'Splayed between' : 'Held by'} ${ids.join(' and ')}`,
    'nothing to fix to': `No ${thing} to fix it to`,
    'out of reach': splayed
      ? 'A member of its splayed pair is out of reach'
      : thing === 'member'
        ? 'No member above it'
        : `No ${thing} within reach`,
    'an eye has no member': 'A suspension eye has no member above it',
    'not between members': 'No member on either side for a splayed pair',
    'splayed too flat': 'Its splayed hangers lie too flat',
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

function remedyOf({ reason, nearest, eyes }: Support, units: DisplayUnits, { chainSideways }: HouseRules): string {
  if (reason === 'tilt not held') return 'Set the tilt to 0°, or choose a mount that holds it.'
  if (reason === 'reach not stated' || reason === 'eyes not stated') return 'Enter it from the manual.'
  if (reason === 'height not known') return 'Enter the height of its underside.'
  if (reason === 'splayed too flat') return 'Lower the heater, or bring its members nearer by a rail.'
  if (!nearest) return 'Add a support to the site, or choose another mount.'
  const away = formatLength(nearest.distance, units)
  const splayed = eyes.some(({ legs }) => legs) || reason === 'not between members'
  if (splayed && nearest.distance <= chainSideways) {
    return `It is under ${nearest.name}: hang it plumb, not splayed.`
  }
  if (reason === 'support too low') return `Lower the heater. Nearest is ${nearest.name}, ${away} away.`
  const rail = nearest.kind === 'member' ? ', or add a rail between members' : ''
  return `Nearest is ${nearest.name}, ${away} away. Move it there${rail}.`
}
