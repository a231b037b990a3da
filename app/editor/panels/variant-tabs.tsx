import { useEffect, useId, useRef, useState, type ReactNode } from 'react'
import { Button, IconButton } from '#app/components/button.tsx'
import { TextField } from '#app/components/field.tsx'
import { TabNav } from '#app/components/tabs.tsx'

/** A variant to switch to. */
export interface VariantTab {
  readonly id: string
  readonly number: number
  readonly title: string
  readonly href: string
}

interface VariantTabsProps {
  readonly variants: readonly VariantTab[]
  readonly currentId: string
  /** The title as it is being edited. */
  readonly title: string
  readonly readOnly: boolean
  readonly onCreate: () => void
  readonly onDuplicate: () => void
  readonly onRename: (title: string) => void
  readonly onDelete: () => void
  /** At the right end: save state, undo. */
  readonly children?: ReactNode
}

/** The variants of a job beside each other; the open one can be renamed, duplicated and deleted. */
export function VariantTabs(props: VariantTabsProps) {
  const { variants, currentId, title, readOnly, children } = props
  const [renaming, setRenaming] = useState(false)
  const list = useRef<HTMLDivElement>(null)
  useEffect(() => {
    list.current?.querySelector('[aria-current=page]')?.scrollIntoView({ block: 'nearest', inline: 'nearest' })
  }, [currentId])
  const tabs = variants.map((variant) => ({
    to: variant.href,
    label: (
      <>
        <b className="font-strong">{variant.number}</b>
        <span className="max-w-48 truncate">{variant.id === currentId ? title : variant.title}</span>
      </>
    ),
    here: variant.id === currentId,
  }))
  return (
    <div className="flex min-h-10 flex-wrap items-center gap-x-2 border-b border-rule bg-paper-raised px-2 wide-tablet:h-10 wide-tablet:flex-nowrap print:hidden pointer-coarse:wide-tablet:max-desk:h-12">
      <div ref={list} className="h-10 min-w-0 overflow-x-auto pointer-coarse:h-11">
        <TabNav label="Variants" tabs={tabs} />
      </div>
      {!readOnly && (
        <>
          <IconButton icon="plus" label="New variant" onClick={props.onCreate} />
          <VariantMenu {...props} onRenaming={() => setRenaming(true)} />
        </>
      )}
      <span className="flex-1" />
      {children}
      {renaming && (
        <Renaming
          title={title}
          onDone={(next) => {
            setRenaming(false)
            if (next !== null && next !== title) props.onRename(next)
          }}
        />
      )}
    </div>
  )
}

function VariantMenu({ onDuplicate, onDelete, onRenaming, variants }: VariantTabsProps & { onRenaming: () => void }) {
  const menu = useRef<HTMLDetailsElement>(null)
  const choose = (act: () => void) => () => {
    menu.current?.removeAttribute('open')
    act()
  }
  const item =
    'flex min-h-8 w-full items-center px-3 text-left hover:bg-paper-sunk disabled:text-ink-3 pointer-coarse:min-h-11'
  return (
    <details
      ref={menu}
      className="relative"
      onKeyDown={(event) => event.key === 'Escape' && menu.current?.removeAttribute('open')}
      onBlur={(event) => {
        if (!event.currentTarget.contains(event.relatedTarget)) menu.current?.removeAttribute('open')
      }}
    >
      <summary
        className="flex size-8 cursor-pointer list-none items-center justify-center rounded-md text-ink-2 hover:bg-paper-sunk pointer-coarse:size-11 [&::-webkit-details-marker]:hidden"
        aria-label="This variant"
        title="This variant"
      >
        <svg width="16" height="16" viewBox="0 0 16 16" fill="currentColor" aria-hidden="true">
          <circle cx="3.5" cy="8" r="1.3" />
          <circle cx="8" cy="8" r="1.3" />
          <circle cx="12.5" cy="8" r="1.3" />
        </svg>
      </summary>
      <div className="absolute left-0 z-40 mt-1 w-48 rounded-md border border-rule bg-paper-raised py-1 shadow-lift">
        <button type="button" className={item} onClick={choose(onRenaming)}>
          Rename
        </button>
        <button type="button" className={item} onClick={choose(onDuplicate)}>
          Duplicate
        </button>
        <button type="button" className={item} disabled={variants.length < 2} onClick={choose(onDelete)}>
          Delete
        </button>
      </div>
    </details>
  )
}

/** A small dialog with the title; the browser's own modal, Escape keeps the old one. */
function Renaming({ title, onDone }: { title: string; onDone: (title: string | null) => void }) {
  const dialog = useRef<HTMLDialogElement>(null)
  const titleId = useId()
  const [typed, setTyped] = useState(title)
  useEffect(() => dialog.current?.showModal(), [])
  const wrong = typed.trim() === '' ? 'A variant has a title.' : null
  return (
    <dialog
      ref={dialog}
      aria-labelledby={titleId}
      onClose={() => onDone(null)}
      className="m-auto w-[min(26rem,calc(100vw-2rem))] rounded-md bg-paper-raised p-5 text-ink shadow-dialog backdrop:bg-dusk-ground/45"
    >
      <form
        method="dialog"
        onSubmit={(event) => {
          event.preventDefault()
          if (!wrong) onDone(typed.trim())
        }}
      >
        <h2 id={titleId} className="mb-2 text-base font-strong">
          Rename the variant
        </h2>
        <TextField
          label="Title"
          value={typed}
          maxLength={120}
          error={wrong}
          hint="Customers choose by it."
          onChange={(event) => setTyped(event.target.value)}
        />
        <div className="mt-4 flex justify-end gap-2">
          <Button kind="text" onClick={() => onDone(null)}>
            Keep “{title.slice(0, 24)}”
          </Button>
          <Button kind="primary" type="submit">
            Rename
          </Button>
        </div>
      </form>
    </dialog>
  )
}
