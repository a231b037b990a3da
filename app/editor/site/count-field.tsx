import { TextField } from '#app/components/field.tsx'

interface CountFieldProps {
  readonly label: string
  readonly value: string
  readonly most: number
  readonly least?: number
  readonly onChange: (text: string) => void
}

/** The whole number that was typed; null outside its limits. */
export function countOf(text: string, least: number, most: number): number | null {
  const count = Number(text)
  return text.trim() !== '' && Number.isInteger(count) && count >= least && count <= most ? count : null
}

/** A whole number as it is typed, with its limits beside it. */
export function CountField({ label, value, least = 0, most, onChange }: CountFieldProps) {
  return (
    <TextField
      label={label}
      inputMode="numeric"
      value={value}
      error={countOf(value, least, most) === null ? `A whole number, ${least} to ${most.toLocaleString('en')}.` : null}
      onChange={(event) => onChange(event.target.value)}
    />
  )
}
