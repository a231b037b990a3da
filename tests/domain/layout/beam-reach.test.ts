import { describe, expect, it } from 'vitest'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { elementCentres, heaterFrame, type Body } from '#app/domain/layout/body.ts'
import { halfAnglesOf, nearestInBeam } from '#app/domain/layout/beam-reach.ts'
import { axisBox, uprightCylinder } from '#app/domain/site/convex.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { demoModels } from '#drizzle/seed/demo-sites.ts'
import { chance } from '#tests/support/chance.ts'

const model = demoModels().find(({ code }) => code === 'betony-3-0')!
const single = demoModels().find(({ code }) => code === 'sanicle-1-6')!

const bodyAt = (turn: number, tilt: number, of: HeaterModel): Body => ({
  ...heaterFrame(turn, tilt),
  centre: [0, 0, 2.5],
  half: { u: of.body.length / 2, v: of.body.width / 2, w: of.body.depth / 2 },
})

const along = (d: Vec3, n: Vec3) => d[0] * n[0] + d[1] * n[1] + d[2] * n[2]

/** α and β of a point, from the nearest point of an element, by the text of the definition. */
function anglesFrom({ u, v, w }: Body, centre: Vec3, length: number, p: Vec3): [number, number] {
  const d: Vec3 = [p[0] - centre[0], p[1] - centre[1], p[2] - centre[2]]
  const t = Math.min(length / 2, Math.max(-length / 2, along(d, u)))
  const from: Vec3 = [d[0] - t * u[0], d[1] - t * u[1], d[2] - t * u[2]]
  const far = Math.hypot(...from)
  return [Math.atan2(along(from, v), along(from, w)), Math.asin(along(from, u) / far)]
}

function distanceFrom({ centre, u, v, w, half }: Body, p: Vec3): number {
  const d: Vec3 = [p[0] - centre[0], p[1] - centre[1], p[2] - centre[2]]
  const over = (n: Vec3, reach: number) => Math.max(0, Math.abs(along(d, n)) - reach)
  return Math.hypot(over(u, half.u), over(v, half.v), over(w, half.w))
}

function sampled(body: Body, of: HeaterModel, pointOf: (t: number[]) => Vec3, random: () => number): number {
  const beam = of.beam
  if (beam?.kind !== 'angles') throw new Error('angles wanted')
  const [a, b] = [(beam.acrossFullAngleDeg * Math.PI) / 360, (beam.alongFullAngleDeg * Math.PI) / 360]
  const centres = elementCentres(body, of)
  let best = { at: [0, 0, 0], distance: Infinity }
  const attempt = (at: number[]) => {
    const inside = at.map((t) => Math.min(1, Math.max(0, t)))
    const p = pointOf(inside)
    const lit = centres.some((centre) => {
      const [alpha, beta] = anglesFrom(body, centre, of.elementLength, p)
      return Math.abs(alpha) <= a && Math.abs(beta) <= b
    })
    const distance = lit ? distanceFrom(body, p) : Infinity
    if (distance < best.distance) best = { at: inside, distance }
  }
  for (let i = 0; i < 8000; i++) attempt([random(), random(), random()])
  if (best.distance === Infinity) return Infinity
  for (let i = 0, reach = 0.2; i < 6000; i++, reach *= 0.9985)
    attempt(best.at.map((t) => t + (random() * 2 - 1) * reach))
  return best.distance
}

