import type { Dimension, Member, Seat, Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** Lengths are kept to 0.1 mm. */
const rounded = (metres: number): number => Math.round(metres * 1e4) / 1e4

const shifted = ([x, y]: Vec2, dx: number, dy: number): [number, number] => [rounded(x + dx), rounded(y + dy)]

/** Every id of the site, whatever it names. */
function idsOf(site: Site): Set<string> {
  const named = [site.covers, site.members, site.walls, site.poles, site.obstacles, site.tables, site.seats]
  return new Set([...named.flatMap((things) => things.map(({ id }) => id)), ...site.dimensions.map(({ id }) => id)])
}

/** An id that nothing on the site has: the stem with the lowest free number. */
export function unusedId(site: Site, stem: string): string {
  const taken = idsOf(site)
  let number = 1
  while (taken.has(`${stem}-${number}`)) number++
  return `${stem}-${number}`
}

/** The site with one more seat; its id must be unused (`unusedId`). */
export const addSeat = (site: Site, seat: Seat): Site => ({ ...site, seats: [...site.seats, seat] })

/** The site with the named seats moved by (dx, dy), m. */
export const moveSeats = (site: Site, ids: readonly string[], dx: number, dy: number): Site => ({
  ...site,
  seats: site.seats.map((seat) =>
    ids.includes(seat.id) ? { ...seat, x: rounded(seat.x + dx), y: rounded(seat.y + dy) } : seat,
  ),
})

/** The site with some facts of one seat replaced: place, facing, priority, group, posture, heights. */
export const changeSeat = (site: Site, id: string, facts: Partial<Omit<Seat, 'id'>>): Site => ({
  ...site,
  seats: site.seats.map((seat) => (seat.id === id ? { ...seat, ...facts } : seat)),
})

/** The site without the named seats, and without what dimensions said about them. */
export const removeSeats = (site: Site, ids: readonly string[]): Site => ({
  ...site,
  seats: site.seats.filter((seat) => !ids.includes(seat.id)),
  dimensions: withoutMoves(site.dimensions, 'seat', ids),
})

/** The site with one more member; its id must be unused (`unusedId`). */
export const addMember = (site: Site, member: Member): Site => ({ ...site, members: [...site.members, member] })

/** The site with one member moved by (dx, dy), m; an underside that follows a cover follows it at the new place. */
export const moveMember = (site: Site, id: string, dx: number, dy: number): Site =>
  changeMember(site, id, ({ from, to }) => ({ from: shifted(from, dx, dy), to: shifted(to, dx, dy) }))

/** The site with one end of a member put at a point. */
export const moveMemberEnd = (site: Site, id: string, end: 'from' | 'to', at: Vec2): Site =>
  changeMember(site, id, () => ({ [end]: shifted(at, 0, 0) }))

/** The site with some facts of one member replaced, given or worked out from the member as it is. */
export const changeMember = (
  site: Site,
  id: string,
  facts: Partial<Omit<Member, 'id'>> | ((member: Member) => Partial<Omit<Member, 'id'>>),
): Site => ({
  ...site,
  members: site.members.map((member) =>
    member.id === id ? { ...member, ...(typeof facts === 'function' ? facts(member) : facts) } : member,
  ),
})

/** The site without one member, and without what dimensions said about it. Heaters that name it become unsupported. */
export const removeMember = (site: Site, id: string): Site => ({
  ...site,
  members: site.members.filter((member) => member.id !== id),
  dimensions: withoutMoves(site.dimensions, 'member', [id]),
})

/** Copies of a member at equal spacing: `count` of them, each (dx, dy) m from the one before, in one step. */
export function repeatMember(site: Site, id: string, dx: number, dy: number, count: number): Site {
  const original = site.members.find((member) => member.id === id)
  if (!original) return site
  let repeated = site
  for (let i = 1; i <= count; i++) {
    const copy = unusedId(repeated, 'member')
    repeated = addMember(repeated, { ...original, id: copy, name: copy.replace('-', ' ') })
    repeated = moveMember(repeated, copy, dx * i, dy * i)
  }
  return repeated
}

function withoutMoves(dimensions: Dimension[], of: 'seat' | 'member', ids: readonly string[]): Dimension[] {
  return dimensions.map((dimension) => {
    const moves = dimension.moves.filter((move) => move.of !== of || !ids.includes(move.id))
    return moves.length === dimension.moves.length ? dimension : { ...dimension, moves }
  })
}
