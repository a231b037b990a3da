import { IconButton } from '#app/components/button.tsx'
import { SaveState, type SaveStatus } from '#app/components/status.tsx'

interface SaveAndUndoProps {
  readonly status: SaveStatus
  readonly onRetry: () => void
  /** What can be taken back and done again; null for who changes nothing. */
  readonly history: { readonly past: readonly unknown[]; readonly future: readonly unknown[] } | null
  readonly onUndo: () => void
  readonly onRedo: () => void
}

/** Whether everything is saved, and the way back and forth. */
export function SaveAndUndo({ status, onRetry, history, onUndo, onRedo }: SaveAndUndoProps) {
  return (
    <>
      <SaveState status={status} onRetry={onRetry} />
      {history && (
        <span className="flex">
          <IconButton icon="undo" label="Undo" disabled={history.past.length === 0} onClick={onUndo} />
          <IconButton icon="redo" label="Redo" disabled={history.future.length === 0} onClick={onRedo} />
        </span>
      )}
    </>
  )
}
