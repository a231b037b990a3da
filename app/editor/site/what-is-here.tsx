import { useState } from 'react'
import { isAssumed } from '#app/domain/site/size-source.ts'
import { listOf, type ThingKind } from '#app/domain/site/edits.ts'
import { formatLength } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { AddRow } from '#app/editor/site/add-row.tsx'
import { chosenFloor, chosenThing, type Chosen } from '#app/editor/site/choice.ts'
import { ChosenFields } from '#app/editor/site/chosen-fields.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { KindList, type ListedKind } from '#app/editor/site/kind-list.tsx'
import type { NewThing } from '#app/editor/site/new-things.ts'
import { SeatRows } from '#app/editor/site/seat-rows.tsx'
import { SizeFields } from '#app/editor/site/size-fields.tsx'
import { ThingList } from '#app/editor/site/thing-list.tsx'
import { rowsOf } from '#app/editor/site/thing-words.ts'

interface WhatIsHereProps {
  readonly kind: ListedKind
  readonly chosen: Chosen | null
  readonly adding: NewThing | null
  readonly onKind: (kind: ListedKind) => void
  readonly onChoose: (chosen: Chosen, shift?: boolean) => void
  readonly onRemove: () => void
  readonly onAdding: (what: NewThing | null) => void
  readonly onAdd: (what: NewThing) => void
}

/** Everything of the site: its kinds with their counts, the fields of what is chosen, and the list of one kind. */
export function WhatIsHere(props: WhatIsHereProps) {
  const { kind, chosen, onKind, onChoose, onRemove } = props
  return (
    <div className="grid gap-x-4 gap-y-3 *:min-w-0 tablet:grid-cols-[8.5rem_minmax(0,1fr)]">
      <KindList kind={kind} onKind={onKind} />
      <div role="tabpanel" aria-label="What is here" className="min-w-0 space-y-3">
        {chosen && chosen.kind === kind && <ChosenFields {...{ chosen, onChoose, onRemove }} />}
        {kind === 'sizes' && <Sizes />}
        {kind !== 'floor' && kind !== 'sizes' && <Things {...props} kind={kind} />}
        {kind === 'floor' && chosen?.kind !== 'floor' && (
          <Button onClick={() => onChoose(chosenFloor())}>Change the floor</Button>
        )}
      </div>
    </div>
  )
}

const none: Record<ThingKind, string> = {
  cover: 'No cover: open sky.',
  member: 'No members yet. A heater needs one, a wall or a pole to hang from.',
  wall: 'No walls.',
  pole: 'No posts or poles.',
  obstacle: 'Nothing known that stands in the way.',
  table: 'No tables.',
  level: 'One level: the finished floor.',
  seat: 'No seats yet. Set them at a table, in rows or one by one.',
}

function Things({ kind, chosen, adding, onChoose, onAdding, onAdd }: WhatIsHereProps & { kind: ThingKind }) {
  const { site, readOnly } = useSiteEditing()
  const [rows, setRows] = useState(false)
  const choose = (id: string, shift: boolean) => onChoose(chosenThing(kind, id), shift)
  return (
    <section aria-label={`All ${listOf[kind]}`}>
      {!readOnly && <AddRow {...{ kind, adding, onAdding, onAdd }} />}
      {!readOnly && kind === 'seat' && (
        <div className="pb-2">
          {rows ? (
            <SeatRows
              onChoose={(next) => {
                setRows(false)
                onChoose(next)
              }}
            />
          ) : (
            <Button size="small" icon="plus" onClick={() => setRows(true)}>
              Seats in rows
            </Button>
          )}
        </div>
      )}
      <ThingList
        key={kind}
        label={`All ${listOf[kind]}`}
        rows={rowsOf(site, kind)}
        chosen={chosen?.kind === kind ? chosen.ids : []}
        empty={none[kind]}
        onChoose={choose}
      />
    </section>
  )
}

/** Every named size with its tolerance, as it goes into the margins, and where it came from. */
function Sizes() {
  const { site, rules } = useSiteEditing()
  const [chosen, setChosen] = useState<string | null>(null)
  const size = site.dimensions.find(({ id }) => id === chosen)
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  const rows = site.dimensions.map((each) => ({
    id: each.id,
    name: each.label,
    words: `${length(each.value)} ± ${length(each.tolerance)}, ${each.source}${each.note ? `: ${each.note}` : ''}`,
    assumed: isAssumed(each),
  }))
  return (
    <section aria-label="All sizes" className="space-y-3">
      {size && <SizeFields size={size} onClose={() => setChosen(null)} />}
      <ThingList
        label="All sizes"
        rows={rows}
        chosen={chosen === null ? [] : [chosen]}
        empty={`No named sizes: every coordinate counts as ± ${length(rules.toleranceUnstated)}.`}
        onChoose={setChosen}
      />
    </section>
  )
}
