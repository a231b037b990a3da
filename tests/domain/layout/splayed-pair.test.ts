import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { facingMembers, firstMet } from '#app/domain/layout/facing-members.ts'
import { hangScheduleOf } from '#app/domain/layout/hanging.ts'
import { plainHanging } from '#app/domain/layout/plain-hanging.ts'
import { splayedPair } from '#app/domain/layout/splayed-pair.ts'
import { supportOf } from '#app/domain/layout/supports.ts'
import type { Member, Site } from '#app/domain/site/site.ts'
import { chance as seededChance } from '#tests/support/chance.ts'
import { plainHeater, plainModel, plainSite, plainHouse } from '#tests/support/plain-site.ts'

const beam = plainSite().members[0]!
const beamAt = (id: string, y: number, underside: number, more: Partial<Member> = {}): Member => ({
  ...beam,
  id,
  name: id,
  from: [0, y],
  to: [6, y],
  underside: { from: underside, to: underside },
  ...more,
})
const between = (members: Member[]): Site => plainSite({ covers: [], members })
const model = plainModel({ suspensionEyePitch: 0.448 })
const splayed = (changes: Parameters<typeof plainHeater>[0] = {}) =>
  plainHeater({ splayed: true, memberId: null, y: 2.3, ...changes })
/** Eyes 0.105 m over the lowest point: body of 105 mm, straight down. */
const eyeHeight = (lowestPoint: number) => lowestPoint + 0.105

describe('a splayed pair', () => {
  it('0.3 m sideways and 0.4 m up under 120 N: 0.500 m and 75 N each (G3 of the check values: W / 2 cos φ)', () => {
    const pair = splayedPair([{ sideways: 0.3, rise: 0.4 }, { sideways: 0.3, rise: 0.4 }], 120) // prettier-ignore
    for (const { length, tension } of pair) {
      expect(length).toBeCloseTo(0.5, 9)
      expect(tension).toBeCloseTo(75, 9)
    }
  })

  it('of other lengths is in equilibrium: forces of 300 random pairs sum to the weight, nothing sideways', () => {
    const chance = seededChance(41)
    for (let i = 0; i < 300; i += 1) {
      const [d1, h1, d2, h2] = [0.02 + chance(), 0.05 + 2 * chance(), 0.02 + chance(), 0.05 + 2 * chance()]
      const weight = 5 + 200 * chance()
      const [a, b] = splayedPair([{ sideways: d1, rise: h1 }, { sideways: d2, rise: h2 }], weight) // prettier-ignore
      // By the angles, not by the lengths.
      const [phi1, phi2] = [Math.atan(d1 / h1), Math.atan(d2 / h2)]
      expect(a.tension * Math.sin(phi1)).toBeCloseTo(b.tension * Math.sin(phi2), 6)
      expect(a.tension * Math.cos(phi1) + b.tension * Math.cos(phi2)).toBeCloseTo(weight, 6)
      expect(a.length * Math.cos(phi1)).toBeCloseTo(h1, 9)
      expect(b.length * Math.sin(phi2)).toBeCloseTo(d2, 9)
    }
  })
})

describe('members on either side', () => {
  it('lie on one line through the place, square to the nearer of them, at any turn of the site', () => {
    const chance = seededChance(7)
    for (let i = 0; i < 200; i += 1) {
      const turn = 2 * Math.PI * chance()
      const [apart, aside] = [0.4 + 2 * chance(), 0.05 + 0.9 * chance()]
      const put = (x: number, y: number): [number, number] => [
        x * Math.cos(turn) - y * Math.sin(turn),
        x * Math.sin(turn) + y * Math.cos(turn),
      ]
      const members = [0, apart, 2 * apart].map((y, k) => ({
        ...beamAt(`m${k}`, y, 3),
        from: put(-5, y),
        to: put(5, y),
      }))
      const at = put(0.3, apart * aside)
      const [near, far] = facingMembers(members, at)!
      expect(near.distance).toBeCloseTo(apart * Math.min(aside, 1 - aside), 9)
      expect(near.distance + far.distance).toBeCloseTo(apart, 9)
      expect(Math.hypot(near.point[0] - far.point[0], near.point[1] - far.point[1])).toBeCloseTo(apart, 9)
    }
  })

  it('are none outside the outermost member, and the first met is the nearest on that side', () => {
    const members = [beamAt('a', 1, 3), beamAt('b', 2, 3), beamAt('c', 3, 3)]
    expect(facingMembers(members, [3, 0.5])).toBeNull()
    expect(firstMet(members, [3, 0.5], [0, 1])?.member.id).toBe('a')
    expect(firstMet(members, [3, 0.5], [1, 0])).toBeNull()
    expect(firstMet(members, [9, 0.5], [0, 1])).toBeNull()
  })
})

