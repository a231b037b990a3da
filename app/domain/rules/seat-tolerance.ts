import { toleranceOf } from '#app/domain/site/dimension.ts'
import type { Seat, Site } from '#app/domain/site/site.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/**
 * Combined tolerance of a figure at one point of a seat, from the sizes that place the seat; the heaters stay where
 * they are. `nominal` is the figure at the point as it is.
 */
export function seatTolerance(
  site: Site,
  seat: Seat,
  pointOf: (seat: Seat) => Vec3,
  nominal: number,
  figureAt: (point: Vec3) => number,
): number | null {
  const [x, y, z] = pointOf(seat)
  const figure = (moved: Site): number | null => {
    const there = moved.seats.find(({ id }) => id === seat.id)
    if (!there) return null
    const point = pointOf(there)
    return point[0] === x && point[1] === y && point[2] === z ? nominal : figureAt(point)
  }
  return toleranceOf(figure, site, [{ of: 'seat', id: seat.id }])
}

/** The point of a seat at which head figures are taken. */
export const headOf = ({ x, y, headHeight }: Seat): Vec3 => [x, y, headHeight]

/** The point of a seat at which the body plane is taken. */
export const bodyPointOf = ({ x, y, bodyHeight }: Seat): Vec3 => [x, y, bodyHeight]
