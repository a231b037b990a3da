import { lazy, Suspense, useCallback, useMemo } from 'react'
import type { Brief } from '#app/domain/brief/brief.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { HeaterChange } from '#app/domain/layout/edits.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import { assumedInWords } from '#app/domain/site/size-source.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { ButtonLink } from '#app/components/button.tsx'
import { ArrangePanel } from '#app/editor/panels/arrange-panel.tsx'
import { FindingsList } from '#app/editor/panels/findings-list.tsx'
import { HeaterFields } from '#app/editor/panels/heater-fields.tsx'
import { HeatersTable } from '#app/editor/panels/heaters-table.tsx'
import { PlacePanel } from '#app/editor/panels/place-panel.tsx'
import { SeatsTable } from '#app/editor/panels/seats-table.tsx'
import { UnheldHeater } from '#app/editor/panels/unheld-heater.tsx'
import { findChosen } from '#app/editor/nearest-shown.ts'
import type { ChangeSite } from '#app/editor/site-change.ts'
import type { Editor } from '#app/editor/use-editor.ts'
import type { ShownFigures } from '#app/editor/use-figures.ts'
import type { ViewChoice } from '#app/editor/view-choice.ts'

const ExplainPanel = lazy(() => import('#app/editor/panels/explain-panel.tsx'))

/** What the panels beside and below the plan show and change. */
export interface SideSubject {
  readonly editor: Editor
  readonly figures: ShownFigures
  /** As shown: the gesture's while one is under way. */
  readonly layout: Layout
  readonly site: Site
  readonly brief: Brief
  readonly catalogue: readonly HeaterModel[]
  readonly choice: ViewChoice
  readonly readOnly: boolean
  readonly hold: boolean
  readonly onHold: (hold: boolean) => void
  /** Seat whose figures are taken apart. */
  readonly explained: string | null
  readonly onExplain: (seatId: string | null) => void
  readonly placing: boolean
  readonly onPlacing: (placing: boolean) => void
  readonly onSeat: (seatId: string | null) => void
  /** The page about which rough size matters most. */
  readonly sizesHref: string
  readonly onSite: ChangeSite
}

/** What each part is given. */
export interface PartProps {
  readonly subject: SideSubject
}

/** The catalogue while placing, a seat's figures taken apart, else the chosen heater. */
export function Top({ subject }: PartProps) {
  if (subject.placing) return <Placing subject={subject} />
  if (subject.explained) return <Explained subject={subject} />
  return <Chosen subject={subject} />
}

/** The catalogue. */
export function Placing({ subject }: PartProps) {
  const { editor, catalogue, site, brief, onPlacing } = subject
  return (
    <PlacePanel
      models={catalogue}
      site={site}
      brief={brief}
      placing={editor.state.placing}
      onPlacing={(model) => editor.dispatch({ type: 'placing', model })}
      onPlaceAt={editor.placeUnder}
      onClose={() => {
        editor.dispatch({ type: 'placing', model: null })
        onPlacing(false)
      }}
    />
  )
}

/** A seat’s figures taken apart; nothing until one is asked for. */
export function Explained({ subject }: PartProps) {
  const { editor, figures, layout, site, brief, choice, explained, onExplain } = subject
  const { models } = editor
  const input = useMemo(
    () => ({ site, brief, layout, models, shade: choice.shade ? ('in-place' as const) : ('none' as const) }),
    [site, brief, layout, models, choice.shade],
  )
  if (!explained) return null
  return (
    <Suspense fallback={<p className="px-4.5 py-3.5 text-ink-2">Opening</p>}>
      <ExplainPanel
        input={input}
        rules={editor.house.rules}
        seatId={explained}
        warmth={figures.warmth.find(({ seat }) => seat.id === explained) ?? null}
        units={site.displayUnits}
        fluxUnit={choice.fluxUnit}
        onClose={() => onExplain(null)}
      />
    </Suspense>
  )
}

/** The chosen heaters’ fields, or what to do when none is chosen. */
export function Chosen({ subject }: PartProps) {
  const { editor, layout, site, brief, readOnly, hold, onHold } = subject
  const { state, models } = editor
  const heaters = layout.heaters.filter(({ id }) => state.selected.includes(id))
  if (heaters.length === 0) return <NothingChosen subject={subject} />
  return (
    <>
      <HeaterFields
        {...{ heaters, models, site, brief, readOnly, hold, onHold }}
        onChange={(change) => editor.set(state.selected, change)}
        onRemove={() => editor.dispatch({ type: 'remove' })}
      />
      {!readOnly && (
        <ArrangePanel
          layout={state.history.present}
          selected={state.selected}
          site={site}
          brief={brief}
          models={models}
          rules={editor.house.rules}
          onEdit={editor.edit}
          onDuplicate={() => editor.dispatch({ type: 'duplicate' })}
        />
      )}
    </>
  )
}

