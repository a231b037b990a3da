import { type HeaterPlace, placeHeaters, type Placed } from '#app/domain/layout/edits.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { maxHeaters } from '#app/domain/layout/limits.ts'
import { roundLength } from '#app/domain/units.ts'
import { radians, type Vec2 } from '#app/domain/vector.ts'

/** How heaters repeat: centre to centre m, how many more, and the direction in plan, counter-clockwise from +x. */
export interface Repeat {
  readonly spacing: number
  readonly count: number
  readonly directionDeg: number
}

/**
 * Repeats the heaters named at a spacing. The copies keep everything but their place and support, which must be found
 * anew. A count that would pass the stated maximum of heaters is refused with the number that still fits.
 */
export function repeatAtSpacing(layout: Layout, ids: readonly string[], repeat: Repeat): Placed | { error: string } {
  const sources = layout.heaters.filter((heater) => ids.includes(heater.id))
  const room = Math.floor((maxHeaters - layout.heaters.length) / Math.max(1, sources.length))
  if (!(repeat.spacing > 0)) return { error: 'Spacing is more than 0.' }
  if (!Number.isInteger(repeat.count) || repeat.count < 1) return { error: 'At least 1 more.' }
  if (repeat.count > room) return { error: `At most ${room} more: a job holds ${maxHeaters} heaters.` }
  const [ux, uy] = directionOf(repeat.directionDeg)
  const places: HeaterPlace[] = []
  for (let step = 1; step <= repeat.count; step += 1) {
    for (const source of sources) {
      const shift = step * repeat.spacing
      places.push({ ...source, x: source.x + ux * shift, y: source.y + uy * shift, memberId: null })
    }
  }
  return placeHeaters(layout, places)
}

function directionOf(deg: number): Vec2 {
  const exact = [1, 0, -1, 0]
  const quarter = deg / 90
  if (Number.isInteger(quarter)) {
    const at = ((quarter % 4) + 4) % 4
    return [exact[at] ?? 0, exact[(at + 3) % 4] ?? 0]
  }
  return [Math.cos(radians(deg)), Math.sin(radians(deg))]
}

/**
 * Spreads the heaters between the two outermost ones so that neighbours stand equally far apart along the line that
 * joins those two; the distance across that line stays. Fewer than three: the same layout.
 */
export function spaceEqually(layout: Layout, ids: readonly string[]): Layout {
  const named = layout.heaters.filter((heater) => ids.includes(heater.id))
  const first = named[0]
  if (!first || named.length < 3) return layout
  const spreadX = Math.max(...named.map((h) => h.x)) - Math.min(...named.map((h) => h.x))
  const spreadY = Math.max(...named.map((h) => h.y)) - Math.min(...named.map((h) => h.y))
  const along = spreadX >= spreadY ? 'x' : 'y'
  const ordered = [...named].sort((a, b) => a[along] - b[along])
  const from = ordered[0]?.[along] ?? 0
  const to = ordered.at(-1)?.[along] ?? 0
  const places = new Map(ordered.map((h, i) => [h.id, from + ((to - from) * i) / (ordered.length - 1)]))
  return {
    ...layout,
    heaters: layout.heaters.map((heater) => {
      const at = places.get(heater.id)
      return at === undefined ? heater : { ...heater, [along]: roundLength(at) }
    }),
  }
}
