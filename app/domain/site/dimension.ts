import { z } from 'zod'
import { houseRules } from '#app/domain/rules/house-rules.ts'
import {
  coverSchema,
  memberSchema,
  obstacleSchema,
  poleSchema,
  seatSchema,
  tableSchema,
  wallSchema,
  type Dimension,
  type Site,
} from '#app/domain/site/site.ts'

/** A thing of the site by kind and id; the floor's id is of no account. */
export interface ThingOf {
  readonly of: Dimension['moves'][number]['of']
  readonly id: string
}

type Coordinate = ThingOf & { readonly coordinate: string }

/** The site with a dimension longer by `delta`, m: every coordinate that it decides moves along. */
export function moveDimension(site: Site, dimension: Dimension, delta: number): Site {
  let moved = site
  for (const move of dimension.moves) moved = moveCoordinate(moved, move, move.by * delta)
  return moved
}

/** The site with one coordinate changed by `delta`, m; unchanged when the coordinate is not there or leaves its range. */
export function moveCoordinate(site: Site, { of, id, coordinate }: Coordinate, delta: number): Site {
  const path = coordinate.split('.')
  const edit = <T extends { id: string }>(things: readonly T[], schema: z.ZodType<T>): T[] =>
    things.map((thing) => (thing.id === id ? reparsed(thing, schema, path, delta) : thing))
  switch (of) {
    case 'floor':
      return { ...site, floor: reparsed(site.floor, floorSchema, path, delta) }
    case 'cover':
      return { ...site, covers: edit(site.covers, coverSchema) }
    case 'member':
      return { ...site, members: edit(site.members, memberSchema) }
    case 'wall':
      return { ...site, walls: edit(site.walls, wallSchema) }
    case 'pole':
      return { ...site, poles: edit(site.poles, poleSchema) }
    case 'obstacle':
      return { ...site, obstacles: edit(site.obstacles, obstacleSchema) }
    case 'table':
      return { ...site, tables: edit(site.tables, tableSchema) }
    case 'seat':
      return { ...site, seats: edit(site.seats, seatSchema) }
  }
}

const floorSchema = z.array(z.tuple([z.number(), z.number()]))

function reparsed<T>(thing: T, schema: z.ZodType<T>, path: readonly string[], delta: number): T {
  const result = schema.safeParse(withNumberMoved(thing, path, delta))
  return result.success ? result.data : thing
}

function withNumberMoved(value: unknown, [key, ...rest]: readonly string[], delta: number): unknown {
  if (key === undefined) return typeof value === 'number' ? value + delta : value
  if (Array.isArray(value))
    return value.map((item, i) => (String(i) === key ? withNumberMoved(item, rest, delta) : item))
  if (typeof value !== 'object' || value === null) return value
  return Object.fromEntries(
    Object.entries(value).map(([name, item]) => [name, name === key ? withNumberMoved(item, rest, delta) : item]),
  )
}

/** Facts of a thing that are numbers but no sizes. */
const noSizes = new Set(['allowedPointLoad', 'transmittance', 'turnDeg', 'facingDeg'])

/** Dotted paths of every size inside a thing. A swing of nothing is no size: nothing moves there. */
function sizesWithin(value: unknown, path: readonly string[]): string[] {
  const last = path.at(-1) ?? ''
  if (typeof value === 'number') return noSizes.has(last) || (last === 'swing' && value === 0) ? [] : [path.join('.')]
  if (typeof value !== 'object' || value === null) return []
  return Object.entries(value).flatMap(([key, item]) => sizesWithin(item, [...path, key]))
}

function thing(site: Site, { of, id }: ThingOf): unknown {
  const named = (things: readonly { id: string }[]) => things.find((candidate) => candidate.id === id)
  switch (of) {
    case 'floor':
      return site.floor
    case 'cover':
      return named(site.covers)
    case 'member':
      return named(site.members)
    case 'wall':
      return named(site.walls)
    case 'pole':
      return named(site.poles)
    case 'obstacle':
      return named(site.obstacles)
    case 'table':
      return named(site.tables)
    case 'seat':
      return named(site.seats)
  }
}

/** One uncertain size and both sites that it may make of a site, its value lower and higher by its tolerance. */
interface Doubt {
  readonly key: string
  /** The most that it moves a point of the thing it is about, m. */
  readonly most: number
  readonly lower: Site
  readonly higher: Site
}

