import { describe, expect, it } from 'vitest'
import { exponentOfFullAngle, fullAngleOfExponent, solidAngleOf } from '#app/domain/flux/beam.ts'
import { wholeCosineIntegral } from '#app/domain/flux/cosine-integral.ts'
import { irradianceAt, scalarIrradianceAt, sphereMeanAt } from '#app/domain/flux/irradiance.ts'
import { gaussNodes } from '#app/domain/flux/nodes.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { adaptive, bruteIrradiance } from '#tests/support/adaptive-integrator.ts'
import { demoBeams } from '#tests/support/demo-beams.ts'
import { cosine, line } from '#tests/support/emitters.ts'

/**
 * Closed forms of radiometry. Every figure is derived by hand from the definitions, or quoted with its source; the
 * tolerance of a row is that of the digits printed.
 */
const up: Vec3 = [0, 0, 1]
const within = (value: number, expected: number, relative: number) =>
  expect(Math.abs(value / expected - 1), `${value} for ${expected}`).toBeLessThanOrEqual(relative)
const pointSource = (a: number, b: number, power = 1000) => line(cosine(a, b), { length: 0, power })

describe('normalisation of a beam', () => {
  // R1, R2: I0 = (n+1) Φ / 2π for cos^n θ, which is cos^n α · cos^n β; derivation, 1e-6.
  it.each([
    ['R1', 1, 318.31],
    ['R2', 3, 636.62],
  ])('%s: 1000 W of cos^%d θ have an axial intensity of %d W/sr', (_, n, intensity) => {
    within(1000 / solidAngleOf(cosine(n, n)), intensity, 1e-6)
    within(1000 / solidAngleOf(cosine(n, n)), ((n + 1) * 1000) / (2 * Math.PI), 1e-12)
  })

  // R3: W(p) = √π Γ((p+1)/2) / Γ(p/2+1), closed form; whole exponents by hand, far within the row's 1e-6.
  it.each([
    [0, Math.PI],
    [1, 2],
    [2, Math.PI / 2],
    [3, 4 / 3],
    [4, (3 * Math.PI) / 8],
    [5, 16 / 15],
    [6, (5 * Math.PI) / 16],
  ])('R3: ∫ cos^%d over ±90° is %d', (p, expected) => {
    within(wholeCosineIntegral(p), expected, 1e-13)
  })

  // W(p) W(p−1) = 2π/p for every real p > 0: from Γ(x+1) = x Γ(x).
  it.each([0.3, 1.7, 2.718, 9.5, 33.3, 51])('W(p) W(p−1) = 2π/p at p = %d', (p) => {
    within(wholeCosineIntegral(p) * wholeCosineIntegral(p - 1), (2 * Math.PI) / p, 1e-13)
  })

  // R4: I0 = Φ / (W(a) W(b+1)); derivation, 1e-5.
  it.each([
    [1, 1, 318.31],
    [2, 1, 405.285],
    [3, 1, 477.465],
    [6, 1, 648.456],
    [3, 3, 636.62],
  ])('R4: 1000 W of cos^%d α cos^%d β: %d W/sr', (a, b, intensity) => {
    within(1000 / solidAngleOf(cosine(a, b)), intensity, 1e-5)
  })
})

describe('half-intensity angles', () => {
  // cos^n(half angle) = 1/2; Lambert's half angle is 60° by definition, cos² halves at 45°.
  it.each([
    [120, 1],
    [90, 2],
    [60, Math.log(0.5) / Math.log(Math.sqrt(3) / 2)],
  ])('a full angle of %d° is the exponent %d', (angle, exponent) => {
    within(exponentOfFullAngle(angle), exponent, 1e-12)
    within(fullAngleOfExponent(exponent), angle, 1e-12)
  })
})

