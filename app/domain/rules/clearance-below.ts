import { bodyCorners } from '#app/domain/layout/clear-space.ts'
import { thingsAbout } from '#app/domain/rules/about-heater.ts'
import { findingOf, heaterRule, judgedBy, manualOf, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { findingsNear, type Left } from '#app/domain/rules/nearest-things.ts'
import { figureOfRuleSet, stricterLength } from '#app/domain/rules/sourced-figure.ts'
import { boundsApart, boundsOf, uprightPrism, type Convex } from '#app/domain/site/convex.ts'
import { gapBetween } from '#app/domain/site/gap.ts'
import type { Solid } from '#app/domain/site/solids.ts'
import type { Vec2 } from '#app/domain/vector.ts'

const titles = (name: string) => ({
  fails: `Too near below: ${name}`,
  'measure first': `Tight below: ${name}`,
  pass: `Clear below, nearest ${name}`,
  'cannot tell': `Clearance below not known: ${name}`,
})

const remedy = 'Raise it, or choose a model that needs less below.'

/**
 * The lowest point keeps the manual's clearance from the floor and from fixed combustible things under the body; a floor
 * of unknown material is combustible. Furniture and movable things are judged by the front of the beam.
 */
export function clearanceBelow(check: HeaterCheck): Finding[] {
  const byManual = check.model.clearanceToCombustible?.below ?? null
  const manual = byManual === null ? null : { value: byManual, source: manualOf(check.model) }
  const governing = stricterLength(manual, figureOfRuleSet(check.brief.ruleSet, 'clearance-below'))
  const limit = governing?.value ?? null
  const rule = heaterRule(check, 'clearance-below', 'hard stop', 'm', governing?.source)
  const { lowestPoint } = check.heater
  if (limit === null) {
    return [
      findingOf(rule, 'cannot tell', { title: titles('floor')['cannot tell'], remedy: 'Enter it from the manual.' }),
    ]
  }
  const margin = lowestPoint - limit
  const floor = judgedBy(rule, titles('floor'), { value: lowestPoint, limit, margin, tolerance: 0, remedy })
  const under = underBody(check)
  const things = thingsAbout(check).filter((thing) => thing.combustible && !thing.furniture && thing.state === null)
  const marginOf = (part: Convex) => (boundsApart(boundsOf(under), boundsOf(part)) > 0 ? Infinity : -Infinity)
  const left = (solid: Solid): Left | null => leftBelow(solid, under, lowestPoint, limit)
  const found = findingsNear(check, things, {
    rule,
    left,
    ...{ quickly: marginOf, closely: marginOf },
    titles,
    clear: 'Nothing near below',
    remedy,
  })
  return [floor, ...found.filter(({ outcome }) => outcome !== 'pass')]
}

/** The space from the floor up to the lowest point, under the body's bounds in plan. */
function underBody({ body, heater }: HeaterCheck) {
  const corners = bodyCorners(body)
  const [u, along] = [body.u, body.half.u]
  const aside = Math.max(
    ...corners.map(([x, y]) => Math.abs((x - body.centre[0]) * -u[1] + (y - body.centre[1]) * u[0])),
  )
  const corner = (i: number, j: number): Vec2 => [
    body.centre[0] + i * along * u[0] - j * aside * u[1],
    body.centre[1] + i * along * u[1] + j * aside * u[0],
  ]
  const outline = [corner(-1, -1), corner(1, -1), corner(1, 1), corner(-1, 1)]
  return uprightPrism(outline.map((at) => ({ at, low: 0, high: Math.max(1e-3, heater.lowestPoint) })))
}

/** The way down from the lowest point to the top of a thing under the body; null when it is not under it. */
function leftBelow(solid: Solid, under: ReturnType<typeof underBody>, lowest: number, limit: number): Left | null {
  const tops = solid.parts
    .filter((part) => gapBetween(under, part).distance === 0)
    .map((part) => part.farthest([0, 0, 1]))
  const top = tops.reduce<(typeof tops)[number] | null>((a, b) => (a && a[2] >= b[2] ? a : b), null)
  if (!top) return null
  const value = Math.max(0, lowest - top[2])
  const [x, y] = [under.middle[0], under.middle[1]]
  return { value, limit, margin: value - limit, nearest: { from: [x, y, lowest], to: [x, y, top[2]] } }
}
