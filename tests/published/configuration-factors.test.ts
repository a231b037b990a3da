import { describe, expect, it } from 'vitest'
import type { Beam } from '#app/domain/flux/beam.ts'
import { groupEmitter, type Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { gaussNodes } from '#app/domain/flux/nodes.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { adaptive } from '#tests/support/adaptive-integrator.ts'
import { demoBeams } from '#tests/support/demo-beams.ts'
import { cosine, line } from '#tests/support/emitters.ts'

/**
 * Configuration factors from a small plane to a diffuse surface, against closed forms of J. R. Howell, "A Catalog of
 * Radiation Heat Transfer Configuration Factors", sections B, and Siegel and Howell, "Thermal Radiation Heat Transfer",
 * appendix (formulas and section numbers from memory; double integration of the definition agrees to 1e-12).
 *
 * The surfaces are made of the engine's own line elements with a Lambert beam, a = b = 1: a surface of exitance 1 W/m²
 * is laid out in chords or strips whose powers are Gauss weights, and the irradiance it gives is the factor.
 */
interface Surface {
  readonly centre: Vec3
  readonly turnDeg: number
  readonly tiltDeg: number
  /** Offsets along v, lengths along u and widths of the strips. */
  readonly strips: readonly { offset: number; length: number; width: number }[]
  /** Of every element; Lambert's unless stated. */
  readonly beam?: Beam
}

function emitterOfSurface({ centre, turnDeg, tiltDeg, strips, beam = cosine(1, 1) }: Surface): Emitter {
  const elements = strips.map(({ offset, length, width }) => ({ offset, length, radiantPower: length * width }))
  return groupEmitter({ id: 'surface', at: centre, turnDeg, tiltDeg, beam, elements })
}

/** Chords of a disc, their places by the angle so that the ends are smooth. */
function disc(centre: Vec3, radius: number, turnDeg = 0, tiltDeg = 0): Emitter {
  const strips = gaussNodes(60).map(({ place, weight }) => {
    const angle = (place * Math.PI) / 2
    const half = radius * Math.cos(angle)
    return { offset: radius * Math.sin(angle), length: 2 * half, width: (weight * Math.PI * half) / 2 }
  })
  return emitterOfSurface({ centre, turnDeg, tiltDeg, strips })
}

/** A rectangle of `length` along u and `width` along v about its centre. */
function rectangle(centre: Vec3, length: number, width: number, turnDeg = 0, tiltDeg = 0, beam?: Beam): Emitter {
  const strips = gaussNodes(60).map(({ place, weight }) => ({
    offset: (place * width) / 2,
    length,
    width: (weight * width) / 2,
  }))
  return emitterOfSurface({ centre, turnDeg, tiltDeg, strips, ...(beam && { beam }) })
}

const up: Vec3 = [0, 0, 1]
const within = (value: number, expected: number, relative = 1e-6) =>
  expect(Math.abs(value / expected - 1), `${value} for ${expected}`).toBeLessThanOrEqual(relative)

describe('a small plane and a disc', () => {
  // Parallel, on the axis: r² / (h² + r²).
  it.each([
    [2, 1],
    [1, 1],
    [0.5, 1],
    [3, 0.2],
    [1, 4],
  ])('parallel on the axis, h = %d, r = %d', (h, r) => {
    within(irradianceAt(disc([0, 0, h], r), [0, 0, 0], up), (r * r) / (h * h + r * r))
  })

  // R7, R8, R9: the same as printed figures, to half of the last digit.
  it.each([
    ['R7', 'parallel, on the axis', [0, 0, 0], [0, 0, 1], 0.2, 6],
    ['R8', 'parallel, 1.5 aside', [1.5, 0, 0], [0, 0, 1], 0.102284, 6],
    ['R9', 'upright, 1.5 aside', [1.5, 0, 0], [-1, 0, 0], 0.0656356, 7],
  ] as const)('%s: printed figures, h = 2, r = 1: %s', (_, __, point, normal, expected, digits) => {
    expect(irradianceAt(disc([0, 0, 2], 1), point, normal)).toBeCloseTo(expected, digits)
  })

  // R26: the five-times rule for a Lambert disc: R²/h² of a point against R²/(h² + R²), five diameters away, 1e-6.
  it('R26: a point in place of a disc errs by 1.000 % five diameters away', () => {
    const point = line(cosine(1, 1), { length: 0, power: Math.PI * 0.3 ** 2, at: [0, 0, 3] })
    const taken = irradianceAt(point, [0, 0, 0], up)
    within(taken / irradianceAt(disc([0, 0, 3], 0.3), [0, 0, 0], up), 1.01)
  })

  // Parallel, a aside: ½ [1 − (1 + H² − R²) / √(Z² − 4R²)], H = h/a, R = r/a, Z = 1 + H² + R².
  it.each([
    [2, 1, 1.5],
    [1, 1, 0.5],
    [0.7, 2, 3],
    [4, 0.3, 2],
  ])('parallel aside, h = %d, r = %d, a = %d', (h, r, a) => {
    const [H, R] = [h / a, r / a]
    const Z = 1 + H * H + R * R
    const expected = (1 - (1 + H * H - R * R) / Math.sqrt(Z * Z - 4 * R * R)) / 2
    within(irradianceAt(disc([0, 0, h], r), [a, 0, 0], up), expected)
  })

  // Upright, l aside (l > r): (H/2) [Z / √(Z² − 4R²) − 1], H = h/l, R = r/l.
  it.each([
    [2, 1, 1.5],
    [1, 0.5, 2],
    [3, 1, 1.2],
  ])('upright aside, h = %d, r = %d, l = %d', (h, r, l) => {
    const [H, R] = [h / l, r / l]
    const Z = 1 + H * H + R * R
    const expected = (H / 2) * (Z / Math.sqrt(Z * Z - 4 * R * R) - 1)
    within(irradianceAt(disc([0, 0, h], r), [l, 0, 0], [-1, 0, 0]), expected)
  })

  // A plane on the axis tilted by θ that still sees the whole disc: cosθ r²/(h² + r²) (cosine law of the net flux).
  it.each([10, 25, 45])('tilted %d° on the axis, whole disc in front', (degrees) => {
    const tilt = (degrees * Math.PI) / 180
    const normal: Vec3 = [Math.sin(tilt), 0, Math.cos(tilt)]
    within(irradianceAt(disc([0, 0, 1], 0.8), [0, 0, 0], normal), (Math.cos(tilt) * 0.64) / 1.64)
  })

  it('does not depend on how the chords lie', () => {
    const normal: Vec3 = [0.2, 0.1, 1]
    const at = (turn: number) => irradianceAt(disc([0, 0, 1.3], 1, turn), [0.4, 0.9, 0], normal)
    within(at(37), at(0), 1e-7)
    within(at(90), at(0), 1e-7)
  })

  // Upright on the axis, half of the disc in front: (1/π)[φ − sinφ cosφ], φ = atan(r/h); by integrating the cosine over
  // half a cap. It tends to ½, the factor from a wall to an endless floor; the parallel one to 1.
  it.each([0.5, 1, 2])('upright on the axis, r = %d h, half of it in front', (r) => {
    const phi = Math.atan(r)
    within(irradianceAt(disc([0, 0, 1], r), [0, 0, 0], [1, 0, 0]), (phi - Math.sin(phi) * Math.cos(phi)) / Math.PI)
  })
})

describe('a small plane and a rectangle', () => {
  const corner = (a: number, b: number, c: number) => {
    const [A, B] = [a / c, b / c]
    const term = (p: number, q: number) => (p / Math.sqrt(1 + p * p)) * Math.atan(q / Math.sqrt(1 + p * p))
    return (term(A, B) + term(B, A)) / (2 * Math.PI)
  }

  // Parallel, under a corner: (1/2π)[A/√(1+A²) atan(B/√(1+A²)) + B/√(1+B²) atan(A/√(1+B²))].
  it.each([
    [1, 1, 1],
    [2, 0.5, 1],
    [0.3, 0.7, 2],
    [5, 4, 1],
  ])('parallel under a corner, a = %d, b = %d, c = %d', (a, b, c) => {
    within(irradianceAt(rectangle([a / 2, b / 2, c], a, b), [0, 0, 0], up), corner(a, b, c))
  })

  // To half of the last digit printed; a superposed corner formula beside it to 1e-6.
  it('R10, R12: 0.138532 under the corner of a unit square, 0.0152626 for 1.0 × 0.2 m at 2 m', () => {
    expect(irradianceAt(rectangle([0.5, 0.5, 1], 1, 1), [0, 0, 0], up)).toBeCloseTo(0.138532, 6)
    expect(irradianceAt(rectangle([0, 0, 2], 1, 0.2), [0, 0, 0], up)).toBeCloseTo(0.0152626, 7)
    within(irradianceAt(rectangle([0, 0, 2], 0.2, 1), [0, 0, 0], up), 4 * corner(0.1, 0.5, 2))
  })

  // R13 is the first row. Perpendicular, at a corner: (1/2π)[atan(1/Y) − Y/√(X²+Y²) atan(1/√(X²+Y²))]: the plane lies c from the edge of a
  // rectangle that stands a high and b long; X = a/b, Y = c/b.
  it.each([
    ['R13: ', 1, 1, 1, 0.0557342],
    ['', 2, 1, 0.5, null],
    ['', 0.6, 2, 1.5, null],
  ])('%sperpendicular, a = %d, b = %d, c = %d', (_, a, b, c, printed) => {
    const [X, Y] = [a / b, c / b]
    const root = Math.hypot(X, Y)
    const expected = (Math.atan(1 / Y) - (Y / root) * Math.atan(1 / root)) / (2 * Math.PI)
    // The rectangle stands on the floor along y, its beam towards −x: turned 90°, tilted 90° to the left of +y.
    const wall = rectangle([c, b / 2, a / 2], b, a, 90, 90)
    within(irradianceAt(wall, [0, 0, 0], up), expected)
    if (printed) expect(irradianceAt(wall, [0, 0, 0], up)).toBeCloseTo(printed, 7)
  })

  // An infinitely long strip seen between the angles φ1 and φ2 from the normal: ½ (sin φ2 − sin φ1).
  it.each([
    [-0.5, 0.5, 1],
    [0.2, 1.4, 0.8],
    [1, 6, 1],
  ])('an endless strip from %d to %d at height %d', (from, to, h) => {
    const strip = rectangle([0, -(from + to) / 2, h], 40_000, to - from)
    const sine = (y: number) => y / Math.hypot(y, h)
    within(irradianceAt(strip, [0, 0, 0], up), (sine(to) - sine(from)) / 2, 2e-6)
  })

  // Superposition of factors: a rectangle is the sum of its four quarters, wherever the plane is.
  it('is the sum of its parts', () => {
    const normal: Vec3 = [0.3, -0.4, 1]
    const point: Vec3 = [0.9, -0.2, 0]
    const parts = [-0.25, 0.25].flatMap((x) => [-0.2, 0.2].map((y) => rectangle([x, y, 1.1], 0.5, 0.4)))
    const sum = parts.reduce((total, part) => total + irradianceAt(part, point, normal), 0)
    within(sum, irradianceAt(rectangle([0, 0, 1.1], 1, 0.8), point, normal), 1e-9)
  })
})

describe('exchange of energy', () => {
  // Reciprocity: the mean factor from a disc to a coaxial parallel disc, X − √(X² − 4R²) over 2 with X = 1 + (1+R2²)/R1²
  // (Howell, C-41, number from memory), here as the power that falls on the lower of two unit discs one apart.
  it('two parallel unit discs one apart exchange the share (3 − √5)/2', () => {
    const upper = disc([0, 0, 1], 1)
    const received = gaussNodes(24).reduce((sum, { place, weight }) => {
      const r = (place + 1) / 2
      return sum + (weight / 2) * 2 * Math.PI * r * irradianceAt(upper, [r, 0, 0], up)
    }, 0)
    within(received / Math.PI, (3 - Math.sqrt(5)) / 2, 1e-6)
  })
})

describe.each(demoBeams)('a surface that radiates as $code does', ({ model, beam }) => {
  // Each line of an endless strip sends its power through the cylinders about it, f(α)/∫f of it per angle, whatever the
  // beam lengthwise; over the strip the distances cancel: ∫ f(α) dα between its edges over the whole ∫ f(α) dα. The
  // beam from the data sheet: half the intensity at half of the full angle.
  const half = model.beam?.kind === 'angles' ? (model.beam.acrossFullAngleDeg * Math.PI) / 360 : Number.NaN
  const across = (alpha: number) => 0.5 ** (Math.log(Math.cos(alpha)) / Math.log(Math.cos(half)))
  const whole = 2 * adaptive(across, 0, Math.PI / 2 - 1e-9, 1e-10)

  it.each([
    [-0.5, 0.5, 1],
    [0.2, 1.4, 0.8],
    [1, 6, 1],
  ])('an endless strip from %d to %d at height %d', (from, to, h) => {
    const strip = rectangle([0, -(from + to) / 2, h], 40_000, to - from, 0, 0, beam)
    const share = adaptive(across, Math.atan(from / h), Math.atan(to / h), 1e-10) / whole
    within(irradianceAt(strip, [0, 0, 0], up), share, 2e-6)
  })

  it('is the sum of its parts', () => {
    const normal: Vec3 = [0.3, -0.4, 1]
    const point: Vec3 = [0.9, -0.2, 0]
    const parts = [-0.25, 0.25].flatMap((x) => [-0.2, 0.2].map((y) => rectangle([x, y, 1.1], 0.5, 0.4, 0, 0, beam)))
    const sum = parts.reduce((total, part) => total + irradianceAt(part, point, normal), 0)
    within(sum, irradianceAt(rectangle([0, 0, 1.1], 1, 0.8, 0, 0, beam), point, normal), 1e-9)
  })
})
