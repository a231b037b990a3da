import { describe, expect, it } from 'vitest'
import { sigmaOf } from '#app/domain/photo/estimate.ts'
import { measure } from '#app/domain/photo/measure-photo.ts'
import { photoMarksSchema } from '#app/domain/photo/measurements.ts'
import { outsideOf } from '#app/domain/photo/mark-places.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { demoMarks, demoPhotoSize, demoPhotoSvg, pictureOfVeranda } from '#drizzle/seed/demo-photo.ts'
import { given } from '#tests/support/marked-photo.ts'
import { pictureOf } from '#tests/support/pin-hole-camera.ts'

const marks = demoMarks()
const found = (label: string) => {
  const measurement = marks.measurements.find((each) => each.label === label)!
  return given(measure({ id: 'demo', marks }, measurement))
}

describe('the demonstration’s photo', () => {
  it('is drawn as a pin-hole camera sees it', () => {
    const [x, y] = [4.7, 8.3]
    const ahead: Vec3 = [x - Math.sin(0.12), y - Math.cos(0.12), 1.62]
    const camera = { at: [x, y, 1.62] as Vec3, towards: ahead, focal: 1120, middle: [800, 640] as const }
    for (const point of [
      [0, 0, 0],
      [7.2, 3.1, 2.65],
      [2.6, 1.55, 1.8],
    ] satisfies Vec3[]) {
      const [u, v] = pictureOf(camera, point).mark
      expect(pictureOfVeranda(point)).toEqual([expect.closeTo(u, 6), expect.closeTo(v, 6)])
    }
  })

  it('is marked inside the picture', () => {
    expect(photoMarksSchema.parse(marks)).toEqual(marks)
    expect(outsideOf(marks, demoPhotoSize)).toBeNull()
    expect(demoPhotoSvg()).not.toContain('NaN')
  })

  // Sizes of demo.json, site C; the window is drawn 1.70 m wide.
  it.each([
    ['joist spacing', 0.6],
    ['ceiling height', 2.65],
    ['window width', 1.7],
  ])('gives the %s within two standard errors', (label, truth) => {
    const estimate = found(label)
    expect(Math.abs(estimate.value - truth)).toBeLessThan(2 * sigmaOf(estimate))
    expect(sigmaOf(estimate)).toBeLessThan(0.1)
  })
})
