import { listOf, type ThingKind } from '#app/domain/site/edits.ts'
import type { Dimension, Site } from '#app/domain/site/site.ts'
import { sameData } from '#app/domain/same-data.ts'
import { formatLength } from '#app/domain/units.ts'
import { differingFacts } from '#app/editor/site/differing-facts.ts'
import { kindWords } from '#app/editor/site/chosen.ts'
import { rowsOf, type ThingRow } from '#app/editor/site/thing-words.ts'

/** Something that two people left different: what each says of it in words. */
export interface SiteDifference {
  readonly key: string
  readonly label: string
  readonly mine: string
  readonly theirs: string
  /** Changed there and not here. */
  readonly theirsAlone: boolean
}

/** The two copies, in this order, and what both were made from, if known. */
type Copies<T> = readonly [mine: T, theirs: T, base: T | null]

const kinds = ['seat', 'table', 'obstacle', 'member', 'cover', 'level', 'wall', 'pole'] as const satisfies readonly ThingKind[] // prettier-ignore

/** Facts of the site as a whole, as a person calls them. */
const wholeFacts = {
  name: 'Name of the site',
  kind: 'Kind of place',
  axes: 'Which way x and y run',
  displayUnits: 'Units',
  trace: 'Picture under the plan',
} as const satisfies Partial<Record<keyof Site, string>>
const wholeNames = ['name', 'kind', 'axes', 'displayUnits', 'trace'] as const satisfies readonly (keyof Site)[]

/** Everything that differs between two copies of a site, thing by thing; `base` is what both were made from, if known. */
export function siteDifferences(mine: Site, theirs: Site, base: Site | null = null): SiteDifference[] {
  const copies: Copies<Site> = [mine, theirs, base]
  const units = mine.displayUnits
  const ofKind = (kind: ThingKind) => {
    const rows = map(copies, (site) => rowsOf({ ...site, displayUnits: units }, kind))
    return differing(kind, map(copies, (site) => site[listOf[kind]]), rows, units) // prettier-ignore
  }
  const sizes = map(copies, ({ dimensions }) => dimensions)
  return [
    ...kinds.flatMap(ofKind),
    ...differing('size', sizes, map(sizes, (list) => sizeRows(list, units)), units), // prettier-ignore
    ...floorDifference(copies),
    ...wholeNames.flatMap((name) => wholeDifference(name, copies)),
  ]
}

const map = <T, U>([mine, theirs, base]: Copies<T>, of: (copy: T) => U): Copies<U> => [of(mine), of(theirs), base && of(base)] // prettier-ignore

const sizeRows = (sizes: readonly Dimension[], units: Site['displayUnits']): ThingRow[] =>
  sizes.map(({ id, label, value, tolerance, source }) => ({
    id,
    name: label,
    words: `${formatLength(value, units)} ± ${formatLength(tolerance, units)}, ${source}`,
  }))

/** Things of one kind that differ: what each copy has otherwise, or the whole of it where the other has none. */
function differing(
  kind: ThingKind | 'size',
  [mine, theirs, base]: Copies<readonly { readonly id: string }[]>,
  [ownRows, otherRows]: Copies<readonly ThingRow[]>,
  units: Site['displayUnits'],
): SiteDifference[] {
  const called = <T extends { readonly id: string }>(list: readonly T[] | null, id: string) =>
    list?.find((thing) => thing.id === id)
  return [...new Set([...mine, ...theirs].map(({ id }) => id))].flatMap((id) => {
    const [own, other, was] = [called(mine, id), called(theirs, id), called(base, id)]
    if (sameData(own, other)) return []
    const row = called(ownRows, id) ?? called(otherRows, id)
    const told = (one: object | undefined, two: object | undefined, rows: readonly ThingRow[]) =>
      one && two ? differingFacts(one, two, units) : one ? (called(rows, id)?.words ?? '') : was ? 'it removed' : 'none'
    return [
      {
        key: `${kind} ${id}`,
        label: labelOf(kind, row?.name ?? id),
        mine: told(own, other, ownRows),
        theirs: told(other, own, otherRows),
        theirsAlone: base !== null && sameData(own, was),
      },
    ]
  })
}

/** Seats and tables are known by their ids alone. */
const labelOf = (kind: ThingKind | 'size', name: string): string =>
  kind === 'seat' || kind === 'table' ? `${kindWords[kind][0]} ${name}` : name

function wholeDifference(name: (typeof wholeNames)[number], copies: Copies<Site>): SiteDifference[] {
  const [own, other, was] = map(copies, (site) => site[name])
  if (sameData(own, other)) return []
  const told = (one: typeof own, two: typeof own): string => {
    if (typeof one === 'string') return one
    if (!one) return 'none'
    return two && typeof two === 'object' ? differingFacts(one, two, copies[0].displayUnits) : 'a picture'
  }
  const texts = { mine: told(own, other), theirs: told(other, own) }
  return [{ key: `whole ${name}`, label: wholeFacts[name], ...texts, theirsAlone: copies[2] !== null && sameData(own, was) }] // prettier-ignore
}

/** The floor goes with what lies beyond its edges: both count its corners. */
function floorDifference(copies: Copies<Site>): SiteDifference[] {
  const [mine, theirs, base] = map(copies, ({ floor, beyond }) => ({ floor, beyond }))
  if (sameData(mine, theirs)) return []
  const units = copies[0].displayUnits
  const told = (own: typeof mine, other: typeof mine) =>
    [differingFacts({ floor: own.floor }, { floor: other.floor }, units), beyondWords(own, other)]
      .filter(Boolean)
      .join(', ')
  const texts = { mine: told(mine, theirs), theirs: told(theirs, mine) }
  return [{ key: 'floor', label: 'Floor', ...texts, theirsAlone: base !== null && sameData(mine, base) }]
}

function beyondWords({ beyond }: Pick<Site, 'beyond'>, other: Pick<Site, 'beyond'>): string {
  if (sameData(beyond, other.beyond)) return ''
  return beyond.map(({ edge, name }) => `${name} beyond edge ${edge + 1}`).join(', ') || 'nothing beyond it'
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
  const side = (key: string): Site => (taken.has(key) ? theirs : mine)
  const { floor, beyond } = side('floor')
  return {
    name: side('whole name').name,
    kind: side('whole kind').kind,
    axes: side('whole axes').axes,
    displayUnits: side('whole displayUnits').displayUnits,
    trace: side('whole trace').trace,
    floor,
    beyond,
    covers: chosen('cover', mine.covers, theirs.covers),
    members: chosen('member', mine.members, theirs.members),
    walls: chosen('wall', mine.walls, theirs.walls),
    poles: chosen('pole', mine.poles, theirs.poles),
    obstacles: chosen('obstacle', mine.obstacles, theirs.obstacles),
    tables: chosen('table', mine.tables, theirs.tables),
    levels: chosen('level', mine.levels, theirs.levels),
    seats: chosen('seat', mine.seats, theirs.seats),
    dimensions: withFloorOf(side('floor'), chosen('size', mine.dimensions, theirs.dimensions)),
  }
}

/** Sizes whose corners of the floor are counted as on the floor that was taken. */
function withFloorOf(site: Site, dimensions: Dimension[]): Dimension[] {
  const corners = (dimension: Dimension) => dimension.moves.filter(({ of }) => of === 'floor')
  return dimensions.map((dimension) => {
    const same = site.dimensions.find(({ id }) => id === dimension.id)
    if (!same || sameData(corners(same), corners(dimension))) return dimension
    return { ...dimension, moves: [...corners(same), ...dimension.moves.filter(({ of }) => of !== 'floor')] }
  })
}
