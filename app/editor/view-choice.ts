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

/** The height most seats have; the lower of two that are equally common; ISO 7726's seated heights without seats. */
function commonHeight(site: Site, of: 'bodyHeight' | 'headHeight'): number {
  const counts = new Map<number, number>()
  for (const seat of site.seats) counts.set(seat[of], (counts.get(seat[of]) ?? 0) + 1)
  const [best] = [...counts].sort((a, b) => b[1] - a[1] || a[0] - b[0])
  return best?.[0] ?? (of === 'bodyHeight' ? 0.6 : 1.1)
}

/** Heights of the body and head planes of a site, m. */
export const planesOf = (site: Site): { readonly body: number; readonly head: number } => ({
  body: commonHeight(site, 'bodyHeight'),
  head: commonHeight(site, 'headHeight'),
})

/** Height of the chosen plane, m. */
export const planeHeight = (plane: PlaneChoice, site: Site): number =>
  plane.kind === 'height' ? plane.height : planesOf(site)[plane.kind]
