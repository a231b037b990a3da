import {
  movedCover,
  movedLevel,
  movedMember,
  movedObstacle,
  movedPole,
  movedSeat,
  movedTable,
  movedWall,
} from '#app/domain/site/moved-things.ts'
import { undersideAt } from '#app/domain/site/member.ts'
import type { Dimension, Member, Seat, Site } from '#app/domain/site/site.ts'
import { roundLength } from '#app/domain/units.ts'

/** What a site is made of, beside its floor and its sizes. */
export interface SiteThings {
  readonly cover: Site['covers'][number]
  readonly member: Site['members'][number]
  readonly wall: Site['walls'][number]
  readonly pole: Site['poles'][number]
  readonly obstacle: Site['obstacles'][number]
  readonly table: Site['tables'][number]
  readonly level: Site['levels'][number]
  readonly seat: Site['seats'][number]
}
export type ThingKind = keyof SiteThings

/** Where a site keeps the things of each kind. */
export const listOf = {
  cover: 'covers',
  member: 'members',
  wall: 'walls',
  pole: 'poles',
  obstacle: 'obstacles',
  table: 'tables',
  level: 'levels',
  seat: 'seats',
} as const satisfies Record<ThingKind, keyof Site>

/** Every id of the site, whatever it names. */
export function idsOf(site: Site): Set<string> {
  const named = Object.values(listOf).flatMap((list) => site[list].map(({ id }) => id))
  return new Set([...named, ...site.dimensions.map(({ id }) => id)])
}

/** An id that nothing on the site has: the stem and the lowest free number, with what stands between them. */
export function unusedId(site: Site, stem: string, between = '-'): string {
  const taken = idsOf(site)
  let number = 1
  while (taken.has(`${stem}${between}${number}`)) number++
  return `${stem}${between}${number}`
}

/** The site with one more thing; its id must be unused (`unusedId`). */
export function addThing<K extends ThingKind>(site: Site, kind: K, thing: SiteThings[K]): Site {
  return { ...site, [listOf[kind]]: [...site[listOf[kind]], thing] }
}

/** Some facts of a thing replaced, given or worked out from it as it is. Its id stays. */
type Facts<T> = Partial<Omit<T, 'id'>> | ((thing: T) => Partial<Omit<T, 'id'>>)

const changed = <T extends { readonly id: string }>(things: readonly T[], id: string, facts: Facts<T>): T[] =>
  things.map((thing) =>
    thing.id === id ? { ...thing, ...(typeof facts === 'function' ? facts(thing) : facts) } : thing,
  )

type Change<K extends ThingKind> = (site: Site, id: string, facts: Facts<SiteThings[K]>) => Site

export const changeCover: Change<'cover'> = (site, id, facts) => ({
  ...site,
  covers: changed(site.covers, id, facts),
})
export const changeMember: Change<'member'> = (site, id, facts) => ({
  ...site,
  members: changed(site.members, id, facts),
})
export const changeWall: Change<'wall'> = (site, id, facts) => ({ ...site, walls: changed(site.walls, id, facts) })
export const changePole: Change<'pole'> = (site, id, facts) => ({ ...site, poles: changed(site.poles, id, facts) })
export const changeObstacle: Change<'obstacle'> = (site, id, facts) => ({
  ...site,
  obstacles: changed(site.obstacles, id, facts),
})
export const changeTable: Change<'table'> = (site, id, facts) => ({
  ...site,
  tables: changed(site.tables, id, facts),
})
export const changeLevel: Change<'level'> = (site, id, facts) => ({
  ...site,
  levels: changed(site.levels, id, facts),
})

/** The site with the same facts of several seats replaced: place, facing, priority, group, posture, heights. */
export function changeSeats(site: Site, ids: readonly string[], facts: Partial<Omit<Seat, 'id'>>): Site {
  const chosen = new Set(ids)
  return { ...site, seats: site.seats.map((seat) => (chosen.has(seat.id) ? { ...seat, ...facts } : seat)) }
}

/** The site with things of one kind moved by (dx, dy), m; everything else stays as it is. */
export function moveThings(site: Site, kind: ThingKind, ids: readonly string[], dx: number, dy: number): Site {
  const chosen = new Set(ids)
  const step = { dx, dy }
  const edit = <T extends { readonly id: string }>(things: readonly T[], move: (thing: T, by: typeof step) => T): T[] =>
    things.map((thing) => (chosen.has(thing.id) ? move(thing, step) : thing))
  switch (kind) {
    case 'cover':
      return { ...site, covers: edit(site.covers, movedCover) }
    case 'member':
      return { ...site, members: edit(site.members, movedMember) }
    case 'wall':
      return { ...site, walls: edit(site.walls, movedWall) }
    case 'pole':
      return { ...site, poles: edit(site.poles, movedPole) }
    case 'obstacle':
      return { ...site, obstacles: edit(site.obstacles, movedObstacle) }
    case 'table':
      return { ...site, tables: edit(site.tables, movedTable) }
    case 'level':
      return { ...site, levels: edit(site.levels, movedLevel) }
    case 'seat':
      return { ...site, seats: edit(site.seats, movedSeat) }
  }
}

/**
 * The site without the named things, and without what dimensions said about them. Members that followed a cover that
 * goes keep the heights they had. Heaters that name a removed thing become unsupported.
 */
export function removeThings(site: Site, kind: ThingKind, ids: readonly string[]): Site {
  const gone = new Set(ids)
  const kept = <T extends { readonly id: string }>(of: ThingKind, things: T[]): T[] =>
    of === kind ? things.filter(({ id }) => !gone.has(id)) : things
  const members = kind === 'cover' ? site.members.map((each) => ownHeights(site, each, gone)) : site.members
  return {
    ...site,
    covers: kept('cover', site.covers),
    members: kept('member', members),
    walls: kept('wall', site.walls),
    poles: kept('pole', site.poles),
    obstacles: kept('obstacle', site.obstacles),
    tables: kept('table', site.tables),
    levels: kept('level', site.levels),
    seats: kept('seat', site.seats),
    dimensions: kind === 'level' ? site.dimensions : withoutMoves(site.dimensions, kind, gone),
  }
}

function ownHeights(site: Site, member: Member, gone: ReadonlySet<string>): Member {
  if (!('follows' in member.underside) || !gone.has(member.underside.follows)) return member
  const [from, to] = [member.from, member.to].map(([x, y]) => undersideAt(site, member, x, y))
  if (from === null || to === null || from === undefined || to === undefined) return member
  return { ...member, underside: { from: roundLength(from), to: roundLength(to) } }
}

function withoutMoves(dimensions: Dimension[], of: Dimension['moves'][number]['of'], gone: ReadonlySet<string>) {
  return dimensions.map((dimension) => {
    const moves = dimension.moves.filter((move) => move.of !== of || !gone.has(move.id))
    return moves.length === dimension.moves.length ? dimension : { ...dimension, moves }
  })
}

/** Copies of a member at equal spacing: `count` of them, each (dx, dy) m from the one before, in one step. */
export function repeatMember(site: Site, id: string, dx: number, dy: number, count: number): Site {
  const original = site.members.find((member) => member.id === id)
  if (!original) return site
  let repeated = site
  for (let i = 1; i <= count; i++) {
    const copy = unusedId(repeated, 'member')
    const step = { dx: dx * i, dy: dy * i }
    repeated = addThing(repeated, 'member', movedMember({ ...original, id: copy, name: copy.replace('-', ' ') }, step))
  }
  return repeated
}
