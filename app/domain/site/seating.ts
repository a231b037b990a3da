import { idsOf } from '#app/domain/site/edits.ts'
import type { Seat, Site, Table } from '#app/domain/site/site.ts'
import { roundLength } from '#app/domain/units.ts'
import { degrees, radians, type Vec2 } from '#app/domain/vector.ts'

/** Where a person sits or stands, m, and the direction of the look, degrees counter-clockwise from +x. */
export interface Place {
  readonly x: number
  readonly y: number
  readonly facingDeg: number
}

/** What all seats of a group share. */
export type SeatFacts = Pick<Seat, 'group' | 'priority' | 'posture' | 'bodyHeight' | 'headHeight'>

/** Usual heights above the floor, m: seated and standing body and head (ISO 7726, from memory). */
export const usualHeights = {
  seated: { bodyHeight: 0.6, headHeight: 1.1 },
  standing: { bodyHeight: 1.1, headHeight: 1.7 },
} as const

/** From the edge of a table to the middle of a person at it, m (common practice, no source). */
export const usualSetback = 0.25

/** Along the edge of a table, for each person, m (common practice, no source). */
const usualWidth = 0.6

/** How many people sit along an edge of so many m: at least one. */
export const seatsAlong = (edge: number): number => Math.max(1, Math.floor(edge / usualWidth + 1e-9))

const turned = ([x, y]: Vec2, turnDeg: number): Vec2 => {
  const turn = radians(turnDeg)
  return [x * Math.cos(turn) - y * Math.sin(turn), x * Math.sin(turn) + y * Math.cos(turn)]
}

const roundTurn = (facingDeg: number): number => {
  const within = ((((Math.round(facingDeg * 10) / 10) % 360) + 540) % 360) - 180
  return within === -180 ? 180 : within || 0
}

type TablePlace = Pick<Table, 'centre' | 'size' | 'turnDeg'>

/** A place in the table's own frame, from its middle, as a place of the site. */
function placed({ centre, turnDeg }: TablePlace, at: Vec2, facingDeg: number): Place {
  const [x, y] = turned(at, turnDeg)
  return { x: roundLength(centre[0] + x), y: roundLength(centre[1] + y), facingDeg: roundTurn(facingDeg + turnDeg) }
}

/** Middles of `count` equal parts of a length about 0. */
const shares = (length: number, count: number): number[] =>
  Array.from({ length: count }, (_, i) => ((i + 0.5) / count - 0.5) * length)

/** How many sit at each of a table's four sides: below and above along its first size, left and right along the second. */
export interface Sides {
  readonly below: number
  readonly above: number
  readonly left: number
  readonly right: number
}

/**
 * Seats at the sides of a rectangular table, each side shared equally, `setback` m from the edge, looking at it. Benches
 * have people below and above only; a bar on one side only.
 */
export function seatsAtSides(table: TablePlace, { below, above, left, right }: Sides, setback: number): Place[] {
  const [along, deep] = table.size
  const [out, aside] = [deep / 2 + setback, along / 2 + setback]
  return [
    ...shares(along, below).map((x) => placed(table, [x, -out], 90)),
    ...shares(along, above).map((x) => placed(table, [x, out], -90)),
    ...shares(deep, left).map((y) => placed(table, [-aside, y], 0)),
    ...shares(deep, right).map((y) => placed(table, [aside, y], 180)),
  ]
}

/** Seats around a round table at equal angles, the first at the table's turn, `setback` m from the edge, looking at its middle. */
export function seatsAround(table: TablePlace, count: number, setback: number): Place[] {
  const out = table.size[0] / 2 + setback
  return Array.from({ length: count }, (_, i) => {
    const at = (360 * i) / count
    return placed(table, turned([out, 0], at), at + 180)
  })
}

/** Rows of seats: `from` is the first place; along a row each is `spacing` m further in the direction `turnDeg`. */
export interface Rows {
  readonly from: Vec2
  readonly turnDeg: number
  readonly perRow: number
  readonly spacing: number
  readonly rows: number
  /** From one row to the next, to the left of the direction, m. */
  readonly rowSpacing: number
  readonly facingDeg: number
}

/** Seats in rows, row by row. */
export const seatsInRows = (asked: Rows): Place[] =>
  Array.from({ length: asked.rows * asked.perRow }, (_, i) => {
    const [k, row] = [i % asked.perRow, Math.floor(i / asked.perRow)]
    const [x, y] = turned([k * asked.spacing, row * asked.rowSpacing], asked.turnDeg)
    return {
      x: roundLength(asked.from[0] + x),
      y: roundLength(asked.from[1] + y),
      facingDeg: roundTurn(asked.facingDeg),
    }
  })

/** The direction from a place towards a point, degrees; 90 when it is the point itself. */
export const facingTowards = (from: Vec2, to: Vec2): number =>
  from[0] === to[0] && from[1] === to[1] ? 90 : roundTurn(degrees(Math.atan2(to[1] - from[1], to[0] - from[0])))

/** From a place to the nearest edge of a table, m; 0 on the table. */
function edgeDistance({ centre, size, turnDeg, form }: Table, [x, y]: Vec2): number {
  const at = turned([x - centre[0], y - centre[1]], -turnDeg)
  if (form === 'round') return Math.max(0, Math.hypot(...at) - size[0] / 2)
  return Math.hypot(Math.max(0, Math.abs(at[0]) - size[0] / 2), Math.max(0, Math.abs(at[1]) - size[1] / 2))
}

/** Farther than this from a table nobody sits at it, m (common practice, no source). */
const farthestSetback = 1.2

/** How far before a person tells at which of two tables they sit, m. */
const reach = 0.5

/** Seats of a group that are at a table: none of the site's others is nearer to what is before them. */
export const seatsAtTable = (site: Site, table: Table, group: string): Seat[] =>
  site.seats.filter((seat) => {
    const [dx, dy] = turned([reach, 0], seat.facingDeg)
    const before: Vec2 = [seat.x + dx, seat.y + dy]
    const own = edgeDistance(table, before)
    const isNear = edgeDistance(table, [seat.x, seat.y]) <= farthestSetback
    return seat.group === group && isNear && site.tables.every((other) => own <= edgeDistance(other, before))
  })

/** The site with seats at places in place of those of the same group that are at the table, and the ids they were given. */
export function setSeatsAt(
  site: Site,
  table: Table,
  places: readonly Place[],
  facts: SeatFacts,
): { site: Site; ids: string[] } {
  const before = new Set(seatsAtTable(site, table, facts.group))
  return addSeats({ ...site, seats: site.seats.filter((seat) => !before.has(seat)) }, places, facts)
}

/** The site with seats at places, numbered within their group, and the ids they were given. */
export function addSeats(site: Site, places: readonly Place[], facts: SeatFacts): { site: Site; ids: string[] } {
  const stem = facts.group === '' ? 'seat' : facts.group.slice(0, 30)
  const taken = idsOf(site)
  let number = 0
  const seats = places.map((place): Seat => {
    do number += 1
    while (taken.has(`${stem}-${number}`))
    return { id: `${stem}-${number}`, ...facts, ...place }
  })
  return { site: { ...site, seats: [...site.seats, ...seats] }, ids: seats.map(({ id }) => id) }
}
