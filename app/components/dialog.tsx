import { useEffect, useId, useRef, type ReactNode } from 'react'

interface DialogProps {
  open: boolean
  onClose: () => void
  title: string
  children: ReactNode
  /** Buttons, the primary last. */
  actions: ReactNode
}

/** A question that must be answered first: the browser's own modal dialog, Escape closes it. */
export function Dialog({ open, onClose, title, children, actions }: DialogProps) {
  const ref = useRef<HTMLDialogElement>(null)
  const titleId = useId()
  useEffect(() => {
    const dialog = ref.current
    if (!dialog) return
    if (open && !dialog.open) dialog.showModal()
    if (!open && dialog.open) dialog.close()
  }, [open])
  return (
    <dialog
      ref={ref}
      aria-labelledby={titleId}
      onClose={onClose}
      onCancel={onClose}
      className="m-auto w-[min(32rem,calc(100vw-2rem))] rounded-md bg-paper-raised p-0 text-ink shadow-dialog backdrop:bg-dusk-ground/45"
    >
      {open && (
        <div className="px-5 pt-4.5 pb-4">
          <h2 id={titleId} className="mb-1.5 text-base font-strong">
            {title}
          </h2>
          <div className="text-ink-2">{children}</div>
          <div className="mt-4 flex flex-wrap justify-end gap-2">{actions}</div>
        </div>
      )}
    </dialog>
  )
}
