import { useState } from 'react'
import { addSeats, seatsInRows, usualHeights } from '#app/domain/site/seating.ts'
import { refusalOf } from '#app/domain/site/site-faults.ts'
import { seatSchema, type Seat, type Site } from '#app/domain/site/site.ts'
import { Button } from '#app/components/button.tsx'
import { SelectField, TextField } from '#app/components/field.tsx'
import { AngleField } from '#app/editor/panels/angle-field.tsx'
import type { Chosen } from '#app/editor/site/choice.ts'
import { CountField, countOf } from '#app/editor/site/count-field.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { LengthInput } from '#app/editor/site/length-input.tsx'
import { middleOf } from '#app/editor/site/new-things.ts'

/** Seats in rows: where the first stands, how many to a row and how far apart, and where they look. */
export function SeatRows({ onChoose }: { onChoose: (chosen: Chosen) => void }) {
  const { site, change } = useSiteEditing()
  const units = site.displayUnits
  const [sizes, setSizes] = useState(() => {
    const [x, y] = middleOf(site)
    return { x, y, spacing: 0.6, rowSpacing: 0.9 }
  })
  const [angles, setAngles] = useState({ along: 0, facing: 90 })
  const [counts, setCounts] = useState({ perRow: '4', rows: '1' })
  const [group, setGroup] = useState('')
  const [priority, setPriority] = useState<Seat['priority']>('primary')
  const perRow = countOf(counts.perRow, 1, 200)
  const rows = countOf(counts.rows, 1, 200)
  const places =
    perRow === null || rows === null
      ? null
      : seatsInRows({
          from: [sizes.x, sizes.y],
          turnDeg: angles.along,
          facingDeg: angles.facing,
          perRow,
          rows,
          spacing: sizes.spacing,
          rowSpacing: sizes.rowSpacing,
        })
  const add = (old: Site) => addSeats(old, places ?? [], { group, priority, posture: 'seated', ...usualHeights.seated })
  const refusal = places ? refusalOf(site, add(site).site) : null
  const length = (label: string, name: keyof typeof sizes, min: number, max: number) => (
    <LengthInput
      label={label}
      units={units}
      value={sizes[name]}
      min={min}
      max={max}
      onCommit={(metres) => setSizes((old) => ({ ...old, [name]: metres }))}
    />
  )
  const angle = (label: string, name: keyof typeof angles, hint: string) => (
    <AngleField
      label={label}
      hint={hint}
      value={angles[name]}
      check={(degrees) => (Math.abs(degrees) > 360 ? 'Between −360 and 360°.' : null)}
      onCommit={(degrees) => setAngles((old) => ({ ...old, [name]: degrees }))}
    />
  )
  return (
    <fieldset className="border-b border-rule pb-4">
      <legend className="mb-2 text-sm font-strong">Seats in rows</legend>
      <div className="grid grid-cols-2 items-start gap-x-3 gap-y-2 tablet:grid-cols-4 wide:grid-cols-3">
        {length('First seat x', 'x', -1000, 1000)}
        {length('First seat y', 'y', -1000, 1000)}
        <CountField
          label="In a row"
          least={1}
          most={200}
          value={counts.perRow}
          onChange={(perRowText) => setCounts((old) => ({ ...old, perRow: perRowText }))}
        />
        {length('Apart', 'spacing', 0.1, 10)}
        <CountField
          label="Rows"
          least={1}
          most={200}
          value={counts.rows}
          onChange={(rowsText) => setCounts((old) => ({ ...old, rows: rowsText }))}
        />
        {rows !== null && rows > 1 && length('Row to row', 'rowSpacing', 0.1, 20)}
        {angle('Row runs', 'along', '0 along x, 90 along y')}
        {angle('All look towards', 'facing', '0 along x, 90 along y')}
        <TextField label="Group" maxLength={40} value={group} onChange={(event) => setGroup(event.target.value)} />
        <SelectField
          label="Counts as"
          value={priority}
          options={seatSchema.shape.priority.options.map((value) => ({ value, label: value }))}
          onChange={(event) => {
            const picked = seatSchema.shape.priority.safeParse(event.target.value)
            if (picked.success) setPriority(picked.data)
          }}
        />
      </div>
      {refusal && <p className="mt-1 text-2xs font-medium text-clay">{refusal.message}</p>}
      <p className="pt-2">
        <Button
          disabled={!places || refusal !== null}
          onClick={() => {
            const made = add(site)
            change(() => made.site)
            onChoose({ kind: 'seat', ids: made.ids, part: null })
          }}
        >
          Set {(places?.length ?? 0).toLocaleString('en')} seats
        </Button>
      </p>
    </fieldset>
  )
}
