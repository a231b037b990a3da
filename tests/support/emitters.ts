import fc from 'fast-check'
import type { Beam } from '#app/domain/flux/beam.ts'
import { groupEmitter, type Emitter } from '#app/domain/flux/emitter.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/** One element at a place, radiating straight down along x unless turned or tilted. */
export function line(
  beam: Beam,
  options: { length?: number; power?: number; at?: Vec3; turnDeg?: number; tiltDeg?: number } = {},
) {
  return groupEmitter({
    id: 'line',
    at: options.at ?? [0, 0, 0],
    turnDeg: options.turnDeg ?? 0,
    tiltDeg: options.tiltDeg ?? 0,
    beam,
    elements: [{ offset: 0, length: options.length ?? 1, radiantPower: options.power ?? 1000 }],
  })
}

export const cosine = (across: number, along: number): Beam => ({ kind: 'cosine', across, along })

const real = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const wholeAngles = (min: number, max: number) =>
  fc
    .uniqueArray(fc.integer({ min, max }), { minLength: 2, maxLength: 8 })
    .map((angles) => angles.sort((a, b) => a - b).map((angle) => (angle * Math.PI) / 180))

/** Beams of cosines with real exponents to 50, small ones as likely as large. */
export const cosineBeams = fc
  .tuple(fc.oneof(real(0, 4), real(0, 50)), fc.oneof(real(0, 4), real(0, 50)))
  .map(([across, along]) => cosine(across, along))

/** Tables of any angles within ±90°, not symmetric, with dark and bright places. */
export const tableBeams = fc.tuple(wholeAngles(-90, 90), wholeAngles(-90, 90)).chain(([across, along]) =>
  fc
    .array(fc.array(real(0, 3), { minLength: along.length, maxLength: along.length }), {
      minLength: across.length,
      maxLength: across.length,
    })
    .map((intensity): Beam => {
      const lit = intensity.map((row, i) => row.map((value, j) => (i === 0 && j === 0 ? value + 0.1 : value)))
      return { kind: 'table', across, along, intensity: lit }
    }),
)

const everyFifteen = Array.from({ length: 13 }, (_, i) => ((i - 6) * Math.PI) / 12)

/** Tables over the whole of ±90° × ±90° in 15° steps with values of no pattern. */
export const fullTables: fc.Arbitrary<Beam> = fc
  .array(fc.array(real(0.05, 2), { minLength: 13, maxLength: 13 }), { minLength: 13, maxLength: 13 })
  .map((intensity) => ({ kind: 'table', across: everyFifteen, along: everyFifteen, intensity }))

const beams = fc.oneof(cosineBeams, tableBeams)

/** Heaters of one to three elements anywhere in a 6 m room, turned and tilted at will. */
export const emitters = (of: fc.Arbitrary<Beam> = beams): fc.Arbitrary<Emitter> =>
  fc
    .record({
      beam: of,
      x: real(-3, 3),
      y: real(-3, 3),
      z: real(1.5, 4),
      turnDeg: real(-180, 180),
      tiltDeg: real(-90, 90),
      length: fc.oneof(real(0.05, 2), real(1e-4, 0.05)),
      power: real(100, 5000),
      offsets: fc.constantFrom([0], [-0.04, 0.04], [-0.08, 0, 0.08]),
    })
    .map(({ beam, x, y, z, turnDeg, tiltDeg, length, power, offsets }) =>
      groupEmitter({
        id: 'any',
        at: [x, y, z],
        turnDeg,
        tiltDeg,
        beam,
        elements: offsets.map((offset) => ({ offset, length, radiantPower: power / offsets.length })),
      }),
    )

export const points: fc.Arbitrary<Vec3> = fc.tuple(real(-4, 4), real(-4, 4), real(0, 1.4))
export const directions: fc.Arbitrary<Vec3> = fc
  .tuple(real(-1, 1), real(-Math.PI, Math.PI))
  .map(([z, turn]) => [Math.sqrt(1 - z * z) * Math.cos(turn), Math.sqrt(1 - z * z) * Math.sin(turn), z])
