import type { Dimension, Member, Seat, Site } from '#app/domain/site/site.ts'
import { sameData } from '#app/domain/same-data.ts'
import { formatLength } from '#app/domain/units.ts'

/** Something that two people left different: what each says of it in words. */
export interface SiteDifference {
  readonly key: string
  readonly label: string
  readonly mine: string
  readonly theirs: string
  /** Changed there and not here. */
  readonly theirsAlone: boolean
}

/** Everything that differs between two copies of a site, thing by thing; `base` is what both were made from, if known. */
export function siteDifferences(mine: Site, theirs: Site, base: Site | null = null): SiteDifference[] {
  const length = (metres: number) => formatLength(metres, mine.displayUnits)
  const seatWords = (seat: Seat) => `${length(seat.x)}, ${length(seat.y)}, facing ${seat.facingDeg}°, ${seat.priority}`
  const memberWords = ({ from, to }: Member) =>
    `${length(from[0])}, ${length(from[1])} to ${length(to[0])}, ${length(to[1])}`
  const sizeWords = ({ value, tolerance, source }: Dimension) => `${length(value)} ± ${length(tolerance)}, ${source}`
  const rest = sameData(withoutThings(mine), withoutThings(theirs))
    ? []
    : [
        {
          key: 'rest',
          label: 'The rest of the site',
          mine: 'what stands here',
          theirs: 'what was saved there',
          theirsAlone: base !== null && sameData(withoutThings(mine), withoutThings(base)),
        },
      ]
  return [
    ...differing('seat', (seat) => `Seat ${seat.id}`, [mine.seats, theirs.seats, base?.seats], seatWords),
    ...differing('member', (member) => member.name, [mine.members, theirs.members, base?.members], memberWords),
    ...differing('size', (size) => size.label, [mine.dimensions, theirs.dimensions, base?.dimensions], sizeWords),
    ...rest,
  ]
}

function withoutThings(site: Site): Site {
  return { ...site, seats: [], members: [], dimensions: [] }
}

function differing<T extends { readonly id: string }>(
  kind: string,
  label: (thing: T) => string,
  [mine, theirs, base]: readonly [readonly T[], readonly T[], readonly T[] | undefined],
  words: (thing: T) => string,
): SiteDifference[] {
  const ids = new Set([...mine, ...theirs].map(({ id }) => id))
  return [...ids].flatMap((id) => {
    const left = mine.find((thing) => thing.id === id)
    const right = theirs.find((thing) => thing.id === id)
    const named = left ?? right
    if (!named || sameData(left, right)) return []
    const told = (thing: T | undefined) => (thing ? words(thing) : 'none')
    const theirsAlone =
      base !== undefined &&
      sameData(
        left,
        base.find((thing) => thing.id === id),
      )
    return [{ key: `${kind} ${id}`, label: label(named), mine: told(left), theirs: told(right), theirsAlone }]
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
