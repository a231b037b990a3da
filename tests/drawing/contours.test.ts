import { describe, expect, it } from 'vitest'
import { gridOf, type Grid } from '#app/domain/flux/grid.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { contoursOf, fineBandEdges } from '#app/drawing/heat/contours.ts'

const square: Vec2[] = [
  [-3, -3],
  [3, -3],
  [3, 3],
  [-3, 3],
]
const fill = (grid: Grid, f: (x: number, y: number) => number): Float32Array =>
  Float32Array.from({ length: grid.columns * grid.rows }, (_, k) =>
    f(grid.x0 + ((k % grid.columns) + 0.5) * grid.cell, grid.y0 + (Math.floor(k / grid.columns) + 0.5) * grid.cell),
  )
/** The points of each ring; of curves where they touch. */
const ringsOf = (path: string): Vec2[][] =>
  path
    .replaceAll(/Q\S+ \S+ /g, 'L')
    .split('Z')
    .filter(Boolean)
    .map((ring) =>
      ring
        .slice(1)
        .split('L')
        .map((p): Vec2 => {
          const [x, y] = p.split(' ').map(Number)
          return [x!, y!]
        }),
    )
const areaOf = (ring: readonly Vec2[]): number =>
  Math.abs(
    ring.reduce((sum, [x, y], i) => {
      const [a, b] = ring[(i + 1) % ring.length]!
      return sum + x * b - a * y
    }, 0) / 2,
  )
const grid = gridOf(square, 0.6, 0.05)

describe('isolines', () => {
  it.each([100, 200, 300, 400])('of a cone are circles of the known radius (%d)', (level) => {
    const picture = contoursOf(
      fill(grid, (x, y) => 500 - 180 * Math.hypot(x, y)),
      grid,
      [level],
      [],
    )
    const rings = ringsOf(picture.lines[0]!.path)
    const radius = (500 - level) / 180
    expect(rings).toHaveLength(1)
    for (const [x, y] of rings[0]!) expect(Math.abs(Math.hypot(x, y) - radius)).toBeLessThan(0.004)
  })
  it('of a paraboloid enclose the known area', () => {
    const picture = contoursOf(
      fill(grid, (x, y) => 600 - 60 * (x * x + y * y)),
      grid,
      [200, 350],
      [350, 355],
    )
    for (const line of picture.lines) {
      const area = (Math.PI * (600 - line.level)) / 60
      expect(Math.abs(areaOf(ringsOf(line.path)[0]!) / area - 1)).toBeLessThan(0.003)
    }
  })
  it('25 apart miss the value by less than 2.5 all along, and the fill reaches the outline', () => {
    const f = (x: number, y: number) => 600 - 60 * (x * x + y * y) + 20 * Math.sin(2 * x)
    const levels = Array.from({ length: 20 }, (_, i) => 25 * (i + 1))
    const picture = contoursOf(fill(grid, f), grid, levels, [-2000])
    for (const line of picture.lines) {
      for (const ring of ringsOf(line.path)) {
        const inner = ring.map((p, i) => [p, ring[(i + 1) % ring.length]!] as const)
        for (const [[ax, ay], [bx, by]] of inner) {
          if (Math.max(Math.abs(ax), Math.abs(ay), Math.abs(bx), Math.abs(by)) > 2.9) continue
          expect(Math.abs(f(ax, ay) - line.level)).toBeLessThan(2.5)
          expect(Math.abs(f((ax + bx) / 2, (ay + by) / 2) - line.level)).toBeLessThan(2.5)
        }
      }
    }
    const outline = ringsOf(picture.bands[0]!.path).flat()
    for (const k of [0, 1] as const) {
      expect(Math.min(...outline.map((p) => p[k]))).toBeLessThanOrEqual(-3)
      expect(Math.max(...outline.map((p) => p[k]))).toBeGreaterThanOrEqual(3)
    }
  })
  it('are traced more coarsely where straight lines miss little of the step between them', () => {
    const values = fill(grid, () => 199)
    values[40 * grid.columns + 42] = 201
    const levelsShown = (levels: readonly number[]) =>
      contoursOf(values, grid, levels, []).lines.map(({ level }) => level)
    expect(levelsShown([200, 205])).toEqual([200])
    expect(levelsShown([200, 225])).toEqual([])
  })
  it('where the field is sharp are traced as finely as ever', () => {
    const step = (x: number) => (x < 0.475 ? 100 : 0)
    const picture = contoursOf(
      fill(grid, (x) => 300 + step(x)),
      grid,
      [325, 350],
      [],
    )
    const edge = ringsOf(picture.lines[1]!.path)[0]!.filter(([x, y]) => Math.abs(y) < 2.9 && x > 0)
    for (const [x] of edge) expect(Math.abs(x - 0.475)).toBeLessThanOrEqual(0.03)
  })
  it('of a plane are straight and in the right place', () => {
    const picture = contoursOf(
      fill(grid, (x) => 300 + 50 * x),
      grid,
      [250],
      [],
    )
    const inner = ringsOf(picture.lines[0]!.path)[0]!.filter(([x, y]) => Math.abs(y) < 2.9 && x < 2.9)
    expect(inner.length).toBeGreaterThan(1)
    for (const [x] of inner) expect(x).toBeCloseTo(-1, 3)
  })
  it('are left out above the highest value', () => {
    const picture = contoursOf(
      fill(grid, () => 120),
      grid,
      [100, 150],
      [0, 50, 100, 150],
    )
    expect(picture.lines.map(({ level }) => level)).toEqual([100])
    expect(picture.bands.map(({ from }) => from)).toEqual([0, 50, 100])
  })
})

