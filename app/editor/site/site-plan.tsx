import { useEffect, useMemo, useRef, useState, type KeyboardEvent, type PointerEvent } from 'react'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { irradianceScale } from '#app/drawing/heat/quantity.ts'
import { screenPen } from '#app/drawing/pen.ts'
import { Plan } from '#app/drawing/plan/plan-drawing.tsx'
import { seatRadius } from '#app/drawing/plan/seat.tsx'
import { toScreen, toSite, workingMargins, type PlanView } from '#app/drawing/plan/plan-view.ts'
import { IconButton } from '#app/components/button.tsx'
import { chosenAfterClick, chosenWords, moveChosen, type Chosen } from '#app/editor/site/chosen.ts'
import { keyActionOf, type KeyAction } from '#app/editor/tools/keys.ts'
import { usePlanView } from '#app/editor/use-plan-view.ts'
import { useSize } from '#app/editor/use-size.ts'

interface SitePlanProps {
  readonly site: Site
  readonly theme: 'dusk' | 'day'
  readonly chosen: Chosen | null
  readonly readOnly: boolean
  /** What a click on the floor adds; null when it only lets go. */
  readonly adding: 'seat' | 'member' | null
  readonly onChoose: (chosen: Chosen | null) => void
  readonly onMove: (chosen: Chosen, dx: number, dy: number) => void
  readonly onAdd: (at: Vec2) => void
  readonly onKey: (action: KeyAction) => boolean
}

const noLayout = { title: '', heaters: [] }
const noModels = new Map<string, never>()
const noSigns = new Map<string, never>()

interface Drag {
  readonly chosen: Chosen
  readonly from: Vec2
  readonly to: Vec2
  readonly moved: boolean
}

/** Pixels a pointer moves before it is a drag. */
const slack = 4
const rounded = (metres: number): number => Math.round(metres * 100) / 100

