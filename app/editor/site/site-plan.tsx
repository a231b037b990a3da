import { memo, useEffect, useMemo, useRef, useState, type RefObject } from 'react'
import { refusalOf } from '#app/domain/site/site-faults.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { irradianceScale } from '#app/drawing/heat/quantity.ts'
import { screenPen, type Pen } from '#app/drawing/pen.ts'
import { CoverMark, LevelMark } from '#app/drawing/plan/cover-mark.tsx'
import { patch } from '#app/drawing/plan/occupied.ts'
import { Plan } from '#app/drawing/plan/plan-drawing.tsx'
import { workingMargins, type PlanView } from '#app/drawing/plan/plan-view.ts'
import { SizeTags } from '#app/drawing/plan/size-tags.tsx'
import { IconButton } from '#app/components/button.tsx'
import { pointedStore } from '#app/editor/pointed.ts'
import type { Chosen } from '#app/editor/site/choice.ts'
import { chosenWords } from '#app/editor/site/chosen.ts'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { HandleMarks } from '#app/editor/site/handle-marks.tsx'
import { PointedHeights } from '#app/editor/site/pointed-heights.tsx'
import { ChosenMarks, ThingMarks } from '#app/editor/site/thing-mark.tsx'
import { TracedPicture } from '#app/editor/site/traced-picture.tsx'
import { useFittedFloor } from '#app/editor/site/use-fitted-floor.ts'
import { useSiteGestures, type SiteDraft, type SiteHand } from '#app/editor/site/use-site-gestures.ts'
import { useSiteKeys } from '#app/editor/site/use-site-keys.ts'
import type { KeyAction } from '#app/editor/tools/keys.ts'
import { usePlanView, type PlanViewing } from '#app/editor/use-plan-view.ts'
import { useSize } from '#app/editor/use-size.ts'

interface SitePlanProps {
  readonly theme: 'dusk' | 'day'
  readonly chosen: Chosen | null
  /** Something waits for a click on the floor. */
  readonly adding: boolean
  /** Every named size with its tolerance and source; assumed ones show always. */
  readonly sizes: boolean
  readonly onChoose: (chosen: Chosen | null) => void
  readonly onAdd: (at: Vec2) => void
  readonly onKey: (action: KeyAction) => boolean
}

const noLayout = { title: '', heaters: [] }
const noModels = new Map<string, never>()
const noSigns = new Map<string, never>()

/** The plan of the cold site: everything is chosen, dragged and nudged; corners and ends move by themselves. */
export function SitePlan({ theme, chosen, adding, sizes, onChoose, onAdd, onKey }: SitePlanProps) {
  const { site, readOnly, change } = useSiteEditing()
  const box = useRef<HTMLDivElement>(null)
  const ground = useRef<SVGSVGElement>(null)
  const moving = useRef<HTMLDivElement>(null)
  const size = useSize(box, { width: 860, height: 560 })
  const viewing = usePlanView(useFittedFloor(site), size, workingMargins, moving)
  const [draft, setDraft] = useState<SiteDraft | null>(null)
  const [note, setNote] = useState<string | null>(null)
  const [pointed] = useState(pointedStore)
  const pen = useMemo(() => screenPen(theme), [theme])

  const keep: SiteHand['onKeep'] = (edit, next) => {
    const refusal = refusalOf(site, edit(site))
    setNote(refusal && `Left as it was. ${refusal.message}`)
    if (refusal) return
    change(edit)
    onChoose(next)
  }
  const common = { site, chosen, readOnly, viewing, onDraft: setDraft, onKeep: keep }
  const choose = (next: Chosen | null) => {
    setNote(null)
    onChoose(next)
  }
  const gestures = useSiteGestures(box, {
    ...common,
    adding,
    onChoose: choose,
    onAdd,
    onPoint: (at) => pointed.set(at && { at, screen: at, seatId: null, by: 'pointer' }),
  })
  const keys = useSiteKeys({ ...common, dropGesture: gestures.drop, onKey })
  useWheel(box, viewing)
  useHidden(ground, draft?.chosen ?? null)

  const shown = draft ?? (chosen && { site, chosen })
  const { view } = viewing
  const sheet = { width: view.width, height: view.height, className: 'absolute inset-0 overflow-visible' }
  return (
    <div
      ref={box}
      className={`relative h-72 overflow-hidden rounded-md border border-rule select-none tablet:h-[min(60dvh,32rem)] ${theme === 'day' ? 'bg-white' : 'bg-dusk-ground'}`}
    >
      <div ref={moving} className="absolute inset-0 origin-top-left">
        <svg ref={ground} {...sheet} aria-hidden="true">
          <SiteGround site={site} view={view} pen={pen} theme={theme} sizes={sizes} />
        </svg>
        {site.trace && <TracedPicture trace={site.trace} view={view} theme={theme} />}
        {/* The drawing is moved in with the keyboard as a whole; its things are rows of the lists beside it. */}
        <svg
          {...sheet}
          tabIndex={0}
          role="application"
          aria-label={`Plan of the site. ${chosen ? `${chosenWords(site, chosen)} chosen: arrows move by 10 mm, with Shift 100 mm.` : 'Choose things in the lists.'}`}
          className={`${sheet.className} touch-none [will-change:transform] ${adding ? 'cursor-crosshair' : ''}`}
          {...gestures.handlers}
          {...keys}
        >
          <rect x={-20_000} y={-20_000} width={40_000} height={40_000} fill="transparent" />
          <g pointerEvents="none">
            {draft && <ThingMarks {...draft} view={view} pen={pen} />}
            {shown && <ChosenMarks {...shown} view={view} pen={pen} />}
            {shown && !readOnly && <HandleMarks {...shown} view={view} pen={pen} />}
          </g>
        </svg>
      </div>
      <PointedHeights store={pointed} site={site} />
      {note && (
        <p
          role="status"
          className="absolute inset-x-4 top-12 rounded-sm bg-paper-raised px-2 py-1 text-center text-clay shadow-lift"
        >
          {note}
        </p>
      )}
      <p className="absolute bottom-2 left-2 flex rounded-md bg-paper-raised/90 print:hidden">
        <IconButton icon="minus" label="Smaller" onClick={() => viewing.enlargeAt(0.8)} />
        <IconButton icon="plus" label="Larger" onClick={() => viewing.enlargeAt(1.25)} />
        <IconButton icon="fit" label="Whole plan" onClick={viewing.showAll} />
      </p>
    </div>
  )
}