describe('fills', () => {
  const floor: Vec2[] = [
    [0, 0],
    [6, 0],
    [6, 2],
    [2, 2],
    [2, 5],
    [0, 5],
  ]
  const shape = gridOf(floor, 0.6, 0.1)
  const field = fill(shape, (x, y) => 80 + 40 * x + 30 * y)
  it('reach past the outline all round, but no more than three cells', () => {
    const [rings] = [ringsOf(contoursOf(field, shape, [], [0]).bands[0]!.path)]
    expect(rings).toHaveLength(1)
    expect(areaOf(rings[0]!)).toBeGreaterThan(18)
    const xs = rings[0]!.map(([x]) => x)
    expect(Math.min(...xs)).toBeGreaterThan(-0.35)
    expect(Math.max(...xs)).toBeLessThan(6.35)
    expect(rings[0]!.some(([x, y]) => x > 2.35 && y > 2.35)).toBe(false)
  })
  it('do not know what lies outside the floor, whatever stands there', () => {
    const plain = contoursOf(field, shape)
    for (const outside of [NaN, 0, 1e6, -1e6]) {
      const spoilt = field.map((value, k) => (shape.inside[k] === 1 ? value : outside))
      expect(contoursOf(spoilt, shape)).toEqual(plain)
    }
  })
  it('lie inside each other, every 10 W/m² where asked', () => {
    const picture = contoursOf(
      fill(grid, (x, y) => 500 - 180 * Math.hypot(x, y)),
      grid,
      [],
      fineBandEdges,
    )
    const inner = picture.bands.filter(({ from }) => from >= 100)
    const areas = inner.map(({ path }) => areaOf(ringsOf(path)[0]!))
    expect(inner.length).toBeGreaterThan(35)
    for (const [i, area] of areas.slice(1).entries()) expect(area).toBeLessThan(areas[i]!)
  })
})

describe('figures on the lines', () => {
  const picture = contoursOf(
    fill(grid, (x, y) => 500 - 180 * Math.hypot(x, y)),
    grid,
    [300, 350],
    [],
    [300],
  )
  it('have places on the line, turned with it and upright', () => {
    const places = picture.lines[0]!.labels
    expect(places.length).toBeGreaterThan(3)
    for (const { x, y, angleDeg } of places) {
      expect(Math.abs(Math.hypot(x, y) - 200 / 180)).toBeLessThan(0.01)
      const square = Math.abs(Math.cos((angleDeg * Math.PI) / 180) * x + Math.sin((angleDeg * Math.PI) / 180) * y)
      expect(square).toBeLessThan(0.1)
      expect(Math.abs(angleDeg)).toBeLessThanOrEqual(90)
    }
  })
  it('have none on levels that are not written', () => expect(picture.lines[1]!.labels).toEqual([]))
  it('say the highest point above the last band, once', () => {
    const high = contoursOf(
      fill(grid, (x, y) => 900 - 180 * Math.hypot(x - 1, y)),
      grid,
    )
    expect(high.peaks).toHaveLength(1)
    expect(Math.hypot(high.peaks[0]!.x - 1, high.peaks[0]!.y)).toBeLessThan(0.06)
    expect(
      contoursOf(
        fill(grid, () => 580),
        grid,
      ).peaks,
    ).toEqual([])
  })
})
