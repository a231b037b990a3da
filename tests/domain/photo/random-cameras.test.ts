import { Matrix, solve } from 'ml-matrix'
import { describe, expect, it } from 'vitest'
import { sigmaOf } from '#app/domain/photo/estimate.ts'
import { heightOverPlane } from '#app/domain/photo/height-over-plane.ts'
import { homographyOf, pointOfPlane, type Corners } from '#app/domain/photo/homography.ts'
import { lengthInPlane, pointInPlane } from '#app/domain/photo/length-in-plane.ts'
import { isRefused } from '#app/domain/photo/refusal.ts'
import type { Vec2, Vec3 } from '#app/domain/vector.ts'
import { chance } from '#tests/support/chance.ts'
import { floorPhoto, given, markOf } from '#tests/support/marked-photo.ts'
import { pictureOf, randomCameras } from '#tests/support/pin-hole-camera.ts'

const cameras = randomCameras(41, 60)

describe('60 random pin-hole cameras', () => {
  it('stand before what they show', () => {
    for (const camera of cameras) expect(pictureOf(camera, [2, 2, 0]).before).toBeGreaterThan(1)
  })

  it('give back lengths on the floor to a micrometre', () => {
    const next = chance(42)
    const near = () => -2 + 4 * next()
    let measured = 0
    for (const camera of cameras) {
      const [a, b]: [Vec3, Vec3] = [
        [near(), near(), 0],
        [near(), near(), 0],
      ]
      const photo = floorPhoto(camera)
      const placed = (point: Vec3) => ({ at: markOf(camera, point), plane: 'floor' })
      const found = lengthInPlane(photo, { id: 'l', from: placed(a), to: placed(b) })
      if (isRefused(found) && found.refused === 'too rough') continue
      expect(Math.abs(given(found).value - Math.hypot(a[0] - b[0], a[1] - b[1]))).toBeLessThan(1e-6)
      measured++
    }
    expect(measured).toBeGreaterThan(50)
  })

  it('give back points of the floor from its first corner', () => {
    for (const camera of cameras) {
      const found = given(pointInPlane(floorPhoto(camera), { at: markOf(camera, [0.6, 0.35, 0]), plane: 'floor' }))
      expect(found.x.value).toBeCloseTo(1.6, 6)
      expect(found.y.value).toBeCloseTo(1.1, 6)
      expect(sigmaOf(found.x)).toBeGreaterThan(0)
    }
  })

  it('give back heights over the floor and depths under it', () => {
    let measured = 0
    for (const camera of cameras) {
      for (const height of [0.45, 1.1, 2.45, -0.3]) {
        const foot: Vec3 = [0.4, 0.5, 0]
        const asked = {
          id: 'h',
          foot: { at: markOf(camera, foot), plane: 'floor' },
          top: markOf(camera, [foot[0], foot[1], height]),
        }
        const found = heightOverPlane(floorPhoto(camera), asked)
        if (isRefused(found) && found.refused === 'uprights in line') continue
        expect(Math.abs(given(found).value - height)).toBeLessThan(1e-6)
        measured++
      }
    }
    expect(measured).toBeGreaterThan(200)
  })

  it('agree with a linear-algebra library on the same eight equations in plain pixels', () => {
    const plane: Corners = [[0, 0], [2, 0], [2, 1.5], [0, 1.5]] // prettier-ignore
    for (const camera of cameras) {
      const [a, b, c, d] = floorPhoto(camera).plane.corners
      const photo: Corners = [a, b, c, d]
      const rows = photo.flatMap(([x, y], k) => {
        const [u, v] = plane[k]!
        return [
          [x, y, 1, 0, 0, 0, -u * x, -u * y],
          [0, 0, 0, x, y, 1, -v * x, -v * y],
        ]
      })
      const h = solve(new Matrix(rows), Matrix.columnVector(plane.flat())).to1DArray()
      const homography = homographyOf(photo, plane)!
      for (const point of [a, b, [2000, 1900], [1500, 1700]] satisfies Vec2[]) {
        const [x, y] = point
        const under = h[6]! * x + h[7]! * y + 1
        const [u, v] = pointOfPlane(homography, point)
        expect(Math.abs(u - (h[0]! * x + h[1]! * y + h[2]!) / under)).toBeLessThan(1e-6 * Math.max(1, Math.abs(u)))
        expect(Math.abs(v - (h[3]! * x + h[4]! * y + h[5]!) / under)).toBeLessThan(1e-6 * Math.max(1, Math.abs(v)))
      }
    }
  })
})
