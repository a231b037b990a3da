import { describe, expect, it } from 'vitest'
import { beamOf, relativeIntensity, solidAngleOf, type Beam } from '#app/domain/flux/beam.ts'
import { beamTableOf } from '#app/domain/flux/beam-table.ts'
import { cosineTable, ratioAt, wholeCosineIntegral } from '#app/domain/flux/cosine-integral.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { adaptive } from '#tests/support/adaptive-integrator.ts'
import { cosine, line } from '#tests/support/emitters.ts'

const degreesBy = (step: number, from = -90, to = 90) =>
  Array.from({ length: Math.round((to - from) / step) + 1 }, (_, i) => from + i * step)
const rad = (degrees: number) => (degrees * Math.PI) / 180

/** cos^a α cos^b β written out as a table. */
function tabulated(a: number, b: number, step: number, from = -90): Beam {
  const angles = degreesBy(step, from)
  const at = (power: number, angle: number) => Math.max(0, Math.cos(rad(angle))) ** power
  return beamOf({
    kind: 'table',
    acrossDeg: angles,
    alongDeg: angles,
    intensity: angles.map((alpha) => angles.map((beta) => at(a, alpha) * at(b, beta))),
    source: 'test',
  })
}

describe('tabulated beams', () => {
  it('normalise exactly: the integral of the bilinear surface, here by Simpson cell by cell', () => {
    const beam = tabulated(2.3, 1.4, 15)
    if (beam.kind !== 'table') throw new Error('a table')
    const { across, along } = beam
    let sum = 0
    for (let i = 0; i + 1 < across.length; i++) {
      for (let j = 0; j + 1 < along.length; j++) {
        const inner = (alpha: number) =>
          adaptive((beta) => relativeIntensity(beam, alpha, beta) * Math.cos(beta), along[j]!, along[j + 1]!, 1e-13, 20)
        sum += (across[i + 1]! - across[i]!) * inner((across[i]! + across[i + 1]!) / 2)
      }
    }
    expect(solidAngleOf(beam) / sum).toBeCloseTo(1, 9)
  })

  // Linear interpolation of a cosine in steps of δ loses δ²/12 of it (trapezium rule): twice 0.06 % at 5°.
  it.each([
    [5, 0.0006],
    [10, 0.0026],
  ])('in %d° steps lie within %d of cos² cos', (step, share) => {
    const exact = solidAngleOf(cosine(2, 1))
    expect(Math.abs(solidAngleOf(tabulated(2, 1, step)) / exact - 1)).toBeLessThanOrEqual(share * 2)
    const point = [0.4, 0.5, -1.6] as const
    const [fine, own] = [line(cosine(2, 1)), line(tabulated(2, 1, step))]
    expect(Math.abs(irradianceAt(own, point, [0, 0, 1]) / irradianceAt(fine, point, [0, 0, 1]) - 1)).toBeLessThan(
      10 * share,
    )
  })

  it('an axis that starts at 0 is taken as symmetric', () => {
    expect(tabulated(3, 2, 10, 0)).toEqual(tabulated(3, 2, 10))
  })

  it('radiate nothing beyond ±90° even where the table goes on, and nothing where it is silent', () => {
    const beam = beamOf({
      kind: 'table',
      acrossDeg: [-120, 120],
      alongDeg: [-30, 30],
      intensity: [
        [1, 1],
        [1, 1],
      ],
      source: 'test',
    })
    // A half cylinder of directions: π wide across, sin 30° − sin(−30°) = 1 high.
    expect(solidAngleOf(beam)).toBeCloseTo(Math.PI, 12)
    expect(relativeIntensity(beam, rad(89), 0)).toBe(1)
    expect(relativeIntensity(beam, rad(91), 0)).toBe(0)
    expect(relativeIntensity(beam, 0, rad(31))).toBe(0)
  })
})

describe('the table behind real exponents', () => {
  const whole = [
    [0, (x: number) => x],
    [1, (x: number) => 1 - Math.cos(x)],
    [2, (x: number) => x / 2 - Math.sin(2 * x) / 4],
    [3, (x: number) => (4 * Math.sin(x / 2) ** 4 * (2 + Math.cos(x))) / 3],
  ] as const

  it.each(whole)('D_%d(x) keeps 1e-9 of its own value from 0.02 to 90°', (p, exact) => {
    for (let x = 0.02; x <= Math.PI / 2; x += 0.0137) {
      const own = Math.sin(x) ** (p + 1) * ratioAt(cosineTable(p), x)
      expect(Math.abs(own / exact(x) - 1)).toBeLessThan(1e-9)
    }
  })

  it.each([0.1, 0.5, 1.7, 4.4, 12.3, 27.9, 51])(
    'D_%d between the entries agrees with adaptive integration to 1e-9',
    (p) => {
      for (let x = 0.05; x < Math.PI / 2; x += 0.0713) {
        // t⁴ tames the power at 0.
        const exact = adaptive((t) => Math.sin(x * t ** 4) ** p * 4 * x * t ** 3, 0, 1, 1e-13 * Math.sin(x) ** (p + 1))
        expect(Math.abs((Math.sin(x) ** (p + 1) * ratioAt(cosineTable(p), x)) / exact - 1)).toBeLessThan(1e-9)
      }
    },
  )

  it.each([0, 0.25, 1, 3.3, 20, 51])('reaches half of W(%d) at 90°', (p) => {
    expect((2 * ratioAt(cosineTable(p), Math.PI / 2)) / wholeCosineIntegral(p)).toBeCloseTo(1, 12)
  })
})

