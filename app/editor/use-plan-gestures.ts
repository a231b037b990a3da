import { useEffect, useRef, type Dispatch, type PointerEvent as ReactPointerEvent, type RefObject } from 'react'
import { flushSync } from 'react-dom'
import type { Vec2 } from '#app/domain/vector.ts'
import { toSite } from '#app/drawing/plan/plan-view.ts'
import type { EditorAction } from '#app/editor/editor-state.ts'
import type { Gesture, GestureStart } from '#app/editor/tools/gesture.ts'
import { heatersWithin, selectionAfterClick } from '#app/editor/tools/marquee.ts'
import { moveGesture } from '#app/editor/tools/move.ts'
import { tiltGesture } from '#app/editor/tools/tilt.ts'
import { turnGesture } from '#app/editor/tools/turn.ts'
import type { PlanViewing } from '#app/editor/use-plan-view.ts'

/** What a hand on the plan needs to know; read afresh at every event. */
export interface PlanHand {
  readonly start: Omit<GestureStart, 'ids' | 'leadId' | 'from' | 'pull'>
  readonly selected: readonly string[]
  readonly readOnly: boolean
  readonly hold: boolean
  /** A model waits to be placed. */
  readonly placing: boolean
  readonly viewing: PlanViewing
  readonly dispatch: Dispatch<EditorAction>
  readonly onPlace: (at: Vec2, free: boolean) => void
  readonly onSeat: (id: string) => void
  readonly onMarquee: (corners: readonly [Vec2, Vec2] | null) => void
  readonly onPoint: (event: PointerEvent, at: Vec2, screen: Vec2) => void
  /** Something is being dragged: nothing is read meanwhile. */
  readonly onHide: () => void
}

type Active =
  | { kind: 'gesture'; gesture: Gesture; start: GestureStart; moved: boolean; clicked: () => void }
  | { kind: 'marquee'; from: Vec2; shift: boolean; moved: boolean }
  | { kind: 'pan'; moved: boolean; clicked: () => void }
  | { kind: 'pinch' }

/** Pixels a pointer moves before it is a drag. */
const slack = { mouse: 3, touch: 8 }
/** A line holds within this many px, but never farther than 0.25 m. */
const pullPx = 10

const handles: Record<string, Gesture> = { turn: turnGesture, tilt: tiltGesture }

