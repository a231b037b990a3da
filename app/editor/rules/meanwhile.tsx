import { useEffect, useRef, type ComponentProps } from 'react'
import { ConflictPanel } from '#app/components/conflict-panel.tsx'
import { changedWords } from '#app/editor/save-status.ts'

interface MeanwhileProps extends Pick<ComponentProps<typeof ConflictPanel>, 'rows' | 'onSettle'> {
  /** Who kept the other copy, and when, ISO 8601. */
  readonly changed: { readonly by: string | null; readonly at: string } | null
}

/** What somebody kept while a form was open, beside what was typed; it takes the focus, as the form may be long. */
export function Meanwhile({ changed, rows, onSettle }: MeanwhileProps) {
  const ref = useRef<HTMLDivElement>(null)
  useEffect(() => ref.current?.focus(), [])
  const { by = null, at } = changed ?? {}
  return (
    <div ref={ref} tabIndex={-1} role="alert" className="scroll-mt-4 outline-none">
      <ConflictPanel {...changedWords({ by, at: at === undefined ? null : new Date(at) })} {...{ rows, onSettle }} />
    </div>
  )
}
