import { bodyPoint, headPoint } from '#app/domain/comfort/seat-heat.ts'
import type { Source } from '#app/domain/comfort/sources.ts'
import { heightsOf, type SeatFigure } from '#app/domain/comfort/uncertainty.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import { scalarIrradianceAt } from '#app/domain/flux/irradiance.ts'
import { seenShare, type Obstruction } from '#app/domain/flux/shading.ts'
import type { Seat } from '#app/domain/site/site.ts'

/** How much of a heater a seat sees past what stands in the way, at one of the seat's heights. */
export interface SeenHeater {
  readonly heaterId: string
  readonly at: 'body' | 'head'
  /** By length of its elements: 1 with nothing in the way, 0 when none of it is seen. */
  readonly seen: number
  /** Ids of what stands in the way. */
  readonly past: readonly string[]
  /** Of all that the heaters would send there with nothing in the way, 0 … 1. */
  readonly ofUnshaded: number
}

/** Every heater whose radiation would reach the seat at the heights of a figure with nothing in the way. */
export function seenHeaters(
  seat: Seat,
  figure: SeatFigure,
  sources: readonly Source[],
  obstructions: readonly Obstruction[],
): SeenHeater[] {
  const heaters = wholeHeaters(sources)
  return heightsOf(figure).flatMap((height) => {
    const [at, point] =
      height === 'headHeight' ? (['head', headPoint(seat)] as const) : (['body', bodyPoint(seat)] as const)
    const whole = scalarIrradianceAt(heaters, point)
    return heaters.flatMap((emitter): SeenHeater[] => {
      const own = scalarIrradianceAt([emitter], point)
      if (own <= 0) return []
      const past = obstructions.filter((each) => seenShare(emitter, point, [each]) < 1).map(({ id }) => id)
      return [
        { heaterId: emitter.id, at, seen: seenShare(emitter, point, obstructions), past, ofUnshaded: own / whole },
      ]
    })
  })
}

/** The elements of each heater together. */
function wholeHeaters(sources: readonly Source[]): Emitter[] {
  const byId = new Map<string, Emitter>()
  for (const { heaterId, emitter } of sources) {
    const before = byId.get(heaterId)
    byId.set(heaterId, before ? { ...before, elements: [...before.elements, ...emitter.elements] } : emitter)
  }
  return [...byId.values()]
}
