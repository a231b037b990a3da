import { coverOutline, coverPlane, planeHeightAt } from '#app/domain/site/cover.ts'
import { axisBox, uprightCylinder, uprightPrism, type Convex, type Upright } from '#app/domain/site/convex.ts'
import type { ThingOf } from '#app/domain/site/dimension.ts'
import { areaOf, convexPieces } from '#app/domain/site/geometry.ts'
import { undersideAt } from '#app/domain/site/member.ts'
import type { Cover, Material, Member, Obstacle, Shape, Site, Table, Wall } from '#app/domain/site/site.ts'
import { radians, type Vec2 } from '#app/domain/vector.ts'

/** A thing of the site as solids that a heater may come too near to. */
export interface Solid extends ThingOf {
  readonly name: string
  readonly parts: readonly Convex[]
  readonly combustible: boolean
  /** The state in which a movable thing is there, as words: "door leaf: open"; null for a fixed thing. */
  readonly state: string | null
  /** Index of that state in the thing's list; null for a fixed thing and one without a list. */
  readonly stateIndex: number | null
  /** Furniture is judged by the front of the beam alone. */
  readonly furniture: boolean
  /** What its place rests on: itself, and the cover that a member follows. */
  readonly rests: readonly ThingOf[]
}

/** An unknown material is judged as combustible. */
export const isCombustible = (material: Material): boolean => material !== 'non-combustible'

/** A wall of no stated top runs past the cover: this high, m. */
const past = 30

const kept = new WeakMap<object, readonly Convex[]>()

function keptParts(thing: object, make: () => readonly Convex[]): readonly Convex[] {
  const known = kept.get(thing) ?? make()
  kept.set(thing, known)
  return known
}

/** Everything of the site that has a body, covers as thin plates; a member whose underside is not known is left out. */
export function solidsOf(site: Site): Solid[] {
  return [
    ...site.members.flatMap((member) => memberSolid(site, member) ?? []),
    ...site.covers.map(coverSolid),
    ...site.walls.map(wallSolid),
    ...site.poles.map((pole): Solid => {
      const parts = keptParts(pole, () => [uprightCylinder(pole.at, pole.diameter / 2, [0, pole.top])])
      return fixed({ of: 'pole', id: pole.id }, pole.name, pole.material, parts)
    }),
    ...site.obstacles.flatMap((obstacle) => obstacleSolids(obstacle, obstacleName(site, obstacle))),
    ...site.tables.map(tableSolid),
  ]
}

const found = new WeakMap<Site, Map<string, Solid | null>>()

/** The solid of one thing in one of its states; null when the site has it not. Kept per site. */
export function solidOf(site: Site, thing: ThingOf & Pick<Solid, 'stateIndex'>): Solid | null {
  const known = found.get(site) ?? new Map<string, Solid | null>()
  found.set(site, known)
  const key = `${thing.of} ${thing.id} ${thing.stateIndex ?? ''}`
  const before = known.get(key)
  if (before !== undefined) return before
  const solid = solidsOf(onlyWith(site, thing)).find(({ stateIndex }) => stateIndex === thing.stateIndex) ?? null
  known.set(key, solid)
  return solid
}

/** The site with no other solid than one; covers stay for a member to follow, behind it. */
function onlyWith(site: Site, { of, id }: ThingOf): Site {
  const only = <T extends { id: string }>(kind: ThingOf['of'], things: T[]): T[] =>
    of === kind ? things.filter((thing) => thing.id === id) : []
  return {
    ...site,
    covers: of === 'member' ? site.covers : only('cover', site.covers),
    members: only('member', site.members),
    walls: only('wall', site.walls),
    poles: only('pole', site.poles),
    obstacles: only('obstacle', site.obstacles),
    tables: only('table', site.tables),
  }
}

function fixed(thing: ThingOf, name: string, material: Material, parts: readonly Convex[]): Solid {
  const fixedThere = { state: null, stateIndex: null, furniture: false, rests: [thing] }
  return { ...thing, name, parts, combustible: isCombustible(material), ...fixedThere }
}

/** A cover counts upward from its underside by this much, m; its real thickness is above, where no heater is. */
const plate = 0.01

function coverSolid(cover: Cover): Solid {
  const parts = () => {
    const plane = coverPlane(cover)
    if (!plane) return []
    const corners = counterClockwise(coverOutline(cover)).map((at): Upright => {
      const low = planeHeightAt(plane, at[0], at[1])
      return { at, low, high: low + plate }
    })
    return [uprightPrism(corners)]
  }
  return fixed({ of: 'cover', id: cover.id }, cover.name, cover.material, keptParts(cover, parts))
}

const counterClockwise = (outline: Vec2[]): Vec2[] => (areaOf(outline) < 0 ? outline.reverse() : outline)

function memberSolid(site: Site, member: Member): Solid | null {
  const low = [member.from, member.to].map((end) => undersideAt(site, member, end[0], end[1]))
  const [from, to] = low
  if (from === null || to === null || from === undefined || to === undefined) return null
  const { follows } = 'follows' in member.underside ? member.underside : { follows: null }
  const thing: ThingOf = { of: 'member', id: member.id }
  const rests: ThingOf[] = follows === null ? [thing] : [thing, { of: 'cover', id: follows }]
  return { ...fixed(thing, member.name, member.material, [beam(member, from, to)]), rests }
}

