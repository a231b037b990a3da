import { useEffect, useState, useSyncExternalStore } from 'react'
import { sameLayout } from '#app/domain/layout/merge.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { SaveStatus } from '#app/components/status.tsx'
import { startAutosave, type Autosave, type SaveState } from '#app/editor/autosave.ts'
import { clockOf } from '#app/editor/figures.ts'
import type { KeptLayout, Keeping } from '#app/editor/keeping.ts'

interface AutosaveInput {
  readonly initial: KeptLayout
  /** The server's newest as far as the page has heard. */
  readonly newest: KeptLayout
  readonly layout: Layout
  readonly keeping: Keeping
  readonly readOnly: boolean
  /** The layout to go on with, from the device or from elsewhere. */
  readonly onTaken: (layout: Layout, said: string) => void
}

/** Keeps the layout saved while the page is open; edits kept on the device come back, changes elsewhere are taken in. */
export function useAutosave(input: AutosaveInput): { autosave: Autosave; state: SaveState } {
  const { initial, newest, layout, keeping, readOnly, onTaken } = input
  const [autosave] = useState(() => startAutosave(initial, keeping))
  const state = useSyncExternalStore(autosave.subscribe, autosave.state, autosave.state)

  useEffect(() => {
    if (readOnly) return
    let open = true
    void keeping.findOnDevice().then((copy) => {
      if (!open || !copy) return
      if (sameLayout(copy.layout, initial.layout)) return keeping.keepOnDevice(null)
      onTaken(copy.layout, 'Changes kept on this device are back')
      autosave.resume(copy)
    })
    const again = () => autosave.retry()
    window.addEventListener('online', again)
    return () => {
      open = false
      window.removeEventListener('online', again)
      autosave.stop()
    }
    // Once for the variant that is open: a new variant is a new editor.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [autosave])

  useEffect(() => {
    if (!readOnly) autosave.changed(layout)
  }, [autosave, layout, readOnly])

  useEffect(() => {
    if (autosave.heardOf(newest)) onTaken(newest.layout, 'Changed elsewhere, taken in')
    // Only a new revision is news.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [autosave, newest.revision])

  return { autosave, state }
}

/** The save state as the page's status line says it. */
export function statusOf(state: SaveState, readOnly: boolean): SaveStatus {
  if (readOnly) return { kind: 'read-only', why: 'Read only' }
  switch (state.kind) {
    case 'saved':
      return state.at ? { kind: 'saved', at: clockOf(state.at) } : { kind: 'saved' }
    case 'offline':
      return { kind: 'offline', kept: state.changes }
    case 'refused':
      return { kind: 'not saved', reason: state.reason }
    case 'conflict':
      return { kind: 'conflict' }
    default:
      return { kind: state.kind }
  }
}
