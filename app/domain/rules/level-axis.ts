import { hangScheduleOf } from '#app/domain/layout/hanging.ts'
import { heaterRule, judgedBy, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/**
 * The element's axis is level within the manual's angle. Rigid mounts are set level; of chain and rods, what the
 * turnbuckles cannot take up is left.
 */
export function levelAxis(check: HeaterCheck): Finding {
  const { site, heater, model, house } = check
  const limit = model.elementAxisLevelWithinDeg
  const schedule = hangScheduleOf(site, heater, model, house)
  const value = Math.abs(schedule?.tiltLeftDeg ?? 0)
  const short = schedule?.hangers.some(({ outcome }) => outcome === 'too short') ?? false
  return judgedBy(
    heaterRule(check, 'level-axis', 'hard stop', '°'),
    {
      fails: 'Element axis out of level',
      'measure first': 'Element axis nearly out of level',
      pass: 'Element axis level',
      'cannot tell': 'The manual does not say how level the element must be',
    },
    {
      value,
      limit,
      margin: limit === null ? null : limit - value,
      tolerance: 0,
      remedy: short ? `Too short for ${heater.mount}: use a short bracket.` : 'Hang it by hangers of other lengths.',
    },
  )
}
