import { lazy, Suspense, useCallback, useMemo, useState } from 'react'
import type { Brief } from '#app/domain/brief/brief.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { House } from '#app/domain/rules/house.ts'
import type { Site } from '#app/domain/site/site.ts'
import { toleranceOfCovers } from '#app/domain/site/tolerance.ts'
import type { NearestPair } from '#app/drawing/nearest/nearest-dimension.tsx'
import type { SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { ButtonLink } from '#app/components/button.tsx'
import { JobFrame, type Viewer } from '#app/components/page-frame.tsx'
import { shownLayout } from '#app/editor/editor-state.ts'
import type { Kept, Keeping } from '#app/editor/keeping.ts'
import { mapNotes } from '#app/editor/map-notes.ts'
import { emittersOf, mapQuestion, scaleOf } from '#app/editor/map-questions.ts'
import { FiguresRow } from '#app/editor/panels/figures-row.tsx'
import { ConflictPanel } from '#app/editor/panels/conflict-panel.tsx'
import { MapLegend, MapNotes, ToolRow } from '#app/editor/panels/tool-row.tsx'
import { VariantTabs, type VariantTab } from '#app/editor/panels/variant-tabs.tsx'
import { PhoneSections } from '#app/editor/phone-sections.tsx'
import { PlanSurface } from '#app/editor/plan-surface.tsx'
import { useCutting } from '#app/editor/section-line/use-cutting.tsx'
import { pointedStore } from '#app/editor/pointed.ts'
import { SeenAsChoice, type SeenAs } from '#app/editor/seen-as.tsx'
import { SidePanels } from '#app/editor/side-panels.tsx'
import type { SideSubject } from '#app/editor/side-parts.tsx'
import { SaveAndUndo } from '#app/components/save-and-undo.tsx'
import { statusOf } from '#app/editor/save-status.ts'
import { Sections } from '#app/editor/sections.tsx'
import type { ChangeSite } from '#app/editor/site-change.ts'
import { useAutosave } from '#app/editor/use-autosave.ts'
import { useEditor } from '#app/editor/use-editor.ts'
import { useFindingMarks } from '#app/editor/use-finding-marks.ts'
import { useUndoKeys } from '#app/editor/use-undo-keys.ts'
import { useFigures } from '#app/editor/use-figures.ts'
import { useFlux } from '#app/editor/use-flux.ts'
import { useAlive, useMedia, useRoom } from '#app/editor/use-media.ts'
import { useBeat, usePaced } from '#app/editor/use-paced.ts'
import { offeredView, plainView, planeHeight } from '#app/editor/view-choice.ts'

/** Everything the variant page brings to its editor. */
export interface VariantEditorProps {
  readonly viewer: Viewer
  readonly job: { readonly id: string; readonly name: string }
  readonly variantId: string
  readonly variants: readonly VariantTab[]
  readonly initial: Kept<Layout>
  /** The server's newest as far as the page has heard. */
  readonly newest: Kept<Layout>
  readonly site: Site
  readonly brief: Brief
  readonly catalogue: readonly HeaterModel[]
  readonly house: House
  readonly readOnly: boolean
  readonly keeping: Keeping<Layout>
  /** The page about which rough size matters most. */
  readonly sizesHref: string
  /** The picture in space as a file, without its ending; null for who may not take one away. */
  readonly pictureHref: string | null
  /** The page that says how each heater hangs. */
  readonly hangHref: string
  readonly onSite: ChangeSite
  readonly onCreate: () => void
  readonly onDuplicate: () => void
  readonly onDelete: (revision: number) => void
  /** Makes a variant of its own from this layout. */
  readonly onMake: (layout: Layout) => Promise<boolean>
}

const PictureView = lazy(() => import('#app/editor/picture-view.tsx'))
const noCuts: readonly SectionCut[] = []
const noPairs: readonly NearestPair[] = []

/** The variant page: figures, plan, findings and seats of one layout, and the hand that changes it. */
export function VariantEditor(props: VariantEditorProps) {
  const { site, brief, catalogue, house, initial, newest, keeping } = props
  const { rules } = house
  const room = useRoom()
  const touch = useMedia('(pointer: coarse)')
  const readOnly = props.readOnly || room === 'phone'
  const editor = useEditor({ site, brief, catalogue, house, initial: initial.body })
  const { state, dispatch, models } = editor
  const kept = state.history.present
  const layout = shownLayout(state)
  const [wanted, setChoice] = useState(plainView)
  const choice = useMemo(() => offeredView(wanted, layout, models), [wanted, layout, models])
  const [hold, setHold] = useState(true)
  const [explained, setExplained] = useState<string | null>(null)
  const [placing, setPlacing] = useState(false)
  const [pointed] = useState(pointedStore)
  const [seen, setSeen] = useState<SeenAs>('plan')
  const alive = useAlive()

  const onTaken = useCallback(
    (taken: Layout, said: string) => dispatch({ type: 'edit', layout: taken, said }),
    [dispatch],
  )
  const { autosave, state: save } = useAutosave({
    initial,
    newest,
    layout: kept,
    keeping,
    readOnly: props.readOnly,
    onTaken,
  })

  const moving = state.draft !== null
  const beat = useBeat(moving)
  const figures = useFigures({ site, brief, layout, models, house, shade: choice.shade, moving, beat })
  const findingMarks = useFindingMarks(state, dispatch, figures, site.displayUnits)
  const scale = useMemo(() => scaleOf(choice, brief, site.displayUnits), [choice, brief, site])
  const coverTolerance = useMemo(() => toleranceOfCovers(site, rules.toleranceUnstated), [site, rules])
  const question = useMemo(
    () => mapQuestion({ site, brief, layout, models, choice }, scale, moving ? 'coarse' : 'sharp'),
    [site, brief, layout, models, choice, scale, moving],
  )
  const cutting = useCutting(
    { site, brief, layout: kept, models, efficiency: choice.efficiency, selected: state.selected, room, touch },
    props.variantId,
  )
  const { cuts, heat } = cutting
  const flux = useFlux(question, cutting.about, state.dropped)
  const sections = cutting.about ? (
    <Sections
      {...{ site, models, rules, cuts }}
      line={cutting.line}
      layout={kept}
      scale={heat}
      sections={flux.sections}
      selected={state.selected}
      nearest={moving ? noPairs : findingMarks.nearest}
    />
  ) : (
    <p className="px-4.5 py-3.5 text-ink-2">Place a heater to see the section through it.</p>
  )
  const emitters = useMemo(() => emittersOf(layout, models, choice.efficiency), [layout, models, choice.efficiency])
  const notes = mapNotes(choice, flux.answer)
  const onSeat = useCallback((id: string | null) => dispatch({ type: 'seat', id }), [dispatch])
  const explain = useCallback(
    (id: string) => {
      setExplained(id)
      dispatch({ type: 'seat', id })
    },
    [dispatch],
  )
  useUndoKeys(editor.dispatch, readOnly)

  const subject: SideSubject = {
    editor,
    figures,
    layout,
    site,
    brief,
    catalogue,
    choice,
    readOnly,
    hold,
    onHold: setHold,
    explained,
    onExplain: setExplained,
    placing,
    onPlacing: setPlacing,
    onSeat,
    sizesHref: props.sizesHref,
    onSite: props.onSite,
  }
  const legend = {
    scale,
    store: pointed,
    site,
    emitters,
    plane: planeHeight(choice.plane, site),
    answer: flux.answer,
    isFlux: choice.map.kind === 'flux',
  }
  const tools = {
    ...{ site, layout, models, choice, readOnly, legend, notes, placing },
    threshold: rules.overlapThreshold,
    selected: state.selected,
    onChoice: setChoice,
    onPlacing: () => {
      setPlacing(!placing)
      if (placing) dispatch({ type: 'placing', model: null })
    },
  }
  return (
    <JobFrame
      viewer={props.viewer}
      job={props.job}
      current="variants"
      bare
      below={
        <VariantTabs
          variants={props.variants}
          currentId={props.variantId}
          title={kept.title}
          readOnly={readOnly}
          onCreate={props.onCreate}
          onDuplicate={props.onDuplicate}
          onRename={(title) => editor.edit({ ...kept, title }, state.selected, 'Renamed')}
          onDelete={() => props.onDelete(autosave.revision())}
        >
          {alive && <SeenAsChoice seen={seen} onSeen={setSeen} />}
          <ButtonLink kind="text" size="small" to={props.hangHref}>
            Hang schedule
          </ButtonLink>
        </VariantTabs>
      }
      tools={
        <SaveAndUndo
          status={statusOf(save, props.readOnly)}
          onRetry={autosave.retry}
          history={readOnly ? null : state.history}
          onUndo={() => dispatch({ type: 'undo' })}
          onRedo={() => dispatch({ type: 'redo' })}
        />
      }
    >
      <h1 className="sr-only">
        {kept.title}, a variant of {props.job.name}
      </h1>
      <p role="status" className="sr-only">
        {state.said}
      </p>
      <div className="flex min-h-0 flex-1 flex-col desk:h-[calc(100dvh-5.8125rem)] desk:flex-none desk:flex-row">
        <div className="flex min-h-0 min-w-0 flex-1 flex-col">
          {save.kind === 'conflict' && (
            <ConflictPanel
              conflict={save.conflict}
              units={site.displayUnits}
              onSettle={(settled) => {
                editor.edit(settled, state.selected, 'Saved together')
                autosave.settle(settled)
              }}
              onTwoVariants={async () => {
                const { mine, theirs } = save.conflict
                if (!(await props.onMake({ ...mine, title: `${mine.title.slice(0, 108)} (yours)` }))) return
                editor.edit(theirs.body, [], 'Two variants made')
                autosave.settle(theirs.body)
              }}
            />
          )}
          <FiguresRow
            totals={figures.totals}
            warmth={figures.warmth}
            brief={brief}
            units={site.displayUnits}
            fluxUnit={choice.fluxUnit}
            onExplain={explain}
          >
            {room === 'tablet' && <MapLegend {...legend} />}
          </FiguresRow>
          {seen === 'picture' ? (
            <Suspense fallback={<p className="p-4 text-ink-2">Drawing the picture</p>}>
              <PictureView
                {...{ site, brief, layout, models, rules, choice, notes }}
                picture={flux.answer?.picture ?? null}
                exports={props.pictureHref}
              />
            </Suspense>
          ) : (
            <>
              {room === 'tablet' ? (
                <div className="px-4.5">
                  <MapNotes notes={notes} />
                </div>
              ) : (
                <ToolRow {...tools} />
              )}
              <PlanSurface
                {...{ state, dispatch, site, models, rules, choice, scale, flux, readOnly, hold, touch, pointed }}
                warmth={figures.warmth}
                cuts={cutting.about ? cuts : noCuts}
                words={room === 'desk'}
                coverTolerance={coverTolerance}
                onPlace={editor.placeAt}
                onSeat={explain}
                {...findingMarks}
                over={cutting.overPlan}
              />
              {room === 'desk' && cutting.about && (
                <div className="h-[clamp(9rem,24dvh,13.75rem)] flex-none border-t border-[#26324c]">{sections}</div>
              )}
              {room === 'phone' && cuts.length > 0 && (
                <PhoneSections wanted={cutting.wanted} onWanted={cutting.onWanted} drawn={sections} />
              )}
            </>
          )}
        </div>
        <SidePanels
          subject={usePaced(subject, moving, beat)}
          room={room}
          tools={room === 'tablet' ? <ToolRow {...tools} bare /> : null}
          sections={room === 'tablet' ? { drawn: sections, onWanted: cutting.onWanted } : null}
        />
      </div>
    </JobFrame>
  )
}
