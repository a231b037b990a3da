import { useEffect, useState, useSyncExternalStore } from 'react'
import { sameLayout } from '#app/domain/layout/merge.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { startAutosave, type Autosave, type SaveState } from '#app/editor/autosave.ts'
import type { Kept, Keeping } from '#app/editor/keeping.ts'

interface AutosaveInput {
  readonly initial: Kept<Layout>
  /** The server's newest as far as the page has heard. */
  readonly newest: Kept<Layout>
  readonly layout: Layout
  readonly keeping: Keeping<Layout>
  readonly readOnly: boolean
  /** The layout to go on with, from the device or from elsewhere. */
  readonly onTaken: (layout: Layout, said: string) => void
}

/** Keeps the layout saved while the page is open; edits kept on the device come back, changes elsewhere are taken in. */
export function useAutosave(input: AutosaveInput): { autosave: Autosave<Layout>; state: SaveState<Layout> } {
  const { initial, newest, layout, keeping, readOnly, onTaken } = input
  const [autosave] = useState(() => startAutosave(initial, keeping, sameLayout))
  const state = useSyncExternalStore(autosave.subscribe, autosave.state, autosave.state)

  useEffect(() => {
    if (readOnly) return
    let open = true
    void keeping.findOnDevice().then((copy) => {
      if (!open || !copy) return
      if (sameLayout(copy.body, initial.body)) return keeping.keepOnDevice(null)
      onTaken(copy.body, 'Changes kept on this device are back')
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
    if (autosave.heardOf(newest)) onTaken(newest.body, 'Changed elsewhere, taken in')
    // Only a new revision is news.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [autosave, newest.revision])

  return { autosave, state }
}
