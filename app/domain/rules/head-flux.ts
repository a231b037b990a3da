import type { SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { findingOf, judgedBy, type LayoutCheck, type Rule } from '#app/domain/rules/check.ts'
import type { Finding, Outcome } from '#app/domain/rules/finding.ts'
import { houseRules } from '#app/domain/rules/house-rules.ts'
import { seatTolerance } from '#app/domain/rules/seat-tolerance.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/** Below this share of a limit no tolerance of a seat's place (25 mm) can bring a figure to it. */
const farBelow = 0.85

/**
 * The largest irradiance over all directions at each head against the house caution for the stay (soft), and at head and
 * body against the stop line (hard stop). One finding for each seat that does not pass, and one pass for the hottest.
 */
export function headFlux(check: LayoutCheck, emitters: readonly Emitter[]): Finding[] {
  const { brief, warmth } = check
  const longStay = brief.stayMinutes >= houseRules.longStayMinutes.value
  const caution = longStay ? houseRules.headCautionLongStay : houseRules.headCautionShortStay
  const stop = houseRules.irradianceStop
  return [
    ...againstLimit(check, emitters, warmth, 'soft', caution, ({ head }) => head),
    ...againstLimit(check, emitters, warmth, 'hard stop', stop, (seat) => largest(seat.head, seat.bodyLargest)),
  ]
}

const largest = (a: number | null, b: number | null): number | null =>
  a === null || b === null ? (a ?? b) : Math.max(a, b)

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
  { site, layout }: LayoutCheck,
  emitters: readonly Emitter[],
  warmth: readonly SeatWarmth[],
  weight: 'soft' | 'hard stop',
  limit: { readonly value: number; readonly source: string },
  figureOf: (seat: SeatWarmth) => number | null,
): Finding[] {
  if (layout.heaters.length === 0) return []
  const rule = (subject: Finding['subject']): Rule => ({ rule: 'head-flux', weight, subject, source: limit.source, unit: 'W/m²' }) // prettier-ignore
  const whole = { kind: 'layout', id: 'layout' } as const
  const findings: Finding[] = []
  let hottest: { seat: SeatWarmth; value: number } | null = null
  for (const seat of warmth) {
    const value = figureOf(seat)
    if (value === null) continue
    if (!hottest || value > hottest.value) hottest = { seat, value }
    if (value < farBelow * limit.value) continue
    const tolerance = seatTolerance(site, seat.seat, 'headHeight', value, figureNear(emitters, seat, value))
    const figures = { value, limit: limit.value, margin: limit.value - value, tolerance, remedy: 'Raise, move or tilt the nearest heater, or use a lower stage.' } // prettier-ignore
    const finding = judgedBy(rule({ kind: 'seat', id: seat.seat.id }), titles(weight), figures)
    if (finding.outcome !== 'pass') findings.push(finding)
  }
  const missing = warmth.length === 0 || hottest === null || warmth.some(({ cannotTell }) => cannotTell.length > 0)
  if (missing) {
    const remedy = warmth.length === 0 ? 'Add the seats.' : 'Give every heater a model with beam data.'
    return [...findings, findingOf(rule(whole), 'cannot tell', { title: titles(weight)['cannot tell'], remedy })]
  }
  if (findings.length > 0 || !hottest) return findings
  const margin = limit.value - hottest.value
  return [
    findingOf(rule(whole), 'pass', { title: titles(weight).pass, value: hottest.value, limit: limit.value, margin }),
  ]
}

/**
 * The figure at points near the head, in the direction that was the largest there: to first order the largest in any
 * direction, because turning away from that direction changes nothing to first order. Scaled to the figure at the head.
 */
function figureNear(
  emitters: readonly Emitter[],
  { seat, headDirection }: SeatWarmth,
  value: number,
): (point: Vec3) => number {
  const direction = headDirection ?? [0, 0, 1]
  const at = (point: Vec3) => emitters.reduce((sum, emitter) => sum + irradianceAt(emitter, point, direction), 0)
  const nominal = at([seat.x, seat.y, seat.headHeight])
  return (point) => (nominal > 0 ? (value * at(point)) / nominal : value)
}
