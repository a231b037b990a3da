import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import {
  farthest,
  fineAcrossEntries,
  fineEntriesPerUnit,
  fineTablesOf,
  type CosineTables,
} from '#app/domain/flux/kernel-tables.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/** Places in plan and height, m, as x, y, z after one another: quick to run through many times. */
export const packedPoints = (points: readonly Vec3[]): Float64Array => Float64Array.from(points.flat())

const up: Vec3 = [0, 0, 1]
const middle = farthest * fineEntriesPerUnit
const last = 2 * middle

function exactly(emitter: Emitter, element: Element, points: Float64Array, k: number): number {
  const point: Vec3 = [points[k] ?? 0, points[k + 1] ?? 0, points[k + 2] ?? 0]
  return irradianceAt({ ...emitter, elements: [element] }, point, up)
}

/** One level element with a beam of cosines, from its fine tables; what lies beyond them in closed form. */
function addFromTables(
  sums: Float64Array,
  points: Float64Array,
  emitter: Emitter,
  element: Element,
  { across, along, solidAngle }: CosineTables,
): void {
  const { u, w } = emitter.frame
  const [ux, uy] = u
  const lean = (w[1] * ux - w[0] * uy) * fineAcrossEntries
  const down = -w[2] * fineAcrossEntries
  const [x, y, z] = element.centre
  const half = (element.length / 2) * fineEntriesPerUnit
  const strength = element.radiantPower / (solidAngle * element.length)
  for (let i = 0, k = 0; i < sums.length; i++, k += 3) {
    const dx = (points[k] ?? 0) - x
    const dy = (points[k + 1] ?? 0) - y
    const height = z - (points[k + 2] ?? 0)
    const side = dy * ux - dx * uy
    const inverse = 1 / Math.sqrt(side * side + height * height)
    const c = (side * lean + height * down) * inverse
    if (!(c > 0) || height <= 0) continue
    const place = (dx * ux + dy * uy) * fineEntriesPerUnit * inverse + middle
    const reach = half * inverse
    const a = place - reach
    const b = place + reach
    if (a < 0 || b >= last || reach < 4) {
      sums[i] = (sums[i] ?? 0) + exactly(emitter, element, points, k)
      continue
    }
    const ci = c | 0
    const ai = a | 0
    const bi = b | 0
    const f = (across[2 * ci] ?? 0) + (c - ci) * (across[2 * ci + 1] ?? 0)
    const low = (along[2 * ai] ?? 0) + (a - ai) * (along[2 * ai + 1] ?? 0)
    const high = (along[2 * bi] ?? 0) + (b - bi) * (along[2 * bi + 1] ?? 0)
    sums[i] = (sums[i] ?? 0) + strength * height * f * inverse * inverse * (high - low)
  }
}

/**
 * Horizontal irradiance, W/m², of all emitters at many points: for searches that ask for thousands of layouts. Level
 * elements with beams of cosines are read from fine tables: within 1e-4 of the value down to 1 W/m² (proved in the
 * tests over the demo models); all others, and places beyond the tables, in closed form.
 */
export function horizontalAtPoints(emitters: readonly Emitter[], points: Float64Array): Float64Array {
  const sums = new Float64Array(points.length / 3)
  for (const emitter of emitters) {
    const { beam, frame, elements } = emitter
    const tables = beam.kind === 'cosine' && Math.abs(frame.u[2]) < 1e-9 ? fineTablesOf(beam) : null
    for (const element of elements) {
      if (tables) addFromTables(sums, points, emitter, element, tables)
      else for (let i = 0; i < sums.length; i++) sums[i] = (sums[i] ?? 0) + exactly(emitter, element, points, 3 * i)
    }
  }
  return sums
}
