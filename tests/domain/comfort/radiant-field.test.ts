import { describe, expect, it } from 'vitest'
import { effectiveAreaShare, projectedAreaFactor, type Posture } from '#app/domain/comfort/projected-area.ts'
import { fieldBeforeAbsorption } from '#app/domain/comfort/radiant-field.ts'
import { sourcesOf } from '#app/domain/comfort/sources.ts'
import type { Beam } from '#app/domain/flux/beam.ts'
import { groupEmitter, type Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import { boxSolid } from '#app/domain/flux/solid.ts'
import { add, radians, scale, subtract, type Vec3 } from '#app/domain/vector.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'

interface Body {
  point: Vec3
  posture: Posture
  facing: number
}

/** f_eff Σ f_p E_n over 100 pieces of each element, each piece by the closed form on a plane that faces it. */
function fieldByPieces(emitter: Emitter, { point, posture, facing }: Body): number {
  const pieces = 100
  let sum = 0
  for (const element of emitter.elements) {
    for (let i = 0; i < pieces; i++) {
      const along = ((i + 0.5) / pieces - 0.5) * element.length
      const centre = add(element.centre, scale(emitter.frame.u, along))
      const piece = { centre, length: element.length / pieces, radiantPower: element.radiantPower / pieces }
      const towards = subtract(centre, point)
      const altitude = Math.atan2(towards[2], Math.hypot(towards[0], towards[1]))
      const azimuth = Math.atan2(towards[1], towards[0]) - facing
      sum +=
        irradianceAt({ ...emitter, elements: [piece] }, point, towards) *
        projectedAreaFactor(posture, altitude, azimuth)
    }
  }
  return effectiveAreaShare[posture] * sum
}

describe('effective radiant field from four nodes an element', () => {
  it('is within 0.3 % of 100 pieces for every element at every demo seat, 0.15 % for the seat', () => {
    const models = new Map(demoModels().map((each) => [each.code, each]))
    for (const { site, variants } of demoSites()) {
      for (const { layout } of variants) {
        const { sources } = sourcesOf(layout, models)
        for (const seat of site.seats) {
          const body: Body = {
            point: [seat.x, seat.y, seat.bodyHeight],
            posture: seat.posture,
            facing: radians(seat.facingDeg),
          }
          let [whole, exact] = [0, 0]
          for (const { emitter } of sources) {
            const [few, many] = [fieldBeforeAbsorption(emitter, body), fieldByPieces(emitter, body)]
            expect(Math.abs(few - many)).toBeLessThanOrEqual(0.003 * many + 1e-3)
            whole += few
            exact += many
          }
          expect(Math.abs(whole / exact - 1)).toBeLessThan(0.0015)
        }
      }
    }
  })

  const beams: Beam[] = [
    { kind: 'cosine', across: 2.3, along: 1.7 },
    {
      kind: 'table',
      across: [-1, -0.3, 0.2, 1.2],
      along: [-1.3, -0.2, 0.6, 1.3],
      intensity: [
        [0, 0.4, 0.5, 0],
        [0.2, 1, 0.7, 0.1],
        [0.3, 0.9, 1, 0.2],
        [0, 0.2, 0.1, 0],
      ],
    },
  ]
  it.each(beams)('holds for beams that are not symmetric, for both postures and any facing ($kind)', (beam) => {
    const elements = [
      { offset: -0.05, length: 1.1, radiantPower: 900 },
      { offset: 0.05, length: 1.1, radiantPower: 900 },
    ]
    const emitter = groupEmitter({ id: 'H1', at: [0.4, -0.7, 2.3], turnDeg: 25, tiltDeg: 20, beam, elements })
    for (const posture of ['seated', 'standing'] as const) {
      for (let facing = -3; facing <= 3; facing += 0.75) {
        const body: Body = { point: [-0.2, 0.1, 0.6], posture, facing }
        const many = fieldByPieces(emitter, body)
        expect(many).toBeGreaterThan(1)
        expect(Math.abs(fieldBeforeAbsorption(emitter, body) / many - 1)).toBeLessThan(0.01)
      }
    }
  })

  it('is more from the front than from the back, and nothing behind the beam', () => {
    const [beam] = beams
    const elements = [{ offset: 0, length: 0.6, radiantPower: 1000 }]
    const emitter = groupEmitter({ id: 'H1', at: [2, 0, 2], turnDeg: 90, tiltDeg: 45, beam: beam!, elements })
    const facing = (turn: number): Body => ({ point: [0, 0, 0.6], posture: 'seated', facing: turn })
    expect(fieldBeforeAbsorption(emitter, facing(0))).toBeGreaterThan(
      1.5 * fieldBeforeAbsorption(emitter, facing(Math.PI)),
    )
    expect(fieldBeforeAbsorption(emitter, { ...facing(0), point: [6, 0, 5] })).toBe(0)
    expect(fieldBeforeAbsorption(emitter, { ...facing(0), point: [2, 0, 2] })).toBe(0)
  })

  it('loses what an obstacle hides: half an element behind an opaque box, exactly the other half is left', () => {
    const beam: Beam = { kind: 'cosine', across: 1, along: 1 }
    const whole = groupEmitter({
      id: 'H1',
      at: [0, 0, 2.6],
      turnDeg: 0,
      tiltDeg: 0,
      beam,
      elements: [{ offset: 0, length: 0.8, radiantPower: 1000 }],
    })
    const leftHalf = groupEmitter({
      id: 'H1',
      at: [-0.2, 0, 2.6],
      turnDeg: 0,
      tiltDeg: 0,
      beam,
      elements: [{ offset: 0, length: 0.4, radiantPower: 500 }],
    })
    const half = { u: 0.5, v: 0.5, w: 0.01 }
    const board: Obstruction = {
      id: 'board',
      heaterId: null,
      transmittance: 0,
      solids: [boxSolid({ centre: [0.5, 0, 2], u: [1, 0, 0], v: [0, 1, 0], w: [0, 0, 1], half })],
    }
    const body: Body = { point: [0, 0, 0.6], posture: 'seated', facing: 0.4 }
    expect(fieldBeforeAbsorption(whole, body, [board]) / fieldBeforeAbsorption(leftHalf, body)).toBeCloseTo(1, 3)
  })
})
