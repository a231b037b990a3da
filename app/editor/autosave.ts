import { sameLayout } from '#app/domain/layout/merge.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { DeviceCopy, KeptLayout, Keeping, SaveRequest } from '#app/editor/keeping.ts'

/** A save that met another one: both layouts, and what they were made from. */
export interface SaveConflict {
  readonly base: Layout
  readonly mine: Layout
  readonly theirs: KeptLayout
  readonly by: string | null
  readonly at: string | null
}

/** Where the work stands. */
export type SaveState =
  /** `at`: when the server last acknowledged; null before the first time. */
  | { readonly kind: 'saved'; readonly at: Date | null }
  | { readonly kind: 'unsaved' | 'saving' }
  | { readonly kind: 'offline'; readonly changes: number }
  | { readonly kind: 'refused'; readonly reason: string }
  | { readonly kind: 'conflict'; readonly conflict: SaveConflict }

/** Saves by itself; hears of every step. */
export interface Autosave {
  /** The layout is now this one. */
  changed: (layout: Layout) => void
  /** Goes on with edits that the device kept over a reload. */
  resume: (copy: DeviceCopy) => void
  /** Sends now what waits: the connection is back, or the person asks. */
  retry: () => void
  /** Ends a conflict: goes on from the server's revision with this layout. */
  settle: (layout: Layout) => void
  /** The server's layout changed elsewhere; true when it was taken in because nothing here waits. */
  heardOf: (current: KeptLayout) => boolean
  state: () => SaveState
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
 * Keeps a layout saved: one save in flight; changes meanwhile wait for its answer. A save without an answer is sent
 * again with its id before anything newer, so that its effect is known and happens once. Every edit not acknowledged
 * is kept on the device.
 */
export function startAutosave(
  initial: KeptLayout,
  keeping: Keeping,
  delays: AutosaveDelays = { rest: 500, again: 4000 },
): Autosave {
  let base = initial
  let present = initial.layout
  let changes = 0
  let open: SaveRequest | null = null
  let sending = false
  let stopped = false
  let timer: ReturnType<typeof setTimeout> | undefined
  let state: SaveState = { kind: 'saved', at: null }
  const listeners = new Set<() => void>()

  const become = (next: SaveState) => {
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
    open ??= sameLayout(present, base.layout)
      ? null
      : { saveId: keeping.newSaveId(), layout: present, revision: base.revision }
    if (!open) return rest()
    const request = open
    sending = true
    if (state.kind !== 'offline') become({ kind: 'saving' })
    const answer = await keeping.save(request)
    sending = false
    switch (answer.kind) {
      case 'saved':
        open = null
        base = { layout: request.layout, revision: answer.revision }
        return sameLayout(present, base.layout) ? rest() : void send()
      case 'conflict':
        open = null
        if (sameLayout(present, answer.current.layout)) {
          base = answer.current
          return rest()
        }
        return become({
          kind: 'conflict',
          conflict: { base: base.layout, mine: present, theirs: answer.current, by: answer.by, at: answer.at },
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
    changed(layout) {
      stopped = false
      if (layout === present) return
      present = layout
      changes += 1
      keeping.keepOnDevice({ base, layout, changes })
      if (state.kind === 'conflict') return become({ kind: 'conflict', conflict: { ...state.conflict, mine: layout } })
      if (state.kind === 'offline') return become({ kind: 'offline', changes })
      if (!sending) become({ kind: 'unsaved' })
      later(delays.rest)
    },
    resume(copy) {
      stopped = false
      base = copy.base
      present = copy.layout
      changes = copy.changes
      become({ kind: 'unsaved' })
      void send()
    },
    retry: () => void send(),
    settle(layout) {
      if (state.kind !== 'conflict') return
      base = state.conflict.theirs
      present = layout
      become({ kind: 'unsaved' })
      keeping.keepOnDevice({ base, layout, changes })
      void send()
    },
    heardOf(current) {
      if (current.revision <= base.revision || sending || open || !sameLayout(present, base.layout)) return false
      base = current
      present = current.layout
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
