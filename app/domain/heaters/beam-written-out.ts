import { exponentOfFullAngle } from '#app/domain/flux/beam.ts'
import type { BeamData, BeamTableData } from '#app/domain/heaters/heater-model.ts'
import { radians } from '#app/domain/vector.ts'

/** Angles at which a power of the cosine is written out, degrees: 0.3 % of a third power is lost between them near the axis. */
const everyFive = Array.from({ length: 37 }, (_, i) => 5 * i - 90)

/** The beam as a table: a table as it is, half-intensity angles as their powers of the cosine every 5°. */
export function beamWrittenOut(beam: BeamData): BeamTableData {
  if (beam.kind === 'table') return beam
  const across = exponentOfFullAngle(beam.acrossFullAngleDeg)
  const along = exponentOfFullAngle(beam.alongFullAngleDeg)
  const power = (angleDeg: number, exponent: number) => Math.cos(radians(angleDeg)) ** exponent
  return {
    kind: 'table',
    acrossDeg: everyFive,
    alongDeg: everyFive,
    intensity: everyFive.map((a) => everyFive.map((b) => Number((power(a, across) * power(b, along)).toFixed(6)))),
    source: beam.source,
  }
}
