import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { combineReadings } from '#app/domain/photo/combine.ts'
import { combined, sigmaOf, type Estimate } from '#app/domain/photo/estimate.ts'
import { heightOverPlane } from '#app/domain/photo/height-over-plane.ts'
import { lengthInPlane, type MarkedPhoto } from '#app/domain/photo/length-in-plane.ts'
import type { PhotoPlane } from '#app/domain/photo/measurements.ts'
import { photoTolerance } from '#app/domain/photo/photo-tolerance.ts'
import { chance } from '#tests/support/chance.ts'
import { floorPhoto, given, markOf } from '#tests/support/marked-photo.ts'
import { normal, randomCameras, type PinHole } from '#tests/support/pin-hole-camera.ts'

type Mark = [number, number]
const cameras = randomCameras(77, 8)

const spread = (values: readonly number[]): number => {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length
  return Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1))
}

/** The same photo with every click off by about 1 px and every size off by half its tolerance, as a person would. */
function clickedAgain(photo: MarkedPhoto & { plane: PhotoPlane }, next: () => number): MarkedPhoto {
  const mark = ([x, y]: Mark): Mark => [x + normal(next), y + normal(next)]
  const size = (value: number, tolerance: number) => value + (tolerance / 2) * normal(next)
  const { plane } = photo
  const [a, b, c, d] = plane.corners
  const { known, other, height, tolerance } = plane.vertical!
  const moved: PhotoPlane = {
    ...plane,
    corners: [mark(a), mark(b), mark(c), mark(d)],
    width: size(plane.width, plane.tolerance),
    depth: size(plane.depth, plane.tolerance),
    vertical: {
      known: { foot: mark(known.foot), top: mark(known.top) },
      other: { foot: mark(other.foot), top: mark(other.top) },
      height: size(height, tolerance),
      tolerance: 0,
    },
  }
  // Without errors of its own only the figure is worked out.
  return { ...photo, marks: { ...photo.marks, clickSigma: 0, planes: [{ ...moved, tolerance: 0 }] } }
}

const trials = 1500

const lengthOf = (photo: MarkedPhoto, a: Mark, b: Mark): Estimate =>
  given(lengthInPlane(photo, { id: 'l', from: { at: a, plane: 'floor' }, to: { at: b, plane: 'floor' } }))

const heightOf = (photo: MarkedPhoto, foot: Mark, top: Mark): Estimate =>
  given(heightOverPlane(photo, { id: 'h', foot: { at: foot, plane: 'floor' }, top }))

describe('standard errors against a seeded Monte Carlo of clicks and reference sizes', () => {
  const next = chance(5)
  const mark = ([x, y]: Mark): Mark => [x + normal(next), y + normal(next)]

  it.each(cameras.map((camera, k) => [k, camera] as const))('camera %i: lengths', (_, camera: PinHole) => {
    const photo = floorPhoto(camera, 0.02)
    const [a, b] = [markOf(camera, [-0.9, 0.8, 0]), markOf(camera, [1.1, -0.4, 0])]
    const found = Array.from({ length: trials }, () => lengthOf(clickedAgain(photo, next), mark(a), mark(b)).value)
    expect(Math.abs(sigmaOf(lengthOf(photo, a, b)) / spread(found) - 1)).toBeLessThan(0.1)
  })

  it.each(cameras.map((camera, k) => [k, camera] as const))('camera %i: heights', (_, camera: PinHole) => {
    const photo = floorPhoto(camera, 0.02, 0.02)
    const [foot, top] = [markOf(camera, [0.4, 0.5, 0]), markOf(camera, [0.4, 0.5, 2.45])]
    const found = Array.from({ length: trials }, () => heightOf(clickedAgain(photo, next), mark(foot), mark(top)).value)
    expect(Math.abs(sigmaOf(heightOf(photo, foot, top)) / spread(found) - 1)).toBeLessThan(0.1)
  })

  it('one length read twice in one photo: the mean keeps the error of the common reference', () => {
    const [camera] = cameras
    const photo = floorPhoto(camera!, 0.08)
    const [a, b] = [markOf(camera!, [-0.9, 0.7, 0]), markOf(camera!, [1, -0.6, 0])]
    const both = (of: MarkedPhoto, p: Mark, q: Mark, r: Mark, s: Mark) => {
      const read = (id: string, from: Mark, to: Mark) =>
        given(lengthInPlane(of, { id, from: { at: from, plane: 'floor' }, to: { at: to, plane: 'floor' } }))
      return combineReadings([read('one', p, q), read('two', r, s)])!.estimate
    }
    const stated = sigmaOf(both(photo, a, b, a, b))
    const found = Array.from(
      { length: trials },
      () => both(clickedAgain(photo, next), mark(a), mark(b), mark(a), mark(b)).value,
    )
    expect(Math.abs(stated / spread(found) - 1)).toBeLessThan(0.1)
    expect(stated).toBeGreaterThan(sigmaOf(lengthOf(photo, a, b)) * 0.9)
  })
})

const plain = (value: number, sigma: number, name: string): Estimate => ({ value, parts: new Map([[name, sigma]]) })

describe('several readings of one length', () => {
  it('weighs by 1/σ² (closed form: 2.00 ± 0.01 and 2.10 ± 0.02 make 2.02 ± 0.008944)', () => {
    const { estimate } = combineReadings([plain(2, 0.01, 'a'), plain(2.1, 0.02, 'b')])!
    expect(estimate.value).toBeCloseTo(2.02, 12)
    expect(sigmaOf(estimate)).toBeCloseTo(0.0089442719, 9)
  })

  it('does not gain by a second reading that errs with the first', () => {
    const { estimate } = combineReadings([plain(2, 0.02, 'same'), plain(2, 0.02, 'same')])!
    expect(sigmaOf(estimate)).toBeCloseTo(0.02, 12)
  })

  it.each([
    [0.0279, false],
    [0.0281, true],
    [-0.0281, true],
  ])('warns when two of σ 0.01/√2·√2 differ by more than two combined σ: %f m', (apart, warned) => {
    const readings = [plain(3, 0.0099, 'a'), plain(3 + apart, 0.00995, 'b')]
    expect(combineReadings(readings)!.warning !== null).toBe(warned)
  })

  it('names the two of three that fit least', () => {
    const found = combineReadings([plain(3, 0.01, 'a'), plain(3.01, 0.01, 'b'), plain(3.2, 0.01, 'c')])!
    expect(found.worst).toMatchObject({ between: [0, 2], difference: expect.closeTo(0.2, 9) })
    expect(found.warning).toContain('14.1 standard errors')
  })

  it('is nothing without readings', () => expect(combineReadings([])).toBeNull())

  it('adds estimates with their errors: a − a is 0 ± 0', () => {
    const a = plain(3, 0.1, 'a')
    expect(sigmaOf(combined([a, a], [1, -1]))).toBe(0)
  })
})

describe('tolerance of a length from a photo (house rule: 3 %, at least 50 mm, at least two standard errors)', () => {
  it.each([
    [1, 0.001, 0.05, 'least'],
    [4, 0.001, 0.12, 'share'],
    [4, 0.0605, 0.121, 'marks'],
    [-4, 0.001, 0.12, 'share'],
    [0.3, 0.026, 0.052, 'marks'],
  ])('%f m with σ %f m: ± %f m, %s', (value, sigma, tolerance, by) => {
    const found = photoTolerance(value, sigma, plainHouseRules)
    expect(found.tolerance).toBeCloseTo(tolerance, 12)
    expect(found.by).toBe(by)
  })
})
