import { findingOf, heaterRule, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** The data sheet states the beam: without it no figure of this heater can be told. */
export function beamData(check: HeaterCheck): Finding {
  const rule = heaterRule(check, 'beam-data', 'hard stop', 'none', check.model.beam?.source ?? 'Data sheet')
  return check.model.beam
    ? findingOf(rule, 'pass', { title: 'Beam data given' })
    : findingOf(rule, 'cannot tell', {
        title: `No beam data for ${check.model.name}`,
        remedy: 'Give it a measured beam in Heaters, or choose a model that has one.',
      })
}
