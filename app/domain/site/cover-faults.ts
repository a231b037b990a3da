import { coverHeightAt, coverOutline, coverPlane, planeHeightAt } from '#app/domain/site/cover.ts'
import type { SiteFault } from '#app/domain/site/site-fault.ts'
import type { Cover, Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** What is wrong with the covers: corners that make no plane, heights below the floor, undersides below heads. */
export function coverFaults(site: Site): SiteFault[] {
  return site.covers.flatMap((cover, i) => {
    const message = cornerFault(site, cover) ?? headFault(site, cover)
    return message ? [{ path: ['covers', i, 'corners'], message }] : []
  })
}

function cornerFault(site: Site, cover: Cover): string | null {
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  const low = cover.corners.findIndex(([, , height]) => height <= 0)
  if (low >= 0)
    return `Every corner is above the floor. Corner ${low + 1} is at ${length(cover.corners[low]?.[2] ?? 0)}.`
  if (!coverPlane(cover)) {
    return cover.corners.length === 3
      ? 'Three heights in one line do not make a plane. Give a fourth corner.'
      : 'Corners 1, 2 and 3 lie in one line and do not make a plane. Move one of them.'
  }
  return runsAround(coverOutline(cover))
    ? null
    : 'The corners do not run around the cover. Give them in order, no notch.'
}

/** True when the corners turn the same way all around. */
function runsAround(outline: readonly Vec2[]): boolean {
  const turns = outline.map((a, i) => {
    const b = outline[(i + 1) % outline.length] ?? a
    const c = outline[(i + 2) % outline.length] ?? a
    return (b[0] - a[0]) * (c[1] - b[1]) - (b[1] - a[1]) * (c[0] - b[0])
  })
  return turns.every((turn) => turn > 1e-9) || turns.every((turn) => turn < -1e-9)
}

/** Over every seat the underside, with blades hanging down, is above its head. */
function headFault(site: Site, cover: Cover): string | null {
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  const plane = coverPlane(cover)
  if (!plane) return null
  for (const { id, x, y, headHeight } of site.seats) {
    const low = planeHeightAt(plane, x, y) - cover.swing
    if (low > headHeight || coverHeightAt(cover, x, y) === null) continue
    return `Over seat ${id} the cover reaches down to ${length(low)}; at least its head at ${length(headHeight)}.`
  }
  return null
}
