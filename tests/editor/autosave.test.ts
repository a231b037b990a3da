import { beforeEach, describe, expect, it, vi } from 'vitest'
import { moveHeaters } from '#app/domain/layout/edits.ts'
import { sameLayout } from '#app/domain/layout/merge.ts'
import { startAutosave } from '#app/editor/autosave.ts'
import { keepingServer } from '#tests/support/keeping-server.ts'
import { heaterAt, layoutOf } from '#tests/support/layouts.ts'

const first = layoutOf(heaterAt('H1', 1, 1))
const moved = (dx: number) => moveHeaters(first, ['H1'], dx, 0)

beforeEach(() => {
  vi.useFakeTimers()
  return () => vi.useRealTimers()
})
const delays = { rest: 500, again: 4000 }

describe('autosave', () => {
  it('saves once after rest, however many changes', async () => {
    const remote = keepingServer({ body: first, revision: 7 })
    const autosave = startAutosave({ body: first, revision: 7 }, remote.keeping, sameLayout, delays)
    for (let i = 1; i <= 20; i += 1) {
      autosave.changed(moved(i / 100))
      await vi.advanceTimersByTimeAsync(100)
    }
    expect(autosave.state().kind).toBe('unsaved')
    await vi.advanceTimersByTimeAsync(600)
    expect(remote.requests).toHaveLength(1)
    expect(remote.kept()).toEqual({ body: moved(0.2), revision: 8 })
    expect(autosave.state().kind).toBe('saved')
    expect(remote.device()).toBeNull()
  })

  it('keeps edits on the device without a connection, and sends them when it is back', async () => {
    const remote = keepingServer({ body: first, revision: 7 })
    const autosave = startAutosave({ body: first, revision: 7 }, remote.keeping, sameLayout, delays)
    remote.pull('out')
    autosave.changed(moved(0.1))
    await vi.advanceTimersByTimeAsync(600)
    autosave.changed(moved(0.2))
    autosave.changed(moved(0.3))
    expect(autosave.state()).toEqual({ kind: 'offline', changes: 3 })
    expect(remote.device()).toMatchObject({ body: moved(0.3), base: { revision: 7 } })
    remote.pull('in')
    await vi.advanceTimersByTimeAsync(4100)
    expect(remote.kept().body).toEqual(moved(0.3))
    expect(autosave.state().kind).toBe('saved')
  })

  it('has one effect when only the answer was lost', async () => {
    const remote = keepingServer({ body: first, revision: 7 })
    const autosave = startAutosave({ body: first, revision: 7 }, remote.keeping, sameLayout, delays)
    remote.pull('answers lost')
    autosave.changed(moved(0.1))
    await vi.advanceTimersByTimeAsync(600)
    expect(autosave.state().kind).toBe('offline')
    autosave.changed(moved(0.2))
    remote.pull('in')
    autosave.retry()
    await vi.advanceTimersByTimeAsync(5000)
    expect(remote.kept()).toEqual({ body: moved(0.2), revision: 9 })
    expect(new Set(remote.requests.map((request) => request.saveId)).size).toBe(2)
    expect(autosave.state().kind).toBe('saved')
  })

  it('shows a conflict with both layouts, saves nothing over it, and goes on from what was chosen', async () => {
    const remote = keepingServer({ body: first, revision: 7 })
    const autosave = startAutosave({ body: first, revision: 7 }, remote.keeping, sameLayout, delays)
    remote.elsewhere(moved(5))
    autosave.changed(moved(0.1))
    await vi.advanceTimersByTimeAsync(600)
    expect(autosave.state()).toMatchObject({
      kind: 'conflict',
      conflict: { base: first, mine: moved(0.1), theirs: { body: moved(5), revision: 8 }, by: 'Ann Other' },
    })
    autosave.changed(moved(0.2))
    await vi.advanceTimersByTimeAsync(10_000)
    expect(remote.requests).toHaveLength(1)
    expect(remote.device()?.body).toEqual(moved(0.2))
    autosave.settle(moved(0.2))
    await vi.advanceTimersByTimeAsync(10)
    expect(remote.kept()).toEqual({ body: moved(0.2), revision: 9 })
  })

  it('takes in what changed elsewhere only while nothing here waits', async () => {
    const remote = keepingServer({ body: first, revision: 7 })
    const autosave = startAutosave({ body: first, revision: 7 }, remote.keeping, sameLayout, delays)
    expect(autosave.heardOf({ body: moved(2), revision: 8 })).toBe(true)
    autosave.changed(moved(0.1))
    expect(autosave.heardOf({ body: moved(3), revision: 9 })).toBe(false)
  })

  it('goes on after a reload with what the device kept, from the revision it was made from', async () => {
    const remote = keepingServer({ body: first, revision: 7 })
    const before = startAutosave({ body: first, revision: 7 }, remote.keeping, sameLayout, delays)
    remote.pull('out')
    before.changed(moved(0.1))
    await vi.advanceTimersByTimeAsync(600)
    before.stop()
    const copy = remote.device()
    if (!copy) throw new Error('nothing kept')
    remote.pull('in')
    remote.elsewhere(moved(5))
    const after = startAutosave({ body: moved(5), revision: 8 }, remote.keeping, sameLayout, delays)
    after.resume(copy)
    await vi.advanceTimersByTimeAsync(10)
    expect(after.state()).toMatchObject({ kind: 'conflict', conflict: { mine: moved(0.1), base: first } })
    expect(remote.kept().body).toEqual(moved(5))
  })

  it('is at rest when the other copy says the same', async () => {
    const remote = keepingServer({ body: first, revision: 7 })
    const autosave = startAutosave({ body: first, revision: 7 }, remote.keeping, sameLayout, delays)
    remote.elsewhere(moved(0.1))
    autosave.changed(moved(0.1))
    await vi.advanceTimersByTimeAsync(600)
    expect(autosave.state().kind).toBe('saved')
    expect(autosave.revision()).toBe(8)
  })

  it('sends what waits when the page is left', async () => {
    const remote = keepingServer({ body: first, revision: 7 })
    const autosave = startAutosave({ body: first, revision: 7 }, remote.keeping, sameLayout, delays)
    autosave.changed(moved(0.1))
    autosave.stop()
    await vi.advanceTimersByTimeAsync(10)
    expect(remote.kept().body).toEqual(moved(0.1))
  })

  it('tells a refusal and tries again with the next change', async () => {
    const remote = keepingServer({ body: first, revision: 7 })
    const save = vi
      .spyOn(remote.keeping, 'save')
      .mockResolvedValueOnce({ kind: 'refused', reason: 'Too many heaters.' })
    const autosave = startAutosave({ body: first, revision: 7 }, remote.keeping, sameLayout, delays)
    autosave.changed(moved(0.1))
    await vi.advanceTimersByTimeAsync(600)
    expect(autosave.state()).toEqual({ kind: 'refused', reason: 'Too many heaters.' })
    autosave.changed(moved(0.2))
    await vi.advanceTimersByTimeAsync(600)
    expect(autosave.state().kind).toBe('saved')
    expect(save).toHaveBeenCalledTimes(2)
  })
})