/** The member's bar: its width across in plan, its depth up from the underside. */
function beam({ from, to, width, depth }: Member, fromZ: number, toZ: number): Convex {
  const [ax, ay] = aside(from, to, width / 2)
  const corner = ([x, y]: Vec2, side: 1 | -1, low: number): Upright => ({
    at: [x + side * ax, y + side * ay],
    low,
    high: low + depth,
  })
  return uprightPrism([corner(from, -1, fromZ), corner(to, -1, toZ), corner(to, 1, toZ), corner(from, 1, fromZ)])
}

/** A length to the left of the line from–to, as a step in plan. */
function aside(from: Vec2, to: Vec2, by: number): Vec2 {
  const length = Math.hypot(to[0] - from[0], to[1] - from[1]) || 1
  return [(-(to[1] - from[1]) / length) * by, ((to[0] - from[0]) / length) * by]
}

/** A wall counts behind its face by this much, m: its thickness is not known and no heater is inside it. */
const thickness = 0.1

function wallSolid(wall: Wall): Solid {
  const parts = () => {
    const { from, to } = wall
    const [ax, ay] = aside(from, to, -thickness)
    const corner = ([x, y]: Vec2, back: 0 | 1): Upright => ({
      at: [x + back * ax, y + back * ay],
      low: 0,
      high: wall.top ?? past,
    })
    return [uprightPrism([corner(from, 1), corner(to, 1), corner(to, 0), corner(from, 0)])]
  }
  return fixed({ of: 'wall', id: wall.id }, wall.name, wall.material, keptParts(wall, parts))
}

/** How a movable thing is said to be there. */
const there: Partial<Record<Obstacle['kind'], string>> = {
  door: 'open',
  umbrella: 'open',
  blind: 'down',
  screen: 'down',
  fan: 'turning',
}

/** The obstacle's name, with its id where several have the same name. */
export function obstacleName({ obstacles }: Site, { id, name }: Obstacle): string {
  return obstacles.some((other) => other.name === name && other.id !== id) ? `${name} (${id})` : name
}

/**
 * A fixed obstacle is one solid; a movable one a solid for each state in which it is there. One without a list of states
 * is either there, filling all that it sweeps, or away.
 */
function obstacleSolids(obstacle: Obstacle, name: string): Solid[] {
  return statesOf(obstacle, name).flatMap(({ words, shape }, i): Solid[] => {
    if (!shape) return []
    const parts = keptParts(shape, () => shapeParts(shape))
    const solid = fixed({ of: 'obstacle', id: obstacle.id }, name, obstacle.material, parts)
    const stateIndex = obstacle.movable && obstacle.states?.length ? i : null
    return [{ ...solid, state: words, stateIndex, furniture: obstacle.kind === 'furniture' }]
  })
}

/** A state of a thing: what a condition of use calls it, null for a fixed thing; and what it fills, null when away. */
interface StateOf {
  readonly words: string | null
  readonly shape: Shape | null
}

function statesOf(obstacle: Obstacle, name: string): readonly StateOf[] {
  const { movable, states, shape, kind } = obstacle
  if (!movable) return [{ words: null, shape }]
  if (states?.length) return states.map((state) => ({ words: `${name}: ${state.name}`, shape: state.shape }))
  return [
    { words: `${name}: ${there[kind] ?? 'in its place'}`, shape },
    { words: `${name}: away`, shape: null },
  ]
}

/** The states of a movable thing in the words of conditions of use; a fixed thing has none. */
export const stateWords = (site: Site, obstacle: Obstacle): readonly string[] =>
  statesOf(obstacle, obstacleName(site, obstacle)).flatMap(({ words }) => words ?? [])

/** Convex solids that make up a shape, m. */
function shapeParts(shape: Shape): Convex[] {
  switch (shape.kind) {
    case 'box':
      return [axisBox(shape.x, shape.y, shape.z)]
    case 'cylinder':
      return [uprightCylinder(shape.centre, shape.radius, shape.z)]
    case 'prism':
      return convexPieces(shape.outline).map((piece) =>
        uprightPrism(piece.map((at) => ({ at, low: shape.z[0], high: shape.z[1] }))),
      )
  }
}

/** A table counts from the floor to its top. */
function tableSolid(table: Table): Solid {
  const parts = () => {
    if (table.form === 'round') return [uprightCylinder(table.centre, table.size[0] / 2, [0, table.height])]
    const [cos, sin] = [Math.cos(radians(table.turnDeg)), Math.sin(radians(table.turnDeg))]
    const [a, b] = [table.size[0] / 2, table.size[1] / 2]
    const corner = (x: number, y: number): Upright => ({
      at: [table.centre[0] + x * cos - y * sin, table.centre[1] + x * sin + y * cos],
      low: 0,
      high: table.height,
    })
    return [uprightPrism([corner(-a, -b), corner(a, -b), corner(a, b), corner(-a, b)])]
  }
  const thing = fixed({ of: 'table', id: table.id }, `table ${table.id}`, table.material, keptParts(table, parts))
  return { ...thing, furniture: true }
}
