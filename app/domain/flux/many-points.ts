import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { farthest, fineAcrossEntries, fineEntriesPerUnit, fineTablesOf } from '#app/domain/flux/kernel-tables.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/** Places in plan and height, m, as x, y, z after one another: quick to run through many times. */
export const packedPoints = (points: readonly Vec3[]): Float64Array => Float64Array.from(points.flat())

const up: Vec3 = [0, 0, 1]
const middle = farthest * fineEntriesPerUnit
const last = 2 * middle

function addExactly(sums: Float64Array, points: Float64Array, emitter: Emitter, element: Element): void {
  const alone = { ...emitter, elements: [element] }
  for (let i = 0, k = 0; i < sums.length; i++, k += 3) {
    sums[i] = (sums[i] ?? 0) + irradianceAt(alone, [points[k] ?? 0, points[k + 1] ?? 0, points[k + 2] ?? 0], up)
  }
}

/** Tables of the beam, to half an entry; a point beyond their reach is left to `exactly`. */
function addElement(sums: Float64Array, points: Float64Array, emitter: Emitter, element: Element): void {
  const { beam, frame } = emitter
  if (beam.kind === 'table' || Math.abs(frame.u[2]) > 1e-9) {
    addExactly(sums, points, emitter, element)
    return
  }
  const { across, along, solidAngle } = fineTablesOf(beam)
  const [ux, uy] = frame.u
  const lean = frame.w[1] * ux - frame.w[0] * uy
  const down = -frame.w[2]
  const [x, y, z] = element.centre
  const half = element.length / 2
  const strength = element.radiantPower / (solidAngle * element.length)
  for (let i = 0, k = 0; i < sums.length; i++, k += 3) {
    const dx = (points[k] ?? 0) - x
    const dy = (points[k + 1] ?? 0) - y
    const height = z - (points[k + 2] ?? 0)
    if (!(height > 0)) continue
    const side = dy * ux - dx * uy
    const inverse = 1 / Math.sqrt(side * side + height * height)
    const c = (side * lean + height * down) * inverse * fineAcrossEntries
    if (!(c > 0)) continue
    const scaled = inverse * fineEntriesPerUnit
    const place = (dx * ux + dy * uy) * scaled + middle
    const reach = half * scaled
    const a = place - reach
    const b = place + reach
    if (a < 0 || b >= last || reach < 16) {
      const alone = { ...emitter, elements: [element] }
      const point: Vec3 = [points[k] ?? 0, points[k + 1] ?? 0, points[k + 2] ?? 0]
      sums[i] = (sums[i] ?? 0) + irradianceAt(alone, point, up)
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
    for (const element of emitter.elements) addElement(sums, points, emitter, element)
  }
  return sums
}
