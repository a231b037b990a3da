import type { Beam, TableBeam } from '#app/domain/flux/beam.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import { maxHeaters } from '#app/domain/layout/limits.ts'

/** The largest exponent of a cosine beam for which the closed form holds to its tolerance. */
export const largestExponent = 50

const rightAngle = Math.PI / 2

/** Rounding of degrees to rad at the edge, rad. */
const rounding = 1e-9

const isExponent = (exponent: number) => exponent >= 0 && exponent <= largestExponent

/** Two angles or more, rising, within ±90°. */
const isAxis = (angles: readonly number[]) =>
  angles.length >= 2 &&
  angles.every((angle, i) => Math.abs(angle) <= rightAngle + rounding && (i === 0 || angle > (angles[i - 1] ?? NaN)))

function requireTable({ across, along, intensity }: TableBeam, id: string): void {
  if (!isAxis(across) || !isAxis(along))
    throw new RangeError(`the beam table of heater ${id} needs two rising angles or more each way, from −90° to 90°`)
  const fits = intensity.length === across.length && intensity.every((row) => row.length === along.length)
  const values = intensity.flat()
  if (!fits || !values.every((value) => value >= 0 && value < Infinity) || !values.some((value) => value > 0))
    throw new RangeError(`the beam table of heater ${id} needs an intensity of 0 or more at each angle, one above 0`)
}

function requireBeam(beam: Beam, id: string): void {
  if (beam.kind === 'table') return requireTable(beam, id)
  if (!isExponent(beam.across) || !isExponent(beam.along))
    throw new RangeError(`the beam exponents of heater ${id} must be from 0 to ${largestExponent}`)
}

/**
 * Refuses what would give heat without meaning or without end: a RangeError that states the limit for more than
 * `maxHeaters` emitters, figures that are not finite, negative power or length, and a beam without meaning.
 */
export function requireAnswerable(emitters: readonly Emitter[]): void {
  if (emitters.length > maxHeaters) throw new RangeError(`a map has at most ${maxHeaters} heaters`)
  const seen = new Set<Beam>()
  for (const { id, frame, beam, elements } of emitters) {
    const figures = [frame.u, frame.v, frame.w, ...elements.map(({ centre }) => centre)].flat()
    const sizes = elements.flatMap(({ length, radiantPower }) => [length, radiantPower])
    if (![...figures, ...sizes].every(Number.isFinite)) throw new RangeError(`figures of heater ${id} are not finite`)
    if (sizes.some((size) => size < 0)) throw new RangeError(`power and length of heater ${id} must be 0 or more`)
    if (!seen.has(beam)) requireBeam(beam, id)
    seen.add(beam)
  }
}
