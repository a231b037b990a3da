import { findingOf, type LayoutCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** Says that circuits are not checked: which figures hold depends on a rule set, and none is chosen. */
export function circuits({ layout }: LayoutCheck): Finding[] {
  if (layout.heaters.length === 0) return []
  const subject = { kind: 'layout', id: 'layout' } as const
  return [
    findingOf({ rule: 'circuits', weight: 'advice', subject, source: 'No rule set', unit: 'none' }, 'cannot tell', {
      title: 'Circuits are not checked yet: no rule set chosen',
      remedy: 'For coordination with a licensed electrician and the local code.',
    }),
  ]
}
