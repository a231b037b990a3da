import { describe, expect, it } from 'vitest'
import type { Body } from '#app/domain/layout/body.ts'
import { heaterFrame } from '#app/domain/layout/body.ts'
import { bodyCorners, gapToBody, gapUpTo, lieAbout } from '#app/domain/layout/clear-space.ts'
import { axisBox, uprightCylinder, uprightPrism, type Convex } from '#app/domain/site/convex.ts'
import { coverPlane } from '#app/domain/site/cover.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { chance } from '#tests/support/chance.ts'

const body = (turn: number, tilt: number, centre: Vec3, half = { u: 0.4, v: 0.15, w: 0.06 }): Body => ({
  ...heaterFrame(turn, tilt),
  centre,
  half,
})

// The sampler's own arithmetic: a point in the body's directions, and its distance from the box there.
function boxDistance({ centre, u, v, w, half }: Body, p: Vec3): number {
  const d = [p[0] - centre[0], p[1] - centre[1], p[2] - centre[2]] as const
  const over = ([axis, reach]: readonly [Vec3, number]) =>
    Math.max(0, Math.abs(d[0] * axis[0] + d[1] * axis[1] + d[2] * axis[2]) - reach)
  return Math.hypot(over([u, half.u]), over([v, half.v]), over([w, half.w]))
}

/** Least distance by trying points of a solid given by three numbers from 0 to 1: everywhere, then nearer and nearer. */
function sampledDistance(
  solid: Body,
  pointOf: (a: number, b: number, c: number) => Vec3,
  random: () => number,
): number {
  let best = { at: [0.5, 0.5, 0.5], distance: Infinity }
  const attempt = (at: number[]) => {
    const inside = at.map((t) => Math.min(1, Math.max(0, t)))
    const distance = boxDistance(solid, pointOf(inside[0]!, inside[1]!, inside[2]!))
    if (distance < best.distance) best = { at: inside, distance }
  }
  for (let i = 0; i < 3000; i++) attempt([random(), random(), random()])
  for (let i = 0, reach = 0.2; i < 3000; i++, reach *= 0.9965)
    attempt(best.at.map((t) => t + (random() * 2 - 1) * reach))
  return best.distance
}

function turnedBox(x: number, y: number, size: [number, number, number], low: number, angle: number) {
  const [cos, sin] = [Math.cos(angle), Math.sin(angle)]
  const at = (a: number, b: number): [number, number] => [
    x + (a - 0.5) * size[0] * cos - (b - 0.5) * size[1] * sin,
    y + (a - 0.5) * size[0] * sin + (b - 0.5) * size[1] * cos,
  ]
  const outline = [at(0, 0), at(1, 0), at(1, 1), at(0, 1)]
  const solid = uprightPrism(outline.map((corner) => ({ at: corner, low, high: low + size[2] })))
  return { solid, pointOf: (a: number, b: number, c: number): Vec3 => [...at(a, b), low + c * size[2]] }
}

describe('a tilted body and a plane', () => {
  it('agrees with the nearest of its eight corners in 300 random cases', () => {
    const random = chance(5)
    for (let i = 0; i < 300; i++) {
      const tilted = body(random() * 360, random() * 120 - 60, [random() * 4, random() * 4, 2 + random()])
      const [a, b, c] = [2.5 + random(), 2.5 + random(), 2.5 + random()]
      const plane = coverPlane({
        id: 'r',
        name: 'r',
        corners: [[0, 0, a], [5, 0, b], [5, 5, c]], // prettier-ignore
        material: 'unknown',
        opening: false,
        swing: 0,
        voidDepth: null,
        note: null,
      })!
      // Height differences turned square to the plane z = a + p x + q y: divide by √(1 + p² + q²).
      const [p, q] = [(b - a) / 5, (c - b) / 5]
      const corners = bodyCorners(tilted).map(([x, y, z]) => (a + p * x + q * y - z) / Math.sqrt(1 + p * p + q * q))
      expect(gapUpTo(tilted, plane)).toBeCloseTo(Math.min(...corners), 9)
    }
  })

  it('has corners that lie half its sizes from its centre', () => {
    const tilted = body(30, 20, [1, 2, 3])
    for (const corner of bodyCorners(tilted))
      expect(Math.hypot(corner[0] - 1, corner[1] - 2, corner[2] - 3)).toBeCloseTo(Math.hypot(0.4, 0.15, 0.06), 12)
  })
})

