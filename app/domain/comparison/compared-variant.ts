import type { ListPrice } from '#app/domain/comparison/list-price.ts'
import type { LayoutTotals, SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { shortName } from '#app/domain/heaters/short-name.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** A variant with everything that a comparison says about it. */
export interface ComparedVariant {
  readonly number: number
  readonly title: string
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly warmth: readonly SeatWarmth[]
  readonly totals: LayoutTotals
  readonly findings: readonly Finding[]
  readonly price: ListPrice
  /** Area where two heaters or more each alone give the stated threshold, m²; null until it is computed. */
  readonly overlap: number | null
}

/** Heaters of a layout by model, the most first: "8 × Betony 3.0". Empty for a layout without heaters. */
export function countByModel({ layout, models }: Pick<ComparedVariant, 'layout' | 'models'>): readonly {
  readonly name: string
  readonly count: number
}[] {
  const counts = new Map<string, number>()
  for (const { model } of layout.heaters) {
    const known = models.get(model)
    const name = known ? shortName(known) : model
    counts.set(name, (counts.get(name) ?? 0) + 1)
  }
  return [...counts].map(([name, count]) => ({ name, count })).sort((a, b) => b.count - a.count)
}

/** Heaters that hang from nothing that holds them, or from something that nobody knows to hold them. */
export function countUnsupported(findings: readonly Finding[]): number {
  const subjects = findings.filter(({ rule, outcome }) => rule === 'supported' && outcome === 'fails')
  return new Set(subjects.map(({ subject }) => subject.id)).size
}

/** Rules about how a heater hangs: their lengths are no clearances. */
const aboutHanging: readonly string[] = ['supported', 'hanger-length']

/** The clearance or height with the least distance to its limit, m; null when none has a margin. How a heater hangs from
 * its support is no clearance and does not count. */
export function tightestMargin(findings: readonly Finding[]): { finding: Finding; margin: number } | null {
  const lengths = findings.flatMap((finding) =>
    !aboutHanging.includes(finding.rule) && finding.unit === 'm' && finding.margin !== null
      ? [{ finding, margin: finding.margin }]
      : [],
  )
  return lengths.reduce<(typeof lengths)[number] | null>(
    (least, each) => (least === null || each.margin < least.margin ? each : least),
    null,
  )
}
