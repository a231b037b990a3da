import { memberLength, undersideAt } from '#app/domain/site/member.ts'
import { areaOf } from '#app/domain/site/geometry.ts'
import type { Cover, Level, Member, Obstacle, Pole, Seat, Site, Table, Wall } from '#app/domain/site/site.ts'
import { formatLength, formatQuantity } from '#app/domain/units.ts'
import { slopeText } from '#app/drawing/plan/cover-mark.tsx'
import type { ThingKind } from '#app/domain/site/edits.ts'

/** A thing of the site as a row of a list: its name, and the facts by which it is known. */
export interface ThingRow {
  readonly id: string
  readonly name: string
  readonly words: string
}

/** Everything of one kind as rows, in the site's order. */
export function rowsOf(site: Site, kind: ThingKind): ThingRow[] {
  const say = wordsWith((metres) => formatLength(metres, site.displayUnits), site)
  switch (kind) {
    case 'cover':
      return site.covers.map((cover) => ({ id: cover.id, name: cover.name, words: say.cover(cover) }))
    case 'member':
      return site.members.map((member) => ({ id: member.id, name: member.name, words: say.member(member) }))
    case 'wall':
      return site.walls.map((wall) => ({ id: wall.id, name: wall.name, words: say.wall(wall) }))
    case 'pole':
      return site.poles.map((pole) => ({ id: pole.id, name: pole.name, words: say.pole(pole) }))
    case 'obstacle':
      return site.obstacles.map((thing) => ({ id: thing.id, name: nameAmong(site, thing), words: say.obstacle(thing) }))
    case 'table':
      return site.tables.map((table) => ({ id: table.id, name: table.id, words: say.table(table) }))
    case 'level':
      return site.levels.map((level) => ({ id: level.id, name: level.name, words: say.level(level) }))
    case 'seat':
      return site.seats.map((seat) => ({ id: seat.id, name: seat.id, words: say.seat(seat) }))
  }
}

/** An obstacle's name, with its id where several have the same. */
const nameAmong = ({ obstacles }: Site, { id, name }: Obstacle): string =>
  obstacles.some((other) => other.name === name && other.id !== id) ? `${name} (${id})` : name

const wordsWith = (length: (metres: number) => string, site: Site) => ({
  cover: (cover: Cover) => {
    const heights = [...new Set(cover.corners.map(([, , height]) => length(height)))].join(', ')
    return `${heights}, ${slopeText(cover)}, ${cover.material}${cover.opening ? ', opens' : ''}`
  },
  member: (member: Member) => {
    const [from, to] = [member.from, member.to].map(([x, y]) => undersideAt(site, member, x, y))
    const height = (metres: number | null | undefined) => (typeof metres === 'number' ? length(metres) : 'not known')
    const under = height(from) === height(to) ? height(from) : `${height(from)} to ${height(to)}`
    return `${member.kind}, at ${length(member.from[0])}, ${length(memberLength(member))} long, underside ${under}`
  },
  wall: ({ from, to, top, material }: Wall) =>
    `${length(Math.hypot(to[0] - from[0], to[1] - from[1]))} long, ${top === null ? 'past the cover' : `${length(top)} high`}, ${material}`,
  pole: ({ at, top, diameter, material }: Pole) =>
    `at ${length(at[0])}, ${length(at[1])}, ${length(top)} high, ${length(diameter)} across, ${material}`,
  obstacle: (obstacle: Obstacle) => {
    const moves = obstacle.movable
      ? `, moves: ${(obstacle.states ?? []).map(({ name }) => name).join(', ') || 'there or away'}`
      : ''
    return `${obstacle.kind}, ${shapeWords(obstacle, length)}, ${obstacle.material}${moves}`
  },
  table: ({ form, size, height, centre }: Table) =>
    `${form === 'round' ? `${length(size[0])} across` : `${length(size[0])} × ${length(size[1])}`}, ${length(height)} high, at ${length(centre[0])}, ${length(centre[1])}`,
  level: ({ height, outline }: Level) =>
    `${length(height)}, ${formatQuantity(Math.abs(areaOf(outline)), 'area', site.displayUnits)}`,
  seat: ({ x, y, group, facingDeg, priority }: Seat) =>
    `${[group, `${length(x)}, ${length(y)}`, `looks ${String(facingDeg).replace('-', '−')}°`, priority].filter(Boolean).join(', ')}`,
})

function shapeWords({ shape }: Obstacle, length: (metres: number) => string): string {
  const heights = `${length(shape.z[0])} to ${length(shape.z[1])} high`
  if (shape.kind === 'cylinder') return `${length(2 * shape.radius)} across, ${heights}`
  if (shape.kind === 'prism') return `${shape.outline.length} corners, ${heights}`
  return `${length(shape.x[1] - shape.x[0])} × ${length(shape.y[1] - shape.y[0])}, ${heights}`
}
