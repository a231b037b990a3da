import { useId, useState } from 'react'

/** How a typed figure was understood. */
export type CellReading = { readonly value: number } | { readonly error: string }

interface CellFieldProps {
  readonly label: string
  readonly shown: string
  readonly read: (text: string) => CellReading
  readonly onKeep: (value: number) => void
  readonly readOnly: boolean
}

/** A figure in a table that can be typed over; what is not understood stays, with the reason below it. */
export function CellField({ label, shown, read, onKeep, readOnly }: CellFieldProps) {
  const id = useId()
  const [typed, setTyped] = useState<string | null>(null)
  const reading = typed === null || typed === shown ? null : read(typed)
  const error = reading && 'error' in reading ? reading.error : null
  const keep = () => {
    if (reading && 'value' in reading) onKeep(reading.value)
    if (!error) setTyped(null)
  }
  return (
    <>
      <input
        aria-label={label}
        aria-invalid={error ? true : undefined}
        aria-describedby={error ? id : undefined}
        readOnly={readOnly}
        value={typed ?? shown}
        onChange={(event) => setTyped(event.target.value)}
        onBlur={keep}
        onKeyDown={(event) => {
          if (event.key === 'Enter') keep()
          if (event.key === 'Escape') setTyped(null)
        }}
        className="h-7 w-full min-w-12 rounded-sm border border-transparent bg-transparent px-1 text-ink hover:border-rule focus-visible:outline-2 focus-visible:outline-focus aria-invalid:border-clay pointer-coarse:h-11"
      />
      {error && (
        <p id={id} role="alert" className="text-2xs text-clay">
          {error}
        </p>
      )}
    </>
  )
}
