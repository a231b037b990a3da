import type { Conditions } from '#app/domain/comfort/feels-like.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import type { Cover } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** What the feels-like map needs besides the emitters; the surroundings are those of open sky. */
export interface MapConditions extends Conditions {
  /** Share of the radiation that clothing and skin take up, one per emitter in the question's order. */
  readonly absorptance: readonly number[]
  /** Where a body lies below one of them, the surroundings are as warm as the air. Absent: open sky everywhere. */
  readonly covers?: readonly Cover[]
}

/**
 * What a map shows. `flux`: irradiance of all emitters on the horizontal plane, W/m². `share`: that of one emitter
 * alone, W/m². `overlap`: how many emitters give at least the threshold, W/m², each alone. `feels-like`: °C with the
 * heaters on; which way a person on the map faces is not known, so the mean over all facings is taken.
 */
export type MapQuantity =
  | { readonly kind: 'flux' }
  | { readonly kind: 'share'; readonly emitterId: string }
  | { readonly kind: 'overlap'; readonly threshold: number }
  | { readonly kind: 'feels-like'; readonly conditions: MapConditions }

/** One question to the worker; plain data. Heights and cell size in m. */
export interface MapQuestion {
  readonly emitters: readonly Emitter[]
  readonly floor: readonly Vec2[]
  /** Height of the horizontal plane above finished floor. */
  readonly z: number
  readonly cell: number
  readonly quantity: MapQuantity
  /** Values at which isolines are drawn, in the unit of the quantity. */
  readonly levels: readonly number[]
  /** Lower edges of the fill's bands; absent: those of the irradiance scale. */
  readonly edges?: readonly number[]
  /** Levels whose figure may stand on the line; absent: all. */
  readonly written?: readonly number[]
  /** Absent: nothing stands in the way. */
  readonly obstructions?: readonly Obstruction[]
}
