import { gapToBody } from '#app/domain/layout/clear-space.ts'
import { findingOf, heaterRule, judgedBy, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { figureOfRuleSet } from '#app/domain/rules/sourced-figure.ts'
import type { Gap } from '#app/domain/site/gap.ts'
import type { Obstacle, Site } from '#app/domain/site/site.ts'
import { solidOf } from '#app/domain/site/solids.ts'
import { toleranceOf } from '#app/domain/site/tolerance.ts'

interface DistanceRule {
  readonly rule: 'sprinkler-distance' | 'lamp-distance'
  readonly kind: Obstacle['kind']
  readonly name: string
  readonly ask: string
}

/**
 * The nearest sprinkler is as far away as the chosen rule set asks: heat may open it. No figure holds everywhere, so
 * without one it cannot be told. Null on a site without sprinklers.
 */
export const sprinklerDistance = (check: HeaterCheck): Finding | null =>
  distanceTo(check, {
    rule: 'sprinkler-distance',
    kind: 'sprinkler',
    name: 'sprinkler',
    ask: 'Ask the fire authority or the maker of the sprinklers, and enter the article in the rule set.',
  })

/** The nearest lamp is as far away as the chosen rule set asks: heat shortens its life. Null on a site without lamps. */
export const lampDistance = (check: HeaterCheck): Finding | null =>
  distanceTo(check, {
    rule: 'lamp-distance',
    kind: 'lamp',
    name: 'lamp',
    ask: 'Ask the maker of the lamp which temperature it stands, and enter the article in the rule set.',
  })

function distanceTo(check: HeaterCheck, { rule, kind, name, ask }: DistanceRule): Finding | null {
  const { site, brief, house } = check
  let nearest: { readonly obstacle: Obstacle; readonly gap: Gap } | null = null
  for (const obstacle of site.obstacles) {
    if (obstacle.kind !== kind) continue
    const gap = gapOf(check, site, obstacle.id)
    if (gap && (!nearest || gap.distance < nearest.gap.distance)) nearest = { obstacle, gap }
  }
  if (!nearest) return null
  const { gap, obstacle } = nearest
  const article = figureOfRuleSet(brief.ruleSet, rule)
  const about = heaterRule(
    check,
    rule,
    'soft',
    'm',
    article?.source ?? 'No rule set with a figure, no published figure known',
  )
  const pair = { from: gap.from, to: gap.to }
  if (!article) {
    const title = `Distance that ${obstacle.name} needs is not known`
    return findingOf(about, 'cannot tell', { title, value: gap.distance, remedy: ask, nearest: pair })
  }
  return judgedBy(
    about,
    {
      fails: `Too near a ${name}: ${obstacle.name}`,
      'measure first': `Near a ${name}: ${obstacle.name}`,
      pass: `Clear of every ${name}, nearest ${obstacle.name}`,
      'cannot tell': `Distance from ${obstacle.name} cannot be told`,
    },
    {
      value: gap.distance,
      limit: article.value,
      margin: gap.distance - article.value,
      tolerance: toleranceOf((moved) => gapOf(check, moved, obstacle.id)?.distance ?? null, site, house.rules.toleranceUnstated, [{ of: 'obstacle', id: obstacle.id }]), // prettier-ignore
      remedy: `Move the heater, or have the ${name} moved.`,
      nearest: pair,
    },
  )
}

/** The nearest part of a thing in whichever state brings it nearest; null when it is nowhere. */
function gapOf({ body }: HeaterCheck, site: Site, id: string): Gap | null {
  const states = site.obstacles.find((obstacle) => obstacle.id === id)?.states?.length ?? 0
  const indices = [null, ...Array.from({ length: states }, (_, i) => i)]
  const parts = indices.flatMap((stateIndex) => solidOf(site, { of: 'obstacle', id, stateIndex })?.parts ?? [])
  const gaps = parts.map((part) => gapToBody(body, part))
  return gaps.reduce<Gap | null>((a, b) => (a && a.distance <= b.distance ? a : b), null)
}
