import { describe, expect, it } from 'vitest'
import { heaterFrame, type Body } from '#app/domain/layout/body.ts'
import { boundsFromBody, gapToBody, gapUpTo, lieAbout } from '#app/domain/layout/clear-space.ts'
import { axisBox, uprightPrism } from '#app/domain/site/convex.ts'
import { coverPlane } from '#app/domain/site/cover.ts'
import { nearestOnSegment } from '#app/domain/site/geometry.ts'
import type { Cover, Obstacle } from '#app/domain/site/site.ts'
import { solidsOf } from '#app/domain/site/solids.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import {
  axesOfBox,
  depthInBox,
  leastOver,
  pointOfBox,
  type Point,
  type TiltedBox,
} from '#tests/support/brute-distance.ts'
import { chance } from '#tests/support/chance.ts'
import { plainSite } from '#tests/support/plain-site.ts'

// Sources: closed forms (projection of a point; a box's reach along a direction), and distances by trying points
// (tests/support/brute-distance.ts), which share nothing with the product. Cases are random with a fixed seed.

const cases = 220

const bodyOfBox = ({ centre, turn, tilt, half }: TiltedBox): Body => ({
  ...heaterFrame(turn, tilt),
  centre,
  half: { u: half[0], v: half[1], w: half[2] },
})

const randomBox = (random: () => number, centre: Point): TiltedBox => ({
  centre,
  turn: random() * 360,
  tilt: random() * 120 - 60,
  half: [0.2 + random() * 0.8, 0.05 + random() * 0.2, 0.03 + random() * 0.1],
})

const cover = (a: number, b: number, c: number): Cover => ({
  id: 'roof',
  name: 'roof',
  corners: [[0, 0, a], [5, 0, b], [5, 5, c]], // prettier-ignore
  material: 'unknown',
  opening: false,
  swing: 0,
  voidDepth: null,
  note: null,
})

describe('a point and a segment', () => {
  it('G5: (3, 2) snaps to (0, 0)–(6, 2) at (3.3, 1.1), 0.9487 m away, ± 1e-4 (projection, closed form)', () => {
    const { point, distance } = nearestOnSegment([0, 0], [6, 2], 3, 2)
    expect(Math.abs(point[0] - 3.3)).toBeLessThan(1e-4)
    expect(Math.abs(point[1] - 1.1)).toBeLessThan(1e-4)
    expect(Math.abs(distance - 0.9487)).toBeLessThan(1e-4)
  })

  it(`agrees with tried points in ${cases} random cases, ± 1e-6 m`, () => {
    const random = chance(41)
    for (let i = 0; i < cases; i++) {
      const [a, b, p] = [0, 1, 2].map((): Vec2 => [random() * 8 - 4, random() * 8 - 4])
      const at = (t: number) => Math.hypot(a![0] + t * (b![0] - a![0]) - p![0], a![1] + t * (b![1] - a![1]) - p![1])
      const tried = leastOver(([t]) => at(t))
      expect(Math.abs(nearestOnSegment(a!, b!, p![0], p![1]).distance - tried)).toBeLessThan(1e-6)
    }
  })
})

describe('a tilted body and a plane', () => {
  it(`agrees with tried points of the body in ${cases} random cases, ± 1e-6 m`, () => {
    const random = chance(43)
    for (let i = 0; i < cases; i++) {
      const box = randomBox(random, [random() * 4, random() * 4, 2 + random()])
      const [a, b, c] = [2.5 + random(), 2.5 + random(), 2.5 + random()]
      // z = a + p x + q y through the three heights; square to it is the height's share 1/√(1 + p² + q²).
      const [p, q] = [(b - a) / 5, (c - b) / 5]
      const tried = leastOver((at) => {
        const [x, y, z] = pointOfBox(box, at)
        return (a + p * x + q * y - z) / Math.sqrt(1 + p * p + q * q)
      })
      expect(Math.abs(gapUpTo(bodyOfBox(box), coverPlane(cover(a, b, c))!) - tried)).toBeLessThan(1e-6)
    }
  })

  it('is by the worst corner: half the width · sin tilt + half the depth · cos tilt over its centre (closed form)', () => {
    const box: TiltedBox = { centre: [1, 1, 2.4], turn: 70, tilt: 30, half: [0.4, 0.15, 0.06] }
    const reach = 0.15 * Math.sin(Math.PI / 6) + 0.06 * Math.cos(Math.PI / 6)
    expect(gapUpTo(bodyOfBox(box), coverPlane(cover(3, 3, 3))!)).toBeCloseTo(3 - 2.4 - reach, 12)
  })
})

