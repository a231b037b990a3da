import { describe, expect, it } from 'vitest'
import { cutOffFor, extentOf, leastKept } from '#app/domain/flux/cut-off.ts'
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
    const { left, right, low, high } = extentOf(emitter, 0.6)
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

  it('is not much more than it has to be', () => {
    const emitter = line(cosine(1.9, 1.3), { at: [3, -2, 2.5], length: 1.1, power: 2500 })
    const { left, right, high } = extentOf(emitter, 0.6)
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
    const { extents, errorBound } = cutOffFor(heaters.slice(0, 12), grid)
    expect(errorBound).toBe(0)
    expect(extents.every(({ left, right }) => left === -Infinity && right === Infinity)).toBe(true)
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
