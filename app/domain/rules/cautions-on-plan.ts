import type { SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
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
