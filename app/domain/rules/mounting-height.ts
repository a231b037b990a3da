import { heaterRule, judgedBy, manualOf, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { figureOfRuleSet, stricterLength } from '#app/domain/rules/sourced-figure.ts'
import { tradePractice } from '#app/domain/rules/trade-practice.ts'

/** The lowest point is not under the least height of the manual or, where it is greater, of the rule set (hard stop) and not over its recommended greatest (soft). */
export function mountingHeight(check: HeaterCheck): Finding[] {
  const { heater, model } = check
  const value = heater.lowestPoint
  const { min: byManual, recommendedMax } = model.mountingHeight
  const manual = byManual === null ? null : { value: byManual, source: manualOf(model) }
  const governing = stricterLength(manual, figureOfRuleSet(check.brief.ruleSet, 'mounting-height'))
  const min = governing?.value ?? null
  const least = judgedBy(
    heaterRule(check, 'mounting-height', 'hard stop', 'm', governing?.source),
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
      remedy:
        min === null
          ? `Enter it from the manual. ${tradePractice.underside.sentence}`
          : 'Raise it, or choose a model for a lower height.',
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
