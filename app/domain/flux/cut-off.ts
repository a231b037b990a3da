import type { Extent } from '#app/domain/flux/cells.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import type { Grid } from '#app/domain/flux/grid.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import type { Vec2, Vec3 } from '#app/domain/vector.ts'

/** Where an emitter is reckoned on a map: a convex outline in plan, counter-clockwise, and the box round it. */
export interface Area extends Extent {
  readonly outline: readonly Vec2[]
}

/** The areas of the emitters in their order, null where every cell counts, and the most left out at any cell, W/m². */
export interface CutOff {
  readonly areas: readonly (Area | null)[]
  readonly errorBound: number
}

/** Cells times elements above which a map is cut; below it every cell knows every heater. */
const uncutWork = 4_000_000
/** What one heater gives outside its area at most, W/m². */
export const leastKept = 0.5
/** Side of the blocks of floor over which the bound is taken, m. */
const block = 4

const up: Vec3 = [0, 0, 1]
const directions = 64
const farthest = 80
const ratio = 0.92
/** Allowance for what lies between the directions and distances looked along. */
const allowance = 1.1

/** How far an emitter of one kind and height reaches, in its own directions. */
interface Reach {
  /** Convex outline, places along u and to the left of u, outside of which it gives less than is kept, m. */
  readonly outline: readonly Vec2[]
  /** The most it gives in any direction at so many whole metres or more, W/m². */
  readonly beyond: Float64Array
}

function reachOf({ beam, frame, elements }: Emitter, z: number): Reach {
  const [ux, uy] = frame.u
  const [x, y] = elements[0]?.centre ?? [0, 0]
  const emitter = { id: 'kind', beam, frame, elements }
  const beyond = new Float64Array(farthest + 1)
  const outline = Array.from({ length: directions }, (_, i) => {
    const angle = (2 * Math.PI * i) / directions
    const [along, left] = [Math.cos(angle), Math.sin(angle)]
    const at = (r: number): Vec3 => [x + r * (along * ux - left * uy), y + r * (along * uy + left * ux), z]
    let kept = 0
    for (let r = farthest; r > 0.5; r *= ratio) {
      const given = irradianceAt(emitter, at(r), up) * allowance
      // A distance looked at stands for those up to the one before: for every whole metre below that.
      const last = Math.min(farthest, Math.floor(r / ratio))
      for (let d = 0; d <= last; d++) beyond[d] = Math.max(beyond[d] ?? 0, given)
      if (given < leastKept) continue
      kept = (r / ratio) * allowance
      break
    }
    return [kept * along, kept * left] as const
  })
  return { outline: hullOf(outline), beyond }
}

/** Twice the area of the triangle a, b, c: positive when c lies to the left of the way from a to b. */
const leftOf = (a: Vec2, b: Vec2, x: number, y: number) => (b[0] - a[0]) * (y - a[1]) - (b[1] - a[1]) * (x - a[0])

/** The corners of the convex hull of points, counter-clockwise. */
function hullOf(points: readonly Vec2[]): Vec2[] {
  const sorted = points.toSorted((a, b) => a[0] - b[0] || a[1] - b[1])
  const half = (way: readonly Vec2[]) => {
    const corners: Vec2[] = []
    for (const point of way) {
      for (let n = corners.length; n >= 2; n--) {
        const [a, b] = [corners[n - 2], corners[n - 1]]
        if (a && b && leftOf(a, b, point[0], point[1]) > 0) break
        corners.pop()
      }
      corners.push(point)
    }
    return corners.slice(0, -1)
  }
  return [...half(sorted), ...half(sorted.toReversed())]
}

const reaches = new Map<string, Reach>()

