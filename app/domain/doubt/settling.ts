import type { SizeEffect } from '#app/domain/doubt/size-effects.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** Which sizes would settle a check that is to be measured first. */
export interface Settling {
  readonly check: string
  readonly finding: Finding
  /** Keys of the sizes each of which is enough by itself, the one that is most of the tolerance first. */
  readonly alone: readonly string[]
  /** Keys of the fewest sizes that are enough together, where none is by itself; empty when all are not enough. */
  readonly together: readonly string[]
}

/**
 * For each check to be measured first: measured with a laser, to ± `laser` m, and found as written, a size
 * leaves the tolerance √(τ² − Δ² + (Δ · laser / its tolerance)²), Δ being what it changes the margin by; it settles the check when the margin
 * is no less than that. To first order; a size that is found otherwise moves the margin by as much.
 */
export function settlings(
  checks: ReadonlyMap<string, Finding>,
  effects: readonly SizeEffect[],
  laser: number,
): Settling[] {
  return [...checks].flatMap(([check, finding]): Settling[] => {
    const { outcome, margin, tolerance } = finding
    if (outcome !== 'measure first' || margin === null || tolerance === null) return []
    const gains = effects
      .filter(({ size }) => size.kind === 'dimension')
      .map(({ size, shares }) => ({
        key: size.key,
        gain: gainOf(shares[check] ?? 0, Math.min(1, laser / size.tolerance)),
      }))
      .filter(({ gain }) => gain > 0)
      .sort((a, b) => b.gain - a.gain || (a.key < b.key ? -1 : 1))
    const settled = (gain: number) => margin >= Math.sqrt(Math.max(0, tolerance ** 2 - gain)) - 1e-9
    const alone = gains.filter(({ gain }) => settled(gain)).map(({ key }) => key)
    return [{ check, finding, alone, together: alone.length > 0 ? [] : fewest(gains, settled) }]
  })
}

/** By how much measuring a size lowers the square of a tolerance: `left` of its own tolerance is left. */
const gainOf = (share: number, left: number): number => share ** 2 * (1 - left ** 2)

/** The largest gains add up soonest, so the fewest are the first of them. */
function fewest(
  gains: readonly { readonly key: string; readonly gain: number }[],
  settled: (gain: number) => boolean,
): string[] {
  let sum = 0
  for (const [i, { gain }] of gains.entries()) {
    sum += gain
    if (settled(sum)) return gains.slice(0, i + 1).map(({ key }) => key)
  }
  return []
}
