import { Icon } from '#app/components/icons.tsx'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'

/** Where the person's work is: kept by the server, on its way, on this device only, or in conflict. */
export type SaveStatus =
  | { kind: 'saved'; at?: string }
  | { kind: 'saving' }
  | { kind: 'unsaved' }
  | { kind: 'offline'; kept: number }
  | { kind: 'not saved'; reason?: string }
  | { kind: 'conflict' }
  | { kind: 'read-only'; why: string }

/** The save state in words, announced when it changes. */
export function SaveState({ status, onRetry }: { status: SaveStatus; onRetry?: () => void }) {
  return (
    <span role="status" className="inline-flex items-center gap-1.5 text-ink-2 print:hidden">
      <SaveWords status={status} />
      {status.kind === 'not saved' && onRetry && (
        <button type="button" className="min-h-6 text-clay underline" onClick={onRetry}>
          Try again
        </button>
      )}
    </span>
  )
}

function SaveWords({ status }: { status: SaveStatus }) {
  switch (status.kind) {
    case 'saved':
      return <>{status.at ? `Saved ${status.at}` : 'Saved'}</>
    case 'saving':
      return <>Saving</>
    case 'unsaved':
      return <>Not saved yet</>
    case 'read-only':
      return <>{status.why}</>
    case 'conflict':
      return (
        <span className="inline-flex items-center gap-1.5 text-amber">
          <OutcomeMark outcome="measure first" />
          Changed elsewhere
        </span>
      )
    case 'offline':
      return (
        <span className="inline-flex items-center gap-1.5 text-amber">
          <Icon name="offline" />
          No connection. {status.kept} {status.kept === 1 ? 'change' : 'changes'} kept on this device
        </span>
      )
    case 'not saved':
      return (
        <span className="inline-flex items-center gap-1.5 text-clay">
          <OutcomeMark outcome="fails" />
          Not saved. {status.reason ?? 'Your changes are kept on this device.'}
        </span>
      )
  }
}
