import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { bodyOf } from '#app/domain/layout/body.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import { radians, type Vec2 } from '#app/domain/vector.ts'
import { patch, type Patch } from '#app/drawing/plan/occupied.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'

/** A heater's body on the drawing, px: its middle, its size along and across the element, and its turn clockwise. */
export interface HeaterPlace {
  readonly x: number
  readonly y: number
  readonly length: number
  readonly width: number
  /** SVG turn of the element axis, degrees. */
  readonly turnDeg: number
  /** Direction on the drawing from the middle towards the end that carries the name. */
  readonly nameEnd: Vec2
}

/** Where a heater's body lies on the drawing; a tilted body is drawn as wide as it looks from above. */
export function heaterPlace(heater: MountedHeater, model: HeaterModel | null, view: PlanView, pen: Pen): HeaterPlace {
  const [x, y] = toScreen(view, [heater.x, heater.y])
  const body = model ? bodyOf(heater, model) : null
  const tilt = radians(heater.tiltDeg)
  const across = body ? 2 * (body.half.v * Math.abs(Math.cos(tilt)) + body.half.w * Math.abs(Math.sin(tilt))) : 0.16
  const turn = radians(heater.turnDeg)
  const along: Vec2 = [Math.cos(turn), -Math.sin(turn)]
  const isUpright = Math.abs(along[1]) > Math.abs(along[0]) * 0.9
  const flips = isUpright ? along[1] > 0 : along[0] > 0
  return {
    x,
    y,
    length: Math.max(14 * pen.k, (model?.body.length ?? 0.6) * view.scale),
    width: Math.max(5.5 * pen.k, across * view.scale),
    turnDeg: -heater.turnDeg,
    nameEnd: flips ? [-along[0], -along[1]] : along,
  }
}

/** The room a heater's body takes on the drawing. */
export const heaterPatch = (place: HeaterPlace): Patch =>
  patch(place.x, place.y, place.length, place.width, place.turnDeg)

/** Where a heater's name stands: beyond the upper end, or the left end of a level heater; middle of the words, px. */
export function heaterNameAt(place: HeaterPlace, nameWidth: number, pen: Pen): Vec2 {
  const [ux, uy] = place.nameEnd
  const reach = place.length / 2 + 4 * pen.k + (Math.abs(ux) * nameWidth + Math.abs(uy) * pen.text * 0.75) / 2
  return [place.x + ux * reach, place.y + uy * reach]
}

/** The nearest point of what holds the heater, m in plan; null when nothing is named or it is not on the site. */
export function supportPoint(heater: MountedHeater, site: Site): Vec2 | null {
  if (heater.memberId === null) return null
  const line = [...site.members, ...site.walls].find(({ id }) => id === heater.memberId)
  if (line) return nearestOn(line.from, line.to, [heater.x, heater.y])
  return site.poles.find(({ id }) => id === heater.memberId)?.at ?? null
}

function nearestOn(a: Vec2, b: Vec2, [x, y]: Vec2): Vec2 {
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]]
  const square = dx * dx + dy * dy
  const t = square === 0 ? 0 : Math.min(1, Math.max(0, ((x - a[0]) * dx + (y - a[1]) * dy) / square))
  return [a[0] + t * dx, a[1] + t * dy]
}
