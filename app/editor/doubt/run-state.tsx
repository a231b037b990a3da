import { Button } from '#app/components/button.tsx'
import type { Run } from '#app/editor/doubt/use-doubt.ts'

interface RunStateProps {
  readonly run: Run<unknown>
  readonly what: string
  readonly onStop: () => void
  readonly onRetry: () => void
}

/** How far a computation is, with the way to stop it or to begin again; nothing once it is ready. */
export function RunState({ run: { state, progress }, what, onStop, onRetry }: RunStateProps) {
  const share = progress && progress.total > 0 ? Math.round((100 * progress.done) / progress.total) : 0
  if (state === 'ready') return <p role="status" className="sr-only">{`${what}: ready`}</p>
  if (state === 'working')
    return (
      <div className="flex items-center gap-3 py-2 print:hidden">
        <span className="text-ink-2">{what}</span>
        <span
          role="progressbar"
          aria-label={what}
          aria-valuemin={0}
          aria-valuemax={100}
          aria-valuenow={share}
          className="h-1.5 min-w-16 flex-1 rounded-full bg-paper-sunk"
        >
          <svg width="100%" height="6" className="block" aria-hidden="true">
            <rect width={`${share}%`} height="6" rx="3" fill="var(--color-ink)" />
          </svg>
        </span>
        {progress && (
          <span className="text-xs whitespace-nowrap text-ink-2">{`${progress.done} of ${progress.total}`}</span>
        )}
        <Button size="small" onClick={onStop}>
          Stop
        </Button>
      </div>
    )
  return (
    <p role="status" className="flex flex-wrap items-center gap-3 py-2 text-ink-2 print:hidden">
      {state === 'stopped' ? `${what}: stopped.` : `${what}: this browser could not work it out.`}
      <Button size="small" onClick={onRetry}>
        Begin again
      </Button>
    </p>
  )
}
