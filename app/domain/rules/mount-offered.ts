import { findingOf, heaterRule, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** The model is made for the mount it has. */
export function mountOffered(check: HeaterCheck): Finding {
  const { heater, model } = check
  const rule = heaterRule(check, 'mount-offered', 'hard stop')
  const offered: readonly string[] = model.mounts
  if (offered.length === 0) return findingOf(rule, 'cannot tell', { title: 'The manual names no mounts' })
  return offered.includes(heater.mount)
    ? findingOf(rule, 'pass', { title: `Offered with ${heater.mount}` })
    : findingOf(rule, 'fails', {
        title: `Not offered with ${heater.mount}`,
        remedy: `Offered with ${offered.join(', ')}.`,
      })
}
