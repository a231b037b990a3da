import { heaterRule, judgedBy, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** The lowest point is not under the manual's least height (hard stop) and not over its recommended greatest (soft). */
export function mountingHeight(check: HeaterCheck): Finding[] {
  const { heater, model } = check
  const value = heater.lowestPoint
  const { min, recommendedMax } = model.mountingHeight
  const least = judgedBy(
    heaterRule(check, 'mounting-height', 'hard stop', 'm'),
    {
      fails: 'Hangs under the least mounting height',
      'measure first': 'Hangs near the least mounting height',
      pass: 'Over the least mounting height',
      'cannot tell': 'The manual states no least mounting height',
    },
    {
      value,
      limit: min,
      margin: min === null ? null : value - min,
      tolerance: 0,
      remedy: min === null ? 'Enter it from the manual.' : 'Raise it, or choose a model for a lower height.',
    },
  )
  if (recommendedMax === null) return [least]
  const most = judgedBy(
    heaterRule(check, 'mounting-height', 'soft', 'm'),
    {
      fails: 'Hangs over the recommended height',
      'measure first': 'Hangs near the recommended height',
      pass: 'Within the recommended height',
      'cannot tell': 'The manual recommends no greatest height',
    },
    {
      value,
      limit: recommendedMax,
      margin: recommendedMax - value,
      tolerance: 0,
      remedy: 'Lower it, or choose a model for a greater height.',
    },
  )
  return [least, most]
}
