import type { Change, SizeEffect } from '#app/domain/doubt/size-effects.ts'
import type { Figures } from '#app/domain/doubt/weighed.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'

/** What sizes may be ranked by: one figure's change, or the largest of the three as shares of what they are. */
export type RankedBy = 'overall' | 'coldest' | 'head' | 'margin'

/** The larger change of both ways; 0 without a figure. */
export const largestChange = ({ lower, higher }: Change): number =>
  Math.max(Math.abs(lower ?? 0), Math.abs(higher ?? 0))

/**
 * How much a size matters: the largest of its change of the coldest seat and of the hottest head as shares of these, and
 * of its change of the tightest margin as a share of the largest of that margin, its tolerance and what an unstated
 * size may be wrong by. No unit.
 */
export function relativeEffect({ coldest, head, margin }: SizeEffect, nominal: Figures, rules: HouseRules): number {
  const { tightest } = nominal
  const least = rules.toleranceUnstated
  const room = tightest ? Math.max(Math.abs(tightest.margin), tightest.tolerance ?? 0, least) : least
  return Math.max(
    shareOf(largestChange(coldest), nominal.coldest?.irradiance),
    shareOf(largestChange(head), nominal.head?.irradiance),
    largestChange(margin) / room,
  )
}

const shareOf = (change: number, of: number | undefined): number => (of !== undefined && of > 0 ? change / of : 0)

const measureOf = (effect: SizeEffect, nominal: Figures, by: RankedBy, rules: HouseRules): number =>
  by === 'overall' ? relativeEffect(effect, nominal, rules) : largestChange(effect[by])

/** Effects with the one that matters most first. Equal ones stand by their labels, whatever order the site has. */
export function rankEffects(
  effects: readonly SizeEffect[],
  nominal: Figures,
  by: RankedBy,
  rules: HouseRules,
): SizeEffect[] {
  const measured = effects.map((effect) => ({ effect, measure: measureOf(effect, nominal, by, rules) }))
  return measured
    .sort(
      (a, b) =>
        b.measure - a.measure ||
        byName(a.effect.size.label, b.effect.size.label) ||
        byName(a.effect.size.key, b.effect.size.key),
    ) // prettier-ignore
    .map(({ effect }) => effect)
}

const byName = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0)
