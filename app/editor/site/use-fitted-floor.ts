import { useState } from 'react'
import type { Site } from '#app/domain/site/site.ts'
import { extentOf } from '#app/drawing/plan/plan-view.ts'

type Floor = Pick<Site, 'floor'>

/** A floor that grew out of the one the plan was fitted to, or shrank below this share of it, is fitted anew. */
const leastShare = 0.45

/** Whether a floor can still be looked at in a plan that was fitted to another. */
function fitsInto(now: Site['floor'], fitted: Site['floor']): boolean {
  const [a, b] = [extentOf(now), extentOf(fitted)]
  return (['x', 'y'] as const).every((axis) => {
    const [low, high] = b[axis]
    const room = 0.08 * (high - low)
    const share = (a[axis][1] - a[axis][0]) / (high - low || 1)
    return a[axis][0] >= low - room && a[axis][1] <= high + room && share >= leastShare
  })
}

/** The floor that the plan is fitted to: while a corner is moved a little, the drawing stays where it is. */
export function useFittedFloor({ floor }: Floor): Floor {
  const [fitted, setFitted] = useState<Floor>({ floor })
  if (fitted.floor === floor || fitsInto(floor, fitted.floor)) return fitted
  const next = { floor }
  setFitted(next)
  return next
}
