import { memo, useEffect, useMemo, useRef, type KeyboardEvent, type PointerEvent } from 'react'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import type { HeatPicture } from '#app/drawing/heat/contours.ts'
import type { MapAnswer } from '#app/drawing/heat/map-picture.ts'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import { screenPen } from '#app/drawing/pen.ts'
import { Plan, type PlanDetail } from '#app/drawing/plan/plan-drawing.tsx'
import { toScreen, toSite, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { SeatSign } from '#app/drawing/plan/seat.tsx'
import type { LinkedViews } from '#app/editor/compare/use-linked-views.ts'
import { emittersOf } from '#app/editor/map-questions.ts'
import { usePointed, type PointedStore } from '#app/editor/pointed.ts'
import { ReadOut } from '#app/editor/read-out.tsx'
import { keyActionOf } from '#app/editor/tools/keys.ts'

interface ComparedMapProps {
  /** Unique in the page. */
  readonly name: string
  /** What the drawing shows, for readers. */
  readonly label: string
  readonly site: Site
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  /** What each seat's disc says. */
  readonly signs: ReadonlyMap<string, SeatSign>
  readonly plane: number
  readonly answer: MapAnswer | null
  readonly quantity: QuantityScale
  /** Whether the tag says the map's own value beside the irradiance. */
  readonly ownValue: boolean
  readonly views: LinkedViews
  readonly pointed: PointedStore
}

const pen = screenPen('dusk')
const detail: PlanDetail = { names: false, spacings: true, overall: false, scaleBar: false, lineFigures: true }

/** One of the maps beside each other: the same view, the same pointer, the same scale as the others. */
export function ComparedMap(props: ComparedMapProps) {
  const { name, label, site, layout, models, answer, signs, quantity, views, pointed, plane } = props
  const { view, join } = views
  const svg = useRef<SVGSVGElement>(null)
  const emitters = useMemo(() => emittersOf(layout, models), [layout, models])
  const hand = useMapHand(svg, views, pointed)
  const { width, height } = view
  return (
    <div className="relative overflow-hidden bg-dusk-ground">
      <svg
        ref={svg}
        width={width}
        height={height}
        viewBox={`0 0 ${width} ${height}`}
        tabIndex={0}
        role="application"
        aria-label={`${label}. Arrows move the point that is read, + and − change the size.`}
        className="block h-auto w-full touch-pan-y select-none focus-visible:-outline-offset-2"
        {...hand}
      >
        <g ref={join}>
          <StillPlan
            {...{ name, site, layout, models, quantity, signs }}
            picture={answer?.picture ?? null}
            view={view}
          />
        </g>
      </svg>
      <ReadOut
        store={pointed}
        site={site}
        emitters={emitters}
        plane={plane}
        answer={answer}
        scale={quantity}
        mapKind={props.ownValue ? 'overlap' : 'flux'}
        fluxUnit="W/m²"
        width={width}
        height={height}
        coverTolerance={null}
      />
      <PointedSeat site={site} view={view} pointed={pointed} />
    </div>
  )
}

interface StillPlanProps {
  name: string
  site: Site
  layout: Layout
  models: ReadonlyMap<string, HeaterModel>
  view: PlanView
  quantity: QuantityScale
  picture: HeatPicture | null
  signs: ReadonlyMap<string, SeatSign>
}

/** Drawn again only when what it shows changes, not with the pointer. */
const StillPlan = memo(function StillPlan(props: StillPlanProps) {
  return <Plan {...props} pen={pen} detail={detail} />
})

function PointedSeat({ site, view, pointed }: { site: Site; view: PlanView; pointed: PointedStore }) {
  const now = usePointed(pointed)
  const seat = site.seats.find(({ id }) => id === now?.seatId)
  if (!seat) return null
  const [x, y] = toScreen(view, [seat.x, seat.y])
  return (
    <svg aria-hidden="true" className="pointer-events-none absolute inset-0 h-full w-full">
      <circle cx={x} cy={y} r="19" fill="none" stroke="var(--color-dusk-select)" strokeWidth="1.8" />
    </svg>
  )
}

/** Pointer, wheel, two fingers and keys on one map; all maps follow. */
function useMapHand(svg: { current: SVGSVGElement | null }, views: LinkedViews, pointed: PointedStore) {
  const fingers = useRef(new Map<number, Vec2>())
  const placeOf = (event: { clientX: number; clientY: number }): Vec2 => {
    const box = svg.current?.getBoundingClientRect()
    const shrunk = box && box.width > 0 ? views.view.width / box.width : 1
    return [(event.clientX - (box?.left ?? 0)) * shrunk, (event.clientY - (box?.top ?? 0)) * shrunk]
  }
  const point = (screen: Vec2, by: 'pointer' | 'focus') =>
    pointed.set({ at: toSite(views.wanted(), screen), screen, seatId: null, by })

  useEffect(() => {
    const element = svg.current
    const turned = (event: WheelEvent) => {
      if (!event.ctrlKey && !event.metaKey) return
      event.preventDefault()
      views.enlargeAt(Math.exp(-event.deltaY / 300), placeOf(event))
    }
    element?.addEventListener('wheel', turned, { passive: false })
    return () => element?.removeEventListener('wheel', turned)
  })

  return {
    onPointerDown(event: PointerEvent) {
      fingers.current.set(event.pointerId, placeOf(event))
      if (event.pointerType === 'mouse') svg.current?.setPointerCapture(event.pointerId)
      else point(placeOf(event), 'pointer')
    },
    onPointerMove(event: PointerEvent) {
      const screen = placeOf(event)
      const before = fingers.current.get(event.pointerId)
      const other = [...fingers.current].find(([id]) => id !== event.pointerId)?.[1]
      if (before && other) views.pinchBy([before, other], [screen, other])
      else if (before && event.pointerType === 'mouse') views.shiftBy(screen[0] - before[0], screen[1] - before[1])
      if (before) fingers.current.set(event.pointerId, screen)
      point(screen, 'pointer')
    },
    onPointerUp: (event: PointerEvent) => void fingers.current.delete(event.pointerId),
    onPointerCancel: (event: PointerEvent) => void fingers.current.delete(event.pointerId),
    onPointerLeave: () => pointed.set(null),
    onBlur: () => pointed.set(null),
    onKeyDown(event: KeyboardEvent) {
      const action = keyActionOf(event)
      if (action?.kind === 'enlarge') views.enlargeAt(action.factor)
      else if (action?.kind === 'whole plan') views.showAll()
      else if (action?.kind === 'let go') pointed.set(null)
      else if (action?.kind === 'nudge') {
        const view = views.wanted()
        const [x, y] = pointed.get()?.at ?? toSite(view, [view.width / 2, view.height / 2])
        const step = event.shiftKey ? 5 : 10
        point(toScreen(view, [x + step * action.dx, y + step * action.dy]), 'pointer')
      } else return
      event.preventDefault()
    },
  }
}