describe('what lies in the beam', () => {
  it.each([
    ['two elements', model, 3],
    ['one element', single, 4],
  ] as const)('agrees with a sampler over random boxes and cylinders (%s)', (_, of, seed) => {
    const random = chance(seed)
    let lit = 0
    for (let i = 0; i < 120; i++) {
      const body = bodyAt(random() * 360, random() * 90 - 45, of)
      const [x, y, z] = [random() * 3 - 1.5, random() * 3 - 1.5, 0.5 + random() * 2]
      const [w, d, h] = [0.2 + random(), 0.2 + random(), 0.1 + random() * 0.6]
      const round = i % 2 === 0
      const solid = round ? uprightCylinder([x, y], w, [z, z + h]) : axisBox([x, x + w], [y, y + d], [z, z + h])
      const pointOf = ([a, b, c]: number[]): Vec3 => {
        if (!round) return [x + a! * w, y + b! * d, z + c! * h]
        const r = w * Math.sqrt(a!)
        return [x + r * Math.cos(2 * Math.PI * b!), y + r * Math.sin(2 * Math.PI * b!), z + c! * h]
      }
      const found = nearestInBeam(body, of, solid)?.distance ?? Infinity
      const expected = sampled(body, of, pointOf, random)
      // A sliver of the obstacle in the beam can escape the sampler, never the other way round.
      if (expected === Infinity) continue
      lit++
      expect(found).toBeLessThanOrEqual(expected + 2e-3)
      expect(expected - found).toBeLessThan(0.03)
    }
    expect(lit).toBeGreaterThan(40)
  })

  it('finds thin things that cross the edge of the beam', () => {
    const body = bodyAt(0, 0, single)
    // A 10 mm cable 1.2 m below, along x, 1.0 m aside: α = atan(1.0 / 1.2) is within 40°; 1.1 m aside it is not.
    const cable = (y: number) => axisBox([-6, 6], [y, y + 0.01], [1.2675, 1.2775])
    expect(nearestInBeam(body, single, cable(0.95))).not.toBeNull()
    expect(nearestInBeam(body, single, cable(1.1))).toBeNull()
    // Square to the element beyond its end: half-intensity at 52.5°, and h grows to h / cos α aside, at most at 40°.
    const down = 2.4525 + 0.04 - 1.2725
    const most = single.elementLength / 2 + (down / Math.cos((40 * Math.PI) / 180)) * Math.tan((52.5 * Math.PI) / 180)
    const square = (x: number) => axisBox([x, x + 0.01], [-6, 6], [1.2675, 1.2775])
    expect(nearestInBeam(body, single, square(most - 0.03))).not.toBeNull()
    expect(nearestInBeam(body, single, square(most + 0.03))).toBeNull()
  })

  it('knows nothing without beam data', () => {
    expect(nearestInBeam(bodyAt(0, 0, single), { ...single, beam: null }, axisBox([-1, 1], [-1, 1], [0, 1]))).toBeNull()
  })
})

describe('half-intensity angles of a table', () => {
  it('reads them where the profile through the peak passes half of it, also when lopsided', () => {
    const beam = {
      kind: 'table' as const,
      acrossDeg: [-60, -30, 0, 30, 60],
      alongDeg: [-40, 0, 40],
      intensity: [[0, 0, 0], [2, 6, 2], [3, 10, 4], [1, 4, 1], [0, 0, 0]], // prettier-ignore
      source: 'test',
    }
    const { across, along } = halfAnglesOf(beam)
    // Across: 6 → 0 between −30 and −60 passes 5 a sixth of the way; 10 → 4 between 0 and 30 five sixths of the way.
    expect(across.map((angle) => (angle * 180) / Math.PI)).toEqual([expect.closeTo(-35, 9), expect.closeTo(25, 9)])
    // Along: 10 → 3 over 40° passes 5 at 5/7, 10 → 4 at 5/6.
    expect(along.map((angle) => (angle * 180) / Math.PI)).toEqual([
      expect.closeTo((-40 * 5) / 7, 9),
      expect.closeTo((40 * 5) / 6, 9),
    ])
  })

  it('reads a table that starts at 0 to both sides, and takes the peak from the front alone', () => {
    const source = 'test'
    const half = halfAnglesOf({ kind: 'table', acrossDeg: [0, 40, 80], alongDeg: [0, 60], intensity: [[8, 0], [6, 0], [2, 0]], source }) // prettier-ignore
    // Across: 6 → 2 passes 4 half-way between 40 and 80; along: 8 → 0 passes 4 half-way to 60.
    expect(half.across.map((angle) => (angle * 180) / Math.PI)).toEqual([expect.closeTo(-60, 9), expect.closeTo(60, 9)])
    expect(half.along.map((angle) => (angle * 180) / Math.PI)).toEqual([expect.closeTo(-30, 9), expect.closeTo(30, 9)])
    const back = [[100, 100], [0, 0], [4, 4], [0, 0]] // prettier-ignore
    const front = halfAnglesOf({ kind: 'table', acrossDeg: [-170, -90, 0, 90], alongDeg: [-20, 20], intensity: back, source }) // prettier-ignore
    expect(front.across.map((angle) => (angle * 180) / Math.PI)).toEqual([expect.closeTo(-45, 9), expect.closeTo(45, 9)]) // prettier-ignore
  })
})
