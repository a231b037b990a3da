import { useState } from 'react'
import { changeSeat } from '#app/domain/site/edits.ts'
import { seatSchema, type Seat, type Site } from '#app/domain/site/site.ts'
import { Button } from '#app/components/button.tsx'
import { SelectField, TextField } from '#app/components/field.tsx'
import { AngleField } from '#app/editor/panels/angle-field.tsx'
import { LengthInput } from '#app/editor/site/length-input.tsx'

interface SeatFieldsProps {
  readonly site: Site
  readonly ids: readonly string[]
  readonly readOnly: boolean
  readonly onChange: (edit: (site: Site) => Site) => void
  readonly onRemove: () => void
}

type Facts = Partial<Omit<Seat, 'id'>>

/** Every fact of the chosen seats; several show what they share and are set together. */
export function SeatFields({ site, ids, readOnly, onChange, onRemove }: SeatFieldsProps) {
  const seats = site.seats.filter(({ id }) => ids.includes(id))
  const units = site.displayUnits
  const shared = <T,>(of: (seat: Seat) => T): T | null => {
    const [first] = seats
    return first && seats.every((seat) => of(seat) === of(first)) ? of(first) : null
  }
  const set = (facts: Facts) => onChange((old) => ids.reduce((now, id) => changeSeat(now, id, facts), old))
  const length = (label: string, name: 'x' | 'y' | 'bodyHeight' | 'headHeight', limits = {}) => (
    <LengthInput
      label={label}
      units={units}
      value={shared((seat) => seat[name])}
      disabled={readOnly}
      onCommit={(metres) => set({ [name]: metres })}
      {...limits}
    />
  )
  const heights = { min: 0.05, max: 3 }
  return (
    <section aria-labelledby="chosen-title" className="border-b border-rule pb-4">
      <header className="mb-2 flex items-center justify-between">
        <h2 id="chosen-title" className="text-sm font-strong">
          {seats.length === 1 ? `Seat ${seats[0]?.id}` : `${seats.length} seats, set together`}
        </h2>
        {!readOnly && (
          <Button kind="danger" size="small" icon="remove" onClick={onRemove}>
            Remove
          </Button>
        )}
      </header>
      <div key={ids.join()} className="grid grid-cols-2 gap-x-3 gap-y-2.5 tablet:grid-cols-4">
        {length('Along, x', 'x')}
        {length('Away, y', 'y')}
        <AngleField
          label="Looks towards"
          hint="0 along x, 90 along y"
          value={shared((seat) => seat.facingDeg)}
          check={(degrees) => (Math.abs(degrees) > 360 ? 'Between −360 and 360°.' : null)}
          disabled={readOnly}
          onCommit={(facingDeg) => set({ facingDeg })}
        />
        <GroupField value={shared((seat) => seat.group)} disabled={readOnly} onCommit={(group) => set({ group })} />
        <SelectField
          label="Counts as"
          value={shared((seat) => seat.priority) ?? ''}
          disabled={readOnly}
          options={[
            { value: '', label: 'differ', disabled: true },
            ...seatSchema.shape.priority.options.map((value) => ({ value, label: value })),
          ]}
          onChange={(event) => {
            const read = seatSchema.shape.priority.safeParse(event.target.value)
            if (read.success) set({ priority: read.data })
          }}
        />
        <SelectField
          label="Posture"
          value={shared((seat) => seat.posture) ?? ''}
          disabled={readOnly}
          options={[
            { value: '', label: 'differ', disabled: true },
            ...seatSchema.shape.posture.options.map((value) => ({ value, label: value })),
          ]}
          onChange={(event) => {
            const read = seatSchema.shape.posture.safeParse(event.target.value)
            if (read.success) set({ posture: read.data })
          }}
        />
        {length('Body plane', 'bodyHeight', heights)}
        {length('Head plane', 'headHeight', heights)}
      </div>
    </section>
  )
}

interface GroupFieldProps {
  value: string | null
  disabled: boolean
  onCommit: (group: string) => void
}

function GroupField({ value, disabled, onCommit }: GroupFieldProps) {
  const [typed, setTyped] = useState<string | null>(null)
  const commit = () => {
    if (typed !== null && typed.trim() !== value) onCommit(typed.trim())
    setTyped(null)
  }
  return (
    <TextField
      label="Table or group"
      maxLength={40}
      placeholder={value === null ? 'differ' : ''}
      value={typed ?? value ?? ''}
      disabled={disabled}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => event.key === 'Enter' && commit()}
    />
  )
}
