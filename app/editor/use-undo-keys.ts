import { useEffect, type Dispatch } from 'react'
import type { EditorAction } from '#app/editor/editor-state.ts'

/** Ctrl or Cmd with Z and Y anywhere on the page that is not a field. */
export function useUndoKeys(dispatch: Dispatch<EditorAction>, readOnly: boolean) {
  useEffect(() => {
    if (readOnly) return
    const onKeyDown = (event: KeyboardEvent) => {
      if (!(event.ctrlKey || event.metaKey) || event.defaultPrevented) return
      if (event.target instanceof Element && event.target.closest('input, textarea, select, dialog')) return
      const key = event.key.toLowerCase()
      if (key !== 'z' && key !== 'y') return
      event.preventDefault()
      dispatch({ type: key === 'y' || event.shiftKey ? 'redo' : 'undo' })
    }
    window.addEventListener('keydown', onKeyDown)
    return () => window.removeEventListener('keydown', onKeyDown)
  }, [dispatch, readOnly])
}
