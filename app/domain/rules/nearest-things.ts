import { mostTolerance } from '#app/domain/rules/about-heater.ts'
import { findingOf, judgedBy, type Found, type HeaterCheck, type Rule } from '#app/domain/rules/check.ts'
import type { Finding, Outcome } from '#app/domain/rules/finding.ts'
import type { Convex } from '#app/domain/site/convex.ts'
import type { Site } from '#app/domain/site/site.ts'
import { solidOf, type Solid } from '#app/domain/site/solids.ts'
import { toleranceOf } from '#app/domain/site/tolerance.ts'

/** What one thing leaves of a clearance. */
export interface Left {
  readonly value: number
  readonly limit: number
  readonly margin: number
  readonly nearest: Finding['nearest']
  /** Where the limit comes from, when that is not the source of the whole rule. */
  readonly source?: string | undefined
}

/** How a rule about things near a heater measures and speaks. */
export interface NearRule {
  readonly rule: Rule
  /** What a thing leaves; null when the rule does not concern it. */
  readonly left: (solid: Solid) => Left | null
  /** The least margin that one part of a thing may leave: from its bounds, and closer. */
  readonly quickly: (part: Convex, solid: Solid) => number
  readonly closely: (part: Convex, solid: Solid) => number
  readonly titles: (name: string) => Readonly<Record<Outcome, string>>
  /** Title of the pass when nothing is near. */
  readonly clear: string
  readonly remedy: string
}

/**
 * Findings of a rule over all things: one for each that does not pass, and one pass with the tightest of the things that
 * are always there. A movable thing that fails does so in one of its states: a named condition of use, not a hard stop.
 */
export function findingsNear(check: HeaterCheck, solids: readonly Solid[], near: NearRule): Finding[] {
  const left = leftBy(check, solids, near)
  const doubtful = left.filter(({ solid, found }) => found.margin < mostTolerance(check, solid))
  const findings = doubtful.map(({ solid, found }) => findingAbout(check, solid, found, near))
  const failing = findings.filter(({ outcome }) => outcome !== 'pass')
  if (failing.some(({ condition }) => condition === null)) return failing
  const standing = left.find(({ solid }) => solid.state === null) ?? left.find(({ solid }) => !doubtful.some((d) => d.solid === solid)) // prettier-ignore
  const tightest = standing
    ? findingAbout(check, standing.solid, standing.found, near)
    : findingOf(near.rule, 'pass', { title: near.clear })
  return [...failing, tightest]
}

/** What each thing leaves, tightest first; a thing that can neither be in doubt nor the tightest is passed over. */
function leftBy(check: HeaterCheck, solids: readonly Solid[], near: NearRule): { solid: Solid; found: Left }[] {
  const quick = solids.map((solid) => ({ solid, atLeast: leastOver(solid, near.quickly) }))
  quick.sort((a, b) => a.atLeast - b.atLeast)
  const left: { solid: Solid; found: Left }[] = []
  let tightest = Infinity
  for (const { solid, atLeast } of quick) {
    const ofNoAccount = (margin: number) => margin > tightest && margin > mostTolerance(check, solid)
    if (ofNoAccount(atLeast) || ofNoAccount(leastOver(solid, near.closely))) continue
    const found = near.left(solid)
    if (!found) continue
    left.push({ solid, found })
    if (solid.state === null) tightest = Math.min(tightest, found.margin)
  }
  return left.sort((a, b) => a.found.margin - b.found.margin)
}

function leastOver(solid: Solid, marginOf: NearRule['quickly']): number {
  let least = Infinity
  for (const part of solid.parts) least = Math.min(least, marginOf(part, solid))
  return least
}

function findingAbout({ site, house }: HeaterCheck, solid: Solid, found: Left, near: NearRule): Finding {
  const margin = (moved: Site) => {
    const there = solidOf(moved, solid)
    return there && (near.left(there)?.margin ?? null)
  }
  const rest: Omit<Found, 'title'> = {
    ...found,
    tolerance: toleranceOf(margin, site, house.rules.toleranceUnstated, solid.rests),
    remedy: solid.state === null ? near.remedy : conditionRemedy,
    condition: solid.state,
  }
  const weight = solid.state === null && solid.combustible ? near.rule.weight : 'soft'
  const finding = judgedBy(
    { ...near.rule, weight, source: found.source ?? near.rule.source },
    near.titles(solid.name),
    rest,
  )
  return finding.outcome === 'pass' ? { ...finding, weight: near.rule.weight, condition: null } : finding
}

/** What makes a state of a movable thing harmless. */
const conditionRemedy = 'Heater isolated by a key switch in this state, with a sign at the switch; or move the heater.'
