import {
  useEffect,
  useMemo,
  useRef,
  useState,
  type Dispatch,
  type FocusEvent,
  type ReactNode,
  type RefObject,
} from 'react'
import type { SeatFigures } from '#app/domain/comfort/seat-warmth.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { PlanCaution } from '#app/domain/rules/cautions-on-plan.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import { screenPen } from '#app/drawing/pen.ts'
import { toScreen, workingMargins, type PlanMargins, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { shownLayout, type EditorAction, type EditorState } from '#app/editor/editor-state.ts'
import { emittersOf } from '#app/editor/map-questions.ts'
import type { ShownNearest } from '#app/editor/nearest-shown.ts'
import { PlanFindings } from '#app/editor/plan-findings.tsx'
import { PlanMarks, PlanScaleBar, PlanUnder } from '#app/editor/plan-marks.tsx'
import { HoldLines, Marquee, PlanHandles } from '#app/editor/plan-overlay.tsx'
import type { PointedStore } from '#app/editor/pointed.ts'
import { ReadOut } from '#app/editor/read-out.tsx'
import type { FluxView } from '#app/editor/use-flux.ts'
import { usePlanGestures } from '#app/editor/use-plan-gestures.ts'
import { usePlanKeys } from '#app/editor/use-plan-keys.ts'
import { SizeButtons } from '#app/editor/size-buttons.tsx'
import { usePlanView, type PlanViewing } from '#app/editor/use-plan-view.ts'
import { useSize } from '#app/editor/use-size.ts'
import { planeHeight, type ViewChoice } from '#app/editor/view-choice.ts'

interface PlanSurfaceProps {
  readonly state: EditorState
  readonly dispatch: Dispatch<EditorAction>
  readonly site: Site
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly rules: HouseRules
  readonly warmth: readonly SeatFigures[]
  readonly choice: ViewChoice
  readonly scale: QuantityScale
  readonly flux: FluxView
  readonly cuts: readonly SectionCut[]
  readonly pointed: PointedStore
  readonly readOnly: boolean
  readonly hold: boolean
  readonly touch: boolean
  /** Names, dimensions and section marks around the floor. */
  readonly words: boolean
  readonly coverTolerance: number | null
  readonly onPlace: (at: Vec2, free: boolean) => void
  readonly onSeat: (id: string) => void
  /** Pairs and cautions that the findings have to show; none while something moves. */
  readonly nearest: readonly ShownNearest[]
  readonly cautions: readonly PlanCaution[]
  readonly onFinding: (finding: Finding) => void
  /** More to take hold of, over everything else. */
  readonly over?: ((view: PlanView) => ReactNode) | null
}

const pen = screenPen('dusk')
/** A pointer anywhere in the frame is on the plan, wherever the drawing is shifted to. */
const far = { x: -20_000, y: -20_000, width: 40_000, height: 40_000 }
/** On small screens, without names, with the buttons for the size at the left. */
const narrowMargins: PlanMargins = { top: 26, right: 28, bottom: 46, left: 54 }
/** The same with room for the marks of sections. */
const cutMargins: PlanMargins = { top: 60, right: 28, bottom: 60, left: 54 }

const marginsOf = ({ words, cuts }: Pick<PlanSurfaceProps, 'words' | 'cuts'>): PlanMargins =>
  words ? workingMargins : cuts.length > 0 ? cutMargins : narrowMargins

/** The plan to work on: pointer, wheel, fingers and keys; the map below, handles and the tag above. */
export function PlanSurface(props: PlanSurfaceProps) {
  const { state, dispatch, site, models, rules, choice, scale, flux, readOnly, hold, touch, pointed } = props
  const box = useRef<HTMLDivElement>(null)
  const svg = useRef<SVGSVGElement>(null)
  const moving = useRef<HTMLDivElement>(null)
  const [marquee, setMarquee] = useState<readonly [Vec2, Vec2] | null>(null)
  const size = useSize(box, { width: 1000, height: 528 })
  const viewing = usePlanView(site, size, marginsOf(props), moving)
  const { view } = viewing
  const layout = shownLayout(state)
  const kept = state.history.present
  const plane = planeHeight(choice.plane, site)
  const emitters = useMemo(() => emittersOf(layout, models, choice.efficiency), [layout, models, choice.efficiency])
  const selected = useMemo(() => new Set(state.selected), [state.selected])
  const say = (metres: number) => formatLength(metres, site.displayUnits)
  const gestures = usePlanGestures(box, svg, {
    start: { site, models, rules, layout: kept, plane, say },
    selected: state.selected,
    readOnly,
    hold,
    placing: state.placing !== null,
    viewing,
    dispatch,
    onPlace: props.onPlace,
    onSeat: props.onSeat,
    onMarquee: setMarquee,
    onPoint: (event, at, screen) =>
      pointed.set(event.pointerType === 'touch' ? null : { at, screen, seatId: null, by: 'pointer' }),
    onHide: () => pointed.set(null),
  })
  const keys = usePlanKeys({
    layout: kept,
    selected: state.selected,
    site,
    models,
    rules,
    readOnly,
    dispatch,
    onLetGo: gestures.dropGesture,
    onEnlarge: (factor) => viewing.enlargeAt(factor),
    onWholePlan: viewing.showAll,
    onSeat: props.onSeat,
  })
  useWheel(box, viewing)

  const lead = layout.heaters.find((heater) => heater.id === state.selected[0])
  const onFocus = (event: FocusEvent<SVGSVGElement>) => {
    const id = event.target.getAttribute('data-object')
    const seat = site.seats.find((each) => each.id === id)
    const heater = layout.heaters.find((each) => each.id === id)
    const place = seat ?? heater
    if (!place || !event.target.matches(':focus-visible')) return
    const at: Vec2 = [place.x, place.y]
    pointed.set({ at, screen: toScreen(viewing.wanted(), at), seatId: seat?.id ?? null, by: 'focus' })
  }
  const sheet = { width: view.width, height: view.height, viewBox: `0 0 ${view.width} ${view.height}` }
  return (
    <div
      ref={box}
      className="relative min-h-64 flex-1 overflow-hidden bg-dusk-ground select-none max-tablet:h-[62vw] max-tablet:flex-none"
    >
      <div ref={moving} className="absolute inset-0 origin-top-left">
        <svg {...sheet} className="absolute inset-0 overflow-visible [will-change:transform]">
          <PlanUnder
            {...{ site, models, view, pen, scale }}
            layout={kept}
            picture={flux.answer?.picture ?? null}
            figures={state.draft === null}
            words={props.words}
            cuts={props.cuts}
            label={`${scale.name} at ${say(plane)} above the floor`}
          />
        </svg>
        <svg
          ref={svg}
          {...sheet}
          tabIndex={-1}
          role="group"
          aria-label={`Plan of ${site.name}`}
          className={`absolute inset-0 touch-none overflow-visible [will-change:transform] outline-none ${state.placing ? 'cursor-copy' : ''}`}
          onPointerDown={gestures.onPointerDown}
          onPointerMove={gestures.onPointerMove}
          onPointerUp={gestures.onPointerUp}
          onPointerCancel={gestures.onPointerCancel}
          onPointerLeave={() => pointed.set(null)}
          onKeyDown={keys.onKeyDown}
          onKeyUp={keys.onKeyUp}
          onFocus={onFocus}
          onBlur={() => {
            keys.onBlur()
            pointed.set(null)
          }}
        >
          <rect {...far} fill="transparent" />
          <PlanMarks
            {...{ site, layout, kept, models, view, pen, selected, readOnly }}
            warmth={props.warmth}
            seatId={state.seatId}
            cuts={props.cuts}
            fluxUnit={choice.fluxUnit}
            words={props.words}
          />
          {state.draft === null && (
            <PlanFindings
              {...{ site, models, view, pen }}
              layout={kept}
              nearest={props.nearest}
              cautions={props.cautions}
              words={props.words}
              onFinding={props.onFinding}
            />
          )}
          {state.draft && <HoldLines lines={state.draft.lines} view={view} />}
          {marquee && <Marquee corners={marquee} view={view} />}
          {lead && !readOnly && state.selected.length === 1 && (
            <PlanHandles heater={lead} model={models.get(lead.model)} view={view} plane={plane} touch={touch} />
          )}
          {props.over?.(view)}
        </svg>
      </div>
      {props.words && (
        <svg {...sheet} className="pointer-events-none absolute inset-0">
          <PlanScaleBar view={view} pen={pen} units={site.displayUnits} />
        </svg>
      )}
      <ReadOut
        store={pointed}
        {...{ site, emitters, plane, scale }}
        answer={flux.answer}
        mapKind={choice.map.kind}
        fluxUnit={choice.fluxUnit}
        width={view.width}
        height={view.height}
        coverTolerance={props.coverTolerance}
      />
      <PlanNotes {...{ state, site, flux, touch }} />
      <SizeButtons viewing={viewing} />
    </div>
  )
}

/** Wheel and trackpad: a wheel and a pinch enlarge about the pointer, two fingers shift. */
function useWheel(box: RefObject<HTMLDivElement | null>, viewing: PlanViewing) {
  const latest = useRef(viewing)
  useEffect(() => {
    latest.current = viewing
  })
  useEffect(() => {
    const element = box.current
    if (!element) return
    const onWheel = (event: WheelEvent) => {
      event.preventDefault()
      const { left, top } = element.getBoundingClientRect()
      const at: Vec2 = [event.clientX - left, event.clientY - top]
      const unit = event.deltaMode === 1 ? 16 : 1
      const fromWheel = event.deltaX === 0 && Math.abs(event.deltaY * unit) >= 40
      if (event.ctrlKey) return latest.current.enlargeAt(Math.exp(-event.deltaY * unit * 0.01), at)
      if (fromWheel) return latest.current.enlargeAt(Math.exp(-event.deltaY * unit * 0.0015), at)
      latest.current.shiftBy(-event.deltaX * unit, -event.deltaY * unit)
    }
    element.addEventListener('wheel', onWheel, { passive: false })
    return () => element.removeEventListener('wheel', onWheel)
  }, [box])
}

interface PlanNotesProps {
  readonly state: EditorState
  readonly site: Site
  readonly flux: FluxView
  readonly touch: boolean
}

/** Lines over the plan: why something stands where it stands, an empty layout, a map that is slow or cannot be made. */
function PlanNotes({ state, site, flux, touch }: PlanNotesProps) {
  const layout = shownLayout(state)
  const lead = layout.heaters.find((heater) => heater.id === state.selected[0])
  const say = (metres: number) => formatLength(metres, site.displayUnits)
  const reason = state.draft?.reason
  return (
    <div className="pointer-events-none absolute inset-x-0 top-2 flex flex-col items-center gap-1.5 px-4 text-center max-desk:px-14">
      {state.draft && lead && (
        <p className="rounded-sm bg-[#fbf7f0] px-2 py-1 text-xs text-[#1d2233]">
          <b className="font-strong">
            {lead.id} at {say(lead.x)}, {say(lead.y)}
          </b>
          {reason && ` ${reason}${touch ? '' : ' Alt lets go.'}`}
        </p>
      )}
      {layout.heaters.length === 0 && (
        <p className="mt-6 bg-dusk-ground/80 px-2 text-base text-dusk-line max-desk:mt-12">
          No heaters yet. Place one on a beam to see the map.
        </p>
      )}
      <MapNote flux={flux} />
    </div>
  )
}

function MapNote({ flux }: { flux: FluxView }) {
  const said = {
    broken: 'No map: it could not be computed on this device. The seats’ figures are exact.',
    slow: 'The map is being computed.',
    stopped: 'The map was stopped. The seats’ figures are exact.',
  }
  if (flux.state !== 'broken' && flux.state !== 'slow' && flux.state !== 'stopped') return null
  const [word, act] = flux.state === 'slow' ? ['Cancel', flux.stop] : ['Try again', flux.retry]
  return (
    <p role="status" className="pointer-events-auto rounded-sm bg-[#fbf7f0] px-2 py-1 text-xs text-[#1d2233]">
      {said[flux.state]}{' '}
      <button type="button" onClick={act} className="min-h-6 cursor-pointer underline pointer-coarse:min-h-11">
        {word}
      </button>
    </p>
  )
}
