import { gapUpTo, nearestOnPlane } from '#app/domain/layout/clear-space.ts'
import { findingOf, heaterRule, judgedBy, type HeaterCheck, type Rule } from '#app/domain/rules/check.ts'
import { coversOver } from '#app/domain/rules/about-heater.ts'
import { clearanceAround, clearanceAt } from '#app/domain/rules/clearance-around.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { coverPlane, type Plane } from '#app/domain/site/cover.ts'
import { isCombustible } from '#app/domain/site/solids.ts'
import type { Cover, Site } from '#app/domain/site/site.ts'
import { add, scale } from '#app/domain/vector.ts'
import { toleranceOf } from '#app/domain/site/tolerance.ts'

const titles = (name: string) => ({
  fails: `Too near above: ${name}`,
  'measure first': `Tight above: ${name}`,
  pass: `Clear above, nearest ${name}`,
  'cannot tell': `Clearance above not known: ${name}`,
})

const remedy = 'Lower it, or choose a model that needs less above.'

/**
 * What is above keeps the manual's clearance: covers by the worst corner of the tilted body square to their plane, with
 * moving blades in both states; other things by distance outward from the back of the body. A recess box sits in its
 * ceiling.
 */
export function clearanceAbove(check: HeaterCheck): Finding[] {
  const recess = check.heater.mount === 'recess box'
  const over = recess ? [] : coversOver(check)
  const covers = over.flatMap((cover) => clearanceToCover(check, cover))
  const ids = new Set(over.map(({ id }) => id))
  const things = clearanceAround(
    check,
    { rule: 'clearance-above', faces: ['above'], titles, clear: 'Nothing near above', remedy },
    ({ of, id }) => of === 'cover' && ids.has(id),
  )
  return covers.length === 0 ? things : [...covers, ...things.filter(({ outcome, value }) => outcome !== 'pass' || value !== null)] // prettier-ignore
}

/** One cover as it is, and with its blades swung when that is worse. */
function clearanceToCover(check: HeaterCheck, cover: Cover): Finding[] {
  const combustible = isCombustible(cover.material)
  const weight = combustible ? 'hard stop' : 'soft'
  const clearance = clearanceAt(check, combustible, 'above')
  const rule: Rule = heaterRule(check, 'clearance-above', weight, 'm', clearance?.source)
  const plane = coverPlane(cover)
  if (!clearance || !plane) {
    const why = clearance ? `Three heights of ${cover.name} in one line` : titles(cover.name)['cannot tell']
    return [findingOf(rule, 'cannot tell', { title: why, remedy: 'Enter it from the manual.' })]
  }
  const shut = toCover(check, cover, rule, clearance.value, false)
  if (cover.swing === 0 || shut.outcome === 'fails') return [shut]
  const swung = toCover(check, cover, { ...rule, weight: 'soft' }, clearance.value, true)
  return swung.outcome === 'pass' ? [shut] : [shut, swung]
}

function toCover(check: HeaterCheck, cover: Cover, rule: Rule, limit: number, swung: boolean): Finding {
  const value = (site: Site): number | null => {
    const moved = site.covers.find(({ id }) => id === cover.id)
    const plane = moved && coverPlane(moved)
    return moved && plane ? gapUpTo(check.body, plane) - (swung ? moved.swing : 0) : null
  }
  const gap = value(check.site)
  const plane = coverPlane(cover)
  return judgedBy(rule, titles(cover.name), {
    value: gap,
    limit,
    margin: gap === null ? null : gap - limit,
    tolerance: toleranceOf(value, check.site, check.house.rules.toleranceUnstated, [{ of: 'cover', id: cover.id }]),
    condition: swung ? `${cover.name}: swung below the underside` : null,
    remedy: swung ? 'Heater off while the blades move; or lower it.' : remedy,
    nearest: plane && nearestWith(check, plane, swung ? cover.swing : 0),
  })
}

/** The worst corner and the point of the cover square above it; moving blades reach down along the same line. */
function nearestWith({ body }: HeaterCheck, plane: Plane, swing: number): Finding['nearest'] {
  const { from, to } = nearestOnPlane(body, plane)
  return { from, to: add(to, scale(plane.normal, -swing)) }
}
