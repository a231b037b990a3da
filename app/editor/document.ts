import { historyOf, record, redo, undo, type History } from '#app/editor/history.ts'

/** A site or a brief as it is kept, with its revision. */
export interface Kept<T> {
  readonly revision: number
  readonly body: T
}

/** What became of a save. */
export type KeepAnswer<T> =
  | { readonly kind: 'saved'; readonly revision: number }
  | { readonly kind: 'conflict'; readonly current: Kept<T> }
  /** Understood and not taken; sending it again helps nothing. */
  | { readonly kind: 'refused'; readonly reason: string }
  | { readonly kind: 'unreachable' }

/** Where a document is kept; the page brings it. The same save id has one effect however often it is sent. */
export interface DocumentKeeping<T> {
  save: (body: T, revision: number, saveId: string) => Promise<KeepAnswer<T>>
  newSaveId: () => string
  keepOnDevice: (copy: Kept<T> | null) => void
}

/** How it stands with the work. */
type DocumentStatus =
  | { readonly kind: 'saved' | 'unsaved' | 'saving' | 'conflict' }
  | { readonly kind: 'offline'; readonly kept: number }
  | { readonly kind: 'not saved'; readonly reason: string }

/** What a page shows of an open document. */
export interface DocumentState<T> {
  readonly history: History<T>
  readonly status: DocumentStatus
  /** The server's copy that differs from the one the work stands on. */
  readonly theirs: Kept<T> | null
  /** What both copies were made from; null when it is not known any more. */
  readonly base: T | null
}

/** An open document: every change is a step that can be undone and is saved by itself. */
export interface OpenDocument<T> {
  state: () => DocumentState<T>
  subscribe: (listener: () => void) => () => void
  change: (edit: (body: T) => T) => void
  undo: () => void
  redo: () => void
  retry: () => void
  /** Takes up changes that this device kept from an earlier visit; they were made from their revision. */
  resume: (copy: Kept<T>) => void
  /** Ends a conflict: this body goes on from the server's revision. */
  settle: (body: T) => void
  stop: () => void
}

/** Milliseconds from the last change to its save, and between tries without an answer. */
interface Delays {
  readonly rest: number
  readonly again: number
}

/** Opens a document as the server keeps it. */
export function openDocument<T>(
  initial: Kept<T>,
  keeping: DocumentKeeping<T>,
  delays: Delays = { rest: 600, again: 4000 },
): OpenDocument<T> {
  let kept = initial
  let state: DocumentState<T> = {
    history: historyOf(initial.body),
    status: { kind: 'saved' },
    theirs: null,
    base: null,
  }
  let pending: { readonly id: string; readonly body: T; readonly revision: number } | null = null
  let sending = false
  let changes = 0
  let timer: ReturnType<typeof setTimeout> | undefined
  const listeners = new Set<() => void>()

  const become = (change: Partial<DocumentState<T>>) => {
    state = { ...state, ...change }
    for (const listener of listeners) listener()
  }
  const later = (ms: number) => {
    clearTimeout(timer)
    timer = setTimeout(() => void send(), ms)
  }
  const step = (history: History<T>) => {
    if (history === state.history) return
    changes += 1
    keeping.keepOnDevice({ revision: kept.revision, body: history.present })
    const calm = state.status.kind === 'saved' || state.status.kind === 'not saved'
    become({ history, ...(calm && { status: { kind: 'unsaved' as const } }) })
    if (state.theirs === null) later(delays.rest)
  }

  async function send(): Promise<void> {
    clearTimeout(timer)
    const body = state.history.present
    if (sending || state.theirs || (!pending && body === kept.body)) return
    pending ??= { id: keeping.newSaveId(), body, revision: kept.revision }
    const asked = pending
    sending = true
    if (state.status.kind !== 'offline') become({ status: { kind: 'saving' } })
    const answer = await keeping.save(asked.body, asked.revision, asked.id)
    sending = false
    if (answer.kind === 'unreachable') {
      become({ status: { kind: 'offline', kept: changes } })
      return later(delays.again)
    }
    pending = null
    if (answer.kind === 'conflict')
      return become({ status: { kind: 'conflict' }, theirs: answer.current, base: kept.body })
    if (answer.kind === 'refused') return become({ status: { kind: 'not saved', reason: answer.reason } })
    kept = { revision: answer.revision, body: asked.body }
    if (state.history.present !== kept.body) {
      keeping.keepOnDevice({ revision: kept.revision, body: state.history.present })
      return send()
    }
    changes = 0
    keeping.keepOnDevice(null)
    become({ status: { kind: 'saved' } })
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
    retry: () => void send(),
    resume(copy) {
      if (changes > 0 || state.status.kind !== 'saved') return
      if (copy.revision === kept.revision) return step(record(state.history, copy.body))
      become({ history: record(state.history, copy.body), status: { kind: 'conflict' }, theirs: kept })
    },
    settle(body) {
      if (!state.theirs) return
      kept = state.theirs
      state = { ...state, theirs: null, base: null, status: { kind: 'unsaved' } }
      step(record(record(state.history, kept.body), body))
      if (body === kept.body) {
        keeping.keepOnDevice(null)
        become({ status: { kind: 'saved' } })
      } else void send()
    },
    stop: () => clearTimeout(timer),
  }
}
