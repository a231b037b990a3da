import { bodyCorners, boundsFromBody } from '#app/domain/layout/clear-space.ts'
import type { HeaterCheck } from '#app/domain/rules/check.ts'
import type { House } from '#app/domain/rules/house.ts'
import { coverOutline } from '#app/domain/site/cover.ts'
import { convexOutlinesMeet } from '#app/domain/site/geometry.ts'
import type { Cover, Site } from '#app/domain/site/site.ts'
import { isCombustible, solidsOf, type Solid } from '#app/domain/site/solids.ts'
import { largestTolerance } from '#app/domain/site/tolerance.ts'
import type { Vec2 } from '#app/domain/vector.ts'

const kept = new WeakMap<Site, readonly Solid[]>()

function siteSolids(site: Site): readonly Solid[] {
  const known = kept.get(site) ?? solidsOf(site)
  kept.set(site, known)
  return known
}

/** Covers whose outline the body meets in plan: it is judged by their plane. */
export function coversOver({ site, body }: HeaterCheck): Cover[] {
  const corners = bodyCorners(body).map(([x, y]): Vec2 => [x, y])
  const xs = corners.map(([x]) => x)
  const ys = corners.map(([, y]) => y)
  const [x0, x1, y0, y1] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)]
  const around: Vec2[] = [[x0, y0], [x1, y0], [x1, y1], [x0, y1]] // prettier-ignore
  return site.covers.filter((cover) => convexOutlinesMeet(coverOutline(cover), around))
}

/** Beyond the greatest clearance that the manual asks by this much, and by its own tolerance, a thing is not near, m. */
const near = 1

const thingsOf = new WeakMap<HeaterCheck, readonly Solid[]>()

/**
 * Everything that a heater may come too near to: not what holds it, nor a member that follows a cover over the heater
 * and so lies behind it, unless it burns and the cover does not. A recess box sits in its ceiling, between members that
 * have a rule of their own. Things that are not near are left out.
 */
export function thingsAbout(check: HeaterCheck): readonly Solid[] {
  const known = thingsOf.get(check)
  if (known) return known
  const { site, heater, support, body } = check
  const recess = heater.mount === 'recess box'
  const over = coversOver(check)
  const behind = ({ rests, combustible }: Solid) =>
    over.some((cover) => rests.some(({ of, id }) => of === 'cover' && id === cover.id) && (isCombustible(cover.material) || !combustible)) // prettier-ignore
  const reach = greatestClearance(check) + near
  const things = siteSolids(site).filter((solid) => {
    if (support.ids.includes(solid.id)) return false
    const apart = Math.min(...solid.parts.map((part) => boundsFromBody(body, part)))
    if (apart > reach && apart > reach + mostTolerance(check, solid)) return false
    if (solid.of === 'member') return !recess && !behind(solid)
    return !recess || !over.some(({ id }) => id === solid.id)
  })
  thingsOf.set(check, things)
  return things
}

function greatestClearance({ model, brief }: HeaterCheck): number {
  const given = [model.clearanceToCombustible, model.clearanceToNoncombustible]
  const articles = brief.ruleSet?.articles ?? []
  const byArticle = articles.map(({ rule, figure }) => (rule.startsWith('clearance-') ? figure : 0))
  return Math.max(
    0,
    ...byArticle,
    ...given.flatMap((clearances) => Object.values(clearances ?? {}).map((length) => length ?? 0)),
  )
}

const tolerances = new WeakMap<Solid, { readonly house: House; readonly most: number }>()

/** The most by which the sizes that a thing rests on may bring it nearer, m. */
export function mostTolerance({ site, house }: Pick<HeaterCheck, 'site' | 'house'>, solid: Solid): number {
  const known = tolerances.get(solid)
  if (known?.house === house) return known.most
  const { toleranceUnstated } = house.rules
  const most = Math.hypot(...solid.rests.map((thing) => largestTolerance(site, thing, toleranceUnstated)))
  tolerances.set(solid, { house, most })
  return most
}
