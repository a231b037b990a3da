import { useState, type InputHTMLAttributes } from 'react'
import { Field, FieldBox, inputClass } from '#app/components/field.tsx'

/** How a typed length was understood: the value, the words to echo, and another reading that may have been meant. */
type LengthReading = { metres: number; reading: string; suggestion: string | null } | { error: string }

interface LengthFieldProps extends Omit<InputHTMLAttributes<HTMLInputElement>, 'value' | 'onChange' | 'onBlur'> {
  label: string
  aside?: string
  hint?: string
  /** From the server or from a check of the range. */
  error?: string | null | undefined
  unit: string
  /** The length as it is kept, m; null when not known. */
  value: number | null
  /** The kept length in the person's units. */
  show: (metres: number) => string
  read: (text: string) => LengthReading
  /** Called with a length that was understood, when the person leaves the field or presses Enter. */
  onCommit: (metres: number) => void
}

/** A length in any way of writing it. What was typed stays until it is understood; the field says how it was read. */
export function LengthField(props: LengthFieldProps) {
  const { label, aside, hint, error, unit, value, show, read, onCommit, className, id, ...input } = props
  const kept = value === null ? '' : show(value)
  const [typed, setTyped] = useState<string | null>(null)
  const reading = typed === null || typed.trim() === '' ? null : read(typed)
  const wrong = reading && 'error' in reading ? reading.error : error
  const commit = () => {
    if (typed === null || typed === kept) return setTyped(null)
    if (!reading || 'error' in reading) return
    onCommit(reading.metres)
    if (!reading.suggestion) setTyped(null)
  }
  return (
    <Field label={label} aside={aside} hint={echo(reading) ?? hint} error={wrong} id={id} className={className}>
      {(control) => (
        <FieldBox error={Boolean(wrong)} unit={unit}>
          <input
            type="text"
            autoComplete="off"
            spellCheck={false}
            {...input}
            {...control}
            value={typed ?? kept}
            onChange={(event) => setTyped(event.target.value)}
            onBlur={commit}
            onKeyDown={(event) => {
              if (event.key === 'Enter') commit()
              if (event.key === 'Escape') setTyped(null)
            }}
            className={inputClass}
          />
        </FieldBox>
      )}
    </Field>
  )
}

function echo(reading: LengthReading | null): string | null {
  if (!reading || 'error' in reading) return null
  return `Read as ${reading.reading}.${reading.suggestion ? ` Did you mean ${reading.suggestion}?` : ''}`
}
