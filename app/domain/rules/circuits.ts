import { findingOf, type LayoutCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** Says that circuits are not checked, and whether a rule set is chosen, on which their figures depend. */
export function circuits({ layout, brief }: LayoutCheck): Finding[] {
  if (layout.heaters.length === 0) return []
  const { ruleSet } = brief
  const source = ruleSet ? `${ruleSet.name}, ${ruleSet.edition}` : 'No rule set'
  const why = ruleSet ? '' : ': no rule set chosen'
  const subject = { kind: 'layout', id: 'layout' } as const
  return [
    findingOf({ rule: 'circuits', weight: 'advice', subject, source, unit: 'none' }, 'cannot tell', {
      title: `Circuits are not checked yet${why}`,
      remedy: 'For coordination with a licensed electrician and the local code.',
    }),
  ]
}
