import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { irradianceAt, irradianceByEmitter, sphereMeanAt, touchesElement } from '#app/domain/flux/irradiance.ts'
import type { Beam } from '#app/domain/flux/beam.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { bruteIrradiance } from '#tests/support/adaptive-integrator.ts'
import { cosine, cosineBeams, directions, emitters, line, points, tableBeams } from '#tests/support/emitters.ts'

/** Shares of the beam's angles; at its very edge, where some beams end abruptly, either side may be right. */
const shares = fc.integer({ min: 20, max: 980 }).map((thousandths) => thousandths / 1000)

/** Less than this, W/m², counts as unlit: a share of it says nothing. */
const lit = 1e-3

const agrees = (emitter: Emitter, point: Vec3, normal: Vec3) => {
  const [own, brute] = [irradianceAt(emitter, point, normal), bruteIrradiance(emitter, point, normal)]
  expect(Math.abs(own - brute), `${own} against ${brute}`).toBeLessThanOrEqual(Math.max(1e-6 * brute, 1e-9))
}

/** A place and a facing in front of a heater's beam: angles within ±90° or the table's own, 0.15 m to 6 m away. */
const inFront = (heaters: fc.Arbitrary<Emitter>) =>
  fc
    .record({
      emitter: heaters,
      across: shares,
      along: shares,
      distance: fc.double({ min: 0.15, max: 6, noNaN: true }),
    })
    .map(({ emitter, across, along, distance }) => {
      const { beam, frame, elements } = emitter
      const between = (angles: readonly number[], share: number) => angles[0]! + share * (angles.at(-1)! - angles[0]!)
      const halfTurn = [-Math.PI / 2, Math.PI / 2]
      const alpha = between(beam.kind === 'table' ? beam.across : halfTurn, across)
      const beta = between(beam.kind === 'table' ? beam.along : halfTurn, along)
      const parts = [Math.sin(beta), Math.cos(beta) * Math.sin(alpha), Math.cos(beta) * Math.cos(alpha)] as const
      const place = (k: number) =>
        elements[0]!.centre[k]! + distance * (parts[0] * frame.u[k]! + parts[1] * frame.v[k]! + parts[2] * frame.w[k]!)
      return { emitter, point: [place(0), place(1), place(2)] as Vec3 }
    })

/** How many random cases of a beam are lit as the integrator says; each of them agrees to 1e-6 of the value, nothing else. */
function litCasesThatAgree(beams: fc.Arbitrary<Beam>, numRuns: number, seed: number): number {
  let count = 0
  fc.assert(
    fc.property(inFront(emitters(beams)), directions, ({ emitter, point }, normal) => {
      const brute = bruteIrradiance(emitter, point, normal)
      fc.pre(brute > lit)
      count++
      const own = irradianceAt(emitter, point, normal)
      expect(Math.abs(own / brute - 1), `${own} against ${brute}`).toBeLessThanOrEqual(1e-6)
    }),
    { numRuns, seed, endOnFailure: true },
  )
  return count
}

describe('closed form against adaptive integration', () => {
  it('agrees to 1e-6 of the value in 400 random lit cases of real exponents', () => {
    expect(litCasesThatAgree(cosineBeams, 400, 11)).toBeGreaterThanOrEqual(400)
  })

  it('agrees to 1e-6 of the value in 200 random lit cases of tables that are not symmetric', () => {
    expect(litCasesThatAgree(tableBeams, 200, 12)).toBeGreaterThanOrEqual(200)
  })

  it('agrees to 1e-6 or 1e-9 W/m² anywhere in a room, dark places among them', () => {
    fc.assert(fc.property(emitters(), points, directions, agrees), { numRuns: 200, seed: 13, endOnFailure: true })
  })

  const edges = [0, 0.5, 1, 2.5, 49.999, 50]
  it.each(edges.flatMap((a) => edges.map((b) => [a, b] as const)))('agrees for across %d, along %d', (a, b) => {
    const emitter = line(cosine(a, b), { length: 0.8, at: [0, 0, 2], tiltDeg: 20 })
    agrees(emitter, [0.3, 0.2, 0.6], [0, 0, 1])
    agrees(emitter, [0.35, 0.9, 1.1], [1, 0.2, 0.1])
    agrees(emitter, [3, 0.4, 1.9], [-1, 0, 0])
  })

  it('agrees very near an element, beside its end and far away', () => {
    const emitter = line(cosine(1.7, 0.4), { length: 0.6 })
    agrees(emitter, [0.1, 0.001, -0.002], [0, 0, 1])
    agrees(emitter, [0.4, 0, -0.001], [-1, 0, 0.2])
    agrees(emitter, [5, 0, -0.0005], [-1, 0, 0])
    agrees(emitter, [300, 40, -200], [0, 0, 1])
  })
})