describe('beam tables as CSV', () => {
  const csv = 'deg,-90,0,90\n-90,0,0,0\n0,0,1,0.2\n90,0,0,0\n'

  it('reads angles and intensities, with any of the three separators', () => {
    const expected = {
      kind: 'table',
      acrossDeg: [-90, 0, 90],
      alongDeg: [-90, 0, 90],
      intensity: [
        [0, 0, 0],
        [0, 1, 0.2],
        [0, 0, 0],
      ],
      source: 'sheet 3',
    }
    for (const separator of [',', ';', '\t']) {
      expect(beamTableOf(csv.replaceAll(',', separator), 'sheet 3')).toEqual({ beam: expected })
    }
  })

  it.each([
    ['a figure that is none', csv.replace('0.2', 'o.2'), 3, 4],
    ['a missing figure', csv.replace(',0.2', ''), 3, 4],
    ['a negative intensity', csv.replace('0.2', '-0.2'), 3, 4],
    ['angles that do not rise along', csv.replace('deg,-90,0,90', 'deg,-90,0,-10'), 1, 4],
    ['angles that do not rise across', csv.replace('\n90,', '\n-1,'), 4, 1],
    ['an angle beyond 180°', csv.replace('\n90,', '\n190,'), 4, 1],
    ['too many figures', csv.replace('0.2', '0.2,0.1'), 3, 5],
    ['darkness', csv.replace('1,0.2', '0,0'), 2, 2],
    ['one row', 'deg,0,90\n0,1,0\n', 2, 1],
    ['nothing', '', 1, 1],
    ['a figure of another base', csv.replace('0.2', '0x10'), 3, 4],
    ['a comma for a point', csv.replaceAll(',', ';').replace('0.2', '0,2'), 3, 4],
    ['an empty line in the middle', csv.replace('\n0,', '\n\n0,'), 3, 1],
    ['an empty row of a spreadsheet', csv.replace('\n0,', '\n , ,,\n0,'), 3, 1],
    ['angles that are one', csv.replace('deg,-90,0,90', 'deg,-90,0,0.001'), 1, 4],
    ['an intensity beyond any scale', csv.replace('0.2', '1e300'), 3, 4],
    ['a table behind the element across', 'deg,-90,0,90\n100,1,1,1\n120,1,1,1\n', 2, 1],
    ['a table that only touches 90° across', 'deg,-90,0,90\n90,1,1,1\n120,1,1,1\n', 2, 1],
    ['a table beyond the ends of the element', 'deg,-180,-90\n-30,1,1\n30,1,1\n', 1, 2],
    ['heat to the back alone', 'deg,-180,-120,-90,0\n-30,1,1,0,0\n30,1,1,0,0\n', 2, 2],
  ])('names row and column of %s', (_, text, row, column) => {
    expect(beamTableOf(text, 'x')).toMatchObject({ faults: [{ row, column }] })
  })

  it('names every place that is wrong, and an empty line as such and not as missing figures', () => {
    const wrong = 'deg,-90,x,90\n-90,0,0,0\n\n0,1,-1,0x1\n90,0,0,0\n'
    const { faults } = beamTableOf(wrong, 'x') as { faults: { row: number; column: number; error: string }[] }
    expect(faults.map(({ row, column }) => [row, column])).toEqual([
      [1, 3],
      [3, 1],
      [4, 3],
      [4, 4],
    ])
    expect(faults[1]?.error).toBe('this line is empty')
  })

  it('stops naming places after the first fifty', () => {
    const many = `deg${',x'.repeat(100)}\n${`0${',x'.repeat(100)}\n`.repeat(3)}`
    expect(beamTableOf(many, 'x')).toMatchObject({ faults: { length: 50 } })
  })

  it('reads figures with a sign, an exponent or a typeset minus, and passes over what a sheet leaves empty at its end', () => {
    const written = '\uFEFF,\u221290,+30\r\n-90,1E-1,.5\r\n90,2.,0\r\n,,\r\n\r\n'
    expect(beamTableOf(written, 'x')).toEqual({
      beam: {
        kind: 'table',
        acrossDeg: [-90, 90],
        alongDeg: [-90, 30],
        intensity: [
          [0.1, 0.5],
          [2, 0],
        ],
        source: 'x',
      },
    })
  })

  it('takes a table that reaches the front only in part', () => {
    expect(beamTableOf('deg,-90,90\n80,1,1\n100,1,1\n', 'x')).toHaveProperty('beam')
  })
})
