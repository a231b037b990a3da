import { useId, useRef, type KeyboardEvent, type ReactNode } from 'react'
import { NavLink } from 'react-router'

interface NavTab {
  to: string
  label: ReactNode
  /** Only this very address counts as here. */
  end?: boolean
  /** Where this tab is shown as here although the address says something else. */
  here?: boolean
}

const tabClass = (here: boolean) =>
  `relative flex flex-none items-center gap-1.5 px-3 whitespace-nowrap transition-colors duration-120 hover:text-ink ${
    here ? 'text-ink after:absolute after:inset-x-2.5 after:bottom-0 after:h-0.5 after:bg-ember' : 'text-ink-2'
  }`

/** Pages beside each other, as links with the ember line under the one that is open. */
export function TabNav({ label, tabs, children }: { label: string; tabs: readonly NavTab[]; children?: ReactNode }) {
  return (
    <nav aria-label={label} className="flex h-full items-stretch gap-0.5 print:hidden">
      {tabs.map((tab) => (
        <NavLink
          key={tab.to}
          to={tab.to}
          end={tab.end ?? false}
          prefetch="intent"
          aria-current={tab.here ? 'page' : undefined}
          className={({ isActive }) => tabClass(tab.here ?? isActive)}
        >
          {tab.label}
        </NavLink>
      ))}
      {children}
    </nav>
  )
}

interface TabsProps<T extends string> {
  label: string
  tabs: readonly { value: T; label: ReactNode; panel: ReactNode }[]
  value: T
  onChange: (value: T) => void
}

/** Panels that share one place; arrows move between their tabs. */
export function Tabs<T extends string>({ label, tabs, value, onChange }: TabsProps<T>) {
  const id = useId()
  const list = useRef<HTMLDivElement>(null)
  const move = (event: KeyboardEvent) => {
    const step = event.key === 'ArrowRight' ? 1 : event.key === 'ArrowLeft' ? -1 : 0
    if (step === 0) return
    event.preventDefault()
    const at = tabs.findIndex((tab) => tab.value === value)
    const next = tabs[(at + step + tabs.length) % tabs.length]
    if (!next) return
    onChange(next.value)
    list.current?.querySelector<HTMLElement>(`[data-tab="${next.value}"]`)?.focus()
  }
  const open = tabs.find((tab) => tab.value === value)
  return (
    <div>
      <div
        ref={list}
        role="tablist"
        aria-label={label}
        onKeyDown={move}
        className="flex h-10 items-stretch overflow-x-auto border-b border-rule pointer-coarse:h-12"
      >
        {tabs.map((tab) => (
          <button
            key={tab.value}
            type="button"
            role="tab"
            data-tab={tab.value}
            id={`${id}-${tab.value}`}
            aria-selected={tab.value === value}
            aria-controls={`${id}-panel`}
            tabIndex={tab.value === value ? 0 : -1}
            onClick={() => onChange(tab.value)}
            className={tabClass(tab.value === value)}
          >
            {tab.label}
          </button>
        ))}
      </div>
      <div role="tabpanel" id={`${id}-panel`} aria-labelledby={`${id}-${value}`}>
        {open?.panel}
      </div>
    </div>
  )
}
