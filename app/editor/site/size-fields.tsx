import { useState } from 'react'
import { moveDimension } from '#app/domain/site/dimension.ts'
import { siteSchema, sizeSourceSchema, type Dimension, type Site } from '#app/domain/site/site.ts'
import { Button } from '#app/components/button.tsx'
import { SelectField, TextField } from '#app/components/field.tsx'
import { LengthInput } from '#app/editor/site/length-input.tsx'

interface SizeFieldsProps {
  readonly site: Site
  readonly size: Dimension
  readonly readOnly: boolean
  readonly onChange: (edit: (site: Site) => Site) => void
  readonly onClose: () => void
}

/** Default tolerance by where a size comes from, m (house rules): laser 5 mm, tape 10 mm, drawing 25 mm, guess 10 %. */
function usualTolerance(source: Dimension['source'], value: number): number {
  const fixed = { laser: 0.005, tape: 0.01, drawing: 0.025 }
  if (source === 'laser' || source === 'tape' || source === 'drawing') return fixed[source]
  if (source === 'photo') return Math.max(0.03 * Math.abs(value), 0.05)
  return 0.1 * Math.abs(value)
}

/** A size of the site: its value moves everything that it decides; its tolerance goes into every margin. */
export function SizeFields({ site, size, readOnly, onChange, onClose }: SizeFieldsProps) {
  const units = site.displayUnits
  const set = (facts: Partial<Dimension>) =>
    onChange((old) => ({
      ...old,
      dimensions: old.dimensions.map((each) => (each.id === size.id ? { ...each, ...facts } : each)),
    }))
  const measure = (value: number) =>
    onChange((old) => {
      const moved = moveDimension(old, size, value - size.value)
      const dimensions = moved.dimensions.map((each) => (each.id === size.id ? { ...each, value } : each))
      const measured = siteSchema.safeParse({ ...moved, dimensions })
      return measured.success ? measured.data : old
    })
  return (
    <section aria-labelledby="size-title" className="border-b border-rule pb-4">
      <header className="mb-2 flex items-center justify-between">
        <h2 id="size-title" className="text-sm font-strong first-letter:uppercase">
          {size.label}
        </h2>
        <Button kind="text" size="small" onClick={onClose}>
          Close
        </Button>
      </header>
      <div key={size.id} className="grid grid-cols-2 gap-x-3 gap-y-2.5 tablet:grid-cols-4">
        <LengthInput
          label="Value"
          units={units}
          value={size.value}
          min={0}
          max={100}
          disabled={readOnly}
          hint={
            size.moves.length > 0 ? `Decides ${size.moves.length} places of the site` : 'Decides nothing that is drawn'
          }
          onCommit={measure}
        />
        <LengthInput
          label="Tolerance, ±"
          units={units}
          value={size.tolerance}
          min={0}
          max={20}
          disabled={readOnly}
          onCommit={(tolerance) => set({ tolerance })}
        />
        <SelectField
          label="Source"
          value={size.source}
          disabled={readOnly}
          options={sizeSourceSchema.options.map((value) => ({ value, label: value }))}
          onChange={(event) => {
            const read = sizeSourceSchema.safeParse(event.target.value)
            if (read.success) set({ source: read.data, tolerance: usualTolerance(read.data, size.value) })
          }}
        />
        <NoteField value={size.note ?? ''} disabled={readOnly} onCommit={(note) => set({ note: note || null })} />
      </div>
    </section>
  )
}

function NoteField({
  value,
  disabled,
  onCommit,
}: {
  value: string
  disabled: boolean
  onCommit: (note: string) => void
}) {
  const [typed, setTyped] = useState(value)
  const commit = () => typed.trim() !== value && onCommit(typed.trim())
  return (
    <TextField
      label="Note"
      maxLength={200}
      value={typed}
      disabled={disabled}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => event.key === 'Enter' && commit()}
    />
  )
}
