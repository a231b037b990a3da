import type { Efficiency } from '#app/domain/flux/emitter.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { planesOf } from '#app/domain/site/planes.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { WindName } from '#app/domain/comfort/seat-warmth.ts'

/** What the map shows. */
export type MapChoice =
  | { readonly kind: 'flux' }
  | { readonly kind: 'share'; readonly heaterId: string }
  | { readonly kind: 'overlap'; readonly threshold: number }
  | { readonly kind: 'feels-like'; readonly wind: WindName }

/** Height of the map's plane: that of the seats' bodies, of their heads, or typed, m. */
export type PlaneChoice = { readonly kind: 'body' | 'head' } | { readonly kind: 'height'; readonly height: number }

/** Unit in which irradiance is written. */
export type FluxUnit = 'W/m²' | 'W/ft²'

/** How a person looks at a variant; changes nothing that is kept. */
export interface ViewChoice {
  readonly map: MapChoice
  readonly plane: PlaneChoice
  readonly fluxUnit: FluxUnit
  /** Heaters shade by tables, poles, obstacles and each other; the plain figures are without. */
  readonly shade: boolean
  /** Which radiant efficiency of the data sheets' range the heat is drawn with; the plain figures are nominal. */
  readonly efficiency: Efficiency
}

/** Opens on irradiance at the body plane, unshaded, with nominal efficiency. */
export const plainView: ViewChoice = {
  map: { kind: 'flux' },
  plane: { kind: 'body' },
  fluxUnit: 'W/m²',
  shade: false,
  efficiency: 'nominal',
}

/** Whether a heater of the layout has a range of radiant efficiency: else there is nothing to choose. */
export const hasEfficiencyRange = (layout: Layout, models: ReadonlyMap<string, HeaterModel>): boolean =>
  layout.heaters.some((heater) => models.get(heater.model)?.radiantEfficiencyRange)

/** The choice as far as the layout offers it. */
export const offeredView = (
  choice: ViewChoice,
  layout: Layout,
  models: ReadonlyMap<string, HeaterModel>,
): ViewChoice =>
  choice.efficiency === 'nominal' || hasEfficiencyRange(layout, models) ? choice : { ...choice, efficiency: 'nominal' }

/** Height of the chosen plane, m. */
export const planeHeight = (plane: PlaneChoice, site: Site): number =>
  plane.kind === 'height' ? plane.height : planesOf(site)[plane.kind]
