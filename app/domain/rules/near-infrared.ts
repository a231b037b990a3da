import { cautionLimits } from '#app/domain/comfort/cautions.ts'
import { findingOf, type LayoutCheck, type Rule } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/**
 * The near infrared at the eye of each guest, looking level to where it is most, stays under the limit for the stay and
 * the air; advice, as guests look away.
 */
export function nearInfrared({ brief, layout, warmth, house }: LayoutCheck): Finding[] {
  if (layout.heaters.length === 0) return []
  const { value: limit, source } = cautionLimits(brief, house.rules).eye
  const rule: Rule = { rule: 'near-infrared', weight: 'advice', subject: { kind: 'layout', id: 'layout' }, source, unit: 'W/m²' } // prettier-ignore
  const known = warmth.flatMap(({ nearInfraredAtEye, cannotTell }) => (cannotTell.length > 0 ? [] : (nearInfraredAtEye ?? []))) // prettier-ignore
  if (known.length < warmth.length || known.length === 0) {
    const remedy = warmth.length === 0 ? 'Add the seats.' : 'Give every model its element temperature and beam data.'
    return [findingOf(rule, 'cannot tell', { title: 'Near-infrared at the eye cannot be told', remedy })]
  }
  const value = Math.max(...known)
  const over = known.filter((each) => each > limit).length
  const figures = { value, limit, margin: limit - value }
  return over === 0
    ? [findingOf(rule, 'pass', { title: 'Near-infrared at the eyes under the limit', ...figures })]
    : [findingOf(rule, 'fails', { title: `Near-infrared over the limit at ${over === 1 ? 'one seat' : `${over} seats`}`, ...figures, remedy: 'Turn heaters out of the line of sight, or choose a longer wave.' })] // prettier-ignore
}
