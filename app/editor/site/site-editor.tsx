import { useCallback, useMemo, useState } from 'react'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { placedByHand, placedInWords } from '#app/domain/site/placed-by-hand.ts'
import { refusalOf, siteFaults } from '#app/domain/site/site-faults.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { useToast } from '#app/components/toast.tsx'
import type { OpenDocument } from '#app/editor/document.ts'
import { chosenFloor, type Chosen } from '#app/editor/site/choice.ts'
import { chosenAfterClick, chosenWords, removeChosen, stillThere } from '#app/editor/site/chosen.ts'
import { SiteEditingProvider, type SiteEditing } from '#app/editor/site/editing.ts'
import type { ListedKind } from '#app/editor/site/kind-list.tsx'
import { kindOfNew, middleOf, withThingAt, type NewThing } from '#app/editor/site/new-things.ts'
import { SitePlan } from '#app/editor/site/site-plan.tsx'
import { WhatIsHere } from '#app/editor/site/what-is-here.tsx'
import type { KeyAction } from '#app/editor/tools/keys.ts'

interface SiteEditorProps {
  readonly site: Site
  readonly rules: HouseRules
  readonly document: Pick<OpenDocument<Site>, 'change' | 'undo' | 'redo'>
  readonly readOnly: boolean
  readonly theme: 'dusk' | 'day'
  /** Every named size on the plan. */
  readonly sizes: boolean
}

/** The plan of the site beside everything that is on it. */
export function SiteEditor({ site, rules, document, readOnly, theme, sizes }: SiteEditorProps) {
  const [wanted, setWanted] = useState<Chosen | null>(null)
  const [kind, setKind] = useState<ListedKind>('floor')
  const [adding, setAdding] = useState<NewThing | null>(null)
  const toast = useToast()
  const chosen = stillThere(site, wanted)
  const { undo } = document
  const change = useChangeByHand(document, rules)
  const editing = useMemo(() => ({ site, rules, readOnly, change }), [site, rules, readOnly, change])

  const choose = (next: Chosen | null) => {
    setWanted(next)
    if (next) setKind(next.kind)
  }
  const open = (next: ListedKind) => {
    setKind(next)
    setAdding(null)
    setWanted(next === 'floor' ? chosenFloor() : chosen?.kind === next ? chosen : null)
  }
  const remove = (what: Chosen) => {
    const without = removeChosen(site, what)
    if (without === site) return toast({ text: 'A floor, a level or an outline keeps three corners.' })
    const refusal = refusalOf(site, without)
    if (refusal && what.part !== null) return toast({ text: `Left as it was. ${refusal.message}` })
    change(() => without)
    choose(what.part === null ? null : { ...what, part: null })
    toast({ text: `${chosenWords(site, what)} removed`, action: { label: 'Undo', run: undo } })
  }
  const add = (what: NewThing, at: Vec2) => {
    const made = withThingAt(site, what, at)
    const refusal = refusalOf(site, made.site)
    if (refusal) return toast({ text: `Not added. ${refusal.message}` })
    change(() => made.site)
    choose({ kind: kindOfNew(what), ids: [made.id], part: null })
  }
  const key = (action: KeyAction): boolean => {
    if (action.kind === 'let go') {
      setAdding(null)
      choose(null)
      return true
    }
    if (action.kind === 'undo' || action.kind === 'redo') document[action.kind]()
    else if (readOnly) return false
    else if (action.kind === 'select all') choose({ kind: 'seat', ids: site.seats.map(({ id }) => id), part: null })
    else if (action.kind === 'remove' && chosen) remove(chosen)
    else return false
    return true
  }
  const faults = siteFaults(site)

  return (
    <SiteEditingProvider value={editing}>
      {faults.length > 0 && <Faults site={site} />}
      <div className="grid items-start gap-x-6 gap-y-5 *:min-w-0 wide:grid-cols-[minmax(0,1fr)_38rem]">
        <div className="min-w-0 wide:sticky wide:top-4">
          <SitePlan
            {...{ theme, chosen, sizes }}
            adding={adding !== null}
            onChoose={choose}
            onAdd={(at) => adding && add(adding, at)}
            onKey={key}
          />
          <p className="mt-1.5 text-xs text-ink-3">{site.axes}. Drag or use the arrows, 10 mm each, Shift 100 mm.</p>
        </div>
        <WhatIsHere
          {...{ kind, chosen, adding }}
          onKind={open}
          onChoose={(next, shift = false) => choose(chosenAfterClick(chosen, next, shift))}
          onRemove={() => chosen && remove(chosen)}
          onAdding={setAdding}
          onAdd={(what) => add(what, middleOf(site))}
        />
      </div>
    </SiteEditingProvider>
  )
}

/** The way to change the site by hand: sizes that decided what was changed go along in the same step, and it is said. */
function useChangeByHand(document: SiteEditorProps['document'], rules: HouseRules): SiteEditing['change'] {
  const toast = useToast()
  const { change, undo } = document
  return useCallback(
    (edit) =>
      change((old) => {
        const placed = placedByHand(old, edit(old), rules)
        const text = placedInWords(placed, placed.site.displayUnits, rules)
        if (text) toast({ text, action: { label: 'Undo', run: undo } })
        return placed.site
      }),
    [change, undo, toast, rules],
  )
}

/** What keeps the site from being saved; an older site may have such things. */
function Faults({ site }: { site: Site }) {
  const faults = siteFaults(site)
  return (
    <section role="alert" className="mb-3 rounded-md border border-clay bg-clay-wash px-3 py-2">
      <h2 className="font-strong">Not saved while this stands</h2>
      <ul className="list-inside list-disc">
        {faults.slice(0, 5).map(({ path, message }) => (
          <li key={path.join('.')}>{message}</li>
        ))}
      </ul>
      {faults.length > 5 && <p>And {faults.length - 5} more.</p>}
    </section>
  )
}