interface GroundProps {
  readonly site: Site
  readonly view: PlanView
  readonly pen: Pen
  readonly theme: 'dusk' | 'day'
  readonly sizes: boolean
}

/** Everything that stays while something is dragged: drawn anew only when the site or the view is another. */
const SiteGround = memo(function SiteGround({ site, view, pen, theme, sizes }: GroundProps) {
  const quantity = useMemo(() => irradianceScale(theme, { low: 150, high: 350 }), [theme])
  return (
    <>
      <Plan
        name="site-plan"
        {...{ site, view, pen, quantity }}
        layout={noLayout}
        models={noModels}
        picture={null}
        signs={noSigns}
      />
      {site.levels.map((level) => (
        <LevelMark key={level.id} level={level} view={view} pen={pen} units={site.displayUnits} />
      ))}
      {site.covers.map((cover) => (
        <CoverMark key={cover.id} cover={cover} view={view} pen={pen} />
      ))}
      <SizeTags site={site} view={view} pen={pen} all={sizes} beside={[patch(70, view.height - 28, 140, 56)]} />
    </>
  )
})

/** Hides what is being dragged where it was, without drawing the rest anew. */
function useHidden(ground: RefObject<SVGSVGElement | null>, chosen: Chosen | null) {
  const key = chosen && `${chosen.kind} ${chosen.ids.join(' ')}`
  const latest = useRef(chosen)
  useEffect(() => {
    latest.current = chosen
  })
  useEffect(() => {
    const { kind, ids } = latest.current ?? { kind: 'floor', ids: [] }
    if (key === null || kind === 'floor') return
    const marks = ids.flatMap(
      (id) => ground.current?.querySelector<SVGElement>(`[data-${kind}="${CSS.escape(id)}"]`) ?? [],
    )
    for (const mark of marks) mark.style.visibility = 'hidden'
    return () => {
      for (const mark of marks) mark.style.visibility = ''
    }
  }, [ground, key])
}

/** A wheel and a pinch enlarge about the pointer, two fingers on a pad shift. */
function useWheel(box: RefObject<HTMLDivElement | null>, viewing: PlanViewing) {
  const latest = useRef(viewing)
  useEffect(() => {
    latest.current = viewing
  })
  useEffect(() => {
    const element = box.current
    const turned = (event: WheelEvent) => {
      event.preventDefault()
      const place = element?.getBoundingClientRect()
      const at: Vec2 = [event.clientX - (place?.left ?? 0), event.clientY - (place?.top ?? 0)]
      if (event.ctrlKey || Math.abs(event.deltaX) < 1) latest.current.enlargeAt(Math.exp(-event.deltaY / 400), at)
      else latest.current.shiftBy(-event.deltaX, -event.deltaY)
    }
    element?.addEventListener('wheel', turned, { passive: false })
    return () => element?.removeEventListener('wheel', turned)
  }, [box])
}
