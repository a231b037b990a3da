import type { SizeEffect } from '#app/domain/doubt/size-effects.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** How exact a size is once it was measured with a laser, m (house default). */
export const measuredTolerance = 0.005

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
 * For each check to be measured first: measured to ± 5 mm and found as written, a size leaves the tolerance
 * √(τ² − Δ² + (Δ · 5 mm / its tolerance)²), Δ being what it changes the margin by; it settles the check when the margin
 * is no less than that. To first order; a size that is found otherwise moves the margin by as much.
 */
export function settlings(checks: ReadonlyMap<string, Finding>, effects: readonly SizeEffect[]): Settling[] {
  return [...checks].flatMap(([check, finding]): Settling[] => {
    const { outcome, margin, tolerance } = finding
    if (outcome !== 'measure first' || margin === null || tolerance === null) return []
    const gains = effects
      .filter(({ size }) => size.kind === 'dimension')
      .map(({ size, shares }) => ({ key: size.key, gain: gainOf(shares[check] ?? 0, size.tolerance) }))
      .filter(({ gain }) => gain > 0)
      .sort((a, b) => b.gain - a.gain || (a.key < b.key ? -1 : 1))
    const settled = (gain: number) => margin >= Math.sqrt(Math.max(0, tolerance ** 2 - gain)) - 1e-9
    const alone = gains.filter(({ gain }) => settled(gain)).map(({ key }) => key)
    return [{ check, finding, alone, together: alone.length > 0 ? [] : fewest(gains, settled) }]
  })
}

/** By how much measuring a size lowers the square of a tolerance. */
function gainOf(share: number, tolerance: number): number {
  const left = Math.min(1, measuredTolerance / tolerance)
  return share ** 2 * (1 - left ** 2)
}

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
