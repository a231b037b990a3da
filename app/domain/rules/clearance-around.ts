import {
  apartAtLeast,
  boundsFromBody,
  gapToBody,
  lieAbout,
  type Face,
  type Growth,
  type Lie,
} from '#app/domain/layout/clear-space.ts'
import { thingsAbout } from '#app/domain/rules/about-heater.ts'
import { findingOf, heaterRule, manualOf, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding, Outcome } from '#app/domain/rules/finding.ts'
import { findingsNear, type Left } from '#app/domain/rules/nearest-things.ts'
import { figureOfRuleSet, stricterLength, type SourcedFigure } from '#app/domain/rules/sourced-figure.ts'
import { tradePractice } from '#app/domain/rules/trade-practice.ts'
import type { Solid } from '#app/domain/site/solids.ts'

/** The clearance for a thing of this kind that governs at a face: the manual's, or a greater one of the rule set. */
export function clearanceAt({ model, brief }: HeaterCheck, combustible: boolean, face: Face): SourcedFigure | null {
  const given = combustible ? model.clearanceToCombustible : model.clearanceToNoncombustible
  const value = given?.[face]
  const manual = value === undefined ? null : { value, source: manualOf(model) }
  return combustible ? stricterLength(manual, figureOfRuleSet(brief.ruleSet, `clearance-${face}`)) : manual
}

/** The governing clearances for a thing of this kind at every face; null when one of them is not stated. */
function clearanceFor(check: HeaterCheck, combustible: boolean): Growth | null {
  const [above, side, end] = (['above', 'side', 'end'] as const).map((face) => clearanceAt(check, combustible, face))
  return above && side && end ? { above: above.value, side: side.value, end: end.value } : null
}

interface Around {
  readonly rule: string
  readonly faces: readonly Face[]
  readonly titles: (name: string) => Readonly<Record<Outcome, string>>
  readonly clear: string
  readonly remedy: string
}

/** Things whose clearance is not stated cannot be told; the others are judged by the faces that the rule is about. */
export function clearanceAround(check: HeaterCheck, around: Around, without: (solid: Solid) => boolean): Finding[] {
  const rule = heaterRule(check, around.rule, 'hard stop', 'm')
  const things = thingsAbout(check).filter((solid) => !solid.furniture && !without(solid))
  const unknown = [true, false].flatMap((combustible) => {
    if (clearanceFor(check, combustible) || !things.some((thing) => thing.combustible === combustible)) return []
    const title = `The manual states no clearance to ${combustible ? 'combustible' : 'non-combustible'} material`
    const weight = combustible ? rule.weight : 'soft'
    return [
      findingOf({ ...rule, weight }, 'cannot tell', {
        title,
        remedy: `Enter it from the manual.${combustible ? ` ${tradePractice.combustibleEdge.sentence}` : ''}`,
      }),
    ]
  })
  const known = things.filter(({ combustible }) => clearanceFor(check, combustible))
  const found = findingsNear(check, known, {
    rule,
    left: (solid) => leftAround(check, solid, around.faces),
    quickly: (part, solid) => boundsFromBody(check.body, part) - mostAround(check, solid),
    closely: (part, solid) => apartAtLeast(check.body, part) - mostAround(check, solid),
    titles: around.titles,
    clear: around.clear,
    remedy: around.remedy,
  })
  return unknown.length > 0 ? [...unknown, ...found.filter(({ outcome }) => outcome !== 'pass')] : found
}

/** The greatest of the clearances that a thing may have to keep, m. */
function mostAround(check: HeaterCheck, { combustible }: Solid): number {
  const { above, side, end } = clearanceFor(check, combustible) ?? { above: 0, side: 0, end: 0 }
  return Math.max(above, side, end)
}

/** What a thing leaves of the clearance of the face that lets it pass most easily; null when that is another rule's face. */
function leftAround(check: HeaterCheck, solid: Solid, faces: readonly Face[]): Left | null {
  const clearance = clearanceFor(check, solid.combustible)
  if (!clearance) return null
  let worst: { lie: Lie; part: number } | null = null
  solid.parts.forEach((part, i) => {
    const lie = lieAbout(check.body, part, clearance)
    if (lie && (!worst || lie.margin < worst.lie.margin)) worst = { lie, part: i }
  })
  return leftOf(check, solid, faces, worst)
}

function leftOf(
  check: HeaterCheck,
  solid: Solid,
  faces: readonly Face[],
  worst: { lie: Lie; part: number } | null,
): Left | null {
  const part = worst && solid.parts[worst.part]
  if (!worst || !part || !faces.includes(worst.lie.face)) return null
  const near = worst.lie.margin < 1 ? gapToBody(check.body, part) : null
  const governing = clearanceAt(check, solid.combustible, worst.lie.face)
  return { ...worst.lie, nearest: near && { from: near.from, to: near.to }, source: governing?.source }
}
