import type { Brief } from '#app/domain/brief/brief.ts'
import type { LayoutTotals, SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { HeatPicture } from '#app/drawing/heat/contours.ts'
import { irradianceScale } from '#app/drawing/heat/quantity.ts'

/** A variant on the customer's sheet. Its picture is made with the levels and edges of `sheetScale`. */
export interface SheetVariant {
  readonly number: number
  readonly title: string
  readonly revision: number
  readonly layout: Layout
  readonly picture: HeatPicture | null
  readonly warmth: readonly SeatWarmth[]
  readonly totals: LayoutTotals
  /** What the customer pays, tax included; absent: the sheet says no price. */
  readonly priceWithTax?: { readonly amount: number; readonly currency: 'EUR' | 'USD' } | null
}

/** Everything on the customer's sheet: two to four variants of one job on one scale. No cost prices, no staff. */
export interface ComparisonSheetProps {
  readonly site: Site
  readonly brief: Brief
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly variants: readonly SheetVariant[]
  /** Height of the plane the pictures are made for, m. */
  readonly planeHeight: number
  /** Who drew it, by the organisation's name. */
  readonly organisation: string
  /** Day of drawing, in words: "1 Dec 2026". */
  readonly date: string
  readonly cautions: readonly string[]
  /** What an engineer said of it; null: not yet checked. */
  readonly checked?: string | null
}

/** The scale of a sheet's pictures: by day, stepped every 10 W/m² so that a figure can be read back from a colour. */
export const sheetScale = (brief: Brief) => irradianceScale('day', brief.target, true)
