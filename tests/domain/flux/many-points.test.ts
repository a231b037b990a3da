import { describe, expect, it } from 'vitest'
import { emitterOf } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { horizontalAtPoints, packedPoints } from '#app/domain/flux/many-points.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { demoModels } from '#drizzle/seed/demo-sites.ts'
import { cosine, line } from '#tests/support/emitters.ts'

const places: Vec3[] = Array.from({ length: 600 }, (_, i) => [
  (i % 25) * 0.5 - 6,
  Math.floor(i / 25) * 0.5 - 6,
  i % 2 ? 0.6 : 1.1,
])

describe('many points at once against the closed form: 1e-4 down to 1 W/m²', () => {
  it.each(
    demoModels()
      .filter((model) => model.beam)
      .map((model) => [model.code, model] as const),
  )('%s', (code, model) => {
    for (const lowestPoint of [model.mountingHeight.min ?? 2, model.mountingHeight.recommendedMax ?? 4]) {
      for (const tiltDeg of [0, model.tiltDeg?.max ?? 0]) {
        for (const turnDeg of [0, 90, 28]) {
          const heater = {
            id: 'h',
            model: code,
            supplyVoltage: 240,
            x: 0.1,
            y: -0.2,
            lowestPoint,
            turnDeg,
            tiltDeg,
            mount: 'chain',
            memberId: null,
          } as const
          const emitter = emitterOf(heater, model)!
          const own = horizontalAtPoints([emitter], packedPoints(places))
          places.forEach((place, i) => {
            const exact = irradianceAt(emitter, place, [0, 0, 1])
            expect(Math.abs(own[i]! - exact)).toBeLessThanOrEqual(1e-4 * Math.max(exact, 1))
          })
        }
      }
    }
  })

  it('tables, very short elements and places beside the element are reckoned in closed form', () => {
    const flat = {
      kind: 'table',
      across: [-1.5, 1.5],
      along: [-1.5, 1.5],
      intensity: [
        [1, 1],
        [1, 2],
      ],
    } as const
    const emitters = [line(flat, { at: [0, 0, 2] }), line(cosine(2, 1), { at: [1, 0, 2], length: 1e-3 })]
    const beside: Vec3[] = [
      [6, 0.2, 1.99],
      [1, 0, 1.9],
      [0, 0, 3],
    ]
    const own = horizontalAtPoints(emitters, packedPoints(beside))
    beside.forEach((place, i) => {
      const exact = emitters.reduce((sum, each) => sum + irradianceAt(each, place, [0, 0, 1]), 0)
      expect(own[i]).toBeCloseTo(exact, 9)
    })
  })
})