/** The reach of every emitter of this kind and height, wherever it hangs and however it is turned. */
function knownReach(emitter: Emitter, z: number): Reach {
  const { beam, elements, frame } = emitter
  const [x, y] = elements[0]?.centre ?? [0, 0]
  const places = elements.map((e) => {
    const aside = (e.centre[1] - y) * frame.u[0] - (e.centre[0] - x) * frame.u[1]
    return [aside, e.centre[2] - z, e.length, e.radiantPower].map((value) => value.toFixed(4))
  })
  const key = JSON.stringify([beam, frame.w[2].toFixed(6), frame.v[2].toFixed(6), places])
  const known = reaches.get(key) ?? reachOf(emitter, z)
  if (reaches.size > 500) reaches.clear()
  reaches.set(key, known)
  return known
}

/** The area outside of which an emitter gives a plane at z less than `leastKept`. */
export function areaOf(emitter: Emitter, z: number): Area {
  return areaFrom(emitter, knownReach(emitter, z))
}

function areaFrom({ elements, frame }: Emitter, reach: Reach): Area {
  const [x, y] = elements[0]?.centre ?? [0, 0]
  const [ux, uy] = frame.u
  const outline = reach.outline.map(([along, left]): Vec2 => [x + along * ux - left * uy, y + along * uy + left * ux])
  const xs = outline.map((place) => place[0])
  const ys = outline.map((place) => place[1])
  return { outline, left: Math.min(...xs), right: Math.max(...xs), low: Math.min(...ys), high: Math.max(...ys) }
}

/** Whether an area holds the whole square whose least corner is (x, y): all corners lie to the left of every side. */
export function holdsSquare({ outline, left, right, low, high }: Area, x: number, y: number, side: number): boolean {
  if (left > x || right < x + side || low > y || high < y + side) return false
  return outline.every((a, i) => {
    const b = outline[(i + 1) % outline.length] ?? a
    // The corner that lies farthest to the right of the way from a to b.
    return leftOf(a, b, b[1] > a[1] ? x + side : x, b[0] > a[0] ? y : y + side) >= 0
  })
}

/** An emitter's area, its place and what it gives from afar. */
interface FarSource {
  readonly area: Area
  readonly x: number
  readonly y: number
  readonly beyond: Float64Array
}

/**
 * The most that all sources together leave out at a cell of the block from (x, y): of each whose area does not hold the
 * whole block, the least kept or what it gives at most from so far away, whichever is less.
 */
function leftOut(sources: readonly FarSource[], x: number, y: number): number {
  let sum = 0
  for (const s of sources) {
    if (holdsSquare(s.area, x, y, block)) continue
    const gapX = Math.max(0, s.x - x - block, x - s.x)
    const gapY = Math.max(0, s.y - y - block, y - s.y)
    const metres = Math.min(farthest, Math.sqrt(gapX * gapX + gapY * gapY) | 0)
    sum += Math.min(leastKept, s.beyond[metres] ?? 0)
  }
  return sum
}

function boundOver(sources: readonly FarSource[], grid: Grid): number {
  let worst = 0
  for (let y = 0; y < grid.rows * grid.cell; y += block) {
    for (let x = 0; x < grid.columns * grid.cell; x += block) {
      worst = Math.max(worst, leftOut(sources, grid.x0 + x, grid.y0 + y))
    }
  }
  return worst
}

/** The cut-off for a map: none while the work is small, else each emitter where it gives at least 0.5 W/m². */
export function cutOffFor(emitters: readonly Emitter[], grid: Grid): CutOff {
  const elements = emitters.reduce((sum, emitter) => sum + emitter.elements.length, 0)
  if (grid.columns * grid.rows * elements <= uncutWork) return { areas: emitters.map(() => null), errorBound: 0 }
  const sources = emitters.map((emitter): FarSource => {
    const reach = knownReach(emitter, grid.z)
    const [x, y] = emitter.elements[0]?.centre ?? [0, 0]
    return { area: areaFrom(emitter, reach), x, y, beyond: reach.beyond }
  })
  return { areas: sources.map(({ area }) => area), errorBound: boundOver(sources, grid) }
}
