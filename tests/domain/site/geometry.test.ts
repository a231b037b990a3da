import { describe, expect, it } from 'vitest'
import {
  areaOf,
  convexOutlinesMeet,
  convexPieces,
  crossesItself,
  distanceToOutline,
  isInside,
  nearestOnSegment,
} from '#app/domain/site/geometry.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { chance } from '#tests/support/chance.ts'

describe('nearest point of a segment', () => {
  it('snaps (3, 2) to (0, 0)–(6, 2) at (3.3, 1.1), 0.9487 m away (closed form: projection)', () => {
    const { point, distance } = nearestOnSegment([0, 0], [6, 2], 3, 2)
    expect(point[0]).toBeCloseTo(3.3, 4)
    expect(point[1]).toBeCloseTo(1.1, 4)
    expect(distance).toBeCloseTo(0.9487, 4)
  })

  it('agrees with the nearest of 20,001 sampled points in 300 random cases', () => {
    const random = chance(11)
    for (let i = 0; i < 300; i++) {
      const [a, b, p] = [0, 1, 2].map((): Vec2 => [random() * 8 - 4, random() * 8 - 4])
      const found = nearestOnSegment(a!, b!, p![0], p![1]).distance
      let sampled = Infinity
      for (let k = 0; k <= 20_000; k++) {
        const t = k / 20_000
        const [x, y] = [a![0] + t * (b![0] - a![0]), a![1] + t * (b![1] - a![1])]
        sampled = Math.min(sampled, Math.hypot(p![0] - x, p![1] - y))
      }
      // Half a step of the sampling along at most 11.4 m.
      expect(found).toBeLessThanOrEqual(sampled + 1e-12)
      expect(sampled - found).toBeLessThan(3e-4)
    }
  })

  it('takes a segment without length as its point', () => {
    expect(nearestOnSegment([1, 1], [1, 1], 4, 5).distance).toBe(5)
  })
})

describe('outlines', () => {
  const notched: Vec2[] = [[0, 0], [6, 0], [6, 4], [4, 4], [4, 2], [2, 2], [2, 4], [0, 4]] // prettier-ignore

  it('knows inside, outside, notch and edge', () => {
    expect(isInside(notched, 1, 3)).toBe(true)
    expect(isInside(notched, 3, 3)).toBe(false)
    expect(isInside(notched, 3, 2)).toBe(true)
    expect(isInside(notched, 6, 4)).toBe(true)
    expect(isInside(notched, 6.001, 2)).toBe(false)
    expect(isInside([...notched].reverse(), 1, 3)).toBe(true)
  })

  it('has area 24 − 4 and the distance to its edges', () => {
    expect(areaOf(notched)).toBe(20)
    expect(areaOf([...notched].reverse())).toBe(-20)
    expect(distanceToOutline(notched, 3, 3)).toBe(1)
    expect(distanceToOutline(notched, 9, 8)).toBe(5)
  })

  it('is cut into convex pieces that have its area between them', () => {
    const pieces = convexPieces(notched)
    expect(pieces.reduce((sum, piece) => sum + areaOf(piece), 0)).toBeCloseTo(20, 9)
    for (const piece of pieces) expect(convexPieces(piece)).toHaveLength(1)
    expect(convexPieces([[0, 0], [0, 1], [1, 1], [1, 0]])).toHaveLength(1) // prettier-ignore
  })

  it('tells an outline that crosses itself', () => {
    expect(crossesItself([[0, 0], [2, 2], [2, 0], [0, 2]])).toBe(true) // prettier-ignore
    expect(crossesItself(notched)).toBe(false)
  })

  it('tells whether two convex outlines share a point', () => {
    const square = (x: number, y: number): Vec2[] => [[x, y], [x + 1, y], [x + 1, y + 1], [x, y + 1]] // prettier-ignore
    expect(convexOutlinesMeet(square(0, 0), square(0.9, 0.9))).toBe(true)
    expect(convexOutlinesMeet(square(0, 0), square(1, 0))).toBe(true)
    expect(convexOutlinesMeet(square(0, 0), square(1.001, 0))).toBe(false)
    expect(convexOutlinesMeet(square(0, 0), [[1.5, 0], [3, 1.5], [1.5, 3], [0, 1.6]])).toBe(true) // prettier-ignore
  })
})
