import type { Brief } from '#app/domain/brief/brief.ts'
import { layoutTotals, seatWarmth, type LayoutTotals, type SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { House } from '#app/domain/rules/house.ts'
import type { Site } from '#app/domain/site/site.ts'

/** What the figures of a layout rest on; plain data. */
export interface FiguresQuestion {
  readonly site: Site
  readonly brief: Brief
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  /** That of the organisation whose layout it is. */
  readonly house: House
}

/** Every seat, what the layout comes to, and its findings. */
export interface LayoutFigures {
  readonly warmth: readonly SeatWarmth[]
  readonly totals: LayoutTotals
  readonly findings: readonly Finding[]
}

/** The figures of a layout by the same functions as on its own page, without shade. */
export function layoutFigures({ site, brief, layout, models, house }: FiguresQuestion): LayoutFigures {
  const warmth = seatWarmth({ site, brief, layout, models })
  return {
    warmth,
    totals: layoutTotals(warmth, layout, models, brief),
    findings: checkLayout({ site, brief, layout, models, warmth, house }),
  }
}
