import type { Vec3 } from '#app/domain/vector.ts'

/** The four outcomes of a check. No data is "cannot tell", never a pass. */
export type Outcome = 'fails' | 'measure first' | 'pass' | 'cannot tell'

/** Result of one rule on one subject. */
export interface Finding {
  /** The rule's name, kebab-case; one per file of this room. */
  readonly rule: string
  readonly outcome: Outcome
  /** A failing hard stop cannot be submitted; a soft finding needs an engineer's typed reason; advice needs nothing. */
  readonly weight: 'hard stop' | 'soft' | 'advice'
  readonly subject: { readonly kind: 'heater' | 'seat' | 'layout'; readonly id: string }
  /** What is so, in a short sentence without figures. */
  readonly title: string
  /** Nominal margin in SI; null when it cannot be told or the rule has no figure. */
  readonly margin: number | null
  /** Combined tolerance of the sizes the margin rests on, same unit as the margin. */
  readonly tolerance: number | null
  readonly value: number | null
  readonly limit: number | null
  readonly unit: 'm' | 'W/m²' | '°' | 'V' | 'N' | 'N·m' | 'none'
  /** The manual's page, a rule set's edition and article, or "house rule". */
  readonly source: string
  /** State of a movable thing in which the finding holds: a named condition of use. */
  readonly condition: string | null
  /** What to do about it, in a sentence. */
  readonly remedy: string | null
  /** The nearest pair of points, for a dimension on the drawing. */
  readonly nearest: { readonly from: Vec3; readonly to: Vec3 } | null
}

/** m < 0 fails · 0 ≤ m < τ measure first · m ≥ τ pass · no data cannot tell. */
export function outcomeOf(margin: number | null, tolerance: number | null): Outcome {
  if (margin === null || tolerance === null) return 'cannot tell'
  if (margin < 0) return 'fails'
  return margin < tolerance ? 'measure first' : 'pass'
}
