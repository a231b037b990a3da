import type { Layout } from '#app/domain/layout/layout.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** Heaters whose centres lie in the rectangle between two corners, the edges included. */
export function heatersWithin(layout: Layout, a: Vec2, b: Vec2): string[] {
  const inside = (value: number, one: number, other: number) =>
    value >= Math.min(one, other) && value <= Math.max(one, other)
  return layout.heaters
    .filter((heater) => inside(heater.x, a[0], b[0]) && inside(heater.y, a[1], b[1]))
    .map((heater) => heater.id)
}

/** The selection after a click: alone, or with Shift added or taken out. */
export function selectionAfterClick(selected: readonly string[], id: string, shift: boolean): readonly string[] {
  if (!shift) return selected.length === 1 && selected[0] === id ? selected : [id]
  return selected.includes(id) ? selected.filter((other) => other !== id) : [...selected, id]
}
