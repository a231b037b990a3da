import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { sameData } from '#app/domain/same-data.ts'
import { openDocument } from '#app/editor/document.ts'
import { keepingServer } from '#tests/support/keeping-server.ts'

type Body = { readonly seats: number }

beforeEach(() => void vi.useFakeTimers())
afterEach(() => void vi.useRealTimers())

const kept = (body: Body) => keepingServer({ revision: 1, body })
const open = (server: ReturnType<typeof kept>) =>
  openDocument(server.kept(), server.keeping, sameData, { rest: 600, again: 4000 })

describe('an open document', () => {
  it('saves by itself once the hand rests, several changes in one save', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    document.change(() => ({ seats: 2 }))
    document.change(({ seats }) => ({ seats: seats + 1 }))
    expect(document.state().save.kind).toBe('unsaved')
    await vi.advanceTimersByTimeAsync(700)
    expect(server.kept()).toEqual({ revision: 2, body: { seats: 3 } })
    expect(server.requests).toHaveLength(1)
    expect(document.state().save.kind).toBe('saved')
    expect(server.device()).toBeNull()
  })

  it('undoes and redoes, and saves what stands then', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    document.change(() => ({ seats: 2 }))
    await vi.advanceTimersByTimeAsync(700)
    document.undo()
    await vi.advanceTimersByTimeAsync(700)
    expect(server.kept()).toEqual({ revision: 3, body: { seats: 1 } })
    document.redo()
    await vi.advanceTimersByTimeAsync(700)
    expect(server.kept().body).toEqual({ seats: 2 })
  })

  it('keeps changes on the device while nobody answers and sends the same save again', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    server.pull('out')
    document.change(() => ({ seats: 2 }))
    await vi.advanceTimersByTimeAsync(700)
    expect(document.state().save).toEqual({ kind: 'offline', changes: 1 })
    expect(server.device()).toEqual({ base: { revision: 1, body: { seats: 1 } }, body: { seats: 2 }, changes: 1 })
    server.pull('in')
    await vi.advanceTimersByTimeAsync(9000)
    expect(new Set(server.requests.map(({ saveId }) => saveId)).size).toBe(1)
    expect(server.kept()).toEqual({ revision: 2, body: { seats: 2 } })
    expect(document.state().save.kind).toBe('saved')
  })

  it('does not save twice when only the answer was lost', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    server.pull('answers lost')
    document.change(() => ({ seats: 2 }))
    await vi.advanceTimersByTimeAsync(700)
    server.pull('in')
    await vi.advanceTimersByTimeAsync(6000)
    expect(server.kept().revision).toBe(2)
    expect(document.state().save.kind).toBe('saved')
  })

  it('shows both copies when somebody else saved, and loses neither until one is chosen', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    server.elsewhere({ seats: 7 })
    document.change(() => ({ seats: 2 }))
    await vi.advanceTimersByTimeAsync(700)
    expect(document.state()).toMatchObject({
      save: { kind: 'conflict', conflict: { theirs: { body: { seats: 7 } }, base: { seats: 1 }, by: 'Ann Other' } },
    })
    expect(document.state().history.present).toEqual({ seats: 2 })
    document.change(() => ({ seats: 3 }))
    await vi.advanceTimersByTimeAsync(9000)
    expect(server.kept().body).toEqual({ seats: 7 })
    document.settle({ seats: 3 })
    await vi.advanceTimersByTimeAsync(700)
    expect(server.kept()).toEqual({ revision: 3, body: { seats: 3 } })
    expect(document.state().save.kind).toBe('saved')
  })

  it('takes theirs without a save', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    server.elsewhere({ seats: 7 })
    document.change(() => ({ seats: 2 }))
    await vi.advanceTimersByTimeAsync(700)
    document.settle(server.kept().body)
    await vi.advanceTimersByTimeAsync(5000)
    expect(server.kept().revision).toBe(2)
    expect(document.state()).toMatchObject({ save: { kind: 'saved' }, history: { present: { seats: 7 } } })
  })

  it('goes on with what the device kept, or asks when the server moved on', async () => {
    const server = kept({ seats: 1 })
    const base = server.kept()
    const same = open(server)
    same.resume({ base, body: { seats: 5 }, changes: 1 })
    expect(same.state().history.present).toEqual({ seats: 5 })
    await vi.advanceTimersByTimeAsync(700)
    expect(server.kept().body).toEqual({ seats: 5 })
    const older = open(server)
    older.resume({ base, body: { seats: 9 }, changes: 1 })
    await vi.advanceTimersByTimeAsync(10)
    expect(older.state().save).toMatchObject({
      kind: 'conflict',
      conflict: { mine: { seats: 9 }, theirs: { revision: 2 }, base: { seats: 1 } },
    })
    expect(server.kept().body).toEqual({ seats: 5 })
  })

  it('lets what the device kept go when the server says the same, and what comes after a change', () => {
    const server = kept({ seats: 1 })
    server.keeping.keepOnDevice({ base: server.kept(), body: { seats: 1 }, changes: 2 })
    const document = open(server)
    document.resume({ base: server.kept(), body: { seats: 1 }, changes: 2 })
    expect(server.device()).toBeNull()
    document.change(() => ({ seats: 3 }))
    document.resume({ base: server.kept(), body: { seats: 8 }, changes: 1 })
    expect(document.state().history.present).toEqual({ seats: 3 })
  })

  it('sends what waits when the page is left', async () => {
    const server = kept({ seats: 1 })
    const document = open(server)
    document.change(() => ({ seats: 2 }))
    document.stop()
    await vi.advanceTimersByTimeAsync(10)
    expect(server.kept().body).toEqual({ seats: 2 })
  })
})
