import { Link } from 'react-router'
import { moveDimension } from '#app/domain/site/dimension.ts'
import { isAssumed, usualTolerance } from '#app/domain/site/size-source.ts'
import { sizeSourceSchema, type Dimension, type Site } from '#app/domain/site/site.ts'
import { roundLength } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { PickInput, TextInput } from '#app/editor/site/fact-inputs.tsx'
import { FieldGrid } from '#app/editor/site/fields-frame.tsx'
import { SizeInput } from '#app/editor/site/size-input.tsx'

interface SizeFieldsProps {
  readonly size: Dimension
  readonly onClose: () => void
}

const withSize = (site: Site, id: string, facts: Partial<Dimension>): Site => ({
  ...site,
  dimensions: site.dimensions.map((each) => (each.id === id ? { ...each, ...facts } : each)),
})

/** The site with a size measured anew: everything that it decides moves along. */
function withMeasured(site: Site, size: Dimension, value: number): Site {
  const rounded = (metres: number) => roundLength(metres)
  const moved = moveDimension(site, size, rounded(value - size.value))
  return withSize(moved, size.id, { value: rounded(value) })
}

/** A size of the site: its value moves everything that it decides; its tolerance goes into every margin. */
export function SizeFields({ size, onClose }: SizeFieldsProps) {
  const { readOnly, rules, change } = useSiteEditing()
  const { id } = size
  return (
    <section aria-labelledby="size-title" className="border-b border-rule pb-4">
      <header className="mb-2 flex items-center justify-between">
        <h2 id="size-title" className="text-sm font-strong first-letter:uppercase">
          {size.label}
          {isAssumed(size) && <span className="ml-2 font-medium text-amber">assumed</span>}
        </h2>
        <Button kind="text" size="small" onClick={onClose}>
          Close
        </Button>
      </header>
      <FieldGrid key={id}>
        <SizeInput
          label="Value"
          value={size.value}
          min={0}
          max={100}
          hint={
            size.moves.length > 0 ? `Decides ${size.moves.length} places of the site` : 'Decides nothing that is drawn'
          }
          edit={(old, value) => withMeasured(old, size, value)}
        />
        <SizeInput
          label="Tolerance, ±"
          value={size.tolerance}
          min={0}
          max={20}
          edit={(old, tolerance) => withSize(old, id, { tolerance })}
        />
        <PickInput
          label="Source"
          value={size.source}
          options={sizeSourceSchema.options.map((value) => ({ value, label: value }))}
          edit={(old, source) => withSize(old, id, { source, tolerance: usualTolerance(source, size.value, rules) })}
        />
        <TextInput
          label="Note"
          value={size.note ?? ''}
          edit={(old, note) => withSize(old, id, { note: note || null })}
        />
      </FieldGrid>
      {!readOnly && (
        <p className="pt-2">
          <Button
            size="small"
            kind="text"
            icon="remove"
            onClick={() => {
              change((old) => ({ ...old, dimensions: old.dimensions.filter((each) => each.id !== id) }))
              onClose()
            }}
          >
            Forget this size
          </Button>
        </p>
      )}
      {size.photo && (
        <p className="mt-1.5">
          <Link
            relative="path"
            to={`../photos/${size.photo.photoId}?at=${size.photo.measurementId}`}
            className="underline pointer-coarse:py-3"
          >
            The photo, at these marks
          </Link>
        </p>
      )}
    </section>
  )
}
