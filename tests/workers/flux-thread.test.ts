import { afterEach, expect, it, vi } from 'vitest'
import { groupEmitter } from '#app/domain/flux/emitter.ts'
import type { FluxOutcome, FluxTask } from '#app/drawing/heat/flux-task.ts'

const port = vi.hoisted(() => ({ heard: null as ((task: unknown) => void) | null, postMessage: vi.fn() }))
vi.mock('node:worker_threads', () => ({
  parentPort: {
    on: (_: 'message', listener: (task: unknown) => void) => (port.heard = listener),
    postMessage: port.postMessage,
  },
}))

const emitter = groupEmitter({
  id: 'a',
  at: [1, 1, 2.4],
  turnDeg: 0,
  tiltDeg: 0,
  beam: { kind: 'cosine', across: 2.3, along: 1.6 },
  elements: [{ offset: 0, length: 0.6, radiantPower: 1500 }],
})
const square = [[0, 0] as const, [2, 0] as const, [2, 2] as const, [0, 2] as const]

async function answerTo(task: FluxTask): Promise<{ outcome: FluxOutcome; transferred: unknown }> {
  await import('#workers/flux-thread.ts')
  port.heard?.(task)
  const [outcome, transferred] = port.postMessage.mock.calls[0] as [FluxOutcome, unknown]
  return { outcome, transferred }
}

afterEach(() => port.postMessage.mockClear())

it('a flux thread hands the values of a map over; which cells lie on the floor is copied, for it keeps that', async () => {
  const question = { emitters: [emitter], floor: square, z: 0.6, cell: 0.1, quantity: { kind: 'flux' }, levels: [] }
  const { outcome, transferred } = await answerTo({ kind: 'map', question } as FluxTask)
  if (outcome.kind !== 'map') throw new Error(`not a map but ${outcome.kind}`)
  expect(outcome.answer.values).toHaveLength(400)
  expect(transferred).toEqual([outcome.answer.values.buffer])
  expect((transferred as unknown[])[0]).toBe(outcome.answer.values.buffer)
})

it('a refusal holds nothing to hand over', async () => {
  const points = [{ at: [NaN, 0, 0], normal: [0, 0, 1] }] as const
  const { outcome, transferred } = await answerTo({ kind: 'points', emitters: [emitter], points })
  expect(outcome.kind).toBe('refused')
  expect(transferred).toEqual([])
})
