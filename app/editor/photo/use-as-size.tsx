import { useState } from 'react'
import type { PhotoSize } from '#app/domain/photo/into-site.ts'
import type { Dimension } from '#app/domain/site/site.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { SelectField } from '#app/components/field.tsx'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'
import type { Figure } from '#app/editor/photo/measured.ts'

/** The site's sizes, and what puts a figure among them: as a new one, or in the place of one by its id. */
export interface SizeUse {
  readonly sizes: readonly Dimension[]
  readonly onUse: (size: Omit<PhotoSize, 'photo'> & { readonly measurementId: string }, replaces: string | null) => void
}

interface UseAsSizeProps extends SizeUse {
  readonly label: string
  readonly measurementId: string
  readonly figure: Figure
  readonly units: DisplayUnits
}

/** Takes a figure of a photo into the site's sizes. */
export function UseAsSize({ label, measurementId, figure, units, sizes, onUse }: UseAsSizeProps) {
  const same = sizes.find((size) => size.label.toLowerCase() === label.toLowerCase())
  const [chosen, setChosen] = useState<string | null>(null)
  const into = chosen ?? same?.id ?? ''
  const replaced = sizes.find(({ id }) => id === into)
  const { value, tolerance } = figure
  const say = (size: Dimension) =>
    `${size.label}: ${formatLength(size.value, units)} ± ${formatLength(size.tolerance, units)}, ${size.source}`
  return (
    <div className="flex min-w-0 flex-1 flex-wrap items-end gap-2">
      <SelectField
        className="min-w-40 flex-1"
        label={`${label} goes into`}
        value={replaced ? into : ''}
        options={[
          { value: '', label: 'A new size of the site' },
          ...sizes.map((size) => ({ value: size.id, label: say(size) })),
        ]}
        onChange={(event) => setChosen(event.target.value)}
      />
      <Button size="small" onClick={() => onUse({ label, value, tolerance, measurementId }, replaced?.id ?? null)}>
        {replaced ? 'Replace this size' : 'Use as a size'}
      </Button>
      {replaced && replaced.tolerance < tolerance && (
        <p className="w-full text-xs text-amber">
          <span className="mr-1.5 inline-block align-[-1px]">
            <OutcomeMark outcome="measure first" size={10} />
          </span>
          The size that is there is known better: ± {formatLength(replaced.tolerance, units)}, {replaced.source}.
        </p>
      )}
    </div>
  )
}
