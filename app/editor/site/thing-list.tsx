import { useState } from 'react'
import { Button } from '#app/components/button.tsx'

interface Row {
  readonly id: string
  readonly name: string
  readonly words: string
  /** Stays visible as assumed. */
  readonly assumed?: boolean
}

interface ThingListProps {
  readonly label: string
  readonly rows: readonly Row[]
  readonly chosen: readonly string[]
  readonly empty: string
  readonly onChoose: (id: string, shift: boolean) => void
}

/** Rows on one page of a list. */
const perPage = 40

/** Things of one kind, each a button with its facts; long lists by pages. Shift chooses several. */
export function ThingList({ label, rows, chosen, empty, onChoose }: ThingListProps) {
  const [asked, setPage] = useState(0)
  const pages = Math.max(1, Math.ceil(rows.length / perPage))
  const page = Math.min(asked, pages - 1)
  const shown = rows.slice(page * perPage, (page + 1) * perPage)
  const here = new Set(chosen)
  if (rows.length === 0) return <p className="py-2 text-ink-3">{empty}</p>
  return (
    <>
      <ul aria-label={label}>
        {shown.map(({ id, name, words, assumed }) => (
          <li key={id} className="border-t border-rule first:border-t-0">
            <button
              type="button"
              aria-pressed={here.has(id)}
              onClick={(event) => onChoose(id, event.shiftKey)}
              className="flex min-h-8 w-full flex-wrap items-baseline gap-x-2 px-1.5 py-1 text-left hover:bg-paper-sunk aria-pressed:bg-ember-wash pointer-coarse:min-h-12 pointer-coarse:items-center"
            >
              <span className="font-medium">{name}</span>
              <span className="text-xs text-ink-2">{words}</span>
              {assumed && <span className="text-xs font-medium text-amber">assumed</span>}
            </button>
          </li>
        ))}
      </ul>
      {pages > 1 && (
        <p className="flex items-center justify-between gap-2 border-t border-rule pt-2 text-xs text-ink-2">
          <Button size="small" icon="left" disabled={page === 0} onClick={() => setPage(page - 1)}>
            Before
          </Button>
          <span>
            {page * perPage + 1} to {Math.min(rows.length, (page + 1) * perPage)} of {rows.length.toLocaleString('en')}
          </span>
          <Button size="small" icon="right" disabled={page === pages - 1} onClick={() => setPage(page + 1)}>
            Next
          </Button>
        </p>
      )}
    </>
  )
}
