import type { Seat, Site } from '#app/domain/site/site.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { shiftsOf } from '#app/domain/site/tolerance.ts'

/**
 * Combined tolerance of a figure at one height of a seat, from the sizes that place the seat; the heaters stay where they
 * are. `nominal` is the figure at the point as it is. The larger change of the two ways counts, as in `toleranceOf`.
 */
export function seatTolerance(
  site: Site,
  seat: Seat,
  height: 'bodyHeight' | 'headHeight',
  nominal: number,
  figureAt: (point: Vec3) => number,
): number {
  let squares = 0
  for (const [dx = 0, dy = 0, dz = 0] of shiftsOf(site, { of: 'seat', id: seat.id }, ['x', 'y', height])) {
    if (dx === 0 && dy === 0 && dz === 0) continue
    const changes = [1, -1].map((sign) => {
      const point: Vec3 = [seat.x + sign * dx, seat.y + sign * dy, seat[height] + sign * dz]
      return Math.abs(figureAt(point) - nominal)
    })
    squares += Math.max(...changes) ** 2
  }
  return Math.sqrt(squares)
}
