import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { bodyOf } from '#app/domain/layout/body.ts'
import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import { coverHeightAt } from '#app/domain/site/cover.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { convexPieces } from '#app/domain/site/geometry.ts'
import { undersideAt } from '#app/domain/site/member.ts'
import type { Seat, Shape, Site, Table, Wall } from '#app/domain/site/site.ts'
import { radians, type Vec2, type Vec3 } from '#app/domain/vector.ts'
import { boxOf, prismOf, type DrawnSolid } from '#app/drawing/axonometric/solid.ts'
import { wallBand } from '#app/drawing/plan/wall.tsx'
import { stripOutline } from '#app/drawing/section/cut-outline.ts'
import { hangersOf } from '#app/drawing/section/section-heater.tsx'

/** What a piece is drawn as. */
type Look = 'wall' | 'solid' | 'see-through' | 'table' | 'seat' | 'heater' | 'hanger'

/** One thing of the drawing that stands in the painter's order. */
export interface Piece {
  readonly key: string
  readonly look: Look
  readonly solid: DrawnSolid
  readonly seat?: Seat
  readonly table?: Table
  readonly heater?: MountedHeater
}

/** Corners of what is round. */
const round = 16

function circle([x, y]: Vec2, radius: number, corners = round): Vec2[] {
  return Array.from({ length: corners }, (_, i): Vec2 => {
    const turn = (2 * Math.PI * i) / corners
    return [x + radius * Math.cos(turn), y + radius * Math.sin(turn)]
  })
}

function shapePrisms(shape: Shape): DrawnSolid[] {
  const [low, high] = shape.z
  if (shape.kind === 'cylinder') return [prismOf(circle(shape.centre, shape.radius), low, high)]
  if (shape.kind === 'prism') return convexPieces(shape.outline).map((piece) => prismOf(piece, low, high))
  const [[x1, x2], [y1, y2]] = [shape.x, shape.y]
  return [prismOf([[x1, y1], [x2, y1], [x2, y2], [x1, y2]], low, high)] // prettier-ignore
}

/** Top of a wall, m: its own, or a little over the covers beside it. */
function wallTop(site: Site, { from, to, top }: Wall): number {
  if (top !== null) return top
  const middle: Vec2 = [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2]
  const inside = stripOutline(middle, [middle[0] + (to[0] - from[0]) * 1e-3, middle[1] + (to[1] - from[1]) * 1e-3], 0.05, 0)[0] ?? middle // prettier-ignore
  return Math.max(2.4, ...site.covers.flatMap((cover) => coverHeightAt(cover, inside[0], inside[1]) ?? [])) + 0.2
}

/** The four sides of a wall as a solid. */
const wallSolid = (site: Site, wall: Wall): DrawnSolid =>
  prismOf(stripOutline(wall.from, wall.to, 0, wallBand), 0, wallTop(site, wall))

/** Whether the eye looks at a wall from outside: it would hide what it is about. */
const isInFront = ({ from, to }: Wall, toEye: Vec3): boolean =>
  (to[1] - from[1]) * toEye[0] - (to[0] - from[0]) * toEye[1] > 1e-9

function memberPieces(site: Site): Piece[] {
  return site.members.flatMap((member): Piece[] => {
    const outline = stripOutline(member.from, member.to, member.width / 2, member.width / 2)
    const low = outline.map(([x, y]) => undersideAt(site, member, x, y))
    const heights = low.flatMap((z) => (z === null ? [] : [z]))
    if (heights.length < outline.length) return []
    const high = heights.map((z) => z + member.depth)
    return [{ key: `member ${member.id}`, look: 'solid', solid: prismOf(outline, heights, high) }]
  })
}

/** Outline of a table in plan. */
function tableOutline({ form, centre: [x, y], size: [width, depth], turnDeg }: Table): Vec2[] {
  if (form === 'round') return circle([x, y], width / 2)
  const [c, s] = [Math.cos(radians(turnDeg)), Math.sin(radians(turnDeg))]
  return ([[-1, -1], [1, -1], [1, 1], [-1, 1]] as const).map(([a, b]): Vec2 => {
    const [u, v] = [(a * width) / 2, (b * depth) / 2]
    return [x + u * c - v * s, y + u * s + v * c]
  }) // prettier-ignore
}

/** A table's top as a slab of its own thickness, m. */
export const tableTop = (table: Table): DrawnSolid => prismOf(tableOutline(table), table.height - 0.04, table.height)

/** Half of the room that a guest takes, m. */
const guest = 0.16

function seatSolid({ x, y, headHeight }: Seat): DrawnSolid {
  return prismOf([[x - guest, y - guest], [x + guest, y - guest], [x + guest, y + guest], [x - guest, y + guest]], 0, headHeight + 0.1) // prettier-ignore
}

function heaterPieces(site: Site, heater: MountedHeater, model: HeaterModel, rules: HouseRules): Piece[] {
  const { centre, u, v, w, half } = bodyOf(heater, model)
  const hangers = hangersOf({ heater, model, site, rules }).map(({ from, to }, i): Piece => ({
    key: `hanger ${heater.id} ${i}`,
    look: 'hanger',
    heater,
    solid: { corners: [from, to], faces: [[0, 1]] },
  }))
  const solid = boxOf(centre, [u, v, w], [half.u, half.v, half.w])
  return [...hangers, { key: `heater ${heater.id}`, look: 'heater', solid, heater }]
}

/** The pieces of a site and its layout as they stand, and the walls in front, which are drawn as outlines over all. */
export function piecesOf(
  site: Site,
  layout: Pick<Layout, 'heaters'>,
  models: ReadonlyMap<string, HeaterModel>,
  rules: HouseRules,
  toEye: Vec3,
): { readonly pieces: Piece[]; readonly front: DrawnSolid[] } {
  const pieces: Piece[] = [
    ...site.walls
      .filter((wall) => !isInFront(wall, toEye))
      .map((wall): Piece => ({ key: `wall ${wall.id}`, look: 'wall', solid: wallSolid(site, wall) })),
    ...site.levels.flatMap(({ id, outline, height }) =>
      height <= 0
        ? []
        : convexPieces(outline).map((piece, i): Piece => ({ key: `level ${id} ${i}`, look: 'solid', solid: prismOf(piece, 0, height) })),
    ),
    ...site.poles.map(
      ({ id, at, diameter, top }): Piece => ({
        key: `pole ${id}`,
        look: 'solid',
        solid: prismOf(circle(at, diameter / 2, 8), 0, top),
      }),
    ),
    ...memberPieces(site),
    ...site.obstacles.flatMap(({ id, shape, movable, transmittance }) =>
      shapePrisms(shape).map(
        (solid, i): Piece => ({
          key: `obstacle ${id} ${i}`,
          look: movable || transmittance > 0 ? 'see-through' : 'solid',
          solid,
        }),
      ),
    ),
    ...site.tables.map(
      (table): Piece => ({ key: `table ${table.id}`, look: 'table', table, solid: prismOf(tableOutline(table), 0, table.height) }),
    ),
    ...site.seats.map((seat): Piece => ({ key: `seat ${seat.id}`, look: 'seat', seat, solid: seatSolid(seat) })),
    ...layout.heaters.flatMap((heater) => {
      const model = models.get(heater.model)
      return model ? heaterPieces(site, heater, model, rules) : []
    }),
  ] // prettier-ignore
  const front = site.walls.filter((wall) => isInFront(wall, toEye)).map((wall) => wallSolid(site, wall))
  return { pieces, front }
}
