import { useId } from 'react'

interface ChoiceProps<T extends string> {
  label: string
  /** Show the label at the left; otherwise only readers hear it. */
  showLabel?: boolean
  options: readonly { value: T; label: string; disabled?: boolean }[]
  value: T
  onChange: (value: T) => void
}

/** One of two to five, all visible. A radio group: one Tab stop, arrows move. */
export function Choice<T extends string>({ label, showLabel = false, options, value, onChange }: ChoiceProps<T>) {
  const name = useId()
  return (
    <fieldset className="inline-flex min-w-0 items-center gap-2">
      <legend className={showLabel ? 'float-left pr-2 text-ink-2' : 'sr-only'}>{label}</legend>
      <span className="inline-flex h-7 flex-none overflow-hidden rounded-md border border-rule-strong has-[:focus-visible]:outline-2 has-[:focus-visible]:outline-offset-2 has-[:focus-visible]:outline-focus pointer-coarse:h-11">
        {options.map((option) => (
          <label
            key={option.value}
            className="relative flex cursor-pointer items-center border-l border-rule px-2.5 whitespace-nowrap text-ink-2 transition-colors duration-120 first:border-l-0 hover:not-has-checked:bg-paper-sunk has-checked:bg-ink has-checked:font-medium has-checked:text-paper-raised has-disabled:cursor-not-allowed has-disabled:text-ink-3"
          >
            <input
              type="radio"
              name={name}
              value={option.value}
              checked={option.value === value}
              disabled={option.disabled}
              onChange={() => onChange(option.value)}
              className="absolute inset-0 cursor-pointer opacity-0"
            />
            {option.label}
          </label>
        ))}
      </span>
    </fieldset>
  )
}
