import { createContext, useCallback, useContext, useEffect, useState, type ReactNode } from 'react'

/** A line that says what was done, with the way back. */
export interface Toast {
  text: string
  action?: { label: string; run: () => void }
}

const ToastContext = createContext<(toast: Toast) => void>(() => undefined)

/** Shows a toast; the newest replaces the one before. */
export const useToast = () => useContext(ToastContext)

const secondsShown = 8

/** Holds the one toast of the page, announced politely. It stays while it has focus or the pointer. */
export function ToastProvider({ children }: { children: ReactNode }) {
  const [toast, setToast] = useState<Toast | null>(null)
  const [held, setHeld] = useState(false)
  const show = useCallback((next: Toast) => setToast(next), [])
  useEffect(() => {
    if (!toast || held) return
    const timer = setTimeout(() => setToast(null), secondsShown * 1000)
    return () => clearTimeout(timer)
  }, [toast, held])
  return (
    <ToastContext value={show}>
      {children}
      <div
        role="status"
        className="pointer-events-none fixed inset-x-0 bottom-4 z-50 flex justify-center px-4 print:hidden"
        onPointerEnter={() => setHeld(true)}
        onPointerLeave={() => setHeld(false)}
        onFocus={() => setHeld(true)}
        onBlur={() => setHeld(false)}
      >
        {toast && (
          <div className="pointer-events-auto flex min-w-72 items-center justify-between gap-6 rounded-md bg-ink px-3.5 py-2.5 text-paper-raised shadow-lift">
            <span>{toast.text}</span>
            {toast.action && (
              <button
                type="button"
                className="min-h-6 font-medium underline"
                onClick={() => {
                  toast.action?.run()
                  setToast(null)
                }}
              >
                {toast.action.label}
              </button>
            )}
          </div>
        )}
      </div>
    </ToastContext>
  )
}
