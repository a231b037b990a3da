import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { farthest, fineAcrossEntries, fineEntriesPerUnit, fineTablesOf } from '#app/domain/flux/kernel-tables.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/** Places in plan and height, m, as x, y, z after one another: quick to run through many times. */
export const packedPoints = (points: readonly Vec3[]): Float64Array => Float64Array.from(points.flat())

const up: Vec3 = [0, 0, 1]
const middle = farthest * fineEntriesPerUnit
const last = 2 * middle

function exactly(emitter: Emitter, element: Element, points: Float64Array, i: number): number {
  const point: Vec3 = [points[3 * i] ?? 0, points[3 * i + 1] ?? 0, points[3 * i + 2] ?? 0]
  return irradianceAt({ ...emitter, elements: [element] }, point, up)
}

/** An element in numbers, filled anew for each: what `addFromTables` is handed has always the same type. */
const figures = new Float64Array(9)

function setFigures({ frame: { u, w } }: Emitter, { centre, length, radiantPower }: Element, solidAngle: number): void {
  figures[0] = u[0]
  figures[1] = u[1]
  figures[2] = (w[1] * u[0] - w[0] * u[1]) * fineAcrossEntries
  figures[3] = -w[2] * fineAcrossEntries
  figures[4] = centre[0]
  figures[5] = centre[1]
  figures[6] = centre[2]
  figures[7] = (length / 2) * fineEntriesPerUnit
  figures[8] = radiantPower / (solidAngle * length)
}

/** Adds one level element with a beam of cosines from its fine tables; how many points lie beyond them, into `beyond`. */
function addFromTables(
  sums: Float64Array,
  points: Float64Array,
  across: Float64Array,
  along: Float64Array,
  beyond: Int32Array,
): number {
  const [ux, uy, lean, down] = [figures[0] ?? 0, figures[1] ?? 0, figures[2] ?? 0, figures[3] ?? 0]
  const [x, y, z] = [figures[4] ?? 0, figures[5] ?? 0, figures[6] ?? 0]
  const [half, strength] = [figures[7] ?? 0, figures[8] ?? 0]
  let missing = 0
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
      beyond[missing++] = i
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
  return missing
}

/**
 * Horizontal irradiance, W/m², of all emitters at many points: for searches that ask for thousands of layouts. Level
 * elements with beams of cosines are read from fine tables: within 1e-4 of the value down to 1 W/m² (proved in the
 * tests over the demo models); all others, and places beyond the tables, in closed form.
 */
export function horizontalAtPoints(emitters: readonly Emitter[], points: Float64Array): Float64Array {
  const sums = new Float64Array(points.length / 3)
  const beyond = new Int32Array(sums.length)
  for (const emitter of emitters) {
    const { beam, frame, elements } = emitter
    const tables = beam.kind === 'cosine' && Math.abs(frame.u[2]) < 1e-9 ? fineTablesOf(beam) : null
    for (const element of elements) {
      if (!tables) {
        for (let i = 0; i < sums.length; i++) sums[i] = (sums[i] ?? 0) + exactly(emitter, element, points, i)
        continue
      }
      setFigures(emitter, element, tables.solidAngle)
      const missing = addFromTables(sums, points, tables.across, tables.along, beyond)
      for (let k = 0; k < missing; k++) {
        const i = beyond[k] ?? 0
        sums[i] = (sums[i] ?? 0) + exactly(emitter, element, points, i)
      }
    }
  }
  return sums
}
