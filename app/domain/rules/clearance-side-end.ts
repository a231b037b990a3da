import type { HeaterCheck } from '#app/domain/rules/check.ts'
import { clearanceAround } from '#app/domain/rules/clearance-around.ts'
import { coversOver } from '#app/domain/rules/about-heater.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** Things beside and beyond the ends of the tilted body keep the manual's side and end clearance. */
export function clearanceSideEnd(check: HeaterCheck): Finding[] {
  const over = new Set(coversOver(check).map(({ id }) => id))
  return clearanceAround(
    check,
    {
      rule: 'clearance-side-end',
      faces: ['side', 'end'],
      titles: (name) => ({
        fails: `Too near at the side or end: ${name}`,
        'measure first': `Tight at the side or end: ${name}`,
        pass: `Clear at sides and ends, nearest ${name}`,
        'cannot tell': `Clearance at the side or end not known: ${name}`,
      }),
      clear: 'Nothing near at sides and ends',
      remedy: 'Move it away, turn it, or choose a model that needs less.',
    },
    ({ of, id }) => of === 'cover' && over.has(id),
  )
}