function NothingChosen({ subject }: PartProps) {
  const { layout, readOnly } = subject
  return (
    <section aria-labelledby="chosen-title" className="px-4.5 py-3.5">
      <h2 id="chosen-title" className="text-sm font-strong">
        {layout.heaters.length === 0 ? 'No heaters yet' : 'No heater chosen'}
      </h2>
      <p className="mt-1 text-ink-2">
        {layout.heaters.length === 0 ? (
          'Place one on a beam to see the map.'
        ) : (
          <>
            Choose one on the plan or in the list
            <span className="pointer-coarse:hidden">; Shift adds another, a rectangle takes several</span>.
          </>
        )}
      </p>
      {!readOnly && (
        <details className="mt-1">
          <summary className="min-h-8 cursor-pointer py-1.5 text-ink-2 pointer-coarse:min-h-11">Keys</summary>
          <p className="text-2xs text-ink-2">
            Tab goes from heater to heater, then to the seats. Arrows move 10 mm, with Shift 100 mm. Page Up and Page
            Down raise and lower. [ and ] turn, comma and full stop tilt. Delete removes, Ctrl D duplicates, Ctrl C and
            Ctrl V copy and paste, Ctrl Z undoes. Alt lets go of members and spacing, Escape goes back. + and − change
            the size, 0 shows the whole plan.
          </p>
        </details>
      )}
    </section>
  )
}

/** What was checked; a finding shows its subject on the plan. */
export function Findings({ subject }: PartProps) {
  const { editor, figures, layout, site, brief, choice, readOnly, onExplain, onSite, sizesHref } = subject
  const assumed = assumedInWords(site, site.displayUnits)
  const chosen = findChosen(figures.findings, editor.state.finding)
  const onPoint = (finding: Finding) => {
    editor.dispatch({ type: 'finding', finding: finding === chosen ? null : finding })
    if (finding.subject.kind === 'seat') onExplain(finding.subject.id)
  }
  const actionsFor = ({ rule, outcome, subject: about }: Finding) => {
    if (rule !== 'supported' || outcome !== 'fails') return null
    const heater = layout.heaters.find(({ id }) => id === about.id)
    return heater ? <UnheldHeater key={heater.id} {...{ heater, editor, site, brief, choice, onSite }} /> : null
  }
  return (
    <>
      <FindingsList
        findings={figures.findings}
        units={site.displayUnits}
        fluxUnit={choice.fluxUnit}
        {...{ chosen, onPoint }}
        {...(readOnly ? {} : { actionsFor })}
      />
      {assumed.length > 0 && (
        <p className="px-4.5 pb-2 text-xs text-ink-2">
          <b className="font-medium text-amber">Assumed sizes:</b> {assumed.join('; ')}.
        </p>
      )}
      {layout.heaters.length > 0 && (
        <p className="px-4.5 pb-3">
          <ButtonLink to={sizesHref} size="small">
            Which size to measure next
          </ButtonLink>
        </p>
      )}
    </>
  )
}

/** The seats, linked with the plan both ways. */
export function Seats({ subject }: PartProps) {
  const { editor, figures, site, brief, choice, onSeat, onExplain } = subject
  return (
    <SeatsTable
      warmth={figures.warmth}
      brief={brief}
      units={site.displayUnits}
      fluxUnit={choice.fluxUnit}
      seatId={editor.state.seatId}
      onSeat={onSeat}
      onExplain={onExplain}
    />
  )
}

/** The heaters as a list. */
export function Heaters({ subject }: PartProps) {
  const { editor, layout, site, readOnly } = subject
  const { dispatch, set, remove } = editor
  const onSelect = useCallback((ids: readonly string[]) => dispatch({ type: 'select', ids }), [dispatch])
  const onSet = useCallback((id: string, change: HeaterChange) => set([id], change), [set])
  const onRemove = useCallback((id: string) => remove([id]), [remove])
  return (
    <HeatersTable
      heaters={layout.heaters}
      models={editor.models}
      site={site}
      selected={editor.state.selected}
      {...{ readOnly, onSelect, onSet, onRemove }}
    />
  )
}
