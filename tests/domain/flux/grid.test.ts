import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { windowOf } from '#app/domain/flux/cells.ts'
import { gridOf, mostCells } from '#app/domain/flux/grid.ts'
import type { Vec2 } from '#app/domain/vector.ts'

const square: Vec2[] = [
  [0, 0],
  [4, 0],
  [4, 3],
  [0, 3],
]

describe('the grid of a floor', () => {
  it('covers a rectangle with cells whose centres lie half a cell in', () => {
    const grid = gridOf(square, 0.6, 0.5)
    expect(grid).toMatchObject({ x0: 0, y0: 0, cell: 0.5, columns: 8, rows: 6, z: 0.6 })
    expect(grid.inside.every((is) => is === 1)).toBe(true)
  })

  it('leaves out what an L-shaped floor leaves out, whichever way round it is drawn', () => {
    const corner: Vec2[] = [
      [-1, 2],
      [3, 2],
      [3, 4],
      [1, 4],
      [1, 6],
      [-1, 6],
    ]
    for (const floor of [corner, [...corner].reverse()]) {
      const grid = gridOf(floor, 1, 0.1)
      expect(grid.inside.reduce((sum, is) => sum + is, 0) * 0.01).toBeCloseTo(8 + 4, 6)
      const at = (x: number, y: number) =>
        grid.inside[Math.floor((y - 2) / 0.1) * grid.columns + Math.floor((x + 1) / 0.1)]
      expect(at(2.55, 3.05)).toBe(1)
      expect(at(2.55, 5.05)).toBe(0)
    }
  })

  it('has the area of any triangle, to the length of its edge times a cell', () => {
    const coordinate = fc.double({ min: -10, max: 10, noNaN: true })
    const corner = fc.tuple(coordinate, coordinate)
    fc.assert(
      fc.property(corner, corner, corner, (a, b, c) => {
        const area = Math.abs((b[0] - a[0]) * (c[1] - a[1]) - (c[0] - a[0]) * (b[1] - a[1])) / 2
        const edge =
          Math.hypot(b[0] - a[0], b[1] - a[1]) +
          Math.hypot(c[0] - b[0], c[1] - b[1]) +
          Math.hypot(a[0] - c[0], a[1] - c[1])
        const grid = gridOf([a, b, c], 1, 0.05)
        const cells = grid.inside.reduce((sum, is) => sum + is, 0) * 0.05 * 0.05
        expect(Math.abs(cells - area)).toBeLessThanOrEqual(edge * 0.05 + 0.01)
      }),
      { numRuns: 50 },
    )
  })

  it.each([
    ['two corners', square.slice(0, 2), 0.6, 0.1],
    ['no cell size', square, 0.6, 0],
    ['a negative cell size', square, 0.6, -1],
    ['a height that is none', square, NaN, 0.1],
    ['a corner that is none', [...square, [NaN, 1] as const], 0.6, 0.1],
    ['too many cells', square, 0.6, 0.001],
  ])('refuses %s', (_, floor, z, cell) => {
    expect(() => gridOf(floor, z, cell)).toThrow(RangeError)
  })

  it('states its limit', () => {
    expect(() => gridOf(square, 0.6, 0.001)).toThrow(String(mostCells))
  })

  it('gives the window of cells in a rectangle, none when out of reach', () => {
    const grid = gridOf(square, 0.6, 0.5)
    const around = (x: number, y: number, r: number) =>
      windowOf(grid, { left: x - r, right: x + r, low: y - r, high: y + r })
    expect(around(1, 1, 0.8)).toMatchObject({ firstColumn: 0, firstRow: 0, columns: 4, rows: 4, x0: 0, y0: 0 })
    expect(around(3.9, 2.9, 0.5)).toMatchObject({ firstColumn: 7, firstRow: 5, columns: 1, rows: 1 })
    expect(around(2, 1, Infinity)).toMatchObject({ columns: 8, rows: 6 })
    expect(around(20, 1, 2)).toBeNull()
  })
})
