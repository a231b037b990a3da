import { useEffect, useMemo, useRef, useState } from 'react'
import type { PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import {
  enlarge,
  interimTransform,
  pinch,
  shift,
  transformedView,
  wholePlan,
  type ViewTransform,
} from '#app/editor/view-transform.ts'

/** One view of several drawings: what one shows, all show. */
export interface LinkedViews {
  readonly view: PlanView
  /** Puts a drawing's moving group under the common view. */
  readonly join: (group: SVGGElement | null) => (() => void) | undefined
  enlargeAt: (factor: number, at?: Vec2) => void
  shiftBy: (dx: number, dy: number) => void
  pinchBy: (before: readonly [Vec2, Vec2], after: readonly [Vec2, Vec2]) => void
  showAll: () => void
  /** The view as it is on screen this moment. */
  wanted: () => PlanView
}

/** Milliseconds of rest after which the drawings are drawn anew at their new size. */
const rest = 140

/** Moves all drawings by one transform without drawing them anew until the hand rests. */
export function useLinkedViews(whole: PlanView): LinkedViews {
  const [drawn, setDrawn] = useState(wholePlan)
  const wanted = useRef(wholePlan)
  const drawnNow = useRef(wholePlan)
  const groups = useRef(new Set<SVGGElement>())
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined)
  useEffect(() => {
    drawnNow.current = drawn
    for (const group of groups.current) group.removeAttribute('transform')
  }, [drawn])
  useEffect(() => () => clearTimeout(timer.current), [])
  const view = useMemo(() => transformedView(whole, drawn), [whole, drawn])

  const want = (next: ViewTransform) => {
    wanted.current = next
    clearTimeout(timer.current)
    for (const group of groups.current) group.setAttribute('transform', interimTransform(drawnNow.current, next))
    timer.current = setTimeout(() => setDrawn(next), rest)
  }
  return {
    view,
    join: (group) => {
      if (!group) return
      groups.current.add(group)
      return () => groups.current.delete(group)
    },
    enlargeAt: (factor, at = [whole.width / 2, whole.height / 2]) => want(enlarge(wanted.current, factor, at)),
    shiftBy: (dx, dy) => want(shift(wanted.current, dx, dy)),
    pinchBy: (before, after) => want(pinch(wanted.current, before, after)),
    showAll: () => {
      clearTimeout(timer.current)
      wanted.current = wholePlan
      setDrawn(wholePlan)
    },
    wanted: () => transformedView(whole, wanted.current),
  }
}
