import { describe, expect, it } from 'vitest'
import { cutOffFor, farBound, farSourceOf } from '#app/domain/flux/cut-off.ts'
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

describe('the bound on what is left out', () => {
  it.each([0, 25, 60, -80])('is never passed by one heater tilted %d°, anywhere beyond the distance', (tiltDeg) => {
    const emitter = line(cosine(1.9, 1.3), { at: [0, 0, 2.5], tiltDeg, turnDeg: 20, length: 1.1, power: 2500 })
    const source = farSourceOf(emitter, 0.6)!
    const [left, right] = [-Math.sin(Math.PI / 9), Math.cos(Math.PI / 9)]
    for (const distance of [4, 8, 12]) {
      for (let turn = 0; turn < 360; turn += 5) {
        const angle = (turn * Math.PI) / 180
        for (const further of [0, 0.5, 3, 10]) {
          const [x, y] = [(distance + further) * Math.cos(angle), (distance + further) * Math.sin(angle)]
          const side = (x * left + y * right) * (tiltDeg < 0 ? -1 : 1)
          expect(irradianceAt(emitter, [x, y, 0.6], [0, 0, 1])).toBeLessThanOrEqual(farBound(source, distance, side))
        }
      }
    }
  })

  it('falls with distance', () => {
    const source = farSourceOf(heaters[1]!, 0.6)!
    const bounds = [2, 4, 8, 16].map((distance) => farBound(source, distance, distance))
    expect(bounds).toEqual(bounds.toSorted((a, b) => b - a))
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
    expect(cutOffFor(heaters.slice(0, 12), grid)).toEqual({ radius: Infinity, errorBound: 0 })
  })

  it('on 100 × 60 m states a bound that the map keeps, at every tenth cell', () => {
    const grid = gridOf(large, 0.6, 0.25)
    const { total, cutOff } = irradianceMap(null, grid, heaters)
    expect(cutOff.radius).toBeGreaterThanOrEqual(8)
    expect(cutOff.radius).toBeLessThanOrEqual(24)
    expect(cutOff.errorBound).toBeGreaterThan(0)
    let [worst, peak] = [0, 0]
    for (let at = 0; at < total.length; at += 97) {
      const x = ((at % grid.columns) + 0.5) * grid.cell
      const y = (Math.floor(at / grid.columns) + 0.5) * grid.cell
      const exact = heaters.reduce((sum, each) => sum + irradianceAt(each, [x, y, 0.6], [0, 0, 1]), 0)
      worst = Math.max(worst, exact - total[at]!)
      peak = Math.max(peak, exact)
    }
    // The kernel's own tables err by less than 0.1 % of the peak.
    expect(worst).toBeLessThanOrEqual(cutOff.errorBound + 0.001 * peak)
    expect(worst).toBeGreaterThan(0)
  })
})
