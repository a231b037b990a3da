import { fluxTolerances, heightsOf, seatTolerance, type SeatFigure } from '#app/domain/comfort/uncertainty.ts'
import type { LayoutCheck } from '#app/domain/rules/check.ts'
import type { Seat } from '#app/domain/site/site.ts'
import { shiftsOf } from '#app/domain/site/tolerance.ts'

/**
 * Share by which an irradiance changes at the most per metre of its place; more only within about half a metre of an
 * element, where E ∝ 1/h².
 */
const steepest = 4

/** Tolerance of a seat's figure from the sizes that place the seat, W/m²; null when it cannot be told. */
export const toleranceOfSeat = (check: LayoutCheck, seat: Seat, figure: SeatFigure): number | null =>
  seatTolerance(check, seat, figure, 'seat', fluxTolerances(check.house.rules))?.total ?? null

/** Whether the sizes that place the seat could bring a figure to the limit: else its tolerance need not be found. */
export function mayReach(
  { site, house }: LayoutCheck,
  seat: Seat,
  figure: SeatFigure,
  value: number,
  limit: number,
): boolean {
  const shifts = shiftsOf(
    site,
    { of: 'seat', id: seat.id },
    ['x', 'y', ...heightsOf(figure)],
    house.rules.toleranceUnstated,
  )
  const most = steepest * Math.hypot(...shifts.flatMap(({ by }) => by))
  return Math.abs(limit - value) <= most * Math.max(limit, value)
}
