import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { heaterNameAt, heaterPatch, heaterPlace, type HeaterPlace } from '#app/drawing/plan/heater-place.ts'
import { isClear, patch, type Patch } from '#app/drawing/plan/occupied.ts'
import type { PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'

/** Places for a name, the best first: beyond its end, a line further, beyond the other end, at either side. */
function spotsOf(place: HeaterPlace, width: number, pen: Pen): Vec2[] {
  const [x, y] = heaterNameAt(place, width, pen)
  const [ux, uy] = place.nameEnd
  const line = pen.text * 1.05
  const far: Vec2 = [2 * place.x - x - ux * 14 * pen.k, 2 * place.y - y - uy * 14 * pen.k]
  const aside = place.width / 2 + 3 * pen.k + (Math.abs(uy) * width + Math.abs(ux) * pen.text) / 2
  return [
    [x, y],
    [x + ux * line, y + uy * line],
    far,
    [place.x + uy * aside, place.y - ux * aside],
    [place.x - uy * aside, place.y + ux * aside],
  ]
}

/** Where each heater's name stands, px, clear of seats, bars and other names where any of its places is. */
export function placeHeaterNames(
  layout: Layout,
  models: ReadonlyMap<string, HeaterModel>,
  view: PlanView,
  pen: Pen,
  occupied: readonly Patch[],
): ReadonlyMap<string, Vec2> {
  const places = layout.heaters.map((heater) => ({
    heater,
    place: heaterPlace(heater, models.get(heater.model) ?? null, view, pen),
  }))
  const taken = [...occupied, ...places.map(({ place }) => heaterPatch(place))]
  return new Map(
    places.map(({ heater, place }) => {
      const width = textWidth(heater.id, pen.text, 600)
      const spots = spotsOf(place, width, pen)
      const boxOf = ([x, y]: Vec2) => patch(x, y, width, pen.text * 0.72)
      const spot = spots.find((one) => isClear(boxOf(one), taken, 0.5)) ?? heaterNameAt(place, width, pen)
      taken.push(boxOf(spot))
      return [heater.id, spot] as const
    }),
  )
}