/** The plan of the cold site: seats and members are chosen, dragged and nudged; the floor is clicked to add one. */
export function SitePlan(props: SitePlanProps) {
  const { site, theme, chosen, readOnly, adding, onChoose, onMove, onAdd, onKey } = props
  const box = useRef<HTMLDivElement>(null)
  const svg = useRef<SVGSVGElement>(null)
  const moving = useRef<SVGGElement>(null)
  const size = useSize(box, { width: 860, height: 560 })
  const viewing = usePlanView(site, size, workingMargins, moving)
  const [drag, setDrag] = useState<Drag | null>(null)
  const pan = useRef<Vec2 | null>(null)
  const pen = useMemo(() => screenPen(theme), [theme])
  const quantity = useMemo(() => irradianceScale(theme, { low: 150, high: 350 }), [theme])
  const shown = drag?.moved
    ? moveChosen(site, drag.chosen, rounded(drag.to[0] - drag.from[0]), rounded(drag.to[1] - drag.from[1]))
    : site

  useEffect(() => {
    const element = svg.current
    const turned = (event: WheelEvent) => {
      event.preventDefault()
      const place = element?.getBoundingClientRect()
      const at: Vec2 = [event.clientX - (place?.left ?? 0), event.clientY - (place?.top ?? 0)]
      if (event.ctrlKey || Math.abs(event.deltaX) < 1) viewing.enlargeAt(Math.exp(-event.deltaY / 400), at)
      else viewing.shiftBy(-event.deltaX, -event.deltaY)
    }
    element?.addEventListener('wheel', turned, { passive: false })
    return () => element?.removeEventListener('wheel', turned)
  })

  const screenOf = (event: PointerEvent): Vec2 => {
    const place = svg.current?.getBoundingClientRect()
    return [event.clientX - (place?.left ?? 0), event.clientY - (place?.top ?? 0)]
  }
  const siteOf = (event: PointerEvent) => toSite(viewing.wanted(), screenOf(event))

  const down = (event: PointerEvent<SVGSVGElement>) => {
    if (event.button > 0) return
    svg.current?.setPointerCapture(event.pointerId)
    const hit = hitOf(event.target)
    if (!hit) {
      pan.current = screenOf(event)
      return
    }
    const kept = chosen?.kind === 'seat' && hit.kind === 'seat' && chosen.ids.includes(hit.ids[0] ?? '')
    const next = kept && !event.shiftKey ? chosen : chosenAfterClick(chosen, hit, event.shiftKey)
    onChoose(next)
    if (!readOnly) setDrag({ chosen: next, from: siteOf(event), to: siteOf(event), moved: false })
  }
  const move = (event: PointerEvent<SVGSVGElement>) => {
    if (drag) {
      const to = siteOf(event)
      const far = Math.hypot(to[0] - drag.from[0], to[1] - drag.from[1]) * viewing.view.scale > slack
      setDrag({ ...drag, to, moved: drag.moved || far })
    } else if (pan.current && event.buttons === 1 && !adding) {
      const at = screenOf(event)
      viewing.shiftBy(at[0] - pan.current[0], at[1] - pan.current[1])
      pan.current = at
    }
  }
  const up = (event: PointerEvent<SVGSVGElement>) => {
    if (drag?.moved) onMove(drag.chosen, rounded(drag.to[0] - drag.from[0]), rounded(drag.to[1] - drag.from[1]))
    else if (!drag && pan.current && adding) onAdd(siteOf(event))
    else if (!drag && pan.current && !hitOf(event.target)) onChoose(null)
    setDrag(null)
    pan.current = null
  }
  const key = (event: KeyboardEvent) => {
    const action = keyActionOf(event)
    if (!action) return
    if (action.kind === 'let go' && drag) setDrag(null)
    else if (action.kind === 'enlarge') viewing.enlargeAt(action.factor)
    else if (action.kind === 'whole plan') viewing.showAll()
    else if (!onKey(action)) return
    event.preventDefault()
  }

  return (
    <div
      ref={box}
      className={`relative h-72 overflow-hidden rounded-md border border-rule tablet:h-[min(60dvh,32rem)] ${theme === 'day' ? 'bg-white' : 'bg-dusk-ground'}`}
    >
      {/* The drawing is moved in with the keyboard as a whole; its things are rows of the tables beside it. */}
      <svg
        ref={svg}
        width={size.width}
        height={size.height}
        tabIndex={0}
        role="application"
        aria-label={`Plan of the site. ${chosen ? `${chosenWords(site, chosen)} chosen: arrows move by 10 mm, with Shift 100 mm.` : 'Choose seats and members in the tables.'}`}
        className={`block touch-none select-none ${adding ? 'cursor-crosshair' : ''}`}
        onPointerDown={down}
        onPointerMove={move}
        onPointerUp={up}
        onPointerCancel={() => setDrag(null)}
        onKeyDown={key}
      >
        <g ref={moving}>
          <Plan
            name="site-plan"
            site={shown}
            layout={noLayout}
            models={noModels}
            view={viewing.view}
            pen={pen}
            quantity={quantity}
            picture={null}
            signs={noSigns}
          />
          {chosen && <ChosenMarks site={shown} chosen={chosen} view={viewing.view} theme={theme} />}
        </g>
      </svg>
      <p className="absolute top-2 right-2 flex rounded-md bg-paper-raised/90 print:hidden">
        <IconButton icon="minus" label="Smaller" onClick={() => viewing.enlargeAt(0.8)} />
        <IconButton icon="plus" label="Larger" onClick={() => viewing.enlargeAt(1.25)} />
        <IconButton icon="fit" label="Whole plan" onClick={viewing.showAll} />
      </p>
    </div>
  )
}

function hitOf(target: EventTarget): Chosen | null {
  if (!(target instanceof Element)) return null
  const seat = target.closest('[data-seat]')?.getAttribute('data-seat')
  if (seat) return { kind: 'seat', ids: [seat] }
  const member = target.closest('[data-member]')?.getAttribute('data-member')
  return member ? { kind: 'member', id: member } : null
}

interface MarksProps {
  site: Site
  chosen: Chosen
  view: PlanView
  theme: 'dusk' | 'day'
}

function ChosenMarks({ site, chosen, view, theme }: MarksProps) {
  const stroke = theme === 'day' ? 'var(--color-ember)' : 'var(--color-dusk-select)'
  if (chosen.kind === 'member') {
    const member = site.members.find(({ id }) => id === chosen.id)
    if (!member) return null
    const [a, b] = [toScreen(view, member.from), toScreen(view, member.to)]
    return (
      <line
        x1={a[0]}
        y1={a[1]}
        x2={b[0]}
        y2={b[1]}
        stroke={stroke}
        strokeWidth="9"
        strokeOpacity="0.45"
        pointerEvents="none"
      />
    )
  }
  const r = seatRadius(view, screenPen(theme), false) + 7
  return (
    <g fill="none" stroke={stroke} strokeWidth="1.8" pointerEvents="none">
      {site.seats
        .filter(({ id }) => chosen.ids.includes(id))
        .map((seat) => {
          const [x, y] = toScreen(view, [seat.x, seat.y])
          return <circle key={seat.id} cx={x} cy={y} r={r} />
        })}
    </g>
  )
}