describe('point sources', () => {
  // R5, R6: inverse square and cosine laws, I0 cos⁴θ/h² with I0 = Φ/π. The printed figures to half of their last digit;
  // the law itself to 1e-6.
  it.each([
    ['R5', 'on the axis at 2 m', [0, 0, -2], 79.577, 1000 / Math.PI / 4],
    ['R6', '2 m aside at 2 m below', [2, 0, -2], 19.894, 1000 / Math.PI / 4 / 4],
  ] as const)('%s: Lambert, 1000 W, %s', (_, __, point, printed, law) => {
    const own = irradianceAt(pointSource(1, 1), point, up)
    expect(own).toBeCloseTo(printed, 3)
    within(own, law, 1e-6)
  })

  it.each([0.5, 1, 2.2, 3, 7])('cos^%d θ: E = I0 cos^(n+1) θ / r² at 1 m below and 0.7, −0.4 aside', (n) => {
    const r2 = 1 + 0.49 + 0.16
    const expected = (((n + 1) * 1000) / (2 * Math.PI)) * (1 / Math.sqrt(r2)) ** (n + 1) * (1 / r2)
    within(irradianceAt(pointSource(n, n), [0.7, -0.4, -1], up), expected, 1e-9)
  })

  // R32: lowering a cos^n source raises E inside x/h = √(2/(n+1)) and lowers it outside: dE/dh = 0; derivation. The place
  // is sought by bisection, to 1e-4; E there to half of the printed share's last digit.
  it.each([
    [1, 1.0, 0.25],
    [2, 0.8165, 0.279],
    [3, 0.7071, 0.296],
  ])('R32: cos^%d: the height does not matter at x/h = %d, where E is %d of the peak', (n, place, share) => {
    const at = (x: number, h: number) => irradianceAt(pointSource(n, n), [x, 0, -h], up)
    let [inside, outside] = [0.1, 3]
    for (let turn = 0; turn < 40; turn++) {
      const middle = (inside + outside) / 2
      if (at(middle, 0.9999) > at(middle, 1.0001)) inside = middle
      else outside = middle
    }
    expect(Math.abs(inside - place)).toBeLessThanOrEqual(1e-4)
    expect(at(inside, 1) / at(0, 1)).toBeCloseTo(share, 3)
  })

  // R30: share of a cos^n source on the disc of radius h at distance h: 1 − cos^(n+1) 45°; derivation, 1e-6.
  it.each([
    [1, 0.5],
    [3, 0.75],
    [2, 1 - Math.SQRT1_2 ** 3],
  ])('R30: cos^%d: %d of its power falls on the disc of radius h below it', (n, share) => {
    const ring = (r: number) => irradianceAt(pointSource(n, n), [r, 0, -1], up) * 2 * Math.PI * r
    const power = gaussNodes(40).reduce((sum, { place, weight }) => sum + (weight / 2) * ring((place + 1) / 2), 0)
    within(power / 1000, share, 1e-6)
  })
})

describe('a line of 1 m and 1000 W', () => {
  const beneath: Vec3 = [0, 0, -2]
  const aside: Vec3 = [0.5, 1, -2]
  // R15–R20, 1e-5: derivation; scipy's quad and dblquad on the defining integral agree.
  it.each([
    ['R15', 2, 1, beneath, up, 97.3236],
    ['R16', 2, 1, aside, up, 51.4363],
    ['R17', 2, 1, [0, 2, -2], up, 17.5483],
    ['R18', 2, 1, aside, [0, -1, 0], 25.7181],
    ['R18', 2, 1, aside, [-1, 0, 0], 12.0833],
    ['R19', 1, 1, beneath, up, 76.4378],
    ['R19', 3, 1, beneath, up, 114.6567],
    ['R19', 6, 1, beneath, up, 155.7178],
    ['R19', 3, 3, beneath, up, 149.9021],
    ['R20', 1, 1, aside, up, 45.1663],
    ['R20', 3, 1, aside, up, 54.1996],
    ['R20', 6, 1, aside, up, 52.6708],
    ['R20', 3, 3, aside, up, 68.3467],
  ] as const)('%s: cos^%d α cos^%d β at %j facing %j: %d W/m²', (_, a, b, point, normal, expected) => {
    within(irradianceAt(line(cosine(a, b)), point, normal), expected, 1e-5)
  })

  const unit = line(cosine(2, 1), { power: 100 * solidAngleOf(cosine(2, 1)) })

  // R21: closed form with clipping, 1e-4; 400 Gauss nodes give 122.551.
  it('R21: is cut by a plane that half of it lies behind: 122.549 W/m²', () => {
    within(irradianceAt(unit, [0, 0, -0.3], [1, 0, 0]), 122.549, 1e-4)
  })

  // R23: derivation, 1e-5; scipy agrees.
  it('R23: gives a small sphere 3.65148 W/m² on the mean, a quarter of the scalar irradiance', () => {
    within(sphereMeanAt(unit, aside), 3.65148, 1e-5)
    within(scalarIrradianceAt([unit], aside), 4 * 3.65148, 1e-5)
  })
})