/** A prism whose outline goes once round a middle at random distances: it may have notches. */
function notched(random: () => number, middle: Vec2) {
  const corners = 4 + Math.floor(random() * 4)
  const outline = Array.from({ length: corners }, (_, i): [number, number] => {
    const [angle, out] = [(2 * Math.PI * (i + 0.6 * random())) / corners, 0.15 + random() * 0.9]
    return [middle[0] + out * Math.cos(angle), middle[1] + out * Math.sin(angle)]
  })
  const low = 1 + random() * 1.8
  const z: [number, number] = [low, low + 0.1 + random()]
  /** One for each edge: the wedge between it and the middle. */
  const wedges = outline.map((from, i) => {
    const to = outline[(i + 1) % corners]!
    return ([a, b, c]: Point): Point => [
      middle[0] + b * (from[0] + a * (to[0] - from[0]) - middle[0]),
      middle[1] + b * (from[1] + a * (to[1] - from[1]) - middle[1]),
      z[0] + c * (z[1] - z[0]),
    ]
  })
  return { outline, z, wedges }
}

const prismOf = (outline: [number, number][], z: [number, number]): Obstacle => ({
  id: 'o',
  name: 'o',
  kind: 'other',
  material: 'combustible',
  movable: false,
  shape: { kind: 'prism', outline, z },
  transmittance: 0,
  note: null,
})

const partsOf = (obstacle: Obstacle) =>
  solidsOf(plainSite({ obstacles: [obstacle] })).find(({ id }) => id === 'o')!.parts

const gapToPrism = (box: TiltedBox, outline: [number, number][], z: [number, number]) =>
  Math.min(...partsOf(prismOf(outline, z)).map((part) => gapToBody(bodyOfBox(box), part).distance))

describe('a tilted body and a prism of any outline', () => {
  it(`agrees with tried points of the prism in ${cases} random cases, ± 1e-4 m, and 0 where they overlap`, () => {
    const random = chance(47)
    let [apart, overlapping] = [0, 0]
    for (let i = 0; i < cases; i++) {
      const box = randomBox(random, [0, 0, 2.3])
      const { outline, z, wedges } = notched(random, [random() * 3 - 1.5, random() * 3 - 1.5])
      const depth = depthInBox(box)
      const tried = Math.min(...wedges.map((pointOf) => leastOver((at) => depth(pointOf(at)))))
      const found = gapToPrism(box, outline, z)
      if (tried < -1e-4) {
        overlapping++
        expect(found).toBe(0)
      } else if (tried > 1e-4) {
        apart++
        expect(Math.abs(found - tried)).toBeLessThan(1e-4)
        const quick = Math.min(...partsOf(prismOf(outline, z)).map((part) => boundsFromBody(bodyOfBox(box), part)))
        expect(quick).toBeLessThanOrEqual(found + 1e-9)
      }
    }
    expect(apart).toBeGreaterThan(120)
    expect(overlapping).toBeGreaterThan(30)
  })

  it('is the same turned and mirrored, in 200 random cases, ± 1e-7 m', () => {
    const random = chance(53)
    for (let i = 0; i < 200; i++) {
      const box = randomBox(random, [0.3, -0.2, 2.3])
      const { outline, z } = notched(random, [random() * 3 - 1.5, random() * 3 - 1.5])
      const found = gapToPrism(box, outline, z)
      const by = random() * 360
      const [c, s] = [Math.cos((by * Math.PI) / 180), Math.sin((by * Math.PI) / 180)]
      const turned = ([x, y]: Vec2): [number, number] => [x * c - y * s, x * s + y * c]
      const turnedBox = { ...box, centre: [...turned([0.3, -0.2]), 2.3] as const, turn: box.turn + by }
      expect(Math.abs(gapToPrism(turnedBox, outline.map(turned), z) - found)).toBeLessThan(1e-7)
      const mirroredBox = { ...box, centre: [-0.3, -0.2, 2.3] as const, turn: 180 - box.turn, tilt: -box.tilt }
      const mirrored = outline.map(([x, y]): [number, number] => [-x, y])
      expect(Math.abs(gapToPrism(mirroredBox, mirrored, z) - found)).toBeLessThan(1e-7)
    }
  })

  it('tells near, touching and overlapping apart at a face, ± 1e-6 m', () => {
    const random = chance(59)
    for (let i = 0; i < 100; i++) {
      // A plumb face of the level body: a wall square to it at its half length and a little more or less.
      const box: TiltedBox = { ...randomBox(random, [0, 0, 2.3]), turn: 0, tilt: 0 }
      const wallAt = (x: number) => gapToBody(bodyOfBox(box), axisBox([x, x + 1], [-1, 1], [2, 3])).distance
      expect(wallAt(box.half[0] + 1e-6)).toBeCloseTo(1e-6, 9)
      expect(wallAt(box.half[0])).toBe(0)
      expect(wallAt(box.half[0] - 1e-6)).toBe(0)
    }
  })

  it('meets an edge with an edge: the distance between skew lines (closed form)', () => {
    // Two boxes turned by 45° about x and about y, one over the other: their edges cross at right angles.
    const box: TiltedBox = { centre: [0, 0, 2], turn: 0, tilt: 45, half: [0.5, 0.2, 0.2] }
    const ridge = 2 + 0.2 * Math.SQRT2
    const keel = uprightPrism([
      { at: [-0.3, -1], low: 3.3, high: 4 },
      { at: [0, -1], low: 3, high: 4 },
      { at: [0, 1], low: 3, high: 4 },
      { at: [-0.3, 1], low: 3.3, high: 4 },
    ])
    expect(gapToBody(bodyOfBox(box), keel).distance).toBeCloseTo(3 - ridge, 9)
  })
})