const doubtsOfThing = new WeakMap<Site, Map<string, readonly Doubt[]>>()

/** The doubts that touch one thing: its dimensions, and each of its sizes that no dimension moves. Kept per site. */
function doubtsAbout(site: Site, about: ThingOf): readonly Doubt[] {
  const known = keptFor(doubtsOfThing, site)
  const key = `${about.of} ${about.id}`
  const found = known.get(key)
  if (found) return found
  const isAbout = (move: ThingOf) => move.of === about.of && (about.of === 'floor' || move.id === about.id)
  const dimensions = site.dimensions.filter(({ moves }) => moves.some(isAbout))
  const moved = new Set(dimensions.flatMap(({ moves }) => moves.filter(isAbout).map(({ coordinate }) => coordinate)))
  const bare = sizesWithin(thing(site, about), []).filter((coordinate) => !moved.has(coordinate))
  const doubts = [
    ...dimensions.map((dimension) => {
      const lever = Math.hypot(...dimension.moves.filter(isAbout).map(({ by }) => by))
      return { ...dimensionDoubt(site, dimension), most: lever * dimension.tolerance }
    }),
    ...bare.map((coordinate) => coordinateDoubt(site, { ...about, coordinate })),
  ]
  known.set(key, doubts)
  return doubts
}

const sitesOfDimension = new WeakMap<Site, Map<Dimension, Omit<Doubt, 'most'>>>()

function dimensionDoubt(site: Site, dimension: Dimension): Omit<Doubt, 'most'> {
  const known = keptFor(sitesOfDimension, site)
  const doubt = known.get(dimension) ?? {
    key: `dimension ${dimension.id}`,
    lower: moveDimension(site, dimension, -dimension.tolerance),
    higher: moveDimension(site, dimension, dimension.tolerance),
  }
  known.set(dimension, doubt)
  return doubt
}

function coordinateDoubt(site: Site, coordinate: Coordinate): Doubt {
  const tolerance = houseRules.tolerance.value
  return {
    key: `${coordinate.of} ${coordinate.id} ${coordinate.coordinate}`,
    most: tolerance,
    lower: moveCoordinate(site, coordinate, -tolerance),
    higher: moveCoordinate(site, coordinate, tolerance),
  }
}

function keptFor<K, V>(kept: WeakMap<Site, Map<K, V>>, site: Site): Map<K, V> {
  const known = kept.get(site) ?? new Map<K, V>()
  kept.set(site, known)
  return known
}

/** Every thing of a site that has sizes. */
export function thingsOf(site: Site): ThingOf[] {
  const named = (of: ThingOf['of'], things: readonly { id: string }[]) => things.map(({ id }): ThingOf => ({ of, id }))
  return [
    { of: 'floor', id: '' },
    ...named('cover', site.covers),
    ...named('member', site.members),
    ...named('wall', site.walls),
    ...named('pole', site.poles),
    ...named('obstacle', site.obstacles),
    ...named('table', site.tables),
    ...named('seat', site.seats),
  ]
}

/**
 * Combined tolerance of a figure: the root of the sum of squares of its change for each uncertain size moved by its
 * tolerance (the larger change of the two ways). Sizes are the site's dimensions and, at ± 25 mm, each coordinate that
 * no dimension moves; placed heights have none. `things` names what the figure rests on: without it every thing of
 * the site is moved, which takes long on a large one. A way in which the figure is null does not count; null when it is
 * null on the site as it is.
 */
export function toleranceOf(
  figure: (site: Site) => number | null,
  site: Site,
  things: readonly ThingOf[] = thingsOf(site),
): number | null {
  const nominal = figure(site)
  if (nominal === null) return null
  const counted = new Set<string>()
  let squares = 0
  for (const about of things) {
    for (const doubt of doubtsAbout(site, about)) {
      if (counted.has(doubt.key)) continue
      counted.add(doubt.key)
      const lower = figure(doubt.lower) ?? nominal
      const higher = figure(doubt.higher) ?? nominal
      squares += Math.max(Math.abs(lower - nominal), Math.abs(higher - nominal)) ** 2
    }
  }
  return Math.sqrt(squares)
}

/** The most that any figure of unit slope on a thing's points could change: a bound of `toleranceOf`, m. */
export function largestTolerance(site: Site, about: ThingOf): number {
  return Math.hypot(...doubtsAbout(site, about).map(({ most }) => most))
}
