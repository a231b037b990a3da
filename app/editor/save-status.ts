import type { SaveStatus } from '#app/components/status.tsx'
import type { SaveConflict, SaveState } from '#app/editor/autosave.ts'
import { clockOf } from '#app/editor/figures.ts'

/** The save state as the page's status line says it. */
export function statusOf<T>(state: SaveState<T>, readOnly: boolean): SaveStatus {
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

/** Who saved the other copy of a conflict, and when: "by A. Name", " at 18:40". */
export function changedWords({ by, at }: Pick<SaveConflict<unknown>, 'by' | 'at'>): { who: string; when: string } {
  return { who: by ? `by ${by}` : 'elsewhere', when: at ? ` at ${clockOf(at)}` : '' }
}