describe('a tilted body and a solid', () => {
  it('agrees with a sampler in 240 random prisms, apart and overlapping', () => {
    const random = chance(7)
    let overlapping = 0
    for (let i = 0; i < 240; i++) {
      const tilted = body(random() * 360, random() * 120 - 60, [0, 0, 2.4])
      const size: [number, number, number] = [0.1 + random() * 2, 0.05 + random(), 0.05 + random() * 2]
      const near = random() * 2.4 - 1.2
      const prism = turnedBox(near, random() * 2.4 - 1.2, size, 1 + random() * 1.6, random() * Math.PI)
      const found = gapToBody(tilted, prism.solid).distance
      const sampled = sampledDistance(tilted, prism.pointOf, random)
      if (sampled === 0) {
        overlapping++
        expect(found).toBe(0)
      } else {
        expect(found).toBeLessThanOrEqual(sampled + 1e-9)
        expect(sampled - found).toBeLessThan(2e-3)
      }
    }
    expect(overlapping).toBeGreaterThan(10)
  })

  it('agrees with a sampler at 120 random cylinders', () => {
    const random = chance(19)
    for (let i = 0; i < 120; i++) {
      const tilted = body(random() * 360, random() * 120 - 60, [0, 0, 2.4])
      const [x, y] = [1 + random() * 2, random() * 2 - 1]
      const [radius, low, high] = [0.2 + random(), 1 + random(), 2.2 + random()]
      const pointOf = (a: number, b: number, c: number): Vec3 => {
        const [r, angle] = [radius * Math.sqrt(a), 2 * Math.PI * b]
        return [x + r * Math.cos(angle), y + r * Math.sin(angle), low + c * (high - low)]
      }
      const found = gapToBody(tilted, uprightCylinder([x, y], radius, [low, high])).distance
      const sampled = sampledDistance(tilted, pointOf, random)
      expect(found).toBeLessThanOrEqual(sampled + 1e-5)
      expect(sampled - found).toBeLessThan(3e-3)
    }
  })

  it('gives a pair of points as far apart as it says, one on each', () => {
    const tilted = body(25, 30, [0, 0, 2.4])
    const { distance, from, to } = gapToBody(tilted, axisBox([1, 2], [0.5, 1], [2, 3]))
    expect(Math.hypot(to[0] - from[0], to[1] - from[1], to[2] - from[2])).toBeCloseTo(distance, 9)
    expect(boxDistance(tilted, from)).toBeLessThan(1e-9)
    expect(boxDistance(tilted, to)).toBeCloseTo(distance, 9)
  })
})

describe('clearances that differ by face', () => {
  const level = body(0, 0, [0, 0, 2.4])
  const clearance = { above: 0.5, side: 0.3, end: 0.4 }
  const lie = (solid: Convex) => lieAbout(level, solid, clearance)

  it.each([
    ['above', axisBox([-1, 1], [-1, 1], [2.4 + 0.06 + 0.5, 4]), 0.5],
    ['side', axisBox([-1, 1], [0.15 + 0.3, 2], [0, 4]), 0.3],
    ['end', axisBox([-3, -0.4 - 0.4], [-2, 2], [0, 4]), 0.4],
  ] as const)('passes exactly at the clearance %s', (face, solid, limit) => {
    const found = lie(solid)!
    expect(found.face).toBe(face)
    expect(found.limit).toBe(limit)
    expect(found.value).toBeCloseTo(limit, 12)
    expect(found.margin).toBeCloseTo(0, 12)
  })

  it('passes beside an upright wall that lies beyond no face of the tilted body, clear of the grown box', () => {
    // Tilt 38°, wall at right angles behind: the grown box reaches 0.45 · cos 38° + 0.56 · sin 38° = 0.699 m back.
    const tilted = body(0, 38, [0, 0, 2.4])
    const reach = 0.45 * Math.cos((38 * Math.PI) / 180) + 0.56 * Math.sin((38 * Math.PI) / 180)
    const wall = (at: number) => lieAbout(tilted, axisBox([-5, 5], [-at - 1, -at], [0, 9]), clearance)!
    expect(wall(reach + 0.001).margin).toBeGreaterThan(0)
    expect(wall(reach - 0.001).margin).toBeLessThan(0)
  })

  it('leaves what lies wholly in front of the open face to the clearance of the beam', () => {
    expect(lie(axisBox([-1, 1], [-1, 1], [1, 2.4 - 0.06]))).toBeNull()
    expect(lie(axisBox([-1, 1], [-1, 1], [1, 2.4 - 0.05]))).not.toBeNull()
  })

  it('reports the bare distance of what lies beyond no face, and 0 when it touches', () => {
    const tilted = body(0, 45, [0, 0, 2.4])
    const touching = lieAbout(tilted, axisBox([-1, 1], [0.1, 1], [1, 4]), clearance)!
    expect([touching.value, touching.margin]).toEqual([0, -touching.limit])
  })
})
