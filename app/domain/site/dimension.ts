import { z } from 'zod'
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

/** One coordinate of a thing, by its dotted path. */
export type Coordinate = ThingOf & { readonly coordinate: string }

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
