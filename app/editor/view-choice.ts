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
}

/** Opens on irradiance at the body plane, unshaded. */
export const plainView: ViewChoice = { map: { kind: 'flux' }, plane: { kind: 'body' }, fluxUnit: 'W/m²', shade: false }

/** Height of the chosen plane, m. */
export const planeHeight = (plane: PlaneChoice, site: Site): number =>
  plane.kind === 'height' ? plane.height : planesOf(site)[plane.kind]
