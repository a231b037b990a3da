import { describe, expect, it } from 'vitest'
import {
  edgeLength,
  outlineFault,
  parseOutline,
  withCornerAdded,
  withCornerAt,
  withEdgeLength,
  withoutCorner,
} from '#app/domain/site/outline.ts'
import { areaOf } from '#app/domain/site/geometry.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { chance } from '#tests/support/chance.ts'

const square: Vec2[] = [[0, 0], [4, 0], [4, 3], [0, 3]] // prettier-ignore

describe('what an outline may not be', () => {
  it.each<[string, Vec2[], RegExp]>([
    ['crossing itself', [[0, 0], [4, 3], [4, 0], [0, 3]], /Edges 1 and 3 cross/], // prettier-ignore
    ['two corners', [[0, 0], [4, 0]], /3 corners; here are 2/], // prettier-ignore
    ['no area', [[0, 0], [2, 0], [4, 0]], /no area; at least 0\.01 m²/], // prettier-ignore
    ['a corner twice', [[0, 0], [4, 0], [4, 0], [0, 3]], /Corners 2 and 3 are the same/], // prettier-ignore
    ['a corner on another edge', [[0, 0], [4, 0], [4, 3], [2, 0], [0, 3]], /Corner 4 lies on another edge/], // prettier-ignore
    ['201 corners', ring(201), /at most 200 corners; here are 201/],
    ['10,000 corners', ring(10_000), /at most 200 corners; here are 10,000/],
  ])('%s is refused with the limit', (_, outline, message) => {
    expect(outlineFault(outline)).toMatch(message)
  })

  it('a square, a notch and 200 corners may be', () => {
    expect(outlineFault(square)).toBeNull()
    expect(outlineFault([[0, 0], [6, 0], [6, 4], [3, 4], [3, 2], [0, 2]])).toBeNull() // prettier-ignore
    expect(outlineFault(ring(200))).toBeNull()
  })

  it('finds every crossing that a walk over all pairs of sampled points finds', () => {
    const random = chance(5)
    for (let round = 0; round < 200; round++) {
      const outline = Array.from({ length: 6 }, (): Vec2 => [random() * 5, random() * 5])
      expect(outlineFault(outline)?.includes('cross') ?? false).toBe(crossesBySampling(outline))
    }
  })
})

function ring(count: number): Vec2[] {
  return Array.from({ length: count }, (_, i): Vec2 => {
    const turn = (2 * Math.PI * i) / count
    return [20 * Math.cos(turn), 20 * Math.sin(turn)]
  })
}

/** Two edges cross when the signs of one's distance to the other's line change along both, seen at 4,000 points each. */
function crossesBySampling(outline: readonly Vec2[]): boolean {
  const edges = outline.map((a, i) => [a, outline[(i + 1) % outline.length]!] as const)
  return edges.some(([a, b], i) =>
    edges.some(([c, d], k) => {
      const apart = Math.abs(i - k)
      if (apart <= 1 || apart === outline.length - 1) return false
      const side = (p: Vec2) => Math.sign((d[0] - c[0]) * (p[1] - c[1]) - (d[1] - c[1]) * (p[0] - c[0]))
      let before = side(a)
      for (let step = 1; step <= 4000; step++) {
        const t = step / 4000
        const p: Vec2 = [a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])]
        const now = side(p)
        if (now !== before) {
          const along =
            ((p[0] - c[0]) * (d[0] - c[0]) + (p[1] - c[1]) * (d[1] - c[1])) / ((d[0] - c[0]) ** 2 + (d[1] - c[1]) ** 2)
          return along > 0 && along < 1
        }
        before = now
      }
      return false
    }),
  )
}

describe('editing an outline', () => {
  it('moves, adds and removes a corner and nothing else', () => {
    expect(withCornerAt(square, 2, [5, 3.5])).toEqual([
      [0, 0],
      [4, 0],
      [5, 3.5],
      [0, 3],
    ])
    expect(withCornerAdded(square, 3)).toEqual([...square, [0, 1.5]])
    expect(withCornerAdded(square, 0, [2, -1])).toEqual([
      [0, 0],
      [2, -1],
      [4, 0],
      [4, 3],
      [0, 3],
    ])
    expect(withoutCorner(square, 1)).toEqual([
      [0, 0],
      [4, 3],
      [0, 3],
    ])
  })

  it('a corner added in the middle of an edge changes no area', () => {
    for (let edge = 0; edge < 4; edge++) expect(areaOf(withCornerAdded(square, edge))).toBeCloseTo(12, 9)
  })

  it('an edge of a typed length keeps its direction; the named end moves', () => {
    const last = withEdgeLength(square, 1, 5, 'last')
    expect(last).toEqual([
      [0, 0],
      [4, 0],
      [4, 5],
      [0, 3],
    ])
    const first = withEdgeLength(square, 1, 5, 'first')
    expect(first).toEqual([
      [0, 0],
      [4, -2],
      [4, 3],
      [0, 3],
    ])
    const slanted: Vec2[] = [[0, 0], [3, 4], [0, 8]] // prettier-ignore
    // 3-4-5 triangle: twice its length ends at (6, 8).
    expect(withEdgeLength(slanted, 0, 10, 'last')[1]).toEqual([6, 8])
    expect(edgeLength(withEdgeLength(slanted, 2, 2, 'first'), 2)).toBeCloseTo(2, 4)
  })
})

describe('corners that are typed or pasted', () => {
  it.each([
    ['0, 0\n4, 0\n4, 3', 'metric'],
    ['0;0\n4 m;0\n400 cm;3000', 'metric'],
    ['0\t0\r\n4,0\t0\r\n4\t3,00 m\r\n', 'metric'],
    ['0, 0\n13\' 1 31/64", 0\n13\' 1 31/64", 9\' 10 7/64"', 'imperial'],
  ] as const)('%j is read', (text, units) => {
    const read = parseOutline(text, units)
    if ('error' in read) throw new Error(read.error)
    const wanted = [[0, 0], [4, 0], [4, 3]] // prettier-ignore
    read.outline.forEach(([x, y], i) => {
      expect(x).toBeCloseTo(wanted[i]![0]!, 3)
      expect(y).toBeCloseTo(wanted[i]![1]!, 3)
    })
  })

  it.each([
    ['0, 0\n4\n4, 3', /Line 2, “4”/],
    ['0, 0\n4, 0\n4, abc', /Line 3, y: “abc” is not read/],
    ['0, 0\n4, 0\n4, 3000 m', /Line 3, y: Between/],
    ['0, 0\n4, 3\n4, 0\n0, 3', /cross/],
    ['', /here are 0/],
    [Array.from({ length: 10_000 }, (_, i) => `${i / 100}, ${(i * i) / 1e6}`).join('\n'), /here are 10,000 lines/],
  ])('%.30j is refused beside its field', (text, message) => {
    const read = parseOutline(text, 'metric')
    expect('error' in read && read.error).toMatch(message)
  })
})
