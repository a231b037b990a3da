import { useState } from 'react'
import { TextField } from '#app/components/field.tsx'
import { degreesFigure } from '#app/editor/figures.ts'

interface AngleFieldProps {
  readonly label: string
  readonly aside?: string
  readonly hint?: string | undefined
  /** Degrees; null where several differ. */
  readonly value: number | null
  /** Says what is wrong with an angle, else null. */
  readonly check?: (degrees: number) => string | null
  readonly onCommit: (degrees: number) => void
  readonly disabled?: boolean
  readonly className?: string
}

/** An angle in degrees; what was typed stays until it is understood. */
export function AngleField({ value, check, onCommit, aside, hint, ...field }: AngleFieldProps) {
  const [typed, setTyped] = useState<string | null>(null)
  const kept = value === null ? '' : degreesFigure(value)
  const reading = typed === null ? null : readAngle(typed)
  const error = typed === null || typed.trim() === '' ? null : wrongWith(reading, kept, check)
  const commit = () => {
    if (typed === null || typed === kept || typed.trim() === '') return setTyped(null)
    if (reading === null || error) return
    onCommit(reading)
    setTyped(null)
  }
  return (
    <TextField
      {...field}
      {...(aside === undefined ? {} : { aside })}
      unit="°"
      hint={hint}
      error={error}
      inputMode="decimal"
      placeholder={value === null ? 'differ' : ''}
      value={typed ?? kept}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => {
        if (event.key === 'Enter') commit()
        if (event.key === 'Escape') setTyped(null)
      }}
    />
  )
}

function wrongWith(reading: number | null, kept: string, check: AngleFieldProps['check']): string | null {
  if (reading === null) return `A number of degrees, such as 22. Was ${kept || 'different'}°.`
  return check?.(reading) ?? null
}

/** Reads `22`, `-22`, `22,5°`; null when it is no number of degrees. */
export function readAngle(text: string): number | null {
  const plain = text
    .trim()
    .replace(/[−–]/g, '-')
    .replace(',', '.')
    .replace(/ ?(°|deg|degrees)$/i, '')
  return /^[+-]?(\d+(\.\d*)?|\.\d+)$/.test(plain) ? Number(plain) : null
}
