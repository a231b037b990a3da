import type { Vec3 } from '#app/domain/vector.ts'
import { bruteIrradiance } from '#tests/support/adaptive-integrator.ts'

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

/** Directions of a heater by the definitions: turn from +x, tilt from straight down towards the left of u. */
export function directions(turnDeg: number, tiltDeg: number): { u: Vec3; v: Vec3; w: Vec3 } {
  const [turn, tilt] = [(turnDeg * Math.PI) / 180, (tiltDeg * Math.PI) / 180]
  const u: Vec3 = [Math.cos(turn), Math.sin(turn), 0]
  const w: Vec3 = [-Math.sin(turn) * Math.sin(tilt), Math.cos(turn) * Math.sin(tilt), -Math.cos(tilt)]
  const v: Vec3 = [w[1] * u[2] - w[2] * u[1], w[2] * u[0] - w[0] * u[2], w[0] * u[1] - w[1] * u[0]]
  return { u, v, w }
}

/** Irradiance at a point from one element that is given by its angles, W/m²: placed by the definitions, then brute force. */
export function integratedIrradiance(source: LineSource, point: Vec3, normal: Vec3): number {
  const { at, across, along, offset, length, radiantPower } = source
  const frame = directions(source.turnDeg, source.tiltDeg)
  const centre: Vec3 = [at[0] + offset * frame.v[0], at[1] + offset * frame.v[1], at[2] + offset * frame.v[2]]
  const elements = [{ centre, length, radiantPower }]
  return bruteIrradiance({ id: 'line', frame, beam: { kind: 'cosine', across, along }, elements }, point, normal)
}
