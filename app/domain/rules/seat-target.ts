import type { SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { findingOf, judgedBy, type LayoutCheck, type Rule } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { seatTolerance } from '#app/domain/rules/seat-tolerance.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/** Farther from both ends of the band than this share of the nearer one, no tolerance of a seat's place matters. */
const farInside = 0.12

const up: Vec3 = [0, 0, 1]

/**
 * Each seat that is to be heated has its body-plane irradiance within the target band. Advice: a cold or hot seat is a
 * matter of the customer's wish. One finding for each seat that does not pass, and one pass for the others.
 */
export function seatTarget({ site, brief, layout, warmth }: LayoutCheck, emitters: readonly Emitter[]): Finding[] {
  if (layout.heaters.length === 0) return []
  const { low, high, source } = brief.target
  const rule = (subject: Finding['subject']): Rule => ({ rule: 'seat-target', weight: 'advice', subject, source, unit: 'W/m²' }) // prettier-ignore
  const figureAt = (point: Vec3) => emitters.reduce((sum, emitter) => sum + irradianceAt(emitter, point, up), 0)
  const heated = warmth.filter(({ seat, onFloor }) => onFloor && seat.priority !== 'not heated')
  const findings = heated.flatMap((warm) => {
    const subject = { kind: 'seat', id: warm.seat.id } as const
    if (warm.body === null || warm.cannotTell.length > 0) {
      return [findingOf(rule(subject), 'cannot tell', { title: 'Heat at this seat cannot be told' })]
    }
    const finding = againstBand(rule(subject), warm, { low, high }, (value) => seatTolerance(site, warm.seat, 'bodyHeight', value, figureAt)) // prettier-ignore
    return finding.outcome === 'pass' ? [] : [finding]
  })
  const passing = heated.length - findings.length
  if (passing === 0) return findings
  const title = passing === 1 ? 'One seat in the target band' : `${passing} seats in the target band`
  return [...findings, findingOf(rule({ kind: 'layout', id: 'layout' }), 'pass', { title })]
}

function againstBand(
  rule: Rule,
  { body }: SeatWarmth,
  { low, high }: { low: number; high: number },
  toleranceOfValue: (value: number) => number,
): Finding {
  const value = body ?? 0
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
  const tolerance = Math.abs(margin) > farInside * limit ? 0 : toleranceOfValue(value)
  const finding = judgedBy(rule, titles, { value, limit, margin, tolerance, remedy })
  return Math.abs(margin) > farInside * limit ? { ...finding, tolerance: null } : finding
}
