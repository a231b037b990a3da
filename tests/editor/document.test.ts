import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { openDocument, type DocumentKeeping, type KeepAnswer, type Kept } from '#app/editor/document.ts'

type Body = { readonly seats: number }

/** A server with one document, the PUT rule and answers that can be made to go missing. */
function kept(start: Body) {
  let current: Kept<Body> = { revision: 1, body: start }
  const answers = new Map<string, KeepAnswer<Body>>()
  const device: (Kept<Body> | null)[] = []
  let away = 0
  let swallow = 0
  let number = 0
  const sent: string[] = []
  const keeping: DocumentKeeping<Body> = {
    newSaveId: () => `save-${++number}`,
    keepOnDevice: (copy) => void device.push(copy),
    save: async (body, revision, id) => {
      sent.push(id)
      await Promise.resolve()
      if (away > 0) return (away--, { kind: 'unreachable' })
      const known = answers.get(id)
      if (known) return known
      if (revision !== current.revision) return { kind: 'conflict', current }
      current = { revision: revision + 1, body }
      const answer: KeepAnswer<Body> = { kind: 'saved', revision: current.revision }
      answers.set(id, answer)
      if (swallow > 0) return (swallow--, { kind: 'unreachable' })
      return answer
    },
  }
  return {
    keeping,
    sent,
    device,
    current: () => current,
    goAway: (times: number) => (away = times),
    swallowAnswer: () => (swallow = 1),
    elsewhere: (body: Body) => (current = { revision: current.revision + 1, body }),
  }
}

beforeEach(() => void vi.useFakeTimers())
afterEach(() => void vi.useRealTimers())

const open = (server: ReturnType<typeof kept>, device: Kept<Body> | null = null) => {
  const document = openDocument(server.current(), server.keeping, { rest: 600, again: 4000 })
  if (device) document.resume(device)
  return document
}

describe('an open document', () => {
  it('saves by itself once the hand rests, several changes in one save', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    document.change(() => ({ seats: 2 }))
    document.change(({ seats }) => ({ seats: seats + 1 }))
    expect(document.state().status.kind).toBe('unsaved')
    await vi.advanceTimersByTimeAsync(700)
    expect(server.current()).toEqual({ revision: 2, body: { seats: 3 } })
    expect(server.sent).toHaveLength(1)
    expect(document.state().status.kind).toBe('saved')
    expect(server.device.at(-1)).toBeNull()
  })

  it('undoes and redoes, and saves what stands then', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    document.change(() => ({ seats: 2 }))
    await vi.advanceTimersByTimeAsync(700)
    document.undo()
    await vi.advanceTimersByTimeAsync(700)
    expect(server.current()).toEqual({ revision: 3, body: { seats: 1 } })
    document.redo()
    await vi.advanceTimersByTimeAsync(700)
    expect(server.current().body).toEqual({ seats: 2 })
  })

  it('keeps changes on the device while nobody answers and sends the same save again', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    server.goAway(2)
    document.change(() => ({ seats: 2 }))
    await vi.advanceTimersByTimeAsync(700)
    expect(document.state().status).toEqual({ kind: 'offline', kept: 1 })
    expect(server.device.at(-1)).toEqual({ revision: 1, body: { seats: 2 } })
    await vi.advanceTimersByTimeAsync(9000)
    expect(new Set(server.sent).size).toBe(1)
    expect(server.current()).toEqual({ revision: 2, body: { seats: 2 } })
    expect(document.state().status.kind).toBe('saved')
  })

  it('does not save twice when only the answer was lost', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    server.swallowAnswer()
    document.change(() => ({ seats: 2 }))
    await vi.advanceTimersByTimeAsync(6000)
    expect(server.current().revision).toBe(2)
    expect(document.state().status.kind).toBe('saved')
  })

  it('shows both copies when somebody else saved, and loses neither until one is chosen', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    server.elsewhere({ seats: 7 })
    document.change(() => ({ seats: 2 }))
    await vi.advanceTimersByTimeAsync(700)
    expect(document.state()).toMatchObject({
      status: { kind: 'conflict' },
      theirs: { body: { seats: 7 } },
      base: { seats: 1 },
    })
    expect(document.state().history.present).toEqual({ seats: 2 })
    document.change(() => ({ seats: 3 }))
    await vi.advanceTimersByTimeAsync(9000)
    expect(server.current().body).toEqual({ seats: 7 })
    document.settle({ seats: 3 })
    await vi.advanceTimersByTimeAsync(700)
    expect(server.current()).toEqual({ revision: 3, body: { seats: 3 } })
    expect(document.state().theirs).toBeNull()
  })

  it('takes theirs without a save', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    server.elsewhere({ seats: 7 })
    document.change(() => ({ seats: 2 }))
    await vi.advanceTimersByTimeAsync(700)
    const { theirs } = document.state()
    if (theirs) document.settle(theirs.body)
    await vi.advanceTimersByTimeAsync(5000)
    expect(server.current().revision).toBe(2)
    expect(document.state()).toMatchObject({ status: { kind: 'saved' }, history: { present: { seats: 7 } } })
  })

  it('goes on with what the device kept, or asks when the server moved on', async () => {
    const server = kept({ seats: 1 })
    const same = open(server, { revision: 1, body: { seats: 5 } })
    expect(same.state().history.present).toEqual({ seats: 5 })
    await vi.advanceTimersByTimeAsync(700)
    expect(server.current().body).toEqual({ seats: 5 })
    const older = open(server, { revision: 1, body: { seats: 9 } })
    expect(older.state()).toMatchObject({ status: { kind: 'conflict' }, theirs: { revision: 2 } })
  })
})
