import type { Brief } from '#app/domain/brief/brief.ts'
import type { SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Body } from '#app/domain/layout/body.ts'
import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import type { Support } from '#app/domain/layout/supports.ts'
import { outcomeOf, type Finding, type Outcome } from '#app/domain/rules/finding.ts'
import type { House } from '#app/domain/rules/house.ts'
import type { Site } from '#app/domain/site/site.ts'

/** What a layout is checked with. `warmth` is that of this very layout. */
export interface LayoutCheck {
  readonly site: Site
  readonly brief: Brief
  readonly layout: Pick<Layout, 'heaters'>
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly warmth: readonly SeatWarmth[]
  /** That of the organisation whose layout it is. */
  readonly house: House
}

/** What a rule about one heater looks at. */
export interface HeaterCheck {
  readonly site: Site
  readonly brief: Brief
  readonly heater: MountedHeater
  readonly model: HeaterModel
  readonly body: Body
  readonly support: Support
  readonly house: House
}

/** What a rule is about, so that its findings share it. */
export interface Rule {
  readonly rule: string
  readonly weight: Finding['weight']
  readonly subject: Finding['subject']
  readonly source: string
  readonly unit: Finding['unit']
}

/** What was found, as far as it is known; the rest of a finding is null. */
export interface Found {
  readonly title: string
  readonly margin?: number | null
  readonly tolerance?: number | null
  readonly value?: number | null
  readonly limit?: number | null
  readonly condition?: string | null
  readonly remedy?: string | null
  readonly nearest?: Finding['nearest']
}

/** A finding whose outcome is known without a figure. */
export function findingOf(rule: Rule, outcome: Outcome, found: Found): Finding {
  const { rule: name, weight, subject, source, unit } = rule
  return {
    rule: name,
    weight,
    subject,
    source,
    unit,
    outcome,
    title: found.title,
    margin: found.margin ?? null,
    tolerance: found.tolerance ?? null,
    value: found.value ?? null,
    limit: found.limit ?? null,
    condition: found.condition ?? null,
    remedy: found.remedy ?? null,
    nearest: found.nearest ?? null,
  }
}

/** Without what binary fractions add, so that a size at its limit is at it. */
const settled = (figure: number | null | undefined): number | null =>
  figure === null || figure === undefined ? null : Math.round(figure * 1e9) / 1e9

/** A finding judged by its margin and tolerance, with the title that fits its outcome. */
export function judgedBy(rule: Rule, titles: Readonly<Record<Outcome, string>>, found: Omit<Found, 'title'>): Finding {
  const margin = settled(found.margin)
  const tolerance = settled(found.tolerance)
  const outcome = outcomeOf(margin, tolerance)
  const remedy = outcome === 'pass' ? null : (found.remedy ?? null)
  return findingOf(rule, outcome, { ...found, margin, tolerance, remedy, title: titles[outcome] })
}

/** The manual as the source of a figure. */
export const manualOf = (model: HeaterModel): string => `Manual of ${model.name}`

/** A rule about one heater. */
export function heaterRule(
  { heater, model }: HeaterCheck,
  rule: string,
  weight: Finding['weight'],
  unit: Finding['unit'] = 'none',
  source = manualOf(model),
): Rule {
  return { rule, weight, subject: { kind: 'heater', id: heater.id }, source, unit }
}