describe('what the plane and the beam leave out', () => {
  const emitter = line(cosine(2, 1))

  it('is nothing behind the plane, behind the beam, for no normal and on the element', () => {
    expect(irradianceAt(emitter, [0, 0, -2], [0, 0, -1])).toBe(0)
    expect(irradianceAt(emitter, [0, 0, 2], [0, 0, -1])).toBe(0)
    expect(irradianceAt(emitter, [0, 1, 0], [0, -1, 0])).toBe(0)
    expect(irradianceAt(emitter, [0, 0, -2], [0, 0, 0])).toBe(0)
    expect(irradianceAt(emitter, [0.2, 0, 0], [0, 0, 1])).toBe(0)
  })

  it('names the element that a point lies on', () => {
    expect(touchesElement(emitter, [0.5, 0, 0])).toBe(true)
    expect(touchesElement(emitter, [0.501, 0, 0])).toBe(false)
    expect(touchesElement(emitter, [0.2, 0.001, 0])).toBe(false)
  })

  it('takes a normal of any length', () => {
    expect(irradianceAt(emitter, [0.2, 0.3, -2], [0, 0, 7])).toBeCloseTo(
      irradianceAt(emitter, [0.2, 0.3, -2], [0, 0, 1]),
      12,
    )
  })

  it('gives each emitter its own figure in their order', () => {
    const other = line(cosine(4, 2), { at: [1, 0, 0] })
    const parts = irradianceByEmitter([emitter, other], [0.2, 0.1, -2], [0, 0, 1])
    expect(parts).toEqual([emitter, other].map((each) => irradianceAt(each, [0.2, 0.1, -2], [0, 0, 1])))
  })

  it('sees the tables the right way round: towards +u and, twice as strong, to the right of u', () => {
    const quarter = Math.PI / 2
    const beam = {
      kind: 'table',
      across: [-quarter, 0, quarter],
      along: [-quarter, 0, quarter],
      intensity: [
        [0, 0, 0],
        [0, 0, 1],
        [0, 0, 1],
      ],
    } as const
    const lit = line(beam, { length: 0.1 })
    // v = w × u: at tilt 0 the positive transverse side is the right of u, −y here.
    expect(irradianceAt(lit, [1, -1, -1], [0, 0, 1])).toBeGreaterThan(1)
    expect(irradianceAt(lit, [-1, -1, -1], [0, 0, 1])).toBe(0)
    expect(irradianceAt(lit, [1, 1, -1], [0, 0, 1])).toBeCloseTo(irradianceAt(lit, [1, -1, -1], [0, 0, 1]) / 2, 9)
  })

  it('averages a sphere as the mean over its directions', () => {
    const point: Vec3 = [0.4, 0.7, -1.1]
    const count = 20000
    let sum = 0
    for (let i = 0; i < count; i++) {
      const z = 1 - (2 * i + 1) / count
      const turn = i * Math.PI * (3 - Math.sqrt(5))
      const flat = Math.sqrt(1 - z * z)
      sum += irradianceAt(emitter, point, [flat * Math.cos(turn), flat * Math.sin(turn), z])
    }
    expect(sphereMeanAt(emitter, point) / (sum / count)).toBeCloseTo(1, 4)
  })
})

describe('figures without meaning', () => {
  const emitter = line(cosine(2, 1))
  it.each([
    ['a place', [NaN, 0, -1], [0, 0, 1]],
    ['a height', [0, 0, -Infinity], [0, 0, 1]],
    ['a normal', [0, 0, -1], [0, NaN, 1]],
  ] as const)('are refused: %s', (_, point, normal) => {
    expect(() => irradianceAt(emitter, point, normal)).toThrow(RangeError)
  })

  it('no elements give nothing; an element without length is a point source', () => {
    expect(irradianceAt({ ...emitter, elements: [] }, [0, 0, -1], [0, 0, 1])).toBe(0)
    const point = line(cosine(1, 1), { length: 0 })
    // Lambert: Φ/π at 1 m on the axis.
    expect(irradianceAt(point, [0, 0, -1], [0, 0, 1])).toBeCloseTo(1000 / Math.PI, 6)
  })
})
