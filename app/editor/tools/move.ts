import { moveHeaters } from '#app/domain/layout/edits.ts'
import { holdMovement } from '#app/domain/layout/holding.ts'
import { findSupports } from '#app/domain/layout/support-near.ts'
import type { Gesture } from '#app/editor/tools/gesture.ts'

/** Drags heaters over the plan. They hold to members and to equal spacing; `free` moves to the millimetre. */
export const moveGesture: Gesture = (start, to, free) => {
  const dx = to[0] - start.from[0]
  const dy = to[1] - start.from[1]
  const held = free
    ? { dx: millimetres(dx), dy: millimetres(dy), reason: null, lines: [] }
    : holdMovement({ ...start, dx, dy })
  const moved = moveHeaters(start.layout, start.ids, held.dx, held.dy)
  return {
    layout: findSupports(moved, start.ids, start.site, start.models, start.rules),
    reason: held.reason,
    lines: held.lines,
  }
}

const millimetres = (metres: number) => Math.round(metres * 1000) / 1000
