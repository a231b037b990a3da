import { nearestInBeam, type InBeam } from '#app/domain/layout/beam-reach.ts'
import { apartAtLeast, boundsFromBody } from '#app/domain/layout/clear-space.ts'
import { thingsAbout } from '#app/domain/rules/about-heater.ts'
import { findingOf, heaterRule, manualOf, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { findingsNear, type Left } from '#app/domain/rules/nearest-things.ts'
import { figureOfRuleSet, stricterLength } from '#app/domain/rules/sourced-figure.ts'
import { tradePractice } from '#app/domain/rules/trade-practice.ts'
import type { Solid } from '#app/domain/site/solids.ts'

/** Beyond the clearance by this much a thing is of no account for the beam, m. */
const farther = 1

/**
 * Nothing combustible is nearer to the body, within the half-intensity angles of its beam, than the manual's clearance
 * in front of the beam; furniture too. What holds the heater is left out.
 */
export function clearanceFrontOfBeam(check: HeaterCheck): Finding[] {
  const byManual = check.model.clearanceToCombustible?.frontOfBeam ?? null
  const manual = byManual === null ? null : { value: byManual, source: manualOf(check.model) }
  const governing = stricterLength(manual, figureOfRuleSet(check.brief.ruleSet, 'clearance-front-of-beam'))
  const limit = governing?.value ?? null
  const rule = heaterRule(check, 'clearance-front-of-beam', 'hard stop', 'm', governing?.source)
  if (limit === null || !check.model.beam) {
    const what = limit === null ? 'The manual states no clearance in front of the beam' : 'No beam data'
    return [
      findingOf(rule, 'cannot tell', {
        title: what,
        remedy: `Enter it from the manual.${limit === null ? ` ${tradePractice.combustibleEdge.sentence}` : ''}`,
      }),
    ]
  }
  const things = thingsAbout(check).filter(({ combustible }) => combustible)
  return findingsNear(check, things, {
    rule,
    left: (solid) => leftInBeam(check, solid, limit),
    quickly: (part) => boundsFromBody(check.body, part) - limit,
    closely: (part) => apartAtLeast(check.body, part) - limit,
    titles: (name) => ({
      fails: `Too near in the beam: ${name}`,
      'measure first': `Tight in the beam: ${name}`,
      pass: `Clear in front of the beam, nearest ${name}`,
      'cannot tell': `In the beam, distance not known: ${name}`,
    }),
    clear: 'Nothing combustible near in front of the beam',
    remedy: 'Move it, aim it elsewhere, or remove what stands in the beam.',
  })
}

function leftInBeam({ body, model }: HeaterCheck, solid: Solid, limit: number): Left | null {
  let nearest: InBeam | null = null
  for (const part of solid.parts) {
    if (boundsFromBody(body, part) > limit + farther || apartAtLeast(body, part) > limit + farther) continue
    const found = nearestInBeam(body, model, part)
    if (found && (!nearest || found.distance < nearest.distance)) nearest = found
  }
  return nearest && leftOf(nearest, limit)
}

const leftOf = ({ distance, from, to }: InBeam, limit: number): Left => ({
  value: distance,
  limit,
  margin: distance - limit,
  nearest: { from, to },
})
