import { solidAngleOf } from '#app/domain/flux/beam.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import type { Grid } from '#app/domain/flux/grid.ts'

/** How far from a heater its irradiance is reckoned, m, and the most that is left out at any cell, W/m². */
export interface CutOff {
  readonly radius: number
  readonly errorBound: number
}

/** Cells times elements above which a map is cut; below it every cell knows every heater. */
const uncutWork = 4_000_000
const radii = [8, 10, 12, 16, 24]
/** The bound to stay under where a radius allows it, W/m²: about 1 % of the usual peak. */
const aim = 5
/** Side of the blocks of floor over which the bound is taken, m. */
const block = 4

/** What bounds an emitter's irradiance from afar; lengths m. */
export interface FarSource {
  readonly x: number
  readonly y: number
  /** Farthest that any point of its elements lies from (x, y) in plan. */
  readonly spread: number
  /** Least and greatest height of its elements over the plane. */
  readonly low: number
  readonly high: number
  readonly ux: number
  readonly uy: number
  /** The beam's axis: its part to the left of u and its part downwards. */
  readonly lean: number
  readonly down: number
  /** Greatest intensity, W/sr. */
  readonly intensity: number
  /** Twice the power of the cosine from the axis that bounds the beam, rounded down to a whole number. */
  readonly halves: number
}

/** The bounding figures of an emitter over a plane; null when none of it is above the plane. */
export function farSourceOf({ beam, elements, frame }: Emitter, z: number): FarSource | null {
  const heights = elements.map(({ centre }) => centre[2] - z)
  const [x, y] = elements[0]?.centre ?? [0, 0]
  const high = Math.max(0, ...heights)
  if (high === 0) return null
  const power = elements.reduce((sum, { radiantPower }) => sum + radiantPower, 0)
  const peak = beam.kind === 'table' ? Math.max(...beam.intensity.flat()) : 1
  return {
    x,
    y,
    spread: Math.max(...elements.map((e) => Math.hypot(e.centre[0] - x, e.centre[1] - y) + e.length / 2)),
    low: Math.max(0, Math.min(...heights)),
    high,
    ux: frame.u[0],
    uy: frame.u[1],
    lean: frame.w[1] * frame.u[0] - frame.w[0] * frame.u[1],
    down: -frame.w[2],
    intensity: (power * peak) / solidAngleOf(beam),
    halves: beam.kind === 'table' ? 0 : Math.min(40, Math.floor(2 * Math.min(beam.across, beam.along))),
  }
}

/** x to the power halves/2, 0 ≤ x ≤ 1, by multiplication. */
function halfPower(x: number, halves: number): number {
  let result = halves % 2 === 1 ? Math.sqrt(x) : 1
  for (let i = 1; i < halves; i += 2) result *= x
  return result
}

/**
 * Upper bound of the irradiance, W/m², that a source gives a horizontal plane anywhere at least `distance` away in plan
 * and at most `side` to the left of its axis (to the right when the beam leans there). With r the least distance to an
 * element and c the greatest cosine of the angle from the beam's axis, E ≤ I c^m H / r³, for cos^a α cos^b β ≤
 * (cosα cosβ)^min(a,b), and cosα cosβ is that cosine.
 */
export function farBound(source: FarSource, distance: number, side: number): number {
  const near = Math.max(0, distance - source.spread)
  const square = near * near + source.low * source.low
  const r = Math.sqrt(square)
  const ahead = side * Math.abs(source.lean) + source.high * source.down
  if (ahead <= 0) return 0
  return (source.intensity * source.high * halfPower(Math.min(1, ahead / r), source.halves)) / (square * r)
}

/** The most that all sources together leave out at a cell of the block from (x, y). */
function leftOut(sources: readonly FarSource[], x: number, y: number, radius: number): number {
  const half = block / 2
  let sum = 0
  for (const source of sources) {
    const dx = x + half - source.x
    const dy = y + half - source.y
    const [fx, fy] = [Math.abs(dx) + half, Math.abs(dy) + half]
    // An element's centre lies within its spread of (x, y): only a cell farther than this can lack it.
    const cut = radius - source.spread
    if (fx * fx + fy * fy <= cut * cut) continue
    const [gx, gy] = [Math.max(0, Math.abs(dx) - half), Math.max(0, Math.abs(dy) - half)]
    const centreSide = (dy * source.ux - dx * source.uy) * (source.lean < 0 ? -1 : 1)
    const side = centreSide + half * (Math.abs(source.ux) + Math.abs(source.uy)) + source.spread
    sum += farBound(source, Math.max(cut, Math.sqrt(gx * gx + gy * gy)), side)
  }
  return sum
}

function boundOver(sources: readonly FarSource[], grid: Grid, radius: number): number {
  let worst = 0
  for (let y = 0; y < grid.rows * grid.cell; y += block) {
    for (let x = 0; x < grid.columns * grid.cell; x += block) {
      worst = Math.max(worst, leftOut(sources, grid.x0 + x, grid.y0 + y, radius))
    }
  }
  return worst
}

/**
 * The cut-off for a map: none while the work is small, else the least of 8 … 24 m whose bound is under 5 W/m², or 24 m
 * with the bound that it has.
 */
export function cutOffFor(emitters: readonly Emitter[], grid: Grid): CutOff {
  const elements = emitters.reduce((sum, emitter) => sum + emitter.elements.length, 0)
  if (grid.columns * grid.rows * elements <= uncutWork) return { radius: Infinity, errorBound: 0 }
  const sources = emitters.map((emitter) => farSourceOf(emitter, grid.z)).filter((source) => source !== null)
  for (const radius of radii) {
    const errorBound = boundOver(sources, grid, radius)
    if (errorBound <= aim || radius === radii.at(-1)) return { radius, errorBound }
  }
  return { radius: Infinity, errorBound: 0 }
}
