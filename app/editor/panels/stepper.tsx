import { useId } from 'react'

interface StepperProps {
  readonly label: string
  readonly aside?: string
  readonly shown: string
  readonly unit: string
  readonly onStep: (direction: 1 | -1) => void
  readonly disabled?: boolean
}

/** A value with a step down and a step up, 48 px high, for fingers. */
export function Stepper({ label, aside, shown, unit, onStep, disabled = false }: StepperProps) {
  const id = useId()
  const button =
    'w-12 flex-none cursor-pointer text-xl text-ink hover:bg-paper-sunk disabled:text-ink-3 focus-visible:outline-2 focus-visible:outline-focus'
  return (
    <div role="group" aria-labelledby={id} className="min-w-0">
      <p className="flex justify-between gap-2 text-xs text-ink-2">
        <span id={id}>{label}</span>
        <span className="text-ink-3">{aside}</span>
      </p>
      <div className="mt-1 flex h-12 items-stretch overflow-hidden rounded-md border border-rule-strong bg-paper-raised">
        <button
          type="button"
          disabled={disabled}
          aria-label={`${label} less`}
          onClick={() => onStep(-1)}
          className={button}
        >
          −
        </button>
        <output className="flex flex-1 items-center justify-center border-x border-rule text-lg font-medium whitespace-nowrap">
          {shown}
          <small className="ml-1 text-sm font-regular text-ink-2">{unit}</small>
        </output>
        <button
          type="button"
          disabled={disabled}
          aria-label={`${label} more`}
          onClick={() => onStep(1)}
          className={button}
        >
          +
        </button>
      </div>
    </div>
  )
}
