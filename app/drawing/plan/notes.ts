import type { Obstacle, Site } from '#app/domain/site/site.ts'
import { dimensionText } from '#app/drawing/plan/dimension-text.ts'
import { isClear, patch, type Patch } from '#app/drawing/plan/occupied.ts'
import { stripOf, type Strip } from '#app/drawing/plan/obstacle.tsx'
import { extentOf, toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import { wallBand } from '#app/drawing/plan/wall.tsx'
import type { Pen } from '#app/drawing/pen.ts'
import { clippedText, textWidth } from '#app/drawing/text/widths.ts'

/** Words beside a thing on the plan. */
export interface Note {
  readonly id: string
  readonly text: string
  readonly x: number
  readonly y: number
  readonly anchor: 'start' | 'middle' | 'end'
}

const sentence = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1)

/** What a thing is called on the plan, with the height of its underside and whether it may burn. */
function noteText(obstacle: Obstacle, displayUnits: Site['displayUnits']): string {
  const name = sentence(obstacle.name.split(',')[0] ?? obstacle.name)
  const [low, high] = obstacle.shape.z
  const height = (metres: number) => dimensionText(metres, displayUnits)
  const place = obstacle.kind === 'cable' ? ` ${height(low)}–${height(high)}` : low > 0.1 ? ` at ${height(low)}` : ''
  const burns = { combustible: ', combustible', unknown: ', material not known', 'non-combustible': '' }
  return `${name}${place}${obstacle.kind === 'cable' ? '' : burns[obstacle.material]}`
}

interface Spot {
  readonly x: number
  readonly y: number
  readonly anchor: Note['anchor']
  /** Outside the floor nothing else stands in the way. */
  readonly free: boolean
}

function stripSpots(strip: Strip, site: Site, view: PlanView, pen: Pen, width: number, isCable: boolean): Spot[] {
  if (strip.from[1] !== strip.to[1]) return []
  const { x, y } = extentOf(site.floor)
  const right = view.x0 + view.scale * x[1]
  const lineY = view.y0 - view.scale * strip.from[1]
  const outside = { x: right, anchor: 'end' as const, free: true }
  if (Math.abs(strip.from[1] - y[1]) < 0.2) return [{ ...outside, y: view.y0 - view.scale * y[1] - 22 * pen.k }]
  const band = wallBand * view.scale
  const isByWall = !isCable && Math.abs(strip.from[1] - y[0]) < 0.3 && site.walls.length > 0
  const room = view.scale * (x[1] - x[0])
  if (isByWall && band >= pen.text + 2 && wallNameWidth(site, pen) + 2 * width + 40 < room)
    return [{ ...outside, x: right - 6, y: view.y0 - view.scale * y[0] + band / 2 + pen.text * 0.35 }]
  const left = Math.max(view.x0 + view.scale * strip.from[0], view.x0 + view.scale * x[0]) + 8
  const last = Math.min(view.x0 + view.scale * strip.to[0], right) - width - 8
  const count = Math.max(0, Math.floor((last - left) / 16) + 1)
  return Array.from({ length: count }, (_, i) => ({
    x: left + i * 16,
    y: lineY - 9,
    anchor: 'start' as const,
    free: false,
  }))
}

const wallNameWidth = (site: Site, pen: Pen): number =>
  Math.max(0, ...site.walls.map((wall) => textWidth(wall.name, pen.text, 500)))

function bodySpots(obstacle: Obstacle, view: PlanView, pen: Pen): Spot[] {
  const { shape } = obstacle
  const extent =
    shape.kind === 'cylinder'
      ? {
          x: [shape.centre[0] - shape.radius, shape.centre[0] + shape.radius] as const,
          y: [shape.centre[1] - shape.radius, shape.centre[1] + shape.radius] as const,
        }
      : shape.kind === 'box'
        ? shape
        : extentOf(shape.outline)
  const [left, top] = toScreen(view, [extent.x[0], extent.y[1]])
  const [right, bottom] = toScreen(view, [extent.x[1], extent.y[0]])
  const x = (left + right) / 2
  const middle = (top + bottom) / 2 + pen.text * 0.35
  const heights = [middle, bottom - 7, top + pen.text + 4, bottom + pen.text + 2, top - 5, middle + 24, middle - 24]
  const below = heights.map((y) => ({ x, y, anchor: 'middle' as const, free: false }))
  return [
    ...below,
    { x: right + 6, y: middle, anchor: 'start', free: false },
    { x: left - 6, y: middle, anchor: 'end', free: false },
  ]
}

const boxOf = (spot: Spot, width: number, pen: Pen): Patch => {
  const x = spot.anchor === 'middle' ? spot.x : spot.anchor === 'start' ? spot.x + width / 2 : spot.x - width / 2
  return patch(x, spot.y - pen.text * 0.33, width, pen.text)
}

/** Names of poles beside them, where there is room. */
export function placePoleNames(site: Site, view: PlanView, pen: Pen, occupied: readonly Patch[]): Note[] {
  const taken = [...occupied]
  return site.poles.flatMap((pole) => {
    const text = sentence(pole.name.split(',')[0] ?? pole.name)
    const width = textWidth(text, pen.text, 500)
    const [x, y] = toScreen(view, pole.at)
    const around: Spot[] = [
      { x: x + 8 * pen.k, y: y + pen.text * 0.35, anchor: 'start', free: false },
      { x: x - 8 * pen.k, y: y + pen.text * 0.35, anchor: 'end', free: false },
      { x, y: y - 8 * pen.k, anchor: 'middle', free: false },
      { x, y: y + 8 * pen.k + pen.text, anchor: 'middle', free: false },
    ]
    const spot = around.find((one) => isClear(boxOf(one, width, pen), taken, 3))
    if (!spot) return []
    taken.push(boxOf(spot, width, pen))
    return [{ id: pole.id, text, x: spot.x, y: spot.y, anchor: spot.anchor }]
  })
}

/** The part of the drawing's width that notes above the floor take, px. */
export function takenAbove(site: Site, view: PlanView, pen: Pen): readonly (readonly [number, number])[] {
  const top = view.y0 - view.scale * extentOf(site.floor).y[1]
  return placeNotes(site, view, pen, [])
    .filter((note) => note.y < top)
    .map((note) => [note.x - textWidth(note.text, pen.text, 500), note.x] as const)
}

/** The room a note takes on the plan, px. */
export const notePatch = (note: Note, pen: Pen): Patch =>
  boxOf({ ...note, free: true }, textWidth(note.text, pen.text, 500), pen)

/** Names of obstacles where they stand clear of everything else; one that has no room is left out. */
export function placeNotes(site: Site, view: PlanView, pen: Pen, occupied: readonly Patch[]): Note[] {
  const taken = [...occupied]
  const said = new Set<string>()
  return site.obstacles.flatMap((obstacle) => {
    const strip = stripOf(obstacle)
    const text = clippedText(noteText(obstacle, site.displayUnits), 320 * pen.k, pen.text, 500)
    const width = textWidth(text, pen.text, 500)
    const spots = strip
      ? stripSpots(strip, site, view, pen, width, obstacle.kind === 'cable')
      : bodySpots(obstacle, view, pen)
    const spot = spots.find((one) => one.free || isClear(boxOf(one, width, pen), taken, 3))
    if (!spot || (spot.free && said.has(`${text} ${spot.y}`))) return []
    said.add(`${text} ${spot.y}`)
    taken.push(boxOf(spot, width, pen))
    return [{ id: obstacle.id, text, x: spot.x, y: spot.y, anchor: spot.anchor }]
  })
}
