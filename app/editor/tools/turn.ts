import { turnHeaters } from '#app/domain/layout/edits.ts'
import { degrees, type Vec2 } from '#app/domain/vector.ts'
import type { Gesture } from '#app/editor/tools/gesture.ts'

/** Directions that hold, degrees apart, and how near one must be. */
const step = 15
const near = 3

/** Turns heaters by the angle the pointer makes about the lead heater; holds every 15° within 3°. */
export const turnGesture: Gesture = (start, to, free) => {
  const lead = start.layout.heaters.find((heater) => heater.id === start.leadId)
  if (!lead) return { layout: start.layout, reason: null, lines: [] }
  const centre: Vec2 = [lead.x, lead.y]
  const by = degrees(angleOf(centre, to) - angleOf(centre, start.from))
  const turn = lead.turnDeg + by
  const line = Math.round(turn / step) * step
  const holds = !free && Math.abs(turn - line) <= near
  const reached = holds ? line : Math.round(turn)
  return {
    layout: turnHeaters(start.layout, start.ids, reached - lead.turnDeg),
    reason: holds ? `Held to ${((line % 360) + 360) % 360}°.` : null,
    lines: [],
  }
}

const angleOf = (centre: Vec2, to: Vec2) => Math.atan2(to[1] - centre[1], to[0] - centre[0])
