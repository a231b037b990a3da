import type { ReactNode } from 'react'
import { Button } from '#app/components/button.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'

interface FieldsFrameProps {
  readonly title: string
  /** What it is besides its fields, in one line. */
  readonly note?: ReactNode
  readonly onRemove?: (() => void) | undefined
  readonly children: ReactNode
}

/** The fields of the chosen thing under its name, with the way to take it off the site. */
export function FieldsFrame({ title, note, onRemove, children }: FieldsFrameProps) {
  const { readOnly } = useSiteEditing()
  return (
    <section aria-labelledby="chosen-title" className="border-b border-rule pb-4">
      <header className="mb-2 flex min-h-8 items-center justify-between gap-3">
        <h2 id="chosen-title" className="text-sm font-strong first-letter:uppercase">
          {title}
        </h2>
        {!readOnly && onRemove && (
          <Button kind="danger" size="small" icon="remove" onClick={onRemove}>
            Remove
          </Button>
        )}
      </header>
      {note && <p className="mb-2 text-xs text-ink-2">{note}</p>}
      {children}
    </section>
  )
}

/** Fields side by side, two on a phone and up to four. */
export function FieldGrid({ children }: { children: ReactNode }) {
  return (
    <div className="grid grid-cols-2 items-start gap-x-3 gap-y-2.5 tablet:grid-cols-4 wide:grid-cols-3">{children}</div>
  )
}
