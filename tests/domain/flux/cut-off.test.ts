import { describe, expect, it } from 'vitest'
import { areaOf, cutOffFor, holdsSquare, leastKept } from '#app/domain/flux/cut-off.ts'
import { emitterOf, type Emitter } from '#app/domain/flux/emitter.ts'
import { gridOf } from '#app/domain/flux/grid.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { irradianceMap } from '#app/domain/flux/map.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { demoModels } from '#drizzle/seed/demo-sites.ts'
import { cosine, line } from '#tests/support/emitters.ts'

const large: Vec2[] = [
  [0, 0],
  [100, 0],
  [100, 60],
  [0, 60],
]
const models = demoModels().filter((model) => model.beam !== null)

/** A hundred heaters of all demo models over 100 × 60 m, as they would hang, some tilted. */
const heaters: Emitter[] = Array.from({ length: 100 }, (_, i) => {
  const model = models[i % models.length]!
  return emitterOf(
    {
      id: `h${i}`,
      model: model.code,
      supplyVoltage: 230,
      x: 5 + (i % 10) * 10,
      y: 3 + Math.floor(i / 10) * 6,
      lowestPoint: model.mountingHeight.recommendedMax ?? 3,
      turnDeg: i % 3 === 0 ? 90 : 0,
      tiltDeg: i % 4 === 0 ? (model.tiltDeg?.max ?? 0) / 2 : 0,
      mount: 'chain',
      memberId: null,
    },
    model,
  )!
})

describe('where a heater is reckoned', () => {
  it.each([
    [0, 0],
    [25, 20],
    [60, -40],
    [-80, 90],
  ])('tilted %d°, turned %d°: outside its rectangle it gives less than 0.5 W/m² anywhere', (tiltDeg, turnDeg) => {
    const emitter = line(cosine(1.9, 1.3), { at: [3, -2, 2.5], tiltDeg, turnDeg, length: 1.1, power: 2500 })
    const { left, right, low, high } = areaOf(emitter, 0.6)
    const at = (x: number, y: number) => irradianceAt(emitter, [x, y, 0.6], [0, 0, 1])
    for (let i = 0; i <= 400; i++) {
      for (const further of [0, 0.3, 2, 8, 40]) {
        const x = left - 60 + (i / 400) * (right - left + 120)
        const y = low - 60 + (i / 400) * (high - low + 120)
        for (const e of [at(x, low - further), at(x, high + further), at(left - further, y), at(right + further, y)]) {
          expect(e).toBeLessThanOrEqual(leastKept)
        }
      }
    }
  })

  it.each([
    [0, 0],
    [25, 20],
    [60, -40],
    [-80, 90],
  ])('tilted %d°, turned %d°: nor outside its convex outline', (tiltDeg, turnDeg) => {
    const emitter = line(cosine(1.9, 1.3), { at: [3, -2, 2.5], tiltDeg, turnDeg, length: 1.1, power: 2500 })
    const { outline, left, right, low, high } = areaOf(emitter, 0.6)
    let [outside, inside] = [0, 0]
    for (let x = left; x <= right; x += 0.1) {
      for (let y = low; y <= high; y += 0.1) {
        const isInside = outline.every(([ax, ay], i) => {
          const [bx, by] = outline[(i + 1) % outline.length]!
          return (bx - ax) * (y - ay) - (by - ay) * (x - ax) >= 0
        })
        if (isInside) inside++
        else expect(irradianceAt(emitter, [x, y, 0.6], [0, 0, 1])).toBeLessThanOrEqual(leastKept)
        if (!isInside) outside++
      }
    }
    expect(inside).toBeGreaterThan(outside)
    expect(outside).toBeGreaterThan(0)
  })

  it('holds a square when it holds its four corners', () => {
    const outline: Vec2[] = [
      [4, 0],
      [7, 3],
      [4, 8],
      [0, 3],
    ]
    const area = { outline, left: 0, right: 7, low: 0, high: 8 }
    const isIn = (x: number, y: number) =>
      3 * x + 4 * y >= 12 && x - y <= 4 && 5 * x + 3 * y <= 44 && 5 * x - 4 * y >= -12
    let held = 0
    for (let x = -1; x <= 8; x += 0.37) {
      for (let y = -1; y <= 8; y += 0.41) {
        const corners = isIn(x, y) && isIn(x + 2, y) && isIn(x, y + 2) && isIn(x + 2, y + 2)
        expect(holdsSquare(area, x, y, 2)).toBe(corners)
        if (corners) held++
      }
    }
    expect(held).toBeGreaterThan(10)
  })

  it('is not much more than it has to be', () => {
    const emitter = line(cosine(1.9, 1.3), { at: [3, -2, 2.5], length: 1.1, power: 2500 })
    const { left, right, high } = areaOf(emitter, 0.6)
    expect(irradianceAt(emitter, [3, high - 2, 0.6], [0, 0, 1])).toBeGreaterThan(leastKept)
    expect(irradianceAt(emitter, [right - 2, -2, 0.6], [0, 0, 1])).toBeGreaterThan(leastKept)
    expect((left + right) / 2).toBeCloseTo(3, 6)
  })
})

describe('the cut-off', () => {
  it('is none for a terrace', () => {
    const grid = gridOf(
      [
        [0, 0],
        [13, 0],
        [13, 5],
        [0, 5],
      ],
      0.6,
      0.05,
    )
    const { areas, errorBound } = cutOffFor(heaters.slice(0, 12), grid)
    expect(errorBound).toBe(0)
    expect(areas).toHaveLength(12)
    expect(areas.every((area) => area === null)).toBe(true)
  })

  it('on 100 × 60 m states a bound that the map keeps, at every 97th cell', () => {
    const grid = gridOf(large, 0.6, 0.25)
    const { total, errorBound } = irradianceMap(null, grid, heaters)
    expect(errorBound).toBeGreaterThan(0)
    // Strong heaters, some tilted, one for 60 m²: 2 % of the peak.
    expect(errorBound).toBeLessThan(12)
    let [worst, peak] = [0, 0]
    for (let at = 0; at < total.length; at += 97) {
      const x = ((at % grid.columns) + 0.5) * grid.cell
      const y = (Math.floor(at / grid.columns) + 0.5) * grid.cell
      const exact = heaters.reduce((sum, each) => sum + irradianceAt(each, [x, y, 0.6], [0, 0, 1]), 0)
      worst = Math.max(worst, exact - total[at]!)
      peak = Math.max(peak, exact)
    }
    // The kernel's own tables err by less than 0.1 % of the peak.
    expect(worst).toBeLessThanOrEqual(errorBound + 0.001 * peak)
    expect(worst).toBeGreaterThan(0)
  })

  it('keeps the layers of a large site while one heater moves', () => {
    const grid = gridOf(large, 0.6, 0.25)
    const first = irradianceMap(null, grid, heaters)
    const moved = heaters.map((each, i) => (i === 7 ? { ...heaters[8]!, id: each.id } : each))
    expect(irradianceMap(first, grid, moved).computed).toBe(1)
  })
})
