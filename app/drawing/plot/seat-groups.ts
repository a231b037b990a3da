/** A seat of a plot: its group and the short number that stands under its column. */
export interface PlotSeat {
  readonly id: string
  readonly group: string
  readonly number: string
}

/** Seats of one group, next to each other. */
export interface SeatGroup {
  readonly name: string
  /** Column of its first seat and how many it has. */
  readonly from: number
  readonly count: number
  /** Whether its name starts with other letters than the group before: another row of the place. */
  readonly isNewRow: boolean
}

/** The part of a seat's id that tells it from others of its group: "R1-3" of group "R1" is "3". */
function seatNumber(id: string, group: string): string {
  const rest = id.startsWith(group) ? id.slice(group.length).replace(/^[-\s.]+/, '') : id
  return rest === '' ? id : rest
}

/** Seats in the order of a plot: group by group as they first come, each group in its own order. */
export function plotSeats(seats: readonly { readonly id: string; readonly group: string }[]): PlotSeat[] {
  const groups = [...new Set(seats.map(({ group }) => group))]
  return groups.flatMap((group) =>
    seats.filter((seat) => seat.group === group).map(({ id }) => ({ id, group, number: seatNumber(id, group) })),
  )
}

const letters = (name: string): string => name.replace(/[\d\s-]+$/, '')

/** Runs of seats of one group. */
export function groupsOf(seats: readonly PlotSeat[]): SeatGroup[] {
  const found: SeatGroup[] = []
  for (const [i, seat] of seats.entries()) {
    const last = found.at(-1)
    if (last?.name === seat.group) found[found.length - 1] = { ...last, count: last.count + 1 }
    else
      found.push({
        name: seat.group,
        from: i,
        count: 1,
        isNewRow: last ? letters(last.name) !== letters(seat.group) : false,
      })
  }
  return found
}
