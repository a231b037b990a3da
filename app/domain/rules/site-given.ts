import { findingOf, type LayoutCheck, type Rule } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { coverPlane } from '#app/domain/site/cover.ts'
import { areaOf, crossesItself } from '#app/domain/site/geometry.ts'

/** The site has a floor, seats and covers that can be reckoned with: nothing is checked against blank geometry. */
export function siteGiven({ site, warmth }: LayoutCheck): Finding[] {
  const rule: Rule = { rule: 'site-given', weight: 'hard stop', subject: { kind: 'layout', id: 'layout' }, source: 'Site', unit: 'none' } // prettier-ignore
  const blank = [
    ...(Math.abs(areaOf(site.floor)) < 1e-4 || crossesItself(site.floor) ? ['The floor has no area'] : []),
    ...(site.seats.length === 0 ? ['The site has no seats'] : []),
    ...site.covers
      .filter((cover) => !coverPlane(cover))
      .map(({ name }) => `The heights of ${name} do not make a plane`),
  ]
  const outside = warmth.filter(({ onFloor }) => !onFloor)
  return [
    ...blank.map((title) => findingOf(rule, 'cannot tell', { title, remedy: 'Complete the site.' })),
    ...(blank.length === 0 ? [findingOf(rule, 'pass', { title: 'Floor, seats and covers given' })] : []),
    ...outside.map(({ seat }) =>
      findingOf({ ...rule, rule: 'seat-on-floor', weight: 'advice', subject: { kind: 'seat', id: seat.id } }, 'fails', {
        title: `Seat ${seat.id} is outside the floor`,
        remedy: 'It is not counted until moved.',
      }),
    ),
  ]
}
