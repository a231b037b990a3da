import type { Extent } from '#app/domain/flux/cells.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import type { Grid } from '#app/domain/flux/grid.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/** Where each emitter is reckoned on a map, in their order, and the most that is left out at any cell, W/m². */
export interface CutOff {
  readonly extents: readonly Extent[]
  readonly errorBound: number
}

/** Cells times elements above which a map is cut; below it every cell knows every heater. */
const uncutWork = 4_000_000
/** What one heater gives outside its extent at most, W/m². */
export const leastKept = 0.5
/** Side of the blocks of floor over which the bound is taken, m. */
const block = 4

/** No cut. */
export const everywhere: Extent = { left: -Infinity, right: Infinity, low: -Infinity, high: Infinity }
const up: Vec3 = [0, 0, 1]
const directions = 32
const farthest = 80
const ratio = 0.92
/** Allowance for what lies between the directions and distances looked along. */
const allowance = 1.1

/** How far an emitter of one kind and height reaches, in its own directions. */
interface Reach {
  /** Places along u and to the left of u beyond which it gives less than is kept, m. */
  readonly outline: readonly (readonly [along: number, left: number])[]
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
  return { outline, beyond }
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

/** The rectangle outside of which an emitter gives a plane at z less than `leastKept`. */
export function extentOf(emitter: Emitter, z: number): Extent {
  const [x, y] = emitter.elements[0]?.centre ?? [0, 0]
  const [ux, uy] = emitter.frame.u
  const places = knownReach(emitter, z).outline.map(
    ([along, left]) => [x + along * ux - left * uy, y + along * uy + left * ux] as const,
  )
  const xs = places.map((place) => place[0])
  const ys = places.map((place) => place[1])
  return { left: Math.min(...xs), right: Math.max(...xs), low: Math.min(...ys), high: Math.max(...ys) }
}

/** An emitter's extent, its place and what it gives from afar. */
interface FarSource extends Extent {
  readonly x: number
  readonly y: number
  readonly beyond: Float64Array
}

/**
 * The most that all sources together leave out at a cell of the block from (x, y): of each whose extent does not hold
 * the whole block, the least kept or what it gives at most from so far away, whichever is less.
 */
function leftOut(sources: readonly FarSource[], x: number, y: number): number {
  let sum = 0
  for (const s of sources) {
    if (s.left <= x && s.right >= x + block && s.low <= y && s.high >= y + block) continue
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
  if (grid.columns * grid.rows * elements <= uncutWork) {
    return { extents: emitters.map(() => everywhere), errorBound: 0 }
  }
  const extents = emitters.map((emitter) => extentOf(emitter, grid.z))
  const sources = emitters.map((emitter, i) => {
    const [x, y] = emitter.elements[0]?.centre ?? [0, 0]
    return { ...(extents[i] ?? everywhere), x, y, beyond: knownReach(emitter, grid.z).beyond }
  })
  return { extents, errorBound: boundOver(sources, grid) }
}
