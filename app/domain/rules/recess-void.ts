import { coversOver } from '#app/domain/rules/about-heater.ts'
import { heaterRule, judgedBy, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { toleranceOf } from '#app/domain/site/tolerance.ts'

/** The void above the ceiling is as deep as the model's recess box needs. Null for other mounts. */
export function recessVoid(check: HeaterCheck): Finding | null {
  const { heater, model, site, house } = check
  if (heater.mount !== 'recess box') return null
  const cover = coversOver(check)[0]
  const depth = cover?.voidDepth ?? null
  const need = model.voidDepth
  const known = cover && depth !== null
  return judgedBy(
    heaterRule(check, 'recess-void', 'hard stop', 'm'),
    {
      fails: 'Void too shallow for the recess box',
      'measure first': 'Void may be too shallow for the recess box',
      pass: 'Void deep enough for the recess box',
      'cannot tell': need === null ? 'The manual states no void depth' : 'Depth of the void not known',
    },
    {
      value: depth,
      limit: need,
      margin: depth === null || need === null ? null : depth - need,
      tolerance: known
        ? toleranceOf((moved) => moved.covers.find(({ id }) => id === cover.id)?.voidDepth ?? null, site, house.rules.toleranceUnstated, [{ of: 'cover', id: cover.id }]) // prettier-ignore
        : null,
      remedy: 'Measure the clear depth of the void.',
    },
  )
}
