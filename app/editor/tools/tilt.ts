import { tiltHeaters } from '#app/domain/layout/edits.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { shortName } from '#app/domain/heaters/short-name.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { degrees, radians, type Vec2 } from '#app/domain/vector.ts'
import type { Gesture } from '#app/editor/tools/gesture.ts'

/** Where the beam's axis meets a plane, from the heater's centre, m to the left of its element axis. */
export function aimDistance(heater: MountedHeater, plane: number): number {
  const drop = Math.max(0.2, heater.lowestPoint - plane)
  return drop * Math.tan(radians(Math.min(80, Math.max(-80, heater.tiltDeg))))
}

/** Direction in plan to which a positive tilt moves the beam. */
export const leftOf = (heater: MountedHeater): Vec2 => [
  -Math.sin(radians(heater.turnDeg)),
  Math.cos(radians(heater.turnDeg)),
]

/**
 * Tilts heaters by moving the spot where the lead heater's beam meets the shown plane. Whole degrees, held to the
 * limits of the model's manual; `free` passes them, and the finding says so.
 */
export const tiltGesture: Gesture = (start, to, free) => {
  const lead = start.layout.heaters.find((heater) => heater.id === start.leadId)
  if (!lead) return { layout: start.layout, reason: null, lines: [] }
  const left = leftOf(lead)
  const shift = (to[0] - start.from[0]) * left[0] + (to[1] - start.from[1]) * left[1]
  const drop = Math.max(0.2, lead.lowestPoint - start.plane)
  const tilt = Math.round(degrees(Math.atan2(aimDistance(lead, start.plane) + shift, drop)))
  const model = start.models.get(lead.model)
  const reached = free ? tilt : withinManual(tilt, model)
  return {
    layout: tiltHeaters(start.layout, start.ids, reached - lead.tiltDeg),
    reason: reached === tilt ? null : tiltLimits(model),
    lines: [],
  }
}

function withinManual(tilt: number, model: HeaterModel | undefined): number {
  if (!model?.tiltDeg) return tilt
  const size = Math.min(model.tiltDeg.max, Math.max(model.tiltDeg.min, Math.abs(tilt)))
  return tilt < 0 ? -size : size
}

/** The manual's limits in words; null when it gives none. */
const tiltLimits = (model: HeaterModel | undefined): string | null =>
  model?.tiltDeg ? `Tilt ${model.tiltDeg.min} to ${model.tiltDeg.max}° by the manual of ${shortName(model)}.` : null
