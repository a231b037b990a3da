import type { SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** What a caution is about. */
export type CautionKind = 'burn' | 'fire' | 'shock' | 'falling heater' | 'eyes' | 'structure' | 'work at height'

/** A caution where it changes placement: a mark on the plan with one sentence. */
export interface PlanCaution {
  readonly kind: CautionKind
  readonly at: Vec2
  readonly subject: Finding['subject']
  readonly sentence: string
  /** State of a movable thing in which it holds. */
  readonly condition: string | null
}

/** The kind of caution that each rule's finding stands for; rules that are about nothing dangerous have none. */
export const cautionKinds: Readonly<Record<string, CautionKind>> = {
  'head-flux': 'burn',
  'mounting-height': 'burn',
  'clearance-above': 'fire',
  'clearance-side-end': 'fire',
  'clearance-front-of-beam': 'fire',
  'clearance-below': 'fire',
  'recess-bay': 'fire',
  'recess-void': 'fire',
  'ingress-protection': 'shock',
  'voltage-offered': 'shock',
  supported: 'falling heater',
  'mount-offered': 'falling heater',
  'near-infrared': 'eyes',
  'support-load': 'structure',
}

/** The cautions that change placement, each where its heater or seat is: findings that fail or want measuring. */
export function cautionsOnPlan(
  layout: Pick<Layout, 'heaters'>,
  warmth: readonly Pick<SeatWarmth, 'seat'>[],
  findings: readonly Finding[],
): PlanCaution[] {
  return findings.flatMap((finding): PlanCaution[] => {
    const kind = cautionKinds[finding.rule]
    if (!kind || kind === 'structure' || finding.weight === 'advice') return []
    if (finding.outcome !== 'fails' && finding.outcome !== 'measure first') return []
    const at = placeOf(finding.subject, layout, warmth)
    if (!at) return []
    const measure = finding.outcome === 'measure first' ? ' Measure first.' : ''
    const { subject, condition } = finding
    return [{ kind, at, subject, sentence: `${finding.title}.${measure}`, condition }]
  })
}

function placeOf(
  { kind, id }: Finding['subject'],
  layout: Pick<Layout, 'heaters'>,
  warmth: readonly Pick<SeatWarmth, 'seat'>[],
): Vec2 | null {
  if (kind === 'layout') return null
  const place =
    kind === 'heater'
      ? layout.heaters.find((heater) => heater.id === id)
      : warmth.find(({ seat }) => seat.id === id)?.seat
  return place ? [place.x, place.y] : null
}

/** What every picture of a layout says beside it, whatever was found. */
const pictureCautions: readonly string[] = [
  'Calculated, not a thermal photograph.',
  "Not a substitute for the heater's manual, a licensed electrician, the structure's engineer, or the fire authority.",
]

/**
 * Plain sentences for a comparison sheet: what hurts, what burns and what must hold, as far as this layout gives cause,
 * then its conditions of use. One sentence for each kind, however many heaters it concerns.
 */
export function cautionSentences(
  layout: Pick<Layout, 'heaters'>,
  models: ReadonlyMap<string, HeaterModel>,
  findings: readonly Finding[],
): string[] {
  if (layout.heaters.length === 0) return [...pictureCautions]
  const open = (kind: CautionKind) =>
    findings.filter(
      ({ rule, outcome, weight }) => cautionKinds[rule] === kind && outcome !== 'pass' && weight !== 'advice',
    )
  const heads = findings.filter(({ rule, outcome }) => rule === 'head-flux' && outcome === 'fails').length
  const glows = layout.heaters.some(({ model }) => models.get(model)?.wave === 'short-wave')
  return [
    'Surfaces stay hot after switching off: keep hands, cloths and plants away from the heaters.',
    ...(heads > 0
      ? [`${heads === 1 ? 'One seat is' : `${heads} seats are`} over the caution for heat at the head.`]
      : []),
    ...(open('fire').length > 0
      ? [`Combustible things are too near or not yet measured at ${heatersOf(open('fire'))}.`]
      : ['Keep furniture, fabric and decoration out of the clearances in the manual.']),
    ...(open('falling heater').length > 0 ? [`No sound support yet for ${heatersOf(open('falling heater'))}.`] : []),
    ...(open('structure').length > 0 ? ['The load on the supports is to be confirmed before anything is hung.'] : []),
    ...(open('shock').length > 0 ? [`Weather or voltage does not suit ${heatersOf(open('shock'))}.`] : []),
    ...(glows ? ['Bright elements: nobody should look into them for long, least of all children.'] : []),
    ...conditionsOfUse(findings).map((condition) => `Condition of use: ${condition}.`),
    ...pictureCautions,
  ]
}

/** "H1", "H1 and H2", "H1, H2 and 3 more". */
function heatersOf(findings: readonly Finding[]): string {
  const ids = [...new Set(findings.flatMap(({ subject }) => (subject.kind === 'heater' ? [subject.id] : [])))]
  if (ids.length > 3) return `${ids.slice(0, 2).join(', ')} and ${ids.length - 2} more`
  return ids.length < 2 ? (ids[0] ?? 'seats') : `${ids.slice(0, -1).join(', ')} and ${ids.at(-1) ?? ''}`
}

/** Named conditions of use: each state that does not pass, with the heaters that it concerns. */
export function conditionsOfUse(findings: readonly Finding[]): string[] {
  const states = new Map<string, Finding[]>()
  for (const finding of findings) {
    if (finding.condition === null || finding.outcome === 'pass') continue
    states.set(finding.condition, [...(states.get(finding.condition) ?? []), finding])
  }
  return [...states].map(([state, found]) => `${heatersOf(found)} off while ${state}`)
}
