import type { SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { SeatSign } from '#app/drawing/plan/seat.tsx'

const whole = (value: number): string => String(Math.round(value)).replace('-', '−')

/** What each seat's disc says: its irradiance on the body plane or at the head, or how much more it is than in `less`. */
export function seatSigns(
  warmth: readonly SeatWarmth[] | null,
  head: boolean,
  less: readonly SeatWarmth[] | null,
): ReadonlyMap<string, SeatSign> {
  const valueOf = (each: SeatWarmth | undefined) => (each ? (head ? each.head : each.body) : null)
  return new Map(
    (warmth ?? []).map((each): [string, SeatSign] => {
      const value = valueOf(each)
      const other = less && valueOf(less.find(({ seat }) => seat.id === each.seat.id))
      const text = value === null ? '–' : other === null ? whole(value) : signed(value - other)
      return [each.seat.id, { kind: 'figure', text, outcome: each.target }]
    }),
  )
}

function signed(difference: number): string {
  const text = whole(difference)
  return Math.round(difference) > 0 ? `+${text}` : text
}
