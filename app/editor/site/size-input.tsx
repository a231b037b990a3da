import { refusalOf } from '#app/domain/site/site-faults.ts'
import type { Site } from '#app/domain/site/site.ts'
import { parseLength } from '#app/domain/length-parser.ts'
import { formatLength } from '#app/domain/units.ts'
import { LengthField } from '#app/components/length-field.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'

interface SizeInputProps {
  readonly label: string
  readonly value: number | null
  /** The site with this length; what it would break is said beside the field, and nothing is changed. */
  readonly edit: (site: Site, metres: number) => Site
  readonly min?: number
  readonly max?: number
  readonly hint?: string
  readonly className?: string
}

/** A length of the site in the person's units, kept when it is understood and breaks nothing. */
export function SizeInput({ edit, min = -1000, max = 1000, ...field }: SizeInputProps) {
  const { site, readOnly, change } = useSiteEditing()
  const units = site.displayUnits
  const read = (text: string) => {
    const reading = parseLength(text, units, { min, max })
    if ('error' in reading) return reading
    const refusal = refusalOf(site, edit(site, reading.metres))
    return refusal ? { error: refusal.message } : reading
  }
  return (
    <LengthField
      {...field}
      unit=""
      disabled={readOnly}
      show={(metres) => formatLength(metres, units, 'fine')}
      read={read}
      onCommit={(metres) => change((old) => edit(old, metres))}
    />
  )
}
