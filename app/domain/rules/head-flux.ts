import { cautionLimits, type CautionLimit } from '#app/domain/comfort/cautions.ts'
import type { SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { SeatFigure } from '#app/domain/comfort/uncertainty.ts'
import { findingOf, judgedBy, type LayoutCheck, type Rule } from '#app/domain/rules/check.ts'
import type { Finding, Outcome } from '#app/domain/rules/finding.ts'
import { mayReach, toleranceOfSeat } from '#app/domain/rules/seat-tolerance.ts'

/** One figure of a seat that is judged. */
interface Judged {
  readonly value: number
  readonly figure: SeatFigure
}

/**
 * The largest irradiance over all directions at each head against the house caution for the stay (soft), and at head and
 * body against the stop line (hard stop). One finding for each seat that does not pass, and one pass for the hottest.
 */
export function headFlux(check: LayoutCheck): Finding[] {
  const { stop, head } = cautionLimits(check.brief, check.house.rules)
  return [...againstLimit(check, 'soft', head, atHead), ...againstLimit(check, 'hard stop', stop, atHeadOrBody)]
}

const atHead = ({ head }: SeatWarmth): Judged | null =>
  head === null ? null : { value: head, figure: { quantity: 'head' } }

function atHeadOrBody(seat: SeatWarmth): Judged | null {
  const head = atHead(seat)
  if (seat.bodyLargest === null || (head && head.value >= seat.bodyLargest)) return head
  return { value: seat.bodyLargest, figure: { quantity: 'body-largest' } }
}

const titles = (weight: Finding['weight']): Readonly<Record<Outcome, string>> => {
  const line = weight === 'soft' ? 'the caution' : 'the stop line'
  return {
    fails: `Head over ${line}`,
    'measure first': `Head near ${line}`,
    pass: `Heads under ${line}`,
    'cannot tell': 'Heat at the head cannot be told',
  }
}

function againstLimit(
  check: LayoutCheck,
  weight: 'soft' | 'hard stop',
  limit: CautionLimit,
  judgedOf: (seat: SeatWarmth) => Judged | null,
): Finding[] {
  const { layout, warmth } = check
  if (layout.heaters.length === 0) return []
  const rule = (subject: Finding['subject']): Rule => ({ rule: 'head-flux', weight, subject, source: limit.source, unit: 'W/m²' }) // prettier-ignore
  const whole = { kind: 'layout', id: 'layout' } as const
  const remedy = 'Raise, move or tilt the nearest heater, or use a lower stage.'
  const findings: Finding[] = []
  let hottest: number | null = null
  for (const warm of warmth) {
    const judged = judgedOf(warm)
    if (!judged) continue
    const { value, figure } = judged
    hottest = Math.max(hottest ?? value, value)
    if (value < limit.value && !mayReach(check, warm.seat, figure, value, limit.value)) continue
    const tolerance = toleranceOfSeat(check, warm.seat, figure)
    const found = { value, limit: limit.value, margin: limit.value - value, tolerance, remedy }
    const finding = judgedBy(rule({ kind: 'seat', id: warm.seat.id }), titles(weight), found)
    if (finding.outcome !== 'pass') findings.push(finding)
  }
  const missing = warmth.length === 0 || hottest === null || warmth.some(({ cannotTell }) => cannotTell.length > 0)
  if (missing) {
    const missingData = warmth.length === 0 ? 'Add the seats.' : 'Give every heater a model with beam data.'
    const found = { title: titles(weight)['cannot tell'], remedy: missingData }
    return [...findings, findingOf(rule(whole), 'cannot tell', found)]
  }
  if (findings.length > 0 || hottest === null) return findings
  const figures = { value: hottest, limit: limit.value, margin: limit.value - hottest }
  return [findingOf(rule(whole), 'pass', { title: titles(weight).pass, ...figures })]
}