/** Pointer gestures on the plan; each step is worked out from the state at pointer-down, once a frame. */
export function usePlanGestures(
  frame: RefObject<HTMLElement | null>,
  svg: RefObject<SVGSVGElement | null>,
  hand: PlanHand,
) {
  const latest = useRef(hand)
  const active = useRef<Active | null>(null)
  const fingers = useRef(new Map<number, Vec2>())
  const downAt = useRef<Vec2>([0, 0])
  const next = useRef(0)
  const waiting = useRef<PointerEvent | null>(null)
  useEffect(() => {
    latest.current = hand
  })
  useEffect(() => () => cancelAnimationFrame(next.current), [])

  const placeOf = (event: { clientX: number; clientY: number }): Vec2 => {
    const box = frame.current?.getBoundingClientRect()
    return [event.clientX - (box?.left ?? 0), event.clientY - (box?.top ?? 0)]
  }
  const siteOf = (event: { clientX: number; clientY: number }) =>
    toSite(latest.current.viewing.wanted(), placeOf(event))

  function onPointerDown(event: ReactPointerEvent<SVGSVGElement>) {
    if (event.button === 2) return
    const screen = placeOf(event)
    fingers.current.set(event.pointerId, screen)
    svg.current?.setPointerCapture(event.pointerId)
    if (fingers.current.size === 2) {
      if (active.current?.kind === 'gesture') latest.current.dispatch({ type: 'drop shown' })
      active.current = { kind: 'pinch' }
      return
    }
    downAt.current = screen
    active.current = begin(event, siteOf(event), latest.current)
  }

  function step(event: PointerEvent) {
    const now = active.current
    const { dispatch, hold, onMarquee } = latest.current
    if (now?.kind === 'gesture') {
      const shown = now.gesture(now.start, siteOf(event), event.altKey || !hold)
      flushSync(() => dispatch({ type: 'show', step: shown }))
    }
    if (now?.kind === 'marquee') onMarquee([now.from, siteOf(event)])
  }

  function onPointerMove(event: ReactPointerEvent<SVGSVGElement>) {
    const screen = placeOf(event)
    const before = fingers.current.get(event.pointerId)
    const { viewing, onPoint, onHide } = latest.current
    if (!before) return onPoint(event.nativeEvent, siteOf(event), screen)
    const now = active.current
    if (now?.kind === 'pinch') {
      const other = [...fingers.current].find(([id]) => id !== event.pointerId)?.[1]
      if (other) viewing.pinchBy([before, other], [screen, other])
    } else if (now) {
      const far = Math.hypot(screen[0] - downAt.current[0], screen[1] - downAt.current[1])
      now.moved ||= far > (event.pointerType === 'mouse' ? slack.mouse : slack.touch)
      if (now.moved && now.kind === 'pan') viewing.shiftBy(screen[0] - before[0], screen[1] - before[1])
      if (now.moved && now.kind !== 'pan') {
        waiting.current = event.nativeEvent
        next.current ||= requestAnimationFrame(() => {
          next.current = 0
          if (waiting.current) step(waiting.current)
        })
      }
      if (now.moved) onHide()
    }
    fingers.current.set(event.pointerId, screen)
  }

  function onPointerUp(event: ReactPointerEvent<SVGSVGElement>) {
    if (!fingers.current.delete(event.pointerId)) return
    const now = active.current
    if (fingers.current.size > 0) return
    active.current = null
    cancelAnimationFrame(next.current)
    next.current = 0
    waiting.current = null
    if (!now || now.kind === 'pinch') return
    const { dispatch, hold, onMarquee, start, selected } = latest.current
    if (now.kind === 'gesture' && now.moved) {
      dispatch({ type: 'show', step: now.gesture(now.start, siteOf(event), event.altKey || !hold) })
      return dispatch({ type: 'keep shown' })
    }
    if (now.kind === 'marquee') {
      const within = now.moved ? heatersWithin(start.layout, now.from, siteOf(event)) : []
      onMarquee(null)
      return dispatch({ type: 'select', ids: now.shift ? [...new Set([...selected, ...within])] : within })
    }
    if (!now.moved) now.clicked()
  }

  /** Escape: back to pointer-down; the pointer's further way means nothing. Whether there was a gesture. */
  function dropGesture(): boolean {
    const was = active.current !== null
    active.current = null
    latest.current.onMarquee(null)
    return was
  }

  function onPointerCancel(event: ReactPointerEvent<SVGSVGElement>) {
    fingers.current.delete(event.pointerId)
    if (active.current?.kind === 'gesture') latest.current.dispatch({ type: 'drop shown' })
    dropGesture()
  }

  return { onPointerDown, onPointerMove, onPointerUp, onPointerCancel, dropGesture }
}

/** What a pointer that goes down begins: by what lies under it, the button and the device. */
function begin(event: ReactPointerEvent<SVGSVGElement>, from: Vec2, hand: PlanHand): Active {
  const under = event.target instanceof Element ? event.target : null
  const { shiftKey, altKey } = event
  const idOf = (name: 'heater' | 'seat' | 'handle') =>
    under?.closest(`[data-${name}]`)?.getAttribute(`data-${name}`) ?? null
  const none = () => undefined
  if (event.button === 1) return { kind: 'pan', moved: false, clicked: none }
  if (hand.placing) return { kind: 'pan', moved: false, clicked: () => hand.onPlace(from, altKey || !hand.hold) }
  const gestureOf = (gesture: Gesture, leadId: string, ids: readonly string[], clicked: () => void): Active => {
    const pull = Math.min(0.25, pullPx / hand.viewing.wanted().scale)
    const start = { ...hand.start, ids, leadId, from, pull }
    return { kind: 'gesture', gesture, start, moved: false, clicked }
  }
  const handle = handles[idOf('handle') ?? '']
  const lead = hand.selected[0]
  if (handle && lead && !hand.readOnly) return gestureOf(handle, lead, hand.selected, none)
  const heaterId = idOf('heater')
  if (heaterId) {
    const among = hand.selected.includes(heaterId)
    if (shiftKey || !among)
      hand.dispatch({ type: 'select', ids: selectionAfterClick(hand.selected, heaterId, shiftKey) })
    const clicked = () => (among && !shiftKey ? hand.dispatch({ type: 'select', ids: [heaterId] }) : undefined)
    if (hand.readOnly) return { kind: 'pan', moved: false, clicked }
    return gestureOf(
      moveGesture,
      heaterId,
      among ? hand.selected : shiftKey ? [...hand.selected, heaterId] : [heaterId],
      clicked,
    )
  }
  const seatId = idOf('seat')
  if (seatId) return { kind: 'pan', moved: false, clicked: () => hand.onSeat(seatId) }
  const clearAll = () => hand.dispatch({ type: 'select', ids: [] })
  return event.pointerType === 'mouse' && !hand.readOnly
    ? { kind: 'marquee', from, shift: shiftKey, moved: false }
    : { kind: 'pan', moved: false, clicked: clearAll }
}