describe('a heater on splayed pairs', () => {
  const reasonAt = (members: Member[], changes = {}) =>
    supportOf(between(members), splayed(changes), model, plainHouseRules).reason

  it('is held between two members within a metre of its eyes, no farther', () => {
    // Undersides 1.2 m over the eyes, so that the angle decides nothing.
    const high = eyeHeight(2.3) + 1.2
    const pair = (far: number) => [beamAt('a', 2, high), beamAt('b', 2.3 + far, high)]
    expect(reasonAt(pair(0.9999))).toBe('held')
    expect(reasonAt(pair(1))).toBe('held')
    expect(reasonAt(pair(1.0001))).toBe('out of reach')
    expect(supportOf(between(pair(0.9)), splayed(), model, plainHouseRules).ids).toEqual(['a', 'b'])
  })

  it('is held up to 45° from plumb, no flatter', () => {
    const at = (rise: number) => reasonAt([beamAt('a', 2, eyeHeight(2.3) + rise), beamAt('b', 2.6, eyeHeight(2.3) + rise)]) // prettier-ignore
    expect(at(0.3001)).toBe('held')
    expect(at(0.3)).toBe('held')
    expect(at(0.2999)).toBe('splayed too flat')
    expect(at(-0.01)).toBe('support too low')
  })

  it('needs a member on either side of each eye, and its height', () => {
    expect(reasonAt([beamAt('a', 2, 3)])).toBe('not between members')
    expect(reasonAt([beamAt('a', 2, 3), beamAt('b', 2.6, 3, { to: [2, 2.6] })])).toBe('out of reach')
    const unknown = beamAt('b', 2.6, 3, { underside: { follows: 'no cover' } })
    expect(reasonAt([beamAt('a', 2, 3), unknown])).toBe('height not known')
    expect(supportOf(between([beamAt('a', 2, 3)]), splayed(), plainModel({ suspensionEyePitch: null }), plainHouseRules).reason).toBe('eyes not stated') // prettier-ignore
  })

  it('does not hold a tilt about its own axis on chain, and says nothing of it on a wall bracket', () => {
    const members = [beamAt('a', 2, 3.4), beamAt('b', 2.6, 3.4)]
    expect(reasonAt(members, { tiltDeg: 10 })).toBe('tilt not held')
    expect(reasonAt(members, { mount: 'wall bracket' })).toBe('nothing to fix to')
  })
})

