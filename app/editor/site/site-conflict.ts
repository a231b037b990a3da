import type { Dimension, Member, Seat, Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'

/** Something that two people left different: what each says of it in words. */
export interface SiteDifference {
  readonly key: string
  readonly label: string
  readonly mine: string
  readonly theirs: string
}

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b)

/** Everything that differs between two copies of a site, thing by thing. */
export function siteDifferences(mine: Site, theirs: Site): SiteDifference[] {
  const length = (metres: number) => formatLength(metres, mine.displayUnits)
  const seatWords = (seat: Seat) => `${length(seat.x)}, ${length(seat.y)}, facing ${seat.facingDeg}°, ${seat.priority}`
  const memberWords = ({ from, to }: Member) =>
    `${length(from[0])}, ${length(from[1])} to ${length(to[0])}, ${length(to[1])}`
  const sizeWords = ({ value, tolerance, source }: Dimension) => `${length(value)} ± ${length(tolerance)}, ${source}`
  const rest = same(withoutThings(mine), withoutThings(theirs))
    ? []
    : [{ key: 'rest', label: 'The rest of the site', mine: 'what stands here', theirs: 'what was saved there' }]
  return [
    ...differing('seat', (seat) => `Seat ${seat.id}`, mine.seats, theirs.seats, seatWords),
    ...differing('member', (member) => member.name, mine.members, theirs.members, memberWords),
    ...differing('size', (size) => size.label, mine.dimensions, theirs.dimensions, sizeWords),
    ...rest,
  ]
}

function withoutThings(site: Site): Site {
  return { ...site, seats: [], members: [], dimensions: [] }
}

function differing<T extends { readonly id: string }>(
  kind: string,
  label: (thing: T) => string,
  mine: readonly T[],
  theirs: readonly T[],
  words: (thing: T) => string,
): SiteDifference[] {
  const ids = new Set([...mine, ...theirs].map(({ id }) => id))
  return [...ids].flatMap((id) => {
    const left = mine.find((thing) => thing.id === id)
    const right = theirs.find((thing) => thing.id === id)
    const named = left ?? right
    if (!named || same(left, right)) return []
    const told = (thing: T | undefined) => (thing ? words(thing) : 'no such thing')
    return [{ key: `${kind} ${id}`, label: label(named), mine: told(left), theirs: told(right) }]
  })
}

/** Both copies as one: theirs for the named differences, mine for all others. */
export function mergedSite(mine: Site, theirs: Site, taken: ReadonlySet<string>): Site {
  const chosen = <T extends { readonly id: string }>(kind: string, own: readonly T[], other: readonly T[]): T[] => {
    const ids = new Set([...own, ...other].map(({ id }) => id))
    return [...ids].flatMap((id) => {
      const side = taken.has(`${kind} ${id}`) ? other : own
      return side.find((thing) => thing.id === id) ?? []
    })
  }
  return {
    ...(taken.has('rest') ? theirs : mine),
    seats: chosen('seat', mine.seats, theirs.seats),
    members: chosen('member', mine.members, theirs.members),
    dimensions: chosen('size', mine.dimensions, theirs.dimensions),
  }
}