describe('the closed forms of whole exponents', () => {
  // E = I0 f(α)/(L h) [n_h C_(b+1)(β) − n_u′ cos^(b+1)β/(b+1)], C1 … C4 by hand; β from the receiver to the element.
  const c = [
    (x: number) => x,
    (x: number) => Math.sin(x),
    (x: number) => x / 2 + Math.sin(2 * x) / 4,
    (x: number) => Math.sin(x) - Math.sin(x) ** 3 / 3,
    (x: number) => (3 * x) / 8 + Math.sin(2 * x) / 4 + Math.sin(4 * x) / 32,
  ]
  const places: Vec3[] = [
    [0.1, 0.5, -1.4],
    [1.9, -0.8, -0.7],
    [-3, 0.2, -2.1],
  ]
  it.each([0, 1, 2, 3].flatMap((b) => places.map((point) => [b, point] as const)))('b = %d at %j', (b, point) => {
    const [x, y, z] = point
    const h = Math.hypot(y, z)
    const [from, to] = [Math.atan2(-0.5 - x, h), Math.atan2(0.5 - x, h)]
    const whole = [Math.PI, 2, Math.PI / 2, 4 / 3, (3 * Math.PI) / 8]
    const i0 = 1000 / (whole[2]! * whole[b + 1]!)
    const factor = (i0 * (-z / h) ** 2) / h
    within(
      irradianceAt(line(cosine(2, b)), point, [0, 0, 1]),
      factor * (-z / h) * (c[b + 1]!(to) - c[b + 1]!(from)),
      1e-8,
    )
    within(4 * sphereMeanAt(line(cosine(2, b)), point), factor * (c[b]!(to) - c[b]!(from)), 1e-8)
    const sideways = (Math.cos(from) ** (b + 1) - Math.cos(to) ** (b + 1)) / (b + 1)
    // A wall along the element sees all of it when the element lies on one side of the point.
    if (Math.abs(x) > 0.5) {
      within(irradianceAt(line(cosine(2, b)), point, [-Math.sign(x), 0, 0]), factor * Math.abs(sideways), 1e-8)
    }
  })
})

describe('long and far lines', () => {
  // Infinite Lambert line: E = (Φ/L) / (2 h) beneath it; derivation (∫ cos² over ±90° = π/2, I0 = Φ/π).
  it.each([0.5, 1, 2, 4])('an infinite line gives Φ/(2 L h) at %d m', (h) => {
    within(irradianceAt(line(cosine(1, 1), { length: 4000, power: 4e6 }), [0, 0, -h], up), 1000 / (2 * h), 1e-6)
  })

  // R25: error of taking a Lambert line across the axis as a point, d lengths away: I0/d² against the closed form, to half
  // of the last digit printed. The rule itself (1 % at five times the largest dimension): ies.org, definition 9.1.1.
  it.each([
    [1, 15.79, 0.005],
    [2, 4.11, 0.005],
    [3, 1.84, 0.005],
    [5, 0.665, 0.0005],
    [10, 0.167, 0.0005],
  ])('R25: a point in place of a line errs at %d lengths by %d %% (± %d)', (d, percent, within) => {
    const exact = irradianceAt(line(cosine(1, 1)), [0, 0, -d], up)
    const taken = irradianceAt(pointSource(1, 1), [0, 0, -d], up)
    expect(Math.abs(100 * (taken / exact - 1) - percent)).toBeLessThanOrEqual(within)
  })
})