describe('the hang schedule of splayed pairs', () => {
  it('has four hangers, each as long as its slope, under a random cover', () => {
    const chance = seededChance(3)
    for (let i = 0; i < 60; i += 1) {
      const [fallX, fallY] = [0.3 * chance() - 0.15, 0.3 * chance() - 0.15]
      const height = (x: number, y: number) => 3.4 + fallX * (x - 3) + fallY * (y - 2)
      const site = plainSite({
        covers: [{ ...plainSite().covers[0]!, corners: [[0, 0, height(0, 0)], [6, 0, height(6, 0)], [6, 4, height(6, 4)]] }], // prettier-ignore
        members: [2, 2.7].map((y, k) => ({ ...beamAt(`m${k}`, y, 3), underside: { follows: 'roof' } })),
      })
      const heater = splayed({ x: 3, y: 2.1 + 0.5 * chance(), lowestPoint: 2.35 })
      const { hangers } = hangScheduleOf(site, heater, model, plainHouse())!
      expect(hangers.map(({ end }) => end)).toEqual([0, 0, 1, 1])
      for (const { end, memberId, length, tension, net } of hangers) {
        const [x, y] = [3 + (end === 0 ? -0.224 : 0.224), memberId === 'm0' ? 2 : 2.7]
        const [aside, rise] = [heater.y - y, height(x, y) - eyeHeight(2.35)]
        expect(length).toBeCloseTo(Math.sqrt(aside ** 2 + rise ** 2), 9)
        expect(net).toBeCloseTo(length - 0.095, 8)
        const other = memberId === 'm0' ? 2.7 : 2
        const [phi, phiOther] = [Math.atan2(Math.abs(aside), rise), Math.atan2(Math.abs(heater.y - other), height(x, other) - eyeHeight(2.35))] // prettier-ignore
        const half = (model.body.mass * 9.80665) / 2
        expect(tension).toBeCloseTo((half * Math.sin(phiOther)) / Math.sin(phi + phiOther), 6)
      }
    }
  })

  it('tilts as the crossing of two circles says when links are left over', () => {
    // Without turnbuckles; the eye of the first end is where circles of the made lengths cross.
    const rise = 0.47
    const site = between([beamAt('a', 2, eyeHeight(2.3) + rise), beamAt('b', 2.75, eyeHeight(2.3) + rise + 0.06)])
    const data = { ...plainHanging, shortens: 0, lengthens: 0 }
    const heater = splayed({ y: 2.3 })
    const { hangers, residualTiltDeg, tiltLeftDeg } = hangScheduleOf(site, heater, model, {
      ...plainHouse(),
      hanging: data,
    })!
    expect(tiltLeftDeg).toBeCloseTo(residualTiltDeg, 12)
    // Both ends are alike: no tilt whatever the residuals.
    expect(residualTiltDeg).toBeCloseTo(0, 9)
    // Only the second member's height differs along x: now the ends differ.
    const sloping = {
      ...site,
      members: [site.members[0]!, { ...site.members[1]!, underside: { from: 3.0, to: 3.09 } }],
    }
    const schedule = hangScheduleOf(sloping, heater, model, { ...plainHouse(), hanging: data })!
    const eyeZ = (end: 0 | 1) => {
      const [a, b] = schedule.hangers.filter((hanger) => hanger.end === end)
      const [ra, rb] = [a!.length - a!.residual, b!.length - b!.residual]
      return crossingBelow([a!.anchor[1], a!.underside, ra], [b!.anchor[1], b!.underside, rb])
    }
    const exact = (Math.atan2(eyeZ(0) - eyeZ(1), 0.448) * 180) / Math.PI
    expect(schedule.hangers.some(({ residual }) => Math.abs(residual) > 0.002)).toBe(true)
    expect(schedule.residualTiltDeg).toBeCloseTo(exact, 9)
    expect(Math.abs(exact)).toBeGreaterThan(0.3)
    expect(hangers).toHaveLength(4)
  })
})

it('hangs plumb from one of a steep pair where the other would be slack', () => {
  // 20 mm to either side and half a metre up; the second member 30 mm lower, so that its chain of as many links is slack.
  const data = { ...plainHanging, hardwareAllowance: 0, shortens: 0, lengthens: 0, linkPitch: 0.1 }
  const sloping = (id: string, y: number, rise: number) =>
    beamAt(id, y, 0, { underside: { from: eyeHeight(2.3) + rise, to: eyeHeight(2.3) + rise - 0.06 } })
  const site = between([sloping('a', 2.28, 0.54), sloping('b', 2.32, 0.51)])
  const { hangers, residualTiltDeg } = hangScheduleOf(site, splayed(), model, { ...plainHouse(), hanging: data })!
  const restOf = (end: 0 | 1) => {
    const [a, b] = hangers.filter((hanger) => hanger.end === end)
    // The lowest point within both lengths, by trying 400,000 of them.
    let lowest = -Infinity
    const inside = (y: number, z: number) => [a!, b!].every(({ anchor, cutLength }) => Math.hypot(y - anchor[1], z - anchor[2]) <= cutLength) // prettier-ignore
    for (let y = 2.25; y <= 2.35; y += 2.5e-4)
      for (let z = 2.3; z <= 2.5; z += 1e-4)
        if (inside(y, z)) {
          lowest = lowest === -Infinity ? z : Math.min(lowest, z)
          break
        }
    return lowest
  }
  const expected = (Math.atan2(restOf(0) - restOf(1), 0.448) * 180) / Math.PI
  expect(Math.abs(residualTiltDeg - expected)).toBeLessThan(0.05)
  expect(Math.abs(expected)).toBeGreaterThan(0.1)
})

/** Height of the lower crossing of two circles (y, z, radius). */
function crossingBelow([y1, z1, r1]: number[], [y2, z2, r2]: number[]): number {
  const d = Math.hypot(y2! - y1!, z2! - z1!)
  const a = (r1! ** 2 - r2! ** 2 + d ** 2) / (2 * d)
  const h = Math.sqrt(r1! ** 2 - a ** 2)
  const [zm, uy] = [z1! + (a * (z2! - z1!)) / d, (y2! - y1!) / d]
  return Math.min(zm - h * uy, zm + h * uy)
}
