import { findThing, moveCoordinate, moveDimension, type Coordinate, type ThingOf } from '#app/domain/site/dimension.ts'
import { listOf } from '#app/domain/site/edits.ts'
import type { Dimension, Site } from '#app/domain/site/site.ts'

/** Facts of a thing that are numbers but no sizes. */
const noSizes = new Set(['allowedPointLoad', 'transmittance', 'turnDeg', 'facingDeg'])

const kinds = ['cover', 'member', 'wall', 'pole', 'obstacle', 'table', 'seat'] as const

/** Dotted paths of every size inside a thing. A swing of nothing is no size: nothing moves there. */
function sizesWithin(value: unknown, path: readonly string[]): string[] {
  const last = path.at(-1) ?? ''
  if (typeof value === 'number') return noSizes.has(last) || (last === 'swing' && value === 0) ? [] : [path.join('.')]
  if (typeof value !== 'object' || value === null) return []
  return Object.entries(value).flatMap(([key, item]) => sizesWithin(item, [...path, key]))
}

/** One uncertain size and both sites that it may make of a site, its value lower and higher by its tolerance. */
interface Doubt {
  readonly key: string
  /** The most that it moves a point of the thing it is about, m. */
  readonly most: number
  /** Made when first asked for: most doubts are never tried. */
  readonly sites: () => { readonly lower: Site; readonly higher: Site }
}

function once<T>(make: () => T): () => T {
  let made: { readonly value: T } | null = null
  return () => (made ??= { value: make() }).value
}

/** A dimension and those of its moves that move one thing. */
interface MovesThing {
  readonly dimension: Dimension
  readonly moves: Dimension['moves']
}

const movesByThing = new WeakMap<Site, Map<string, MovesThing[]>>()

const keyOf = ({ of, id }: ThingOf): string => (of === 'floor' ? of : `${of} ${id}`)

/** The dimensions that move a thing, found once for the whole site. */
function dimensionsOf(site: Site, about: ThingOf): readonly MovesThing[] {
  const known = movesByThing.get(site)
  if (known) return known.get(keyOf(about)) ?? []
  const index = new Map<string, MovesThing[]>()
  for (const dimension of site.dimensions) {
    for (const move of dimension.moves) {
      const listed = index.get(keyOf(move)) ?? []
      const last = listed.at(-1)
      if (last?.dimension === dimension) last.moves.push(move)
      else listed.push({ dimension, moves: [move] })
      index.set(keyOf(move), listed)
    }
  }
  movesByThing.set(site, index)
  return index.get(keyOf(about)) ?? []
}

/** One uncertain size as it shifts some coordinates of a thing, all together, m. */
interface Shift {
  /** The dimension's label; null for a coordinate that no dimension moves. */
  readonly label: string | null
  /** By how much each coordinate moves when the size is longer by its tolerance, in the order asked for. */
  readonly by: readonly number[]
}

/**
 * How uncertain sizes shift some coordinates of a thing: each dimension that moves it by its own tolerance, and each of
 * the coordinates that none moves by `bareTolerance`. Sizes that shift nothing are left out.
 */
export function shiftsOf(
  site: Site,
  about: ThingOf,
  coordinates: readonly string[],
  bareTolerance: number,
): readonly Shift[] {
  const dimensions = dimensionsOf(site, about)
  const shifts = dimensions.map(({ dimension, moves }): Shift => {
    const by = coordinates.map((coordinate) =>
      moves.filter((move) => move.coordinate === coordinate).reduce((sum, move) => sum + move.by, 0),
    )
    return { label: dimension.label, by: by.map((lever) => lever * dimension.tolerance) }
  })
  const moved = new Set(dimensions.flatMap(({ moves }) => moves.map(({ coordinate }) => coordinate)))
  const bare = coordinates.flatMap((coordinate, i): Shift[] => {
    if (moved.has(coordinate)) return []
    return [{ label: null, by: coordinates.map((_, k) => (k === i ? bareTolerance : 0)) }]
  })
  return [...shifts, ...bare].filter(({ by }) => by.some((shift) => shift !== 0))
}

/** Dotted paths of the sizes of a thing that no dimension moves. */
export function bareSizesOf(site: Site, about: ThingOf): string[] {
  const moved = new Set(dimensionsOf(site, about).flatMap(({ moves }) => moves.map(({ coordinate }) => coordinate)))
  return sizesWithin(findThing(site, about), []).filter((coordinate) => !moved.has(coordinate))
}

