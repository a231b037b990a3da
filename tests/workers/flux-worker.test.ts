import '@vitest/web-worker'
import { wrap, type Remote } from 'comlink'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { groupEmitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import type { MapQuestion } from '#app/domain/flux/map-question.ts'
import type { FluxWorker } from '#workers/flux.worker.ts'

const emitter = (id: string, x: number) =>
  groupEmitter({
    id,
    at: [x, 1.5, 2.4],
    turnDeg: 20,
    tiltDeg: 15,
    beam: { kind: 'cosine', across: 2.3, along: 1.6 },
    elements: [{ offset: 0, length: 0.6, radiantPower: 1500 }],
  })
const question: MapQuestion = {
  emitters: [emitter('a', 1), emitter('b', 3)],
  floor: [
    [0, 0],
    [4, 0],
    [4, 3],
    [2, 3],
    [2, 2],
    [0, 2],
  ],
  z: 0.6,
  cell: 0.1,
  quantity: { kind: 'flux' },
  levels: [50, 100],
}

describe('the flux worker, through comlink', () => {
  let worker: Worker
  let flux: Remote<FluxWorker>
  beforeAll(() => {
    worker = new Worker(new URL('../../workers/flux.worker.ts', import.meta.url), { type: 'module' })
    flux = wrap<FluxWorker>(worker)
  })
  afterAll(() => worker.terminate())

  it('answers the map of the closed form, not a number outside the floor', async () => {
    const { grid, values, peak, picture } = await flux.answerMap(question)
    const at = (x: number, y: number) => values[Math.floor(y / 0.1) * grid.columns + Math.floor(x / 0.1)]
    const exact = question.emitters.reduce((sum, e) => sum + irradianceAt(e, [2.55, 1.45, 0.6], [0, 0, 1]), 0)
    expect(at(2.55, 1.45)).toBeCloseTo(exact, 1)
    expect(at(0.55, 2.55)).toBeNaN()
    expect(peak).toBeGreaterThan(100)
    expect(picture.lines.map((line) => line.level)).toEqual([50, 100])
  })

  it('keeps answering after a question it refuses, and says why', async () => {
    await expect(flux.answerMap({ ...question, cell: 0 })).rejects.toThrow('positive cell size')
    const { values } = await flux.answerMap({ ...question, quantity: { kind: 'share', emitterId: 'b' } })
    expect(values.some((value) => value > 20)).toBe(true)
  })
})
