import { changeCover, changeLevel, changeMember, changeObstacle, changeWall } from '#app/domain/site/edits.ts'
import { addFloorCorner, moveFloorCorner, removeFloorCorner } from '#app/domain/site/floor-edits.ts'
import { outlineCorners, withCornerAdded, withCornerAt, withoutCorner } from '#app/domain/site/outline.ts'
import type { Shape, Site } from '#app/domain/site/site.ts'
import { statesAfter } from '#app/domain/site/usual-states.ts'
import { roundLength } from '#app/domain/units.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import type { Chosen } from '#app/editor/site/choice.ts'

const two = ([x, y]: readonly [number, number, ...number[]]): Vec2 => [x, y]

/** The corners or ends of the one chosen thing that move by themselves, in plan; by their index. Empty for others. */
export function handlesOf(site: Site, { kind, ids }: Chosen): readonly Vec2[] {
  if (kind === 'floor') return site.floor
  const [id] = ids
  if (id === undefined || ids.length > 1) return []
  const called = <T extends { readonly id: string }>(things: readonly T[]) => things.find((thing) => thing.id === id)
  switch (kind) {
    case 'level':
      return called(site.levels)?.outline ?? []
    case 'cover':
      return called(site.covers)?.corners.map(two) ?? []
    case 'member':
      return endsOf(called(site.members))
    case 'wall':
      return endsOf(called(site.walls))
    case 'obstacle': {
      const obstacle = called(site.obstacles)
      return obstacle ? shapeHandles(obstacle.shape) : []
    }
    default:
      return []
  }
}

const endsOf = (line: { readonly from: Vec2; readonly to: Vec2 } | undefined): readonly Vec2[] =>
  line ? [line.from, line.to] : []

function shapeHandles(shape: Shape): readonly Vec2[] {
  switch (shape.kind) {
    case 'box': {
      const [[x0, x1], [y0, y1]] = [shape.x, shape.y]
      return [[x0, y0], [x1, y0], [x1, y1], [x0, y1]] // prettier-ignore
    }
    case 'cylinder':
      return [[shape.centre[0] + shape.radius, shape.centre[1]]]
    case 'prism':
      return shape.outline
  }
}

/** Whether corners can be added to the chosen thing's outline and taken out of it. */
export function hasOutline(site: Site, { kind, ids }: Chosen): boolean {
  if (kind === 'floor') return true
  if (ids.length !== 1) return false
  if (kind === 'level') return true
  return kind === 'obstacle' && site.obstacles.find(({ id }) => id === ids[0])?.shape.kind === 'prism'
}

/** The site with one corner or end of the chosen thing put at a place. */
export function putHandle(site: Site, { kind, ids: [id = ''] }: Chosen, part: number, at: Vec2): Site {
  const place: [number, number] = [roundLength(at[0]), roundLength(at[1])]
  const end = part === 0 ? { from: place } : { to: place }
  switch (kind) {
    case 'floor':
      return moveFloorCorner(site, part, at)
    case 'level':
      return changeLevel(site, id, ({ outline }) => ({ outline: withCornerAt(outline, part, at) }))
    case 'cover':
      return changeCover(site, id, ({ corners }) => ({
        corners: corners.map((corner, i): [number, number, number] => (i === part ? [...place, corner[2]] : corner)),
      }))
    case 'member':
      return changeMember(site, id, end)
    case 'wall':
      return changeWall(site, id, end)
    case 'obstacle':
      return changeShape(site, id, (shape) => shapeWithHandleAt(shape, part, place))
    default:
      return site
  }
}

/** The site with an obstacle of another shape; states that fill all of it follow. */
export const changeShape = (site: Site, id: string, edit: (shape: Shape) => Shape): Site =>
  changeObstacle(site, id, ({ shape, states }) => {
    const after = edit(shape)
    return { shape: after, ...(states && { states: statesAfter(states, shape, after) }) }
  })

function shapeWithHandleAt(shape: Shape, part: number, [x, y]: Vec2): Shape {
  switch (shape.kind) {
    case 'box': {
      const [[x0, x1], [y0, y1]] = [shape.x, shape.y]
      return { ...shape, x: part === 1 || part === 2 ? [x0, x] : [x, x1], y: part >= 2 ? [y0, y] : [y, y1] }
    }
    case 'cylinder':
      return { ...shape, radius: roundLength(Math.max(0.001, Math.hypot(x - shape.centre[0], y - shape.centre[1]))) }
    case 'prism':
      return { ...shape, outline: withCornerAt(shape.outline, part, [x, y]) }
  }
}

/** The site with one corner or end of the chosen thing moved by (dx, dy), m. */
export function movedHandle(site: Site, chosen: Chosen, part: number, dx: number, dy: number): Site {
  const at = handlesOf(site, chosen)[part]
  return at ? putHandle(site, chosen, part, [at[0] + dx, at[1] + dy]) : site
}

/** The site with a corner more in an edge of the chosen outline, in its middle or at a place; it is part `edge + 1`. */
export function withPartAdded(site: Site, { kind, ids: [id = ''] }: Chosen, edge: number, at?: Vec2): Site {
  if (kind === 'floor') return addFloorCorner(site, edge, at)
  if (kind === 'level') return changeLevel(site, id, ({ outline }) => ({ outline: withCornerAdded(outline, edge, at) }))
  return changeShape(site, id, (shape) =>
    shape.kind === 'prism' ? { ...shape, outline: withCornerAdded(shape.outline, edge, at) } : shape,
  )
}

/** The site without one corner of the chosen outline; null when the part is not the corner of an outline. */
export function withoutPart(site: Site, chosen: Chosen, part: number): Site | null {
  if (!hasOutline(site, chosen)) return null
  if (handlesOf(site, chosen).length <= outlineCorners.least) return site
  const { kind, ids: [id = ''] } = chosen // prettier-ignore
  if (kind === 'floor') return removeFloorCorner(site, part)
  if (kind === 'level') return changeLevel(site, id, ({ outline }) => ({ outline: withoutCorner(outline, part) }))
  return changeShape(site, id, (shape) =>
    shape.kind === 'prism' ? { ...shape, outline: withoutCorner(shape.outline, part) } : shape,
  )
}
