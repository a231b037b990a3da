import { useEffect, useLayoutEffect, useMemo, useRef, useState, type RefObject } from 'react'
import { planViewOf, type PlanMargins, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import {
  atTrueSize,
  enlarge,
  interimTransform,
  pinch,
  shift,
  transformedView,
  wholePlan,
  type ViewTransform,
} from '#app/editor/view-transform.ts'

/** The view of the plan and the ways to change it. */
export interface PlanViewing {
  readonly view: PlanView
  readonly transform: ViewTransform
  enlargeAt: (factor: number, at?: Vec2) => void
  shiftBy: (dx: number, dy: number) => void
  pinchBy: (before: readonly [Vec2, Vec2], after: readonly [Vec2, Vec2]) => void
  showAll: () => void
  showTrueSize: () => void
  /** The view as it is on screen this moment, for working out where a pointer is. */
  wanted: () => PlanView
}

/** Milliseconds of rest after which the drawing is drawn anew at its new size. */
const rest = 140

/**
 * Shifts and enlarges the drawing inside `moving` by one transform, without drawing it anew, until the hand rests; then
 * it is drawn once at the new size, so that lines and words keep theirs.
 */
export function usePlanView(
  { floor }: Pick<Site, 'floor'>,
  size: { readonly width: number; readonly height: number },
  margins: PlanMargins,
  moving: RefObject<HTMLElement | SVGElement | null>,
): PlanViewing {
  const whole = useMemo(() => planViewOf({ floor }, size.width, size.height, margins), [floor, size, margins])
  const [drawn, setDrawn] = useState(wholePlan)
  const wanted = useRef(wholePlan)
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined)
  const drawnNow = useRef(wholePlan)

  useLayoutEffect(() => {
    drawnNow.current = drawn
    moving.current?.style.removeProperty('transform')
  }, [drawn, moving])
  useEffect(() => () => clearTimeout(timer.current), [])

  const want = (next: ViewTransform, atOnce = false) => {
    wanted.current = next
    clearTimeout(timer.current)
    if (atOnce) return setDrawn(next)
    moving.current?.style.setProperty('transform', interimTransform(drawnNow.current, next))
    timer.current = setTimeout(() => setDrawn(next), rest)
  }
  const view = useMemo(() => transformedView(whole, drawn), [whole, drawn])

  return {
    view,
    transform: drawn,
    enlargeAt: (factor, at = [whole.width / 2, whole.height / 2]) => want(enlarge(wanted.current, factor, at)),
    shiftBy: (dx, dy) => want(shift(wanted.current, dx, dy)),
    pinchBy: (before, after) => want(pinch(wanted.current, before, after)),
    showAll: () => want(wholePlan, true),
    showTrueSize: () => want(atTrueSize(whole), true),
    wanted: () => transformedView(whole, wanted.current),
  }
}
