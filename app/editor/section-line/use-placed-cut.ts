import { useCallback, useState } from 'react'
import type { SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { keptCut, parseCut } from '#app/editor/section-line/placed-cut.ts'
import { useAlive } from '#app/editor/use-media.ts'

/** The section line that a person put on a variant's plan; kept for the visit on this device, part of no layout. */
export function usePlacedCut(variantId: string): [SectionCut | null, (cut: SectionCut | null) => void] {
  const key = `section-line:${variantId}`
  const alive = useAlive()
  const [cut, setCut] = useState(() => readKept(key))
  const keep = useCallback(
    (next: SectionCut | null) => {
      setCut(next)
      try {
        if (next) sessionStorage.setItem(key, keptCut(next))
        else sessionStorage.removeItem(key)
      } catch {
        // A device that keeps nothing shows the line until the page is left.
      }
    },
    [key],
  )
  return [alive ? cut : null, keep]
}

function readKept(key: string): SectionCut | null {
  try {
    return parseCut(sessionStorage.getItem(key))
  } catch {
    return null
  }
}
