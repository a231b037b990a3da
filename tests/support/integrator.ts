import type { Vec3 } from '#app/domain/vector.ts'

/** A tubular element for the integrator: where it is, how it lies, its separable beam. m, W, degrees. */
export interface LineSource {
  readonly at: Vec3
  readonly turnDeg: number
  readonly tiltDeg: number
  readonly across: number
  readonly along: number
  readonly offset: number
  readonly length: number
  readonly radiantPower: number
}

const dot = (a: Vec3, b: Vec3) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2]

/** ln Γ(x) for x > 0 by Stirling's series at x + 10 (Abramowitz and Stegun 6.1.41) and the recurrence down. */
function logGamma(x: number): number {
  let shift = 0
  for (let k = 0; k < 10; k++) shift += Math.log(x + k)
  const y = x + 10
  const series = 1 / (12 * y) - 1 / (360 * y ** 3) + 1 / (1260 * y ** 5) - 1 / (1680 * y ** 7)
  return (y - 0.5) * Math.log(y) - y + 0.5 * Math.log(2 * Math.PI) + series - shift
}

/** ∫ cos^p over ±90° = √π Γ((p + 1) / 2) / Γ(p / 2 + 1). */
export const cosineIntegral = (p: number): number =>
  Math.sqrt(Math.PI) * Math.exp(logGamma((p + 1) / 2) - logGamma(p / 2 + 1))

/** Directions of a heater by the definitions: turn from +x, tilt from straight down towards the left of u. */
export function directions(turnDeg: number, tiltDeg: number): { u: Vec3; v: Vec3; w: Vec3 } {
  const [turn, tilt] = [(turnDeg * Math.PI) / 180, (tiltDeg * Math.PI) / 180]
  const u: Vec3 = [Math.cos(turn), Math.sin(turn), 0]
  const w: Vec3 = [-Math.sin(turn) * Math.sin(tilt), Math.cos(turn) * Math.sin(tilt), -Math.cos(tilt)]
  const v: Vec3 = [w[1] * u[2] - w[2] * u[1], w[2] * u[0] - w[0] * u[2], w[0] * u[1] - w[1] * u[0]]
  return { u, v, w }
}

/**
 * Irradiance at a point from one element by plain summation along it (composite Simpson), W/m²: point sources of a
 * separable beam, the inverse square and the cosine at the receiver. Written for tests, apart from the engine.
 */
export function integratedIrradiance(source: LineSource, point: Vec3, normal: Vec3, steps = 4000): number {
  const { u, v, w } = directions(source.turnDeg, source.tiltDeg)
  const peak = source.radiantPower / (cosineIntegral(source.across) * cosineIntegral(source.along + 1))
  const unit = Math.hypot(...normal)
  const at = (s: number): number => {
    const d: Vec3 = [0, 1, 2].map(
      (i) => point[i]! - source.at[i]! - source.offset * v[i]! - s * u[i]!,
    ) as unknown as Vec3
    const distance = Math.hypot(...d)
    const [du, dv, dw] = [dot(d, u) / distance, dot(d, v) / distance, dot(d, w) / distance]
    const receiver = -dot(d, normal) / (distance * unit)
    if (dw <= 0 || receiver <= 0) return 0
    const across = Math.cos(Math.atan2(dv, dw)) ** source.across
    return (peak * across * Math.sqrt(1 - du * du) ** source.along * receiver) / distance ** 2
  }
  let sum = 0
  for (let i = 0; i <= steps; i++) {
    const weight = i === 0 || i === steps ? 1 : i % 2 === 1 ? 4 : 2
    sum += weight * at(source.length * (i / steps - 0.5))
  }
  return sum / (3 * steps)
}
