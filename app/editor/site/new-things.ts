import { addThing, unusedId, type ThingKind } from '#app/domain/site/edits.ts'
import { facingTowards, usualHeights } from '#app/domain/site/seating.ts'
import type { Member, Obstacle, Seat, Site, Table } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { extentOf } from '#app/drawing/plan/plan-view.ts'
import { newObstacle } from '#app/editor/site/new-obstacle.ts'

const rounded = (metres: number): number => Math.round(metres * 100) / 100
const place = ([x, y]: Vec2): [number, number] => [rounded(x), rounded(y)]

/** What can be added: a thing of a kind; an obstacle says which. */
export type NewThing = Exclude<ThingKind, 'obstacle'> | Obstacle['kind']

const isObstacle = (what: NewThing): what is Obstacle['kind'] =>
  !['cover', 'member', 'wall', 'pole', 'table', 'level', 'seat'].includes(what)

/** The kind that something new is of. */
export const kindOfNew = (what: NewThing): ThingKind => (isObstacle(what) ? 'obstacle' : what)

/** The middle of the floor's extent, m. */
export function middleOf(site: Site): Vec2 {
  const { x, y } = extentOf(site.floor)
  return [rounded((x[0] + x[1]) / 2), rounded((y[0] + y[1]) / 2)]
}

/** A thing's name from its id: "cover 2". */
const nameFrom = (id: string): string => id.replace('-', ' ')

const unknownStuff = { material: 'unknown', loadStatus: 'not known' } as const

/** The site with a new thing at a place, of sizes to start from, and its id. */
export function withThingAt(site: Site, what: NewThing, at: Vec2): { site: Site; id: string } {
  // A table's name stands on the plan and begins the names of its seats: T1, T1-1.
  const id = what === 'table' ? unusedId(site, 'T', '') : unusedId(site, what)
  const name = nameFrom(id)
  if (isObstacle(what)) return { site: addThing(site, 'obstacle', newObstacle(site, what, id, at)), id }
  switch (what) {
    case 'seat':
      return { site: addThing(site, 'seat', newSeat(site, id, at)), id }
    case 'member':
      return { site: addThing(site, 'member', newMember(site, id, at)), id }
    case 'cover':
      return { site: addThing(site, 'cover', newCover(site, id, at)), id }
    case 'wall': {
      const [from, to] = freeEdge(site)
      return { site: addThing(site, 'wall', { ...unknownStuff, id, name, from, to, top: null }), id }
    }
    case 'pole':
      return {
        site: addThing(site, 'pole', { ...unknownStuff, id, name, at: place(at), top: 2.4, diameter: 0.1 }),
        id,
      }
    case 'table': {
      const centre = place(at)
      const table: Table = { id, centre, size: [0.8, 0.8], turnDeg: 0, height: 0.74, material: 'unknown' }
      return { site: addThing(site, 'table', table), id }
    }
    case 'level': {
      const [x, y] = place(at)
      const outline = [[-1, -1], [1, -1], [1, 1], [-1, 1]].map(([dx = 0, dy = 0]) => place([x + dx, y + dy])) // prettier-ignore
      return { site: addThing(site, 'level', { id, name, outline, height: 0.15 }), id }
    }
  }
}

/** The direction from a place to the nearest table within 1.5 m; along y when there is none. */
function facingFrom(site: Site, at: Vec2): number {
  const near = site.tables
    .map(({ centre }) => ({ centre, away: Math.hypot(centre[0] - at[0], centre[1] - at[1]) }))
    .toSorted((a, b) => a.away - b.away)[0]
  return !near || near.away > 1.5 ? 90 : Math.round(facingTowards(at, near.centre))
}

/** Group, priority and heights are those of the last seat. */
function newSeat(site: Site, id: string, at: Vec2): Seat {
  const last = site.seats.at(-1)
  return {
    id,
    group: last?.group ?? '',
    priority: last?.priority ?? 'primary',
    posture: last?.posture ?? 'seated',
    bodyHeight: last?.bodyHeight ?? usualHeights.seated.bodyHeight,
    headHeight: last?.headHeight ?? usualHeights.seated.headHeight,
    x: rounded(at[0]),
    y: rounded(at[1]),
    facingDeg: facingFrom(site, at),
  }
}

const firstUnderside = 2.6

/** Across the floor, under the first cover when there is one; section and material are those of the last member. */
function newMember(site: Site, id: string, [x]: Vec2): Member {
  const { y } = extentOf(site.floor)
  const last = site.members.at(-1)
  const [cover] = site.covers
  return {
    id,
    name: nameFrom(id),
    kind: last?.kind ?? 'beam',
    from: [rounded(x), y[0]],
    to: [rounded(x), y[1]],
    underside: cover ? { follows: cover.id } : { from: firstUnderside, to: firstUnderside },
    width: last?.width ?? 0.06,
    depth: last?.depth ?? 0.12,
    material: last?.material ?? 'unknown',
    allowedPointLoad: last?.allowedPointLoad ?? null,
    loadStatus: last?.loadStatus ?? 'not known',
  }
}

/** The first cover lies over the whole floor, another one over 2 × 2 m at its place. */
function newCover(site: Site, id: string, at: Vec2): Site['covers'][number] {
  const whole = extentOf(site.floor)
  const around = { x: [at[0] - 1, at[0] + 1] as const, y: [at[1] - 1, at[1] + 1] as const }
  const { x, y } = site.covers.length === 0 ? whole : around
  const corner = (cx: number, cy: number): [number, number, number] => [rounded(cx), rounded(cy), firstUnderside]
  return {
    id,
    name: nameFrom(id),
    corners: [corner(x[0], y[0]), corner(x[1], y[0]), corner(x[1], y[1]), corner(x[0], y[1])],
    material: 'unknown',
    opening: false,
    swing: 0,
    voidDepth: null,
    note: null,
  }
}

/** The first edge of the floor that no wall stands on; the first of all when every one has a wall. */
function freeEdge(site: Site): [[number, number], [number, number]] {
  const edges = site.floor.map((from, i): [[number, number], [number, number]] => {
    return [from, site.floor[(i + 1) % site.floor.length] ?? from]
  })
  const free = edges.find(
    ([from, to]) => !site.walls.some((wall) => wall.from.join() === from.join() && wall.to.join() === to.join()),
  )
  return free ?? edges[0] ?? [[0, 0], [1, 0]] // prettier-ignore
}