const doubtsOfThing = new WeakMap<Site, Map<string, readonly Doubt[]>>()

/** The doubts that touch one thing: its dimensions, and each of its sizes that no dimension moves. Kept per site. */
function doubtsAbout(site: Site, about: ThingOf, bareTolerance: number): readonly Doubt[] {
  const known = keptFor(doubtsOfThing, site)
  const key = `${keyOf(about)} ± ${bareTolerance}`
  const found = known.get(key)
  if (found) return found
  const doubts = [
    ...dimensionsOf(site, about).map(({ dimension, moves }) => {
      const lever = Math.hypot(...moves.map(({ by }) => by))
      return { ...dimensionDoubt(site, dimension), most: lever * dimension.tolerance }
    }),
    ...bareSizesOf(site, about).map((coordinate) => coordinateDoubt(site, { ...about, coordinate }, bareTolerance)),
  ]
  known.set(key, doubts)
  return doubts
}

const sitesOfDimension = new WeakMap<Site, Map<Dimension, Omit<Doubt, 'most'>>>()

function dimensionDoubt(site: Site, dimension: Dimension): Omit<Doubt, 'most'> {
  const known = keptFor(sitesOfDimension, site)
  const doubt = known.get(dimension) ?? {
    key: `dimension ${dimension.id}`,
    sites: once(() => ({
      lower: moveDimension(site, dimension, -dimension.tolerance),
      higher: moveDimension(site, dimension, dimension.tolerance),
    })),
  }
  known.set(dimension, doubt)
  return doubt
}

function coordinateDoubt(site: Site, coordinate: Coordinate, tolerance: number): Doubt {
  return {
    key: `${coordinate.of} ${coordinate.id} ${coordinate.coordinate}`,
    most: tolerance,
    sites: once(() => ({
      lower: moveCoordinate(site, coordinate, -tolerance),
      higher: moveCoordinate(site, coordinate, tolerance),
    })),
  }
}

function keptFor<K, V>(kept: WeakMap<Site, Map<K, V>>, site: Site): Map<K, V> {
  const known = kept.get(site) ?? new Map<K, V>()
  kept.set(site, known)
  return known
}

/** Every thing of a site that has sizes. */
export function thingsOf(site: Site): ThingOf[] {
  return [{ of: 'floor', id: '' }, ...kinds.flatMap((of) => site[listOf[of]].map(({ id }): ThingOf => ({ of, id })))]
}

/**
 * Combined tolerance of a figure: the root of the sum of squares of its change for each uncertain size moved by its
 * tolerance (the larger change of the two ways). Sizes are the site's dimensions and, at ± `bareTolerance`, each
 * coordinate that no dimension moves; placed heights have none. `things` names what the figure rests on: without it
 * every thing of the site is moved, which takes long on a large one. A way in which the figure is null does not count; null when it is
 * null on the site as it is.
 */
export function toleranceOf(
  figure: (site: Site) => number | null,
  site: Site,
  bareTolerance: number,
  things: readonly ThingOf[] = thingsOf(site),
): number | null {
  const nominal = figure(site)
  if (nominal === null) return null
  const counted = new Set<string>()
  let squares = 0
  for (const about of things) {
    for (const doubt of doubtsAbout(site, about, bareTolerance)) {
      if (counted.has(doubt.key)) continue
      counted.add(doubt.key)
      const sites = doubt.sites()
      const lower = figure(sites.lower) ?? nominal
      const higher = figure(sites.higher) ?? nominal
      squares += Math.max(Math.abs(lower - nominal), Math.abs(higher - nominal)) ** 2
    }
  }
  return Math.sqrt(squares)
}

/** The most that any figure of unit slope on a thing's points could change: a bound of `toleranceOf`, m. */
export function largestTolerance(site: Site, about: ThingOf, bareTolerance: number): number {
  return Math.hypot(...doubtsAbout(site, about, bareTolerance).map(({ most }) => most))
}

/** The largest ± of the heights of a site's covers, m; null without a cover. */
export function toleranceOfCovers(site: Site, bareTolerance: number): number | null {
  const each = site.covers.map(({ id }) => largestTolerance(site, { of: 'cover', id }, bareTolerance))
  return each.length > 0 ? Math.max(...each) : null
}
