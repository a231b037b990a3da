import { useState } from 'react'
import {
  seatsAlong,
  seatsAround,
  seatsAtSides,
  seatsAtTable,
  setSeatsAt,
  usualHeights,
  usualSetback,
} from '#app/domain/site/seating.ts'
import { refusalOf } from '#app/domain/site/site-faults.ts'
import type { Site, Table } from '#app/domain/site/site.ts'
import { Button } from '#app/components/button.tsx'
import { TextField } from '#app/components/field.tsx'
import type { Chosen } from '#app/editor/site/choice.ts'
import { CountField, countOf } from '#app/editor/site/count-field.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { LengthInput } from '#app/editor/site/length-input.tsx'

const most = 40

/** Seats around a table: how many at each side, or around a round one; all look at it. */
export function SeatsAtTable({ table, onChoose }: { table: Table; onChoose: (chosen: Chosen) => void }) {
  const { site, change } = useSiteEditing()
  const round = table.form === 'round'
  const [group, setGroup] = useState(table.id)
  const [setback, setSetback] = useState<number>(usualSetback)
  const along = String(seatsAlong(table.size[0]))
  const [counts, setCounts] = useState({ below: along, above: along, left: '0', right: '0', around: '4' })
  const read = {
    below: countOf(counts.below, 0, most),
    above: countOf(counts.above, 0, most),
    left: countOf(counts.left, 0, most),
    right: countOf(counts.right, 0, most),
    around: countOf(counts.around, 1, most),
  }
  const { below, above, left, right, around } = read
  const places = () => {
    if (round) return around === null ? null : seatsAround(table, around, setback)
    if (below === null || above === null || left === null || right === null) return null
    return seatsAtSides(table, { below, above, left, right }, setback)
  }
  const sitting = places()
  const standing = table.height > 0.9
  const facts = {
    group,
    priority: 'primary' as const,
    posture: standing ? ('standing' as const) : ('seated' as const),
    ...usualHeights[standing ? 'standing' : 'seated'],
  }
  const add = (old: Site) => setSeatsAt(old, table, sitting ?? [], facts)
  const replaced = seatsAtTable(site, table, group).length
  const refusal = sitting ? refusalOf(site, add(site).site) : null
  const count = (name: keyof typeof counts, label: string) => (
    <CountField
      label={label}
      least={name === 'around' ? 1 : 0}
      most={most}
      value={counts[name]}
      onChange={(text) => setCounts((old) => ({ ...old, [name]: text }))}
    />
  )
  return (
    <fieldset className="border-t border-rule pt-2">
      <legend className="sr-only">Seats around it</legend>
      <p className="mb-2 font-medium">Seats around it</p>
      <div className="grid grid-cols-2 items-start gap-x-3 gap-y-2 tablet:grid-cols-4 wide:grid-cols-3">
        {round ? (
          count('around', 'Around')
        ) : (
          <>
            {count('below', 'Along it, lower side')}
            {count('above', 'Along it, upper side')}
            {count('left', 'At its left end')}
            {count('right', 'At its right end')}
          </>
        )}
        <LengthInput
          label="From the edge"
          units={site.displayUnits}
          value={setback}
          min={0}
          max={3}
          onCommit={setSetback}
        />
        <TextField label="Group" maxLength={40} value={group} onChange={(event) => setGroup(event.target.value)} />
      </div>
      {refusal && <p className="mt-1 text-2xs font-medium text-clay">{refusal.message}</p>}
      <p className="pt-2">
        <Button
          disabled={!sitting || sitting.length === 0 || refusal !== null}
          onClick={() => {
            const made = add(site)
            change(() => made.site)
            onChoose({ kind: 'seat', ids: made.ids, part: null })
          }}
        >
          Set {sitting?.length ?? 0} seats
        </Button>
        {replaced > 0 && (
          <span className="ml-2 text-2xs text-ink-3">
            In place of the {replaced} of {group} {replaced === 1 ? 'that is' : 'that are'} at this table.
          </span>
        )}
      </p>
    </fieldset>
  )
}
