import type { DeviceCopy, Kept, Keeping, SaveRequest } from '#app/editor/keeping.ts'

/** A save that met another one: both copies, what they were made from, and who saved the other when. */
export interface SaveConflict<T> {
  readonly base: T
  readonly mine: T
  readonly theirs: Kept<T>
  readonly by: string | null
  readonly at: Date | null
}

/** Where the work stands. */
export type SaveState<T> =
  /** `at`: when the server last acknowledged; null before the first time. */
  | { readonly kind: 'saved'; readonly at: Date | null }
  | { readonly kind: 'unsaved' | 'saving' }
  | { readonly kind: 'offline'; readonly changes: number }
  | { readonly kind: 'refused'; readonly reason: string }
  | { readonly kind: 'conflict'; readonly conflict: SaveConflict<T> }

/** Saves by itself; hears of every step. */
export interface Autosave<T> {
  /** It is now this. */
  changed: (body: T) => void
  /** Goes on with edits that the device kept over a reload. */
  resume: (copy: DeviceCopy<T>) => void
  /** Sends now what waits: the connection is back, or the person asks. */
  retry: () => void
  /** Ends a conflict: goes on from the server's revision with this. */
  settle: (body: T) => void
  /** The server's copy changed elsewhere; true when it was taken in because nothing here waits. */
  heardOf: (current: Kept<T>) => boolean
  state: () => SaveState<T>
  /** The newest revision that is known here. */
  revision: () => number
  subscribe: (listener: () => void) => () => void
  stop: () => void
}

/** Milliseconds from the last change to its save, and between tries without an answer. */
export interface AutosaveDelays {
  readonly rest: number
  readonly again: number
}

/**
 * Keeps something saved: one save in flight; changes meanwhile wait for its answer. A save without an answer is sent
 * again with its id before anything newer, so that its effect is known and happens once. Every edit not acknowledged
 * is kept on the device. `same`: whether two bodies say the same.
 */
export function startAutosave<T>(
  initial: Kept<T>,
  keeping: Keeping<T>,
  same: (a: T, b: T) => boolean,
  delays: AutosaveDelays = { rest: 500, again: 4000 },
): Autosave<T> {
  let base = initial
  let present = initial.body
  let changes = 0
  let open: SaveRequest<T> | null = null
  let sending = false
  let stopped = false
  let timer: ReturnType<typeof setTimeout> | undefined
  let state: SaveState<T> = { kind: 'saved', at: null }
  const listeners = new Set<() => void>()

  const become = (next: SaveState<T>) => {
    state = next
    for (const listener of listeners) listener()
  }
  const later = (ms: number) => {
    clearTimeout(timer)
    timer = setTimeout(() => void send(), ms)
  }

  async function send(): Promise<void> {
    clearTimeout(timer)
    if (sending || state.kind === 'conflict') return
    open ??= same(present, base.body) ? null : { saveId: keeping.newSaveId(), body: present, revision: base.revision }
    if (!open) return rest()
    const request = open
    sending = true
    if (state.kind !== 'offline') become({ kind: 'saving' })
    const answer = await keeping.save(request)
    sending = false
    switch (answer.kind) {
      case 'saved':
        open = null
        base = { body: request.body, revision: answer.revision }
        return same(present, base.body) ? rest() : void send()
      case 'conflict':
        open = null
        if (same(present, answer.current.body)) {
          base = answer.current
          return rest()
        }
        return become({
          kind: 'conflict',
          conflict: { base: base.body, mine: present, theirs: answer.current, by: answer.by, at: answer.at },
        })
      case 'refused':
        open = null
        return become({ kind: 'refused', reason: answer.reason })
      case 'unreachable':
        become({ kind: 'offline', changes })
        return stopped ? undefined : later(delays.again)
    }
  }

  function rest() {
    changes = 0
    keeping.keepOnDevice(null)
    become({ kind: 'saved', at: new Date() })
  }

  return {
    changed(body) {
      stopped = false
      if (body === present) return
      present = body
      changes += 1
      keeping.keepOnDevice({ base, body, changes })
      if (state.kind === 'conflict') return become({ kind: 'conflict', conflict: { ...state.conflict, mine: body } })
      if (state.kind === 'offline') return become({ kind: 'offline', changes })
      if (!sending) become({ kind: 'unsaved' })
      later(delays.rest)
    },
    resume(copy) {
      stopped = false
      base = copy.base
      present = copy.body
      changes = copy.changes
      become({ kind: 'unsaved' })
      void send()
    },
    retry: () => void send(),
    settle(body) {
      if (state.kind !== 'conflict') return
      base = state.conflict.theirs
      present = body
      become({ kind: 'unsaved' })
      keeping.keepOnDevice({ base, body, changes })
      void send()
    },
    heardOf(current) {
      if (current.revision <= base.revision || sending || open || !same(present, base.body)) return false
      base = current
      present = current.body
      return true
    },
    state: () => state,
    revision: () => base.revision,
    subscribe(listener) {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
    stop() {
      stopped = true
      clearTimeout(timer)
      if (state.kind === 'unsaved') void send()
    },
  }
}
