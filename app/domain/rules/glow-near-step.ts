import { glowsBright } from '#app/domain/heaters/glow.ts'
import { heaterRule, judgedBy, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { houseFigure } from '#app/domain/rules/house-rules.ts'
import { distanceToOutline } from '#app/domain/site/geometry.ts'

/** A step of less than this is level ground, m. */
const leastStep = 0.01

/**
 * Information: a bright glow beside a step or a stair dazzles who walks there. Distance in plan from the heater to the
 * nearest edge where the level changes. Null without levels and for heaters that hardly glow.
 */
export function glowNearStep(check: HeaterCheck): Finding | null {
  const { site, heater, model, house } = check
  if (!glowsBright(model)) return null
  const steps = site.levels.filter(({ height }) => Math.abs(height) >= leastStep)
  const nearest = steps
    .map(({ name, outline }) => ({ name, distance: distanceToOutline(outline, heater.x, heater.y) }))
    .reduce<{ name: string; distance: number } | null>((a, b) => (a && a.distance <= b.distance ? a : b), null)
  if (!nearest) return null
  const { value: limit, source } = houseFigure(house.rules, 'glowNearStep')
  return judgedBy(
    heaterRule(check, 'glow-near-step', 'advice', 'm', source),
    {
      fails: `Bright glow near the step of ${nearest.name}`,
      'measure first': `Bright glow near the step of ${nearest.name}`,
      pass: 'No step near the bright glow',
      'cannot tell': 'Steps cannot be told',
    },
    {
      value: nearest.distance,
      limit,
      margin: nearest.distance - limit,
      tolerance: 0,
      remedy: 'Light the step, mark its edge, or choose a model with less glow.',
    },
  )
}
