import { MessageChannel } from 'node:worker_threads'
import { wrap, type Endpoint, type Remote } from 'comlink'
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest'
import { groupEmitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import type { MapQuestion } from '#app/domain/flux/map-question.ts'
import { contoursOf } from '#app/drawing/heat/contours.ts'
import type { FluxWorker } from '#workers/flux.worker.ts'

const emitter = groupEmitter({
  id: 'a',
  at: [2, 1.5, 2.4],
  turnDeg: 20,
  tiltDeg: 15,
  beam: { kind: 'cosine', across: 2.3, along: 1.6 },
  elements: [{ offset: 0, length: 0.6, radiantPower: 1500 }],
})
const question: MapQuestion = {
  emitters: [emitter],
  floor: [
    [0, 0],
    [4, 0],
    [4, 3],
    [0, 3],
  ],
  z: 0.6,
  cell: 0.1,
  quantity: { kind: 'flux' },
  levels: [50, 100],
}
const cells = 40 * 30

/** Where typed arrays lie in a message and how many bytes the sender still holds of each: none once it is handed over. */
function bytesHeld(value: unknown, path = ''): [string, number][] {
  if (ArrayBuffer.isView(value)) return [[path, value.buffer.byteLength]]
  if (value instanceof ArrayBuffer) return [[path, value.byteLength]]
  if (typeof value !== 'object' || value === null) return []
  return Object.entries(value).flatMap(([key, part]) => bytesHeld(part, path === '' ? key : `${path}.${key}`))
}

/** The worker as it stands, its `self` one end of a real channel that takes what is handed over. */
describe('what the flux worker hands over and what it copies', () => {
  const { port1, port2 } = new MessageChannel()
  const sent: unknown[] = []
  let flux: Remote<FluxWorker>
  beforeAll(async () => {
    vi.stubGlobal('self', {
      postMessage(message: unknown, { transfer }: { transfer: ArrayBuffer[] }) {
        port1.postMessage(message, transfer)
        sent.push((message as { value: unknown }).value)
      },
      addEventListener: port1.addEventListener.bind(port1),
      removeEventListener: port1.removeEventListener.bind(port1),
    })
    await import('#workers/flux.worker.ts')
    port1.start()
    flux = wrap<FluxWorker>(port2 as unknown as Endpoint)
  })
  beforeEach(() => {
    sent.length = 0
  })
  afterAll(() => {
    vi.unstubAllGlobals()
    port1.close()
  })

  const absorptance = [0.95]
  const guest = { airTemperature: 10, surroundingsTemperature: 10, wind: 1, clothing: 1.3, posture: 'seated' } as const
  it.each([
    { kind: 'flux' },
    { kind: 'share', emitterId: 'a' },
    { kind: 'overlap', threshold: 80 },
    { kind: 'feels-like', conditions: { ...guest, absorptance } },
  ] as MapQuestion['quantity'][])(
    'the values of a map of $kind are handed over; only which cells lie on the floor is copied, for the worker keeps it',
    async (quantity) => {
      const { values, grid } = await flux.answerMap({ ...question, quantity })
      expect(values).toHaveLength(cells)
      expect(grid.inside).toHaveLength(cells)
      expect(bytesHeld(sent[0])).toEqual([
        ['grid.inside', cells],
        ['values', 0],
      ])
    },
  )

  it('what it kept still answers rightly', async () => {
    await flux.answerMap(question)
    const { values } = await flux.answerMap(question)
    const exact = irradianceAt(emitter, [2.05, 1.55, 0.6], [0, 0, 1])
    expect(values[15 * 40 + 20]! / exact).toBeCloseTo(1, 3)
  })

  it('pictures hold no arrays that could be handed over', async () => {
    const { values, grid } = await flux.answerMap(question)
    const picture = await flux.answerPicture(values, grid, [50], [0, 25])
    expect(picture).toEqual(contoursOf(values, grid, [50], [0, 25]))
    expect(bytesHeld(sent[1])).toEqual([])
  })
})
