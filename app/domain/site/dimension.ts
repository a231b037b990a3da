import { listOf } from '#app/domain/site/edits.ts'
import type { Dimension, Site } from '#app/domain/site/site.ts'

/** A thing of the site by kind and id; the floor's id is of no account. */
export interface ThingOf {
  readonly of: Dimension['moves'][number]['of']
  readonly id: string
}

/** One coordinate of a thing, by its dotted path. */
export type Coordinate = ThingOf & { readonly coordinate: string }

/** A thing of the site, the floor as its outline; undefined when it is not there. */
export const findThing = (site: Site, { of, id }: ThingOf): object | undefined =>
  of === 'floor' ? site.floor : site[listOf[of]].find((thing) => thing.id === id)

/** The value of one coordinate, m; null when the coordinate is not there. */
export function numberAt(site: Site, coordinate: Coordinate): number | null {
  let inside: unknown = findThing(site, coordinate)
  for (const key of coordinate.coordinate.split('.')) inside = within(inside, key)
  return typeof inside === 'number' ? inside : null
}

const within = (inside: unknown, key: string): unknown =>
  typeof inside === 'object' && inside !== null && Object.hasOwn(inside, key) ? Reflect.get(inside, key) : undefined

/** The site with a dimension longer by `delta`, m: every coordinate that it decides moves along. */
export function moveDimension(site: Site, dimension: Dimension, delta: number): Site {
  let moved = site
  for (const move of dimension.moves) moved = moveCoordinate(moved, move, move.by * delta)
  return moved
}

/** The site with one coordinate changed by `delta`, m; unchanged when the coordinate is not there. */
export function moveCoordinate(site: Site, { of, id, coordinate }: Coordinate, delta: number): Site {
  const path = coordinate.split('.')
  const edit = <T extends { id: string }>(things: readonly T[]): T[] =>
    things.map((thing) => (thing.id === id ? withNumberMoved(thing, path, delta) : thing))
  switch (of) {
    case 'floor':
      return { ...site, floor: withNumberMoved(site.floor, path, delta) }
    case 'cover':
      return { ...site, covers: edit(site.covers) }
    case 'member':
      return { ...site, members: edit(site.members) }
    case 'wall':
      return { ...site, walls: edit(site.walls) }
    case 'pole':
      return { ...site, poles: edit(site.poles) }
    case 'obstacle':
      return { ...site, obstacles: edit(site.obstacles) }
    case 'table':
      return { ...site, tables: edit(site.tables) }
    case 'seat':
      return { ...site, seats: edit(site.seats) }
  }
}

function withNumberMoved<T>(thing: T, path: readonly string[], delta: number): T {
  const copy = structuredClone(thing)
  moveNumber(copy, path, delta)
  return copy
}

function moveNumber(inside: unknown, [key, ...rest]: readonly string[], delta: number): void {
  if (typeof inside !== 'object' || inside === null || key === undefined) return
  const value = within(inside, key)
  if (rest.length > 0) moveNumber(value, rest, delta)
  else if (typeof value === 'number') Reflect.set(inside, key, value + delta)
}
