import { useEffect, useRef, type PointerEvent as ReactPointerEvent, type RefObject } from 'react'
import { flushSync } from 'react-dom'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { toSite } from '#app/drawing/plan/plan-view.ts'
import type { Chosen } from '#app/editor/site/choice.ts'
import { gestureAt, type SiteGesture } from '#app/editor/site/gesture-start.ts'
import type { PlanViewing } from '#app/editor/use-plan-view.ts'

/** A change that is shown and not kept yet. */
export interface SiteDraft {
  readonly site: Site
  readonly chosen: Chosen
}

/** What a hand on the site's plan needs to know; read afresh at every event. */
export interface SiteHand {
  readonly site: Site
  readonly chosen: Chosen | null
  readonly readOnly: boolean
  /** Something waits to be added at the next click. */
  readonly adding: boolean
  readonly viewing: PlanViewing
  readonly onChoose: (chosen: Chosen | null) => void
  readonly onDraft: (draft: SiteDraft | null) => void
  /** Keeps a change as one step. */
  readonly onKeep: (edit: (site: Site) => Site, chosen: Chosen) => void
  readonly onAdd: (at: Vec2) => void
  readonly onPoint: (at: Vec2 | null) => void
}

type Active =
  | { kind: 'gesture'; gesture: SiteGesture; moved: boolean; to: Vec2 }
  | { kind: 'pan'; moved: boolean }
  | { kind: 'pinch' }

/** Pixels a pointer moves before it is a drag, and how far around it things are meant. */
const slack = { mouse: 4, touch: 8 }
const reach = { mouse: 8, touch: 22 }
const sort = (event: { pointerType: string }) => (event.pointerType === 'mouse' ? 'mouse' : 'touch')

/** Pointer gestures on the site's plan, one step of the history each; drawn once a frame. */
export function useSiteGestures(frame: RefObject<HTMLElement | null>, hand: SiteHand) {
  const latest = useRef(hand)
  const active = useRef<Active | null>(null)
  const fingers = useRef(new Map<number, Vec2>())
  const downAt = useRef<Vec2>([0, 0])
  const next = useRef(0)
  useEffect(() => {
    latest.current = hand
  })
  useEffect(() => () => cancelAnimationFrame(next.current), [])

  const placeOf = (event: { clientX: number; clientY: number }): Vec2 => {
    const box = frame.current?.getBoundingClientRect()
    return [event.clientX - (box?.left ?? 0), event.clientY - (box?.top ?? 0)]
  }
  const siteOf = (screen: Vec2) => toSite(latest.current.viewing.wanted(), screen)

  function drop(): boolean {
    cancelAnimationFrame(next.current)
    next.current = 0
    const had = active.current?.kind === 'gesture'
    active.current = null
    latest.current.onDraft(null)
    return had
  }

  function onPointerDown(event: ReactPointerEvent<SVGSVGElement>) {
    if (event.button > 0) return
    const screen = placeOf(event)
    fingers.current.set(event.pointerId, screen)
    event.currentTarget.setPointerCapture(event.pointerId)
    const { site, chosen, adding, viewing, onChoose, readOnly } = latest.current
    if (fingers.current.size === 2) {
      drop()
      active.current = { kind: 'pinch' }
      return
    }
    downAt.current = screen
    const around = reach[sort(event)] / viewing.wanted().scale
    const gesture = adding ? null : gestureAt(site, chosen, siteOf(screen), around, event.shiftKey)
    if (!gesture) {
      active.current = { kind: 'pan', moved: false }
      return
    }
    onChoose(gesture.click ? chosen : gesture.chosen)
    active.current = readOnly
      ? { kind: 'pan', moved: true }
      : { kind: 'gesture', gesture, moved: false, to: siteOf(screen) }
  }

  function step() {
    next.current = 0
    const now = active.current
    if (now?.kind !== 'gesture') return
    const { site, onDraft } = latest.current
    flushSync(() => onDraft({ site: now.gesture.step(site, now.to), chosen: now.gesture.chosen }))
  }

  function onPointerMove(event: ReactPointerEvent<SVGSVGElement>) {
    const screen = placeOf(event)
    const before = fingers.current.get(event.pointerId)
    const { viewing, onPoint } = latest.current
    onPoint(siteOf(screen))
    const now = active.current
    if (!before || !now) return
    if (now.kind === 'pinch') {
      const other = [...fingers.current].find(([id]) => id !== event.pointerId)?.[1]
      if (other) viewing.pinchBy([before, other], [screen, other])
    } else {
      const far = Math.hypot(screen[0] - downAt.current[0], screen[1] - downAt.current[1])
      now.moved ||= far > slack[sort(event)]
      if (now.moved && now.kind === 'pan') viewing.shiftBy(screen[0] - before[0], screen[1] - before[1])
      if (now.moved && now.kind === 'gesture') {
        now.to = siteOf(screen)
        next.current ||= requestAnimationFrame(step)
      }
    }
    fingers.current.set(event.pointerId, screen)
  }

  function onPointerUp(event: ReactPointerEvent<SVGSVGElement>) {
    fingers.current.delete(event.pointerId)
    const now = active.current
    if (!now) return
    if (now.kind === 'pinch' && fingers.current.size > 0) return
    drop()
    const { adding, onAdd, onChoose, onKeep } = latest.current
    if (now.kind === 'gesture') {
      const { gesture, moved } = now
      const to = siteOf(placeOf(event))
      if (moved) onKeep((old) => gesture.step(old, to), gesture.chosen)
      else if (gesture.click) onKeep(gesture.click, gesture.chosen)
    }
    if (now.kind === 'pan' && !now.moved) {
      if (adding) onAdd(siteOf(placeOf(event)))
      else onChoose(null)
    }
  }

  function onPointerCancel(event: ReactPointerEvent<SVGSVGElement>) {
    fingers.current.delete(event.pointerId)
    drop()
  }

  const onPointerLeave = () => latest.current.onPoint(null)
  return { drop, handlers: { onPointerDown, onPointerMove, onPointerUp, onPointerCancel, onPointerLeave } }
}
