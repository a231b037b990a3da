import { useRef, type KeyboardEvent, type PointerEvent } from 'react'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import { discPlaces, type SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { moveEnds } from '#app/editor/section-line/placed-cut.ts'

interface CutHandlesProps {
  readonly cut: SectionCut
  readonly view: PlanView
  readonly site: Site
  readonly touch: boolean
  readonly onChange: (cut: SectionCut) => void
}

type Ends = readonly ('from' | 'to')[]

const arrows: Record<string, Vec2> = { ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, 1], ArrowDown: [0, -1] }

/** Three handles of a section line: its ends, and its middle that moves it as it is. Arrows move 10 mm, with Shift 100. */
export default function CutHandles({ cut, view, site, touch, onChange }: CutHandlesProps) {
  const [a, b] = discPlaces(cut, view)
  const middle = toScreen(view, [(cut.from[0] + cut.to[0]) / 2, (cut.from[1] + cut.to[1]) / 2])
  const say = ([x, y]: Vec2) => `${formatLength(x, site.displayUnits)}, ${formatLength(y, site.displayUnits)}`
  const shared = { cut, view, site, touch, onChange }
  return (
    <>
      <Handle {...shared} ends={['from']} at={a} label={`Left end of section ${cut.letter}, at ${say(cut.from)}`} />
      <Handle {...shared} ends={['to']} at={b} label={`Right end of section ${cut.letter}, at ${say(cut.to)}`} />
      <Handle {...shared} ends={['from', 'to']} at={middle} label={`Line of section ${cut.letter}, whole`} />
    </>
  )
}

function Handle({ cut, view, site, touch, onChange, ends, at, label }: CutHandlesProps & { ends: Ends; at: Vec2; label: string }) { // prettier-ignore
  const held = useRef<{ readonly cut: SectionCut; readonly from: Vec2 } | null>(null)
  const onPointerDown = (event: PointerEvent<SVGGElement>) => {
    if (event.button !== 0) return
    event.stopPropagation()
    event.currentTarget.setPointerCapture(event.pointerId)
    held.current = { cut, from: [event.clientX, event.clientY] }
  }
  const onPointerMove = (event: PointerEvent<SVGGElement>) => {
    event.stopPropagation()
    if (!held.current) return
    const [x, y] = held.current.from
    const way: Vec2 = [(event.clientX - x) / view.scale, (y - event.clientY) / view.scale]
    onChange(moveEnds(held.current.cut, ends, way, site))
  }
  const letGo = (event: PointerEvent<SVGGElement>) => {
    event.stopPropagation()
    held.current = null
  }
  const onKeyDown = (event: KeyboardEvent<SVGGElement>) => {
    if (event.key === 'Escape' && held.current) {
      event.stopPropagation()
      onChange(held.current.cut)
      held.current = null
      return
    }
    const arrow = arrows[event.key]
    if (!arrow || event.ctrlKey || event.metaKey || event.altKey) return
    event.preventDefault()
    event.stopPropagation()
    const step = event.shiftKey ? 0.1 : 0.01
    onChange(moveEnds(cut, ends, [arrow[0] * step, arrow[1] * step], site))
  }
  return (
    <g
      tabIndex={0}
      role="button"
      aria-label={`${label}. Arrows move it.`}
      className="group cursor-move outline-none"
      {...{ onPointerDown, onPointerMove, onKeyDown }}
      onPointerUp={letGo}
      onPointerCancel={letGo}
    >
      <circle cx={at[0]} cy={at[1]} r={touch ? 22 : 13} fill="transparent" />
      <circle
        cx={at[0]}
        cy={at[1]}
        r={11}
        fill="none"
        stroke="var(--color-dusk-select)"
        strokeWidth={2}
        className="opacity-0 group-hover:opacity-100 group-focus-visible:opacity-100"
      />
      {ends.length === 2 && (
        <rect x={at[0] - 4} y={at[1] - 4} width={8} height={8} fill="var(--color-dusk-ground)" stroke="var(--color-dusk-select)" />
      )}
    </g>
  )
} // prettier-ignore
