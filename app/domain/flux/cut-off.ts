import type { Emitter } from '#app/domain/flux/emitter.ts'
import type { Grid } from '#app/domain/flux/grid.ts'
import { solidAngleOf } from '#app/domain/flux/beam.ts'

/** How far from a heater its irradiance is reckoned, m, and the most that is left out at any cell, W/m². */
export interface CutOff {
  readonly radius: number
  readonly errorBound: number
}

/** Cells times elements above which a map is cut; below it every cell knows every heater. */
const uncutWork = 4_000_000
const radii = [8, 10, 12, 16, 24]
/** Aim for the bound, W/m²: a map is read to the whole W/m². */
const aim = 2
/** Side of the blocks of floor over which the bound is taken, m. */
const block = 4

/** The most that a beam sends per steradian and watt in directions that make an angle of at least `angle` with its axis. */
function greatestIntensity(emitter: Emitter, angle: number): number {
  const { beam } = emitter
  if (beam.kind === 'table') return Math.max(...beam.intensity.flat()) / solidAngleOf(beam)
  return Math.max(0, Math.cos(angle)) ** Math.min(beam.across, beam.along) / solidAngleOf(beam)
}

/**
 * Upper bound of what an emitter gives a horizontal plane anywhere farther than `distance` in plan, W/m². With D the
 * distance less half an element, E ≤ I(θ) H / (H² + D²)^(3/2), θ = atan(D/H) less the tilt, and cos^a α cos^b β ≤
 * (cosα cosβ)^min(a,b), where cosα cosβ is the cosine of the angle from the beam's axis. It falls with distance.
 */
export function farBound(emitter: Emitter, z: number, distance: number): number {
  const tilt = Math.acos(Math.min(1, Math.max(-1, -emitter.frame.w[2])))
  return emitter.elements.reduce((sum, { centre, length, radiantPower }) => {
    const height = centre[2] - z
    const near = Math.max(0, distance - length / 2)
    if (height <= 0) return sum
    const angle = Math.max(0, Math.atan2(near, height) - tilt)
    const slope = height / (height * height + near * near) ** 1.5
    return sum + radiantPower * greatestIntensity(emitter, angle) * slope
  }, 0)
}

/** An emitter's place in plan, how far its elements lie from it, and its bound at every half metre. */
interface Reach {
  readonly x: number
  readonly y: number
  readonly spread: number
  readonly bounds: Float64Array
}

const perMetre = 2

function reachesOf(emitters: readonly Emitter[], z: number, farthest: number): Reach[] {
  const known = new Map<string, Float64Array>()
  return emitters.map((emitter) => {
    const { beam, elements, frame } = emitter
    const form = beam.kind === 'cosine' ? [beam.across, beam.along] : [beam.intensity]
    const key = JSON.stringify([form, frame.w[2], elements.map((e) => [e.centre[2], e.length, e.radiantPower])])
    const make = () =>
      Float64Array.from({ length: farthest * perMetre + 1 }, (_, i) => farBound(emitter, z, i / perMetre))
    const bounds = known.get(key) ?? make()
    known.set(key, bounds)
    const [x, y] = elements[0]?.centre ?? [0, 0]
    const spread = Math.max(0, ...elements.map(({ centre }) => Math.hypot(centre[0] - x, centre[1] - y)))
    return { x, y, spread, bounds }
  })
}

/** The most that all emitters together leave out at a cell of the block from (x, y). */
function leftOut(reaches: readonly Reach[], x: number, y: number, radius: number): number {
  let sum = 0
  for (const reach of reaches) {
    const [left, right] = [reach.x - x, x + block - reach.x]
    const [low, high] = [reach.y - y, y + block - reach.y]
    const far = Math.sqrt(Math.max(left, right) ** 2 + Math.max(low, high) ** 2)
    if (far + reach.spread <= radius) continue
    const gap = Math.sqrt(Math.max(-left, -right, 0) ** 2 + Math.max(-low, -high, 0) ** 2) - reach.spread
    const at = Math.floor(Math.max(radius, gap) * perMetre)
    sum += reach.bounds[Math.min(at, reach.bounds.length - 1)] ?? 0
  }
  return sum
}

function boundOver(reaches: readonly Reach[], grid: Grid, radius: number): number {
  let worst = 0
  for (let y = 0; y < grid.rows * grid.cell; y += block) {
    for (let x = 0; x < grid.columns * grid.cell; x += block) {
      worst = Math.max(worst, leftOut(reaches, grid.x0 + x, grid.y0 + y, radius))
    }
  }
  return worst
}

/**
 * The cut-off for a map: none while the work is small, else the least of 8 … 24 m whose bound is under 2 W/m², or 24 m
 * with the bound that it has.
 */
export function cutOffFor(emitters: readonly Emitter[], grid: Grid): CutOff {
  const elements = emitters.reduce((sum, emitter) => sum + emitter.elements.length, 0)
  if (grid.columns * grid.rows * elements <= uncutWork) return { radius: Infinity, errorBound: 0 }
  const reaches = reachesOf(emitters, grid.z, Math.ceil(Math.hypot(grid.columns, grid.rows) * grid.cell) + 30)
  for (const radius of radii) {
    const errorBound = boundOver(reaches, grid, radius)
    if (errorBound <= aim || radius === radii.at(-1)) return { radius, errorBound }
  }
  return { radius: Infinity, errorBound: 0 }
}
