import { describe, expect, it } from 'vitest'
import { axisBox, leastAlong, uprightCylinder, uprightPrism, type Convex } from '#app/domain/site/convex.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { chance } from '#tests/support/chance.ts'

type Inside = (p: Vec3) => boolean

const within = (value: number, low: number, high: number) => value >= low && value <= high

const solids: readonly (readonly [string, Convex, Inside])[] = [
  ['box', axisBox([1, 2], [-0.5, 0.7], [0.3, 1.1]), ([x, y, z]) => within(x, 1, 2) && within(y, -0.5, 0.7) && within(z, 0.3, 1.1)], // prettier-ignore
  ['cylinder', uprightCylinder([1.5, 0], 0.6, [0.2, 1.4]), ([x, y, z]) => Math.hypot(x - 1.5, y) <= 0.6 && within(z, 0.2, 1.4)], // prettier-ignore
  [
    'sloping prism',
    uprightPrism([
      { at: [1, -1], low: 0, high: 1 },
      { at: [3, -1], low: 0.4, high: 1.4 },
      { at: [3, 1], low: 0.4, high: 1.4 },
      { at: [1, 1], low: 0, high: 1 },
    ]),
    ([x, y, z]) => within(x, 1, 3) && within(y, -1, 1) && within(z - 0.2 * (x - 1), 0, 1),
  ],
]

describe.each(solids)('a ray through a %s', (_, solid, inside) => {
  it('is inside it just where 4,001 points along the ray are, in 300 random cases', () => {
    const random = chance(23)
    let met = 0
    for (let i = 0; i < 300; i++) {
      const from: Vec3 = [random() * 1.6 - 0.8, random() * 3 - 1.5, random() * 3 - 1]
      const direction: Vec3 = [random(), random() - 0.5, random() - 0.5]
      const { enter, leave } = solid.alongRay(from, direction)
      const hits = Array.from({ length: 4001 }, (_k, k) => k / 500).filter((t) =>
        inside([from[0] + t * direction[0], from[1] + t * direction[1], from[2] + t * direction[2]]),
      )
      if (hits.length === 0) {
        // Nothing longer than a step of the sampling may be inside before its end.
        expect(Math.min(leave, 8) - enter).toBeLessThan(2 / 500)
        continue
      }
      met++
      expect(Math.abs(enter - hits[0]!)).toBeLessThan(1 / 499)
      if (hits.at(-1)! < 8) expect(Math.abs(leave - hits.at(-1)!)).toBeLessThan(1 / 499)
    }
    expect(met).toBeGreaterThan(25)
  })

  it('holds its middle and reaches no farther than its farthest point', () => {
    expect(inside(solid.middle)).toBe(true)
    const random = chance(29)
    for (let i = 0; i < 500; i++) {
      const p: Vec3 = [random() * 3.5, random() * 3 - 1.5, random() * 2]
      const n: Vec3 = [random() - 0.5, random() - 0.5, random() - 0.5]
      if (inside(p)) expect(leastAlong(solid, n)).toBeLessThanOrEqual(p[0] * n[0] + p[1] * n[1] + p[2] * n[2] + 1e-12)
    }
  })
})

it('makes no prism of two corners', () => {
  expect(() => uprightPrism([{ at: [0, 0], low: 0, high: 1 }])).toThrow(RangeError)
})
