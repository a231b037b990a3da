import { useState } from 'react'
import type { Site } from '#app/domain/site/site.ts'
import { formatQuantity, parseQuantity } from '#app/domain/units.ts'
import { TextField } from '#app/components/field.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'

const limits = { min: 1, max: 100_000 }

interface LoadInputProps {
  /** N per suspension point; null: not known. */
  readonly value: number | null
  readonly edit: (site: Site, newtons: number | null) => Site
}

/** What a member may carry per point; empty: not known. */
export function LoadInput({ value, edit }: LoadInputProps) {
  const { site, readOnly, change } = useSiteEditing()
  const units = site.displayUnits
  const kept = value === null ? '' : formatQuantity(value, 'force', units)
  const [typed, setTyped] = useState<string | null>(null)
  const read = typed === null || typed.trim() === '' ? null : parseQuantity(typed, 'force', units, limits)
  const commit = () => {
    if (typed === null || typed === kept) return setTyped(null)
    if (read && 'error' in read) return
    change((old) => edit(old, read ? read.value : null))
    setTyped(null)
  }
  return (
    <TextField
      label="Allowed load per point"
      placeholder="not known"
      value={typed ?? kept}
      disabled={readOnly}
      error={read && 'error' in read ? read.error : null}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => event.key === 'Enter' && commit()}
    />
  )
}
