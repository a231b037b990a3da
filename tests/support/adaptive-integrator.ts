import type { Beam } from '#app/domain/flux/beam.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/**
 * Irradiance by brute force, for tests only: adaptive Simpson over the element's length of the inverse-square law, with
 * beam, normalisation and geometry written again and nothing taken from the engine but the shapes of its data.
 */
export function adaptive(f: (x: number) => number, from: number, to: number, tolerance: number, depth = 48): number {
  const simpson = (a: number, fa: number, fm: number, b: number, fb: number) => ((b - a) / 6) * (fa + 4 * fm + fb)
  const refine = (
    a: number,
    fa: number,
    m: number,
    fm: number,
    b: number,
    fb: number,
    whole: number,
    allowed: number,
    left: number,
  ): number => {
    const [m1, m2] = [(a + m) / 2, (m + b) / 2]
    const [f1, f2] = [f(m1), f(m2)]
    const halves = [simpson(a, fa, f1, m, fm), simpson(m, fm, f2, b, fb)] as const
    const gain = halves[0] + halves[1] - whole
    if (left <= 0 || (Math.abs(gain) <= 15 * allowed && left < depth - 3)) return halves[0] + halves[1] + gain / 15
    return (
      refine(a, fa, m1, f1, m, fm, halves[0], allowed / 2, left - 1) +
      refine(m, fm, m2, f2, b, fb, halves[1], allowed / 2, left - 1)
    )
  }
  const m = (from + to) / 2
  const [fa, fm, fb] = [f(from), f(m), f(to)]
  return refine(from, fa, m, fm, to, fb, simpson(from, fa, fm, to, fb), tolerance, depth)
}

function bilinear(beam: Extract<Beam, { kind: 'table' }>, alpha: number, beta: number): number {
  const cell = (angles: readonly number[], angle: number) => {
    const i = angles.findIndex((from, k) => from <= angle && angle <= (angles[k + 1] ?? -Infinity))
    return i < 0 ? null : { i, t: (angle - angles[i]!) / (angles[i + 1]! - angles[i]!) }
  }
  const [row, column] = [cell(beam.across, alpha), cell(beam.along, beta)]
  if (!row || !column) return 0
  const value = (i: number, j: number) => beam.intensity[row.i + i]![column.i + j]!
  const low = value(0, 0) + column.t * (value(0, 1) - value(0, 0))
  const high = value(1, 0) + column.t * (value(1, 1) - value(1, 0))
  return low + row.t * (high - low)
}

/** Relative intensity along a direction given by its parts along u, v and w. */
function intensity(beam: Beam, du: number, dv: number, dw: number): number {
  const transverse = Math.hypot(dv, dw)
  if (dw <= 0) return 0
  if (beam.kind === 'table') return bilinear(beam, Math.atan2(dv, dw), Math.atan2(du, transverse))
  return (dw / transverse) ** beam.across * transverse ** beam.along
}

/** ∫ relative intensity dΩ: cell by cell for tables; for cosines with t = angle / (π/2) stretched to tame the ends. */
function solidAngle(beam: Beam): number {
  if (beam.kind === 'cosine') {
    const power = (p: number) =>
      2 * adaptive((t) => Math.cos((Math.PI / 2) * (1 - (1 - t) ** 4)) ** p * 2 * Math.PI * (1 - t) ** 3, 0, 1, 1e-13)
    return power(beam.across) * power(beam.along + 1)
  }
  let sum = 0
  for (let i = 0; i + 1 < beam.across.length; i++) {
    for (let j = 0; j + 1 < beam.along.length; j++) {
      const inner = (alpha: number) =>
        adaptive((beta) => bilinear(beam, alpha, beta) * Math.cos(beta), beam.along[j]!, beam.along[j + 1]!, 1e-12, 12)
      // Linear in α within a cell: the middle is the mean.
      sum += (beam.across[i + 1]! - beam.across[i]!) * inner((beam.across[i]! + beam.across[i + 1]!) / 2)
    }
  }
  return sum
}

const solidAngles = new Map<string, number>()

function knownSolidAngle(beam: Beam): number {
  const key = JSON.stringify(beam)
  const known = solidAngles.get(key) ?? solidAngle(beam)
  solidAngles.set(key, known)
  return known
}

/** Irradiance of a one-sided plane, W/m², to about 1e-8 of its value. */
export function bruteIrradiance(emitter: Emitter, point: Vec3, normal: Vec3): number {
  const { u, v, w } = emitter.frame
  const size = Math.hypot(...normal)
  return emitter.elements.reduce((sum, { centre, length, radiantPower }) => {
    const density = radiantPower / length / knownSolidAngle(emitter.beam)
    const at = (s: number) => {
      const d = [0, 1, 2].map((k) => point[k]! - centre[k]! - s * u[k]!)
      const r = Math.hypot(...d)
      const part = (axis: Vec3) => (d[0]! * axis[0] + d[1]! * axis[1] + d[2]! * axis[2]) / r
      const facing = -part(normal) / size
      return facing <= 0 ? 0 : (density * intensity(emitter.beam, part(u), part(v), part(w)) * facing) / (r * r)
    }
    const ends = breaks(emitter, point, normal, centre, length)
    const rough = ends.slice(1).reduce((total, to, i) => total + adaptive(at, ends[i]!, to, Infinity, 6), 0)
    const allowed = Math.max(rough * 1e-8, 1e-11) / ends.length
    return sum + ends.slice(1).reduce((total, to, i) => total + adaptive(at, ends[i]!, to, allowed), 0)
  }, 0)
}

/** Places on the element where the integrand has a kink: the plane's horizon and the table's longitudinal angles. */
function breaks(emitter: Emitter, point: Vec3, normal: Vec3, centre: Vec3, length: number): number[] {
  const { u, v, w } = emitter.frame
  const along = (axis: Vec3, from: Vec3) => [0, 1, 2].reduce((sum, k) => sum + (point[k]! - from[k]!) * axis[k]!, 0)
  const h = Math.hypot(along(v, centre), along(w, centre))
  const foot = along(u, centre)
  const nu = normal[0] * u[0] + normal[1] * u[1] + normal[2] * u[2]
  const nr = along(normal, centre)
  const knees = emitter.beam.kind === 'table' ? emitter.beam.along.map((beta) => foot - h * Math.tan(beta)) : []
  const inner = [nr / nu, foot, ...knees].filter((s) => Math.abs(s) < length / 2)
  return [-length / 2, ...inner, length / 2].sort((a, b) => a - b)
}
