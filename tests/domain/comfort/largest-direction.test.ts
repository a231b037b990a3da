import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { heatAtSeat } from '#app/domain/comfort/seat-heat.ts'
import { sourcesOf } from '#app/domain/comfort/sources.ts'
import { emitterOf } from '#app/domain/flux/emitter.ts'
import { irradianceByEmitter, largestIrradianceAt } from '#app/domain/flux/irradiance.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Seat } from '#app/domain/site/site.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'
import { heater, model, modelsOf, seat } from '#tests/domain/comfort/terrace.ts'

const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0)

/** Largest irradiance at a seat's head from the kept fluxes, and by the flux engine's own search. */
function bothWays(placed: MountedHeater[], at: Seat, models = modelsOf(model())) {
  const emitters = placed.flatMap((each) => emitterOf(each, models.get(each.model)!) ?? [])
  const point = [at.x, at.y, at.headHeight] as const
  const { head } = heatAtSeat(at, sourcesOf({ heaters: placed }, models).sources)
  const searched = largestIrradianceAt(emitters, point).irradiance
  return { kept: sum(head.parts), searched, onPlane: sum(irradianceByEmitter(emitters, point, head.direction)) }
}

describe('largest irradiance at a head from kept fluxes', () => {
  it('is that of the flux engine for every demo seat and variant, and its parts lie on one plane', () => {
    const models = new Map(demoModels().map((each) => [each.code, each]))
    for (const { site, variants } of demoSites()) {
      for (const { layout } of variants) {
        for (const at of site.seats) {
          const { kept, searched, onPlane } = bothWays(layout.heaters, at, models)
          expect(Math.abs(kept / searched - 1)).toBeLessThan(1e-9)
          expect(Math.abs(kept / onPlane - 1)).toBeLessThan(1e-9)
        }
      }
    }
  })

  it('is that of the flux engine for random heaters all round the head, also where planes cut elements', () => {
    const place = fc.record({
      x: fc.double({ min: -3, max: 3, noNaN: true }),
      y: fc.double({ min: -3, max: 3, noNaN: true }),
      lowestPoint: fc.double({ min: 0.6, max: 3, noNaN: true }),
      turnDeg: fc.double({ min: -180, max: 180, noNaN: true }),
      tiltDeg: fc.double({ min: -90, max: 90, noNaN: true }),
    })
    const three = modelsOf(model({ elementCount: 3, elementLength: 1.5 }))
    fc.assert(
      fc.property(fc.array(place, { minLength: 1, maxLength: 6 }), (places) => {
        const placed = places.map((at, i) => heater(`H${i}`, at))
        const { kept, searched, onPlane } = bothWays(placed, seat('S1'), three)
        // a search from more starts may find more, never less
        expect(kept).toBeGreaterThanOrEqual(searched * (1 - 1e-9))
        expect(Math.abs(kept - onPlane)).toBeLessThanOrEqual(1e-9 * (1 + kept))
      }),
      { numRuns: 300, seed: 5 },
    )
  })

  it('is that of the flux engine between wall heaters that look at the head from all sides', () => {
    const wall = fc.record({ turn: fc.integer({ min: 0, max: 35 }), power: fc.integer({ min: 100, max: 2000 }) })
    fc.assert(
      fc.property(fc.array(wall, { minLength: 3, maxLength: 7 }), (walls) => {
        const models = new Map(walls.map(({ power }, i) => [`m${i}`, model({ code: `m${i}`, elementLength: 1e-3, radiantEfficiency: power / 2000 })])) // prettier-ignore
        const placed = walls.map(({ turn }, i) => {
          const place = { x: 3 * Math.cos((turn * Math.PI) / 18), y: 3 * Math.sin((turn * Math.PI) / 18) }
          return heater(`H${i}`, { ...place, model: `m${i}`, turnDeg: turn * 10 + 90, tiltDeg: 90, lowestPoint: 1 })
        })
        const { kept, searched } = bothWays(placed, seat('S1'), models)
        expect(kept).toBeGreaterThanOrEqual(searched * (1 - 1e-6))
      }),
      { numRuns: 300, seed: 21 },
    )
  })

  it('loses no more than 0.1 % where many far heaters are left to the last climb', () => {
    const many = Array.from({ length: 90 }, (_, i) =>
      heater(`H${i}`, {
        x: ((i % 10) - 4.3) * 3,
        y: (Math.floor(i / 10) - 4.2) * 3,
        turnDeg: i * 37,
        tiltDeg: (i % 7) * 12,
      }),
    )
    for (let i = 0; i < 20; i++) {
      const { kept, searched, onPlane } = bothWays(many, seat('S1', { x: i * 0.6 - 6, y: 5 - i * 0.45 }))
      expect(kept / searched).toBeGreaterThan(0.999)
      expect(Math.abs(kept / onPlane - 1)).toBeLessThan(1e-9)
    }
  })

  it('between two facing wall heaters is what one of them gives, not their sum', () => {
    const facing = [
      heater('H1', { x: -2, turnDeg: -90, tiltDeg: 90, lowestPoint: 1.0 }),
      heater('H2', { x: 2, turnDeg: 90, tiltDeg: 90, lowestPoint: 1.0 }),
    ]
    const pair = bothWays(facing, seat('S1')).kept
    const single = bothWays([facing[0]!], seat('S1')).kept
    expect(single).toBeGreaterThan(50)
    expect(pair / single).toBeGreaterThanOrEqual(1)
    expect(pair / single).toBeLessThan(1.1)
  })

  it('without radiation looks up and receives nothing', () => {
    const { head } = heatAtSeat(seat('S1'), [])
    expect(head).toEqual({ direction: [0, 0, 1], parts: [] })
    const below = sourcesOf({ heaters: [heater('H1', { lowestPoint: 0.2 })] }, modelsOf(model())).sources
    expect(heatAtSeat(seat('S1'), below).head).toEqual({ direction: [0, 0, 1], parts: [0] })
  })
})
