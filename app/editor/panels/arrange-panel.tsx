import { useMemo, useState } from 'react'
import type { Brief } from '#app/domain/brief/brief.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { alignHeaters } from '#app/domain/layout/edits.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { repeatAtSpacing, spaceEqually } from '#app/domain/layout/repeat.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import { parseLength } from '#app/domain/length-parser.ts'
import { Button } from '#app/components/button.tsx'
import { SelectField, TextField } from '#app/components/field.tsx'
import { LengthField } from '#app/components/length-field.tsx'
import { SpacingCosts } from '#app/editor/panels/spacing-costs.tsx'
import { alongLabel, fieldLength, fromLabel } from '#app/editor/panels/axis-words.ts'

interface ArrangePanelProps {
  readonly layout: Layout
  readonly selected: readonly string[]
  readonly site: Site
  readonly brief: Brief
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly rules: HouseRules
  readonly onEdit: (layout: Layout, selected: readonly string[], said: string) => void
  readonly onDuplicate: () => void
}

const directions = [
  { value: '0', label: 'To the right' },
  { value: '180', label: 'To the left' },
  { value: '90', label: 'Up' },
  { value: '270', label: 'Down' },
]

/** Repeats the chosen heaters at a spacing; brings several into line or to equal spacing. */
export function ArrangePanel({ onDuplicate, ...repeated }: ArrangePanelProps) {
  const { layout, selected, site, onEdit } = repeated
  const [open, setOpen] = useState(false)
  const several = selected.length > 1
  const align = (along: 'x' | 'y') =>
    onEdit(alignHeaters(layout, selected, along), selected, `${selected.length} heaters in line`)
  return (
    <section aria-label="Arrange" className="border-t border-rule px-4.5 py-2">
      <div className="flex flex-wrap items-center gap-1">
        <Button kind="text" size="small" aria-expanded={open} onClick={() => setOpen(!open)}>
          Repeat at a spacing
        </Button>
        <Button kind="text" size="small" onClick={onDuplicate}>
          Duplicate
        </Button>
        {several && (
          <>
            <Button kind="text" size="small" onClick={() => align('x')} title="The same place along">
              Align {alongLabel(site).toLowerCase()}
            </Button>
            <Button kind="text" size="small" onClick={() => align('y')} title="The same distance">
              Align {fromLabel(site).toLowerCase()}
            </Button>
          </>
        )}
        {selected.length > 2 && (
          <Button
            kind="text"
            size="small"
            onClick={() => onEdit(spaceEqually(layout, selected), selected, 'Equally spaced')}
          >
            Space equally
          </Button>
        )}
      </div>
      {open && <RepeatForm {...repeated} />}
    </section>
  )
}

function RepeatForm({ onEdit, ...subject }: Omit<ArrangePanelProps, 'onDuplicate'>) {
  const { layout, selected, site } = subject
  const units = site.displayUnits
  const [spacing, setSpacing] = useState(firstSpacing(site))
  const [count, setCount] = useState('1')
  const [direction, setDirection] = useState('0')
  const [error, setError] = useState<string | null>(null)
  const asked = useMemo(
    () => ({ spacing, count: Number(count), directionDeg: Number(direction) }),
    [spacing, count, direction],
  )
  const repeat = (at: number) => {
    const answer = repeatAtSpacing(layout, selected, { ...asked, spacing: at })
    if ('error' in answer) return setError(answer.error)
    setError(null)
    onEdit(answer.layout, [...selected, ...answer.ids], `${answer.ids.length} heaters placed`)
  }
  return (
    <>
      <form
        className="mt-1 mb-1.5 grid grid-cols-2 items-start gap-2 wide:grid-cols-4"
        onSubmit={(event) => {
          event.preventDefault()
          repeat(spacing)
        }}
      >
        <LengthField
          label="Spacing"
          unit={units === 'metric' ? 'm' : ''}
          hint="Centre to centre"
          value={spacing}
          show={(metres) => fieldLength(metres, units)}
          read={(text) => parseLength(text, units, { min: 0.1, max: 100 })}
          onCommit={setSpacing}
        />
        <TextField
          label="How many more"
          inputMode="numeric"
          value={count}
          error={error}
          onChange={(event) => setCount(event.target.value)}
        />
        <SelectField
          label="Direction on the plan"
          options={directions}
          value={direction}
          onChange={(event) => setDirection(event.target.value)}
        />
        <Button type="submit" className="mt-4" disabled={selected.length === 0}>
          Repeat
        </Button>
      </form>
      <SpacingCosts {...subject} repeat={asked} onTake={repeat} />
    </>
  )
}

/** The spacing of the first two members, else 2.5 m. */
function firstSpacing(site: Site): number {
  const [one, two] = site.members
  const apart = one && two ? Math.hypot(two.from[0] - one.from[0], two.from[1] - one.from[1]) : 0
  return apart > 0.1 ? Math.round(apart * 1e4) / 1e4 : 2.5
}
