import { layoutTotals, seatFigures, type LayoutTotals, type WarmthInput } from '#app/domain/comfort/seat-warmth.ts'
import type { Layout } from '#app/domain/layout/layout.ts'

/** A seat's irradiance on the body plane before and after a change, W/m²; null without a heater. */
interface ChangedSeat {
  readonly seatId: string
  readonly before: number | null
  readonly after: number | null
}

/** What a change of the layout does: the totals of both, and the seats it changes, the most changed first. */
export interface LayoutChange {
  readonly before: LayoutTotals
  readonly after: LayoutTotals
  readonly seats: readonly ChangedSeat[]
}

/** A seat that changes by less than this is not listed, W/m². */
const leastChange = 1

const changeOf = ({ before, after }: ChangedSeat): number => Math.abs((after ?? 0) - (before ?? 0))

/** What it would do to the seats to put another layout in place of this one, by the page's own functions. */
export function layoutChange(input: WarmthInput, other: Pick<Layout, 'heaters'>): LayoutChange {
  const now = seatFigures(input)
  const then = seatFigures({ ...input, layout: other })
  const later = new Map(then.map(({ seat, body }) => [seat.id, body]))
  const seats = now
    .map(({ seat, body }): ChangedSeat => ({ seatId: seat.id, before: body, after: later.get(seat.id) ?? null }))
    .filter((each) => changeOf(each) >= leastChange)
    .toSorted((a, b) => changeOf(b) - changeOf(a) || (a.seatId < b.seatId ? -1 : 1))
  const { brief, models, layout } = input
  return {
    before: layoutTotals(now, layout, models, brief),
    after: layoutTotals(then, other, models, brief),
    seats,
  }
}
