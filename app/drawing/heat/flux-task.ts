import { explainSeat, type Explanation } from '#app/domain/comfort/explain.ts'
import { layoutFigures, type FiguresQuestion, type LayoutFigures } from '#app/domain/comparison/layout-figures.ts'
import { seatWarmth, type SeatWarmth, type WarmthInput } from '#app/domain/comfort/seat-warmth.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceByEmitter } from '#app/domain/flux/irradiance.ts'
import type { MapQuestion } from '#app/domain/flux/map-question.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { answerMap, type MapAnswer, type MapCache } from '#app/drawing/heat/map-picture.ts'

/** A receiver: a place, m, and the normal of a one-sided plane there, of any length but zero. */
export interface FluxPoint {
  readonly at: Vec3
  readonly normal: Vec3
}

/** Irradiance at each point, W/m², and for each point that of each emitter in their order. */
export interface PointFluxes {
  readonly irradiance: number[]
  readonly byHeater: number[][]
}

/** Work for a flux thread; plain data. */
export type FluxTask =
  | { readonly kind: 'map'; readonly question: MapQuestion }
  | { readonly kind: 'points'; readonly emitters: readonly Emitter[]; readonly points: readonly FluxPoint[] }
  | { readonly kind: 'warmth'; readonly input: WarmthInput }
  | { readonly kind: 'figures'; readonly input: FiguresQuestion }
  | { readonly kind: 'explanation'; readonly asked: Parameters<typeof explainSeat> }

/** What a flux thread answers; `refused` says which figure has no meaning or which limit is passed. */
export type FluxOutcome =
  | { readonly kind: 'map'; readonly answer: MapAnswer }
  | { readonly kind: 'points'; readonly fluxes: PointFluxes }
  | { readonly kind: 'warmth'; readonly warmth: SeatWarmth[] }
  | { readonly kind: 'figures'; readonly figures: LayoutFigures }
  | { readonly kind: 'explanation'; readonly explanation: Explanation | null }
  | { readonly kind: 'refused'; readonly message: string }

function pointFluxesOf(emitters: readonly Emitter[], points: readonly FluxPoint[]): PointFluxes {
  const byHeater = points.map(({ at, normal }) => irradianceByEmitter(emitters, at, normal))
  return { byHeater, irradiance: byHeater.map((parts) => parts.reduce((sum, part) => sum + part, 0)) }
}

function outcomeOf(task: FluxTask, cache: MapCache): FluxOutcome {
  if (task.kind === 'map') return { kind: 'map', answer: answerMap(task.question, cache) }
  if (task.kind === 'warmth') return { kind: 'warmth', warmth: seatWarmth(task.input) }
  if (task.kind === 'figures') return { kind: 'figures', figures: layoutFigures(task.input) }
  if (task.kind === 'explanation') return { kind: 'explanation', explanation: explainSeat(...task.asked) }
  return { kind: 'points', fluxes: pointFluxesOf(task.emitters, task.points) }
}

/** Does one task; figures without meaning and passed limits are an outcome, anything else is thrown. */
export function doFluxTask(task: FluxTask, cache: MapCache): FluxOutcome {
  try {
    return outcomeOf(task, cache)
  } catch (error) {
    if (error instanceof RangeError) return { kind: 'refused', message: error.message }
    throw error
  }
}
