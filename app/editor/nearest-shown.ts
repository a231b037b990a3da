import type { Finding } from '#app/domain/rules/finding.ts'
import type { DisplayUnits } from '#app/domain/units.ts'
import { lengthOf, subtract } from '#app/domain/vector.ts'
import type { NearestPair } from '#app/drawing/nearest/nearest-dimension.tsx'
import { nearestText } from '#app/drawing/nearest/nearest-text.ts'

/** A finding as it was chosen: known again after the layout changed and its title or figures with it. */
export type ChosenFinding = Pick<Finding, 'rule' | 'condition' | 'title' | 'subject' | 'weight'>

/** The finding that was chosen among those of now: the very same, else the first of its rule at its subject; else null. */
export function findChosen(findings: readonly Finding[], chosen: ChosenFinding | null): Finding | null {
  if (!chosen) return null
  const alike = findings.filter(
    ({ rule, subject, condition, weight }) =>
      rule === chosen.rule &&
      subject.kind === chosen.subject.kind &&
      subject.id === chosen.subject.id &&
      condition === chosen.condition &&
      weight === chosen.weight,
  )
  return alike.find(({ title }) => title === chosen.title) ?? alike[0] ?? null
}

/** A pair on the drawings with the finding that it stands for. */
export interface ShownNearest extends NearestPair {
  readonly finding: Finding
}

/** Least margin less its tolerance: what is nearest to failing. */
const tightness = ({ margin, tolerance }: Finding): number => (margin ?? Infinity) - (tolerance ?? 0)

/**
 * The pairs to draw: the chosen finding's, and the tightest of the chosen heater's where it is another. A finding without
 * a pair draws nothing.
 */
export function nearestShown(
  findings: readonly Finding[],
  chosen: Finding | null,
  heaterId: string | null,
  units: DisplayUnits,
): ShownNearest[] {
  const ofHeater = findings.filter(
    ({ subject, nearest, unit }) => nearest && unit === 'm' && subject.kind === 'heater' && subject.id === heaterId,
  )
  const tightest = ofHeater.reduce<Finding | null>((a, b) => (a && tightness(a) <= tightness(b) ? a : b), null)
  const shown = [...new Set([chosen, tightest])]
  return shown.flatMap((finding): ShownNearest[] => {
    const nearest = finding?.nearest
    if (!nearest) return []
    const figure = nearestText(lengthOf(subtract(nearest.to, nearest.from)), finding.tolerance, units)
    return [{ ...nearest, figure, chosen: finding === chosen, finding }]
  })
}