/** Laws that hold for any beam, for each of the invented catalogue; the data sheet states the angles of half intensity. */
describe.each(demoBeams)('the beam of $code', ({ model, beam }) => {
  const lamp = line(beam, { length: 0 })
  /** Irradiance of a plane that faces the lamp from 1 m away, in the direction of α and β. */
  const facing = (alpha: number, beta: number) => {
    const towards: Vec3 = [Math.sin(beta), -Math.cos(beta) * Math.sin(alpha), -Math.cos(beta) * Math.cos(alpha)]
    return irradianceAt(lamp, towards, [-towards[0], -towards[1], -towards[2]])
  }
  const halfAngles =
    model.beam?.kind === 'angles'
      ? [model.beam.acrossFullAngleDeg, model.beam.alongFullAngleDeg].map((full) => (full * Math.PI) / 360)
      : []
  const [across = Number.NaN, along = Number.NaN] = halfAngles

  it('sends 1000 W through the half sphere in front of it, nothing behind', () => {
    const nodes = gaussNodes(60).map(({ place, weight }) => ({
      angle: (place * Math.PI) / 2,
      width: (weight * Math.PI) / 2,
    }))
    const power = nodes.reduce(
      (sum, alpha) =>
        sum +
        nodes.reduce(
          (row, beta) => row + facing(alpha.angle, beta.angle) * Math.cos(beta.angle) * alpha.width * beta.width,
          0,
        ),
      0,
    )
    within(power, 1000, 1e-6)
    expect(facing(2, 0.3)).toBe(0)
  })

  it('has half of its intensity at half of the angles on the data sheet, either side', () => {
    for (const side of [-1, 1]) {
      within(facing(side * across, 0) / facing(0, 0), 0.5, 1e-9)
      within(facing(0, side * along) / facing(0, 0), 0.5, 1e-9)
    }
  })

  it('as a point, falls by the square of the distance and the cosine of the plane', () => {
    const near = irradianceAt(lamp, [0.3, -0.4, -1.2], [-0.3, 0.4, 1.2])
    within(irradianceAt(lamp, [0.6, -0.8, -2.4], [-0.3, 0.4, 1.2]), near / 4, 1e-9)
    within(irradianceAt(lamp, [0.3, -0.4, -1.2], up), (near * 1.2) / 1.3, 1e-9)
    within(scalarIrradianceAt([lamp], [0.3, -0.4, -1.2]), near, 1e-9)
  })

  it('as a line, errs as a point by the square of its length over the distance', () => {
    const error = (d: number) => irradianceAt(lamp, [0, 0, -d], up) / irradianceAt(line(beam), [0, 0, -d], up) - 1
    expect(error(10)).toBeLessThan(0.01)
    expect(error(10) / error(20)).toBeCloseTo(4, 1)
  })

  // By energy through the cylinders about it: Φ/L · f(α) / ∫ f, over h, whatever the beam lengthwise.
  it('as an endless line, falls with the distance and not its square', () => {
    const profile = (alpha: number) => 0.5 ** (Math.log(Math.cos(alpha)) / Math.log(Math.cos(across)))
    const whole = 2 * adaptive(profile, 0, Math.PI / 2 - 1e-9, 1e-10)
    const endless = line(beam, { length: 4000, power: 4e6 })
    for (const h of [0.5, 1, 2, 4]) within(irradianceAt(endless, [0, 0, -h], up), 1000 / whole / h, 1e-6)
    within(irradianceAt(endless, [0, 1, -1], [0, -1, 1]), (1000 * profile(Math.PI / 4)) / whole / Math.SQRT2, 1e-6)
  })

  it.each([
    [[0, 0, -2], up],
    [[0.5, 1, -2], up],
    [[0, 2, -2], up],
    [
      [0.5, 1, -2],
      [0, -1, 0],
    ],
    [
      [0.5, 1, -2],
      [-1, 0, 0],
    ],
    [
      [0, 0, -0.3],
      [1, 0, 0],
    ],
  ] as const)('as a line, agrees with the integral at the places of R15 to R21: %j facing %j', (point, normal) => {
    const whole = line(beam)
    within(irradianceAt(whole, point, normal), bruteIrradiance(whole, point, normal), 1e-6)
  })
})
