import { startAutosave, type AutosaveDelays, type SaveState } from '#app/editor/autosave.ts'
import { historyOf, record, redo, undo, type History } from '#app/editor/history.ts'
import type { DeviceCopy, Kept, Keeping } from '#app/editor/keeping.ts'

/** What a page shows of an open document. */
export interface DocumentState<T> {
  readonly history: History<T>
  readonly save: SaveState<T>
}

/** An open document: every change is a step that can be undone and is saved by itself. */
export interface OpenDocument<T> {
  state: () => DocumentState<T>
  subscribe: (listener: () => void) => () => void
  change: (edit: (body: T) => T) => void
  undo: () => void
  redo: () => void
  retry: () => void
  /** Takes up changes that this device kept from an earlier visit; after a change of this visit they come too late. */
  resume: (copy: DeviceCopy<T>) => void
  /** Ends a conflict: this body goes on from the server's revision. */
  settle: (body: T) => void
  /** Sends what waits, then nothing more. */
  stop: () => void
}

/** Opens a document as the server keeps it. `same`: whether two bodies say the same. */
export function openDocument<T>(
  initial: Kept<T>,
  keeping: Keeping<T>,
  same: (a: T, b: T) => boolean,
  delays?: AutosaveDelays,
): OpenDocument<T> {
  const autosave = startAutosave(initial, keeping, same, delays)
  let state: DocumentState<T> = { history: historyOf(initial.body), save: autosave.state() }
  const listeners = new Set<() => void>()
  const become = (next: DocumentState<T>) => {
    state = next
    for (const listener of listeners) listener()
  }
  autosave.subscribe(() => become({ ...state, save: autosave.state() }))
  const step = (history: History<T>) => {
    if (history === state.history) return
    become({ ...state, history })
    autosave.changed(history.present)
  }
  return {
    state: () => state,
    subscribe(listener) {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
    change: (edit) => step(record(state.history, edit(state.history.present))),
    undo: () => step(undo(state.history)),
    redo: () => step(redo(state.history)),
    retry: () => autosave.retry(),
    resume(copy) {
      if (state.history.past.length > 0) return
      if (same(copy.body, initial.body)) return keeping.keepOnDevice(null)
      become({ ...state, history: record(state.history, copy.body) })
      autosave.resume(copy)
    },
    settle(body) {
      const { save } = state
      if (save.kind !== 'conflict') return
      const theirs = record(state.history, save.conflict.theirs.body)
      become({ ...state, history: record(theirs, body) })
      autosave.settle(body)
    },
    stop: () => autosave.stop(),
  }
}