describe('a clearance that differs by face', () => {
  it('passes beyond a face by its clearance, or clear of the grown box, as tried points say, in 200 random cases', () => {
    const random = chance(61)
    const clearance = { above: 0.35, side: 0.3, end: 0.4 }
    let [kept, broken] = [0, 0]
    for (let i = 0; i < 200; i++) {
      const box = randomBox(random, [0, 0, 2.3])
      const [x, y, z] = [random() * 4 - 2, random() * 4 - 2, 1.5 + random() * 1.6]
      const size: Point = [0.1 + random(), 0.1 + random(), 0.1 + random() * 0.6]
      const pointOf = ([a, b, c]: Point): Point => [x + a * size[0], y + b * size[1], z + c * size[2]]
      const along = (axis: Point, sign: 1 | -1) =>
        leastOver((at) => pointOf(at).reduce((sum, p, k) => sum + sign * (p - box.centre[k]!) * axis[k]!, 0))
      const [u, v, w] = axesOfBox(box)
      if (along(w, 1) - box.half[2] >= 0) continue
      const grownTop = (clearance.above + 2 * box.half[2]) / 2
      const shift = box.half[2] - grownTop
      const grown: TiltedBox = {
        ...box,
        centre: [box.centre[0] + w[0] * shift, box.centre[1] + w[1] * shift, box.centre[2] + w[2] * shift],
        half: [box.half[0] + clearance.end, box.half[1] + clearance.side, grownTop],
      }
      const inGrown = depthInBox(grown)
      const left = Math.max(
        along(w, -1) - box.half[2] - clearance.above,
        Math.max(along(v, 1), along(v, -1)) - box.half[1] - clearance.side,
        Math.max(along(u, 1), along(u, -1)) - box.half[0] - clearance.end,
        leastOver((at) => inGrown(pointOf(at))),
      )
      if (Math.abs(left) < 1e-4) continue
      const lie = lieAbout(bodyOfBox(box), axisBox([x, x + size[0]], [y, y + size[1]], [z, z + size[2]]), clearance)
      expect(lie!.margin > 0).toBe(left > 0)
      if (left > 0) kept++
      else broken++
    }
    expect(kept).toBeGreaterThan(40)
    expect(broken).toBeGreaterThan(40)
  })
})
