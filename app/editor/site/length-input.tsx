import { parseLength } from '#app/domain/length-parser.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'
import { LengthField } from '#app/components/length-field.tsx'

interface LengthInputProps {
  readonly label: string
  readonly units: DisplayUnits
  readonly value: number | null
  readonly min?: number
  readonly max?: number
  readonly hint?: string
  readonly aside?: string
  readonly error?: string | null
  readonly disabled?: boolean
  readonly onCommit: (metres: number) => void
}

/** A length in the person's units that is not part of the site yet; within 1000 m unless said otherwise. */
export function LengthInput({ units, min = -1000, max = 1000, ...field }: LengthInputProps) {
  return (
    <LengthField
      {...field}
      unit=""
      show={(metres) => formatLength(metres, units, 'fine')}
      read={(text) => parseLength(text, units, { min, max })}
    />
  )
}
