import { useMemo } from 'react'
import type { Brief } from '#app/domain/brief/brief.ts'
import { layoutTotals, seatWarmth, type LayoutTotals, type SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { obstructionsOf } from '#app/domain/flux/shading.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { Site } from '#app/domain/site/site.ts'

/** Everything that is reckoned from a layout: exact at every step of a gesture. */
export interface LayoutFigures {
  readonly warmth: readonly SeatWarmth[]
  readonly totals: LayoutTotals
  readonly findings: readonly Finding[]
}

/** What figures rest on. */
export interface FiguresInput {
  readonly site: Site
  readonly brief: Brief
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly shade: boolean
}

/** The seats' figures, the totals and the findings of a layout. Findings are of the plain figures, without shade. */
export function figuresOf({ site, brief, layout, models, shade }: FiguresInput): LayoutFigures {
  const plain = seatWarmth({ site, brief, layout, models })
  const warmth = shade
    ? seatWarmth({ site, brief, layout, models, obstructions: obstructionsOf(site, layout, models) })
    : plain
  return {
    warmth,
    totals: layoutTotals(warmth, layout, models, brief),
    findings: checkLayout({ site, brief, layout, models, warmth: plain }),
  }
}

/** The figures of the layout shown, reckoned anew only when something they rest on changed. */
export function useFigures({ site, brief, layout, models, shade }: FiguresInput): LayoutFigures {
  return useMemo(() => figuresOf({ site, brief, layout, models, shade }), [site, brief, layout, models, shade])
}
