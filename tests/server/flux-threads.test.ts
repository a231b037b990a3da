import { afterAll, describe, expect, it } from 'vitest'
import { groupEmitter, type Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { answerMapOffThread, pointFluxes, stopFluxThreads } from '#app/server/flux.server.ts'

const emitters: Emitter[] = [0, 1, 2].map((i) =>
  groupEmitter({
    id: `h${i}`,
    at: [i, 1, 2.5],
    turnDeg: 35 * i,
    tiltDeg: 10 * i,
    beam: { kind: 'cosine', across: 1.9, along: 2.4 },
    elements: [{ offset: 0, length: 0.5, radiantPower: 1200 }],
  }),
)
const points = [
  { at: [0.5, 0.5, 0.6], normal: [0, 0, 1] },
  { at: [1, 2, 1.1], normal: [0, -2, 1] },
] as const

describe('flux off the event loop', () => {
  afterAll(stopFluxThreads)

  it('gives the fluxes of the engine, in total and by heater, while the event loop goes on', async () => {
    let turns = 0
    const ticking = setInterval(() => turns++, 1)
    const { irradiance, byHeater } = await pointFluxes(emitters, points)
    clearInterval(ticking)
    const expected = points.map(({ at, normal }) => emitters.map((emitter) => irradianceAt(emitter, at, normal)))
    expect(byHeater).toEqual(expected)
    expect(irradiance[0]).toBeCloseTo(expected[0]?.reduce((sum, part) => sum + part, 0) ?? 0, 9)
    expect(turns).toBeGreaterThan(5)
  })

  it('gives maps, many at once, each its own', async () => {
    const floor = [[0, 0] as const, [3, 0] as const, [3, 2] as const, [0, 2] as const]
    const asked = [0.2, 0.6, 1.1].map((z) =>
      answerMapOffThread({ emitters, floor, z, cell: 0.25, quantity: { kind: 'flux' }, levels: [] }),
    )
    const answers = await Promise.all(asked)
    expect(answers.map(({ grid }) => grid.z)).toEqual([0.2, 0.6, 1.1])
    expect(answers[2]?.peak).toBeGreaterThan(answers[0]?.peak ?? Infinity)
  })

  it('refuses figures without meaning and goes on working', async () => {
    await expect(pointFluxes(emitters, [{ at: [NaN, 0, 0], normal: [0, 0, 1] }])).rejects.toThrow(RangeError)
    expect((await pointFluxes(emitters, points)).irradiance).toHaveLength(2)
  })

  it('starts anew after its threads have ended', async () => {
    await stopFluxThreads()
    expect((await pointFluxes(emitters, points)).irradiance).toHaveLength(2)
  })
})
