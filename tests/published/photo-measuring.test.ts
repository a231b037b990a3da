import { describe, expect, it } from 'vitest'
import { sigmaOf, type Estimate } from '#app/domain/photo/estimate.ts'
import { isRefused } from '#app/domain/photo/refusal.ts'
import { lengthInPlane } from '#app/domain/photo/length-in-plane.ts'
import type { PhotoPlane } from '#app/domain/photo/measurements.ts'
import { chance } from '#tests/support/chance.ts'
import { normal } from '#tests/support/pin-hole-camera.ts'

type Corners = PhotoPlane['corners']
type Mark = Corners[0]

/** Rows G6 to G9 of the project's list of check values: a synthetic camera and independent code. */
const corners: Corners = [
  [711.642, 953.999],
  [1288.358, 953.999],
  [1183.907, 784.3],
  [816.093, 784.3],
]
const [from, to]: [Mark, Mark] = [
  [1313.742, 825.331],
  [803.087, 752.11],
]

function distance(marked: Corners, a: Mark, b: Mark, width = 2, depth = 3, clickSigma = 1): Estimate {
  const floor: PhotoPlane = {
    id: 'floor',
    name: 'Floor',
    corners: marked,
    width,
    depth,
    tolerance: 0,
    vertical: null,
  }
  const photo = { id: 'photo', marks: { clickSigma, planes: [floor], measurements: [] } }
  const answer = lengthInPlane(photo, { id: 'd', from: { at: a, plane: 'floor' }, to: { at: b, plane: 'floor' } })
  if (isRefused(answer)) throw new Error(answer.words)
  return answer
}

describe('a rectangle of 2 × 3 m on the floor (check values G6 to G9)', () => {
  const exact = distance(corners, from, to).value

  it('G6: gives the distance of two points of the floor, 3.3601 m (synthetic camera)', () => {
    expect(Math.abs(exact - 3.3601)).toBeLessThan(0.001)
  })

  it('G7: with corners in whole pixels gives 3.3505 m (independent code)', () => {
    const rounded = corners.map(([x, y]): Mark => [Math.round(x), Math.round(y)])
    const [a, b, c, d] = rounded
    expect(Math.abs(distance([a!, b!, c!, d!], from, to).value - 3.3505)).toBeLessThan(0.001)
  })

  it('G8: grows with both sizes of the reference, and less with one (scale law)', () => {
    expect(Math.abs(distance(corners, from, to, 2 * 1.03, 3 * 1.03).value / exact - 1.03)).toBeLessThan(1e-4)
    expect(Math.abs(distance(corners, from, to, 2 * 1.03, 3).value / exact - 1.0195)).toBeLessThan(1e-4)
  })

  it('G9: has σ 0.044 m for clicks of σ 1 px (Monte Carlo of 4000, independent code), and so have 4000 of our own', () => {
    const sigma = sigmaOf(distance(corners, from, to))
    expect(Math.abs(sigma / 0.044 - 1)).toBeLessThan(0.25)
    const next = chance(9)
    const clicked = ([x, y]: Mark): Mark => [x + normal(next), y + normal(next)]
    const trials = Array.from({ length: 4000 }, () => {
      const [a, b, c, d] = corners
      return distance([clicked(a), clicked(b), clicked(c), clicked(d)], clicked(from), clicked(to), 2, 3, 0).value
    })
    const mean = trials.reduce((sum, value) => sum + value, 0) / trials.length
    const spread = Math.sqrt(trials.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (trials.length - 1))
    expect(Math.abs(sigma / spread - 1)).toBeLessThan(0.08)
  })
})
