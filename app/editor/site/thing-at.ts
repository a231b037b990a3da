import { coverOutline } from '#app/domain/site/cover.ts'
import { areaOf, distanceToOutline, isInside, nearestOnSegment } from '#app/domain/site/geometry.ts'
import type { Shape, Site, Table } from '#app/domain/site/site.ts'
import { radians, type Vec2 } from '#app/domain/vector.ts'
import { chosenThing, type Chosen } from '#app/editor/site/choice.ts'

/** Something under a pointer: what it is, how far away, m, and how large it is in plan, m². */
interface Found {
  readonly what: Chosen
  readonly distance: number
  readonly area: number
}

/** Radius within which a seat is meant, m. */
const seatRadius = 0.22

/**
 * What a pointer at a place means, `reach` m around it: a seat or pole before a smaller obstacle or table, before a
 * member or wall, before the edge of a cover or level. Null on bare floor.
 */
export function thingAt(site: Site, [x, y]: Vec2, reach: number): Chosen | null {
  const orders: (() => Found[])[] = [
    () => [
      ...site.seats.map((seat) => ({
        what: chosenThing('seat', seat.id),
        distance: Math.max(0, Math.hypot(seat.x - x, seat.y - y) - seatRadius),
        area: 0,
      })),
      ...site.poles.map((pole) => ({
        what: chosenThing('pole', pole.id),
        distance: Math.max(0, Math.hypot(pole.at[0] - x, pole.at[1] - y) - pole.diameter / 2),
        area: 0,
      })),
    ],
    () => [
      ...site.obstacles.map(({ id, shape }) => ({ what: chosenThing('obstacle', id), ...bodyOf(shape, x, y) })),
      ...site.tables.map((table) => ({ what: chosenThing('table', table.id), ...outlined(tableOutline(table), x, y) })),
    ],
    () => [
      ...site.members.map(({ id, from, to, width }) => ({
        what: chosenThing('member', id),
        distance: Math.max(0, nearestOnSegment(from, to, x, y).distance - width / 2),
        area: 0,
      })),
      ...site.walls.map(({ id, from, to }) => ({
        what: chosenThing('wall', id),
        distance: nearestOnSegment(from, to, x, y).distance,
        area: 0,
      })),
    ],
    () => [
      ...site.levels.map(({ id, outline }) => edgeOf(chosenThing('level', id), outline, x, y)),
      ...site.covers.map((cover) => edgeOf(chosenThing('cover', cover.id), coverOutline(cover), x, y)),
    ],
  ]
  for (const order of orders) {
    const near = order().filter(({ distance }) => distance <= reach)
    const [first] = near.toSorted((a, b) => a.distance - b.distance || a.area - b.area)
    if (first) return first.what
  }
  return null
}

const outlined = (outline: readonly Vec2[], x: number, y: number) => ({
  distance: isInside(outline, x, y) ? 0 : distanceToOutline(outline, x, y),
  area: Math.abs(areaOf(outline)),
})

const edgeOf = (what: Chosen, outline: readonly Vec2[], x: number, y: number): Found => ({
  what,
  distance: distanceToOutline(outline, x, y),
  area: 0,
})

function bodyOf(shape: Shape, x: number, y: number) {
  switch (shape.kind) {
    case 'box': {
      const [[x0, x1], [y0, y1]] = [shape.x, shape.y]
      return outlined([[x0, y0], [x1, y0], [x1, y1], [x0, y1]], x, y) // prettier-ignore
    }
    case 'cylinder':
      return {
        distance: Math.max(0, Math.hypot(shape.centre[0] - x, shape.centre[1] - y) - shape.radius),
        area: Math.PI * shape.radius ** 2,
      }
    case 'prism':
      return outlined(shape.outline, x, y)
  }
}

/** Corners of a table in plan; a round one as the square around it. */
export function tableOutline({ centre, size, turnDeg }: Table): Vec2[] {
  const [cos, sin] = [Math.cos(radians(turnDeg)), Math.sin(radians(turnDeg))]
  const [a, b] = [size[0] / 2, size[1] / 2]
  const corner = (u: number, v: number): Vec2 => [centre[0] + u * cos - v * sin, centre[1] + u * sin + v * cos]
  return [corner(-a, -b), corner(a, -b), corner(a, b), corner(-a, b)]
}
