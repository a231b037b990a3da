import { findingOf, judgedBy, type LayoutCheck, type Rule } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { mayReach, toleranceOfSeat } from '#app/domain/rules/seat-tolerance.ts'
import type { Seat } from '#app/domain/site/site.ts'

/**
 * Each seat that is to be heated has its body-plane irradiance within the target band. Advice: a cold or hot seat is a
 * matter of the customer's wish. One finding for each seat that does not pass, and one pass for the others.
 */
export function seatTarget(check: LayoutCheck): Finding[] {
  const { brief, layout, warmth } = check
  if (layout.heaters.length === 0) return []
  const { source } = brief.target
  const rule = (subject: Finding['subject']): Rule => ({ rule: 'seat-target', weight: 'advice', subject, source, unit: 'W/m²' }) // prettier-ignore
  const heated = warmth.filter(({ seat, onFloor }) => onFloor && seat.priority !== 'not heated')
  const findings = heated.flatMap((warm) => {
    const subject = { kind: 'seat', id: warm.seat.id } as const
    if (warm.body === null || warm.cannotTell.length > 0) {
      return [findingOf(rule(subject), 'cannot tell', { title: 'Heat at this seat cannot be told' })]
    }
    const finding = againstBand(check, rule(subject), warm.seat, warm.body)
    return finding.outcome === 'pass' ? [] : [finding]
  })
  const passing = heated.length - findings.length
  if (passing === 0) return findings
  const title = passing === 1 ? 'One seat in the target band' : `${passing} seats in the target band`
  return [...findings, findingOf(rule({ kind: 'layout', id: 'layout' }), 'pass', { title })]
}

function againstBand(check: LayoutCheck, rule: Rule, seat: Seat, value: number): Finding {
  const { low, high } = check.brief.target
  const cold = value - low < high - value
  const limit = cold ? low : high
  const margin = cold ? value - low : high - value
  const titles = {
    fails: cold ? 'Seat below the target band' : 'Seat above the target band',
    'measure first': cold ? 'Seat near the low end of the target band' : 'Seat near the high end of the target band',
    pass: 'Seat in the target band',
    'cannot tell': 'Heat at this seat cannot be told',
  }
  const remedy = cold ? 'Move a heater nearer, or add one.' : 'Move a heater away, or use a lower stage.'
  const figure = { quantity: 'body' } as const
  const near = mayReach(check, seat, figure, value, limit)
  const tolerance = near ? toleranceOfSeat(check, seat, figure) : 0
  const finding = judgedBy(rule, titles, { value, limit, margin, tolerance, remedy })
  return near ? finding : { ...finding, tolerance: null }
}
