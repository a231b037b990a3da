import { describe, expect, it } from 'vitest'
import type { Vec2, Vec3 } from '#app/domain/vector.ts'
import { axonometricView, corners, planeTransform, projectionFrom, toDrawing, type AxonometricView } from '#app/drawing/axonometric/projection.ts' // prettier-ignore
import { chance as seededChance } from '#tests/support/chance.ts'

const viewFrom = (corner: (typeof corners)[number]): AxonometricView => ({
  projection: projectionFrom(corner),
  scale: 100,
  x0: 50,
  y0: 400,
  width: 900,
  height: 600,
})

describe('the projection', () => {
  it.each([
    // By hand: the eye stands 30° from a side and looks down by 30°; sin 30° = 1/2, cos 30° = √3/2.
    ['lower left', [Math.sqrt(3) / 2, -1 / 4], [-1 / 2, -Math.sqrt(3) / 4]],
    ['lower right', [Math.sqrt(3) / 2, 1 / 4], [1 / 2, -Math.sqrt(3) / 4]],
    ['upper right', [-Math.sqrt(3) / 2, 1 / 4], [1 / 2, Math.sqrt(3) / 4]],
    ['upper left', [-Math.sqrt(3) / 2, -1 / 4], [-1 / 2, Math.sqrt(3) / 4]],
  ] as const)('from the %s puts every corner of a box at its place', (corner, x, y) => {
    const view = viewFrom(corner)
    for (const a of [0, 2])
      for (const b of [0, 3])
        for (const c of [0, 1.5]) {
          // A metre of x goes (x[0], x[1]) on the drawing, y down; a metre of height cos 30° up.
          const expected = [
            50 + 100 * (a * x[0] + b * y[0]),
            400 + 100 * (a * x[1] + b * y[1] - (c * Math.sqrt(3)) / 2),
          ]
          const [px, py] = toDrawing(view, [a, b, c])
          expect(px).toBeCloseTo(expected[0]!, 9)
          expect(py).toBeCloseTo(expected[1]!, 9)
        }
  })
  it('keeps parallel lines parallel and their lengths in ratio', () => {
    const chance = seededChance(7)
    for (const corner of corners) {
      const view = viewFrom(corner)
      for (let i = 0; i < 50; i++) {
        const [p, q, d] = [0, 1, 2].map((): Vec3 => [chance() * 9, chance() * 9, chance() * 3]) as [Vec3, Vec3, Vec3]
        const step = (from: Vec3, by: number): Vec2 => {
          const [a, b] = [toDrawing(view, from), toDrawing(view, [from[0] + by * d[0], from[1] + by * d[1], from[2] + by * d[2]])] // prettier-ignore
          return [b[0] - a[0], b[1] - a[1]]
        }
        const [one, three] = [step(p, 1), step(q, 3)]
        expect(three[0]).toBeCloseTo(3 * one[0], 8)
        expect(three[1]).toBeCloseTo(3 * one[1], 8)
      }
    }
  })
  it('is square to the direction of view: three directions of length 1, each square to the others', () => {
    for (const corner of corners) {
      const axes = Object.values(projectionFrom(corner)) as Vec3[]
      axes.forEach((a, i) => axes.forEach((b, k) => expect(a[0] * b[0] + a[1] * b[1] + a[2] * b[2]).toBeCloseTo(i === k ? 1 : 0, 12))) // prettier-ignore
    }
  })
  it('lays a plan in its plane as it lays its points', () => {
    const view = viewFrom('upper left')
    const [a, b, c, d, e, f] = /matrix\((.*)\)/.exec(planeTransform(view, 0.6))![1]!.split(' ').map(Number) as [number, number, number, number, number, number] // prettier-ignore
    const [x, y] = toDrawing(view, [3.2, 1.7, 0.6])
    expect(a * 3.2 + c * 1.7 + e).toBeCloseTo(x, 2)
    expect(b * 3.2 + d * 1.7 + f).toBeCloseTo(y, 2)
  })
  it('fits everything in its room', () => {
    const points: Vec3[] = [[0, 0, 0], [13, 0, 3.3], [13, 5.4, 2.7], [0, 5.4, 0]] // prettier-ignore
    for (const corner of corners) {
      const view = axonometricView(points, corner, { width: 800, height: 300, margin: 20 })
      for (const [x, y] of points.map((point) => toDrawing(view, point))) {
        expect(x).toBeGreaterThanOrEqual(20 - 1e-9)
        expect(x).toBeLessThanOrEqual(780 + 1e-9)
        expect(y).toBeGreaterThanOrEqual(20 - 1e-9)
        expect(y).toBeLessThanOrEqual(280 + 1e-9)
      }
    }
  })
})
