import { useDeferredValue, useMemo } from 'react'
import type { Brief } from '#app/domain/brief/brief.ts'
import { layoutTotals, seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { LayoutFigures } from '#app/domain/comparison/layout-figures.ts'
import { obstructionsOf } from '#app/domain/flux/shading.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import { useAlive } from '#app/editor/use-media.ts'

/** What figures rest on. */
export interface FiguresInput {
  readonly site: Site
  readonly brief: Brief
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly shade: boolean
}

/** Before the page is alive: the last digits of a figure may differ between two machines, so the server shows none. */
const notYet: LayoutFigures = {
  warmth: [],
  totals: {
    heaters: 0,
    seatsCounted: 0,
    seatsInTarget: 0,
    coldest: null,
    hottest: null,
    mean: null,
    evenness: null,
    headMaximum: null,
    power: 0,
    energyPerEvening: null,
    costPerEvening: null,
    cannotTell: [],
  },
  findings: [],
}

/**
 * The figures of the layout shown. Seats and totals are of this very frame; the findings are reckoned right after it, in
 * a turn of their own, so that a frame of a drag does not wait for them. Findings are of the plain figures, without shade.
 */
export function useFigures({ site, brief, layout, models, shade }: FiguresInput): LayoutFigures {
  const alive = useAlive()
  const plain = useMemo(
    () => ({ layout, warmth: alive ? seatWarmth({ site, brief, layout, models }) : notYet.warmth }),
    [alive, site, brief, layout, models],
  )
  const shown = useMemo(() => {
    if (!alive) return notYet
    const obstructions = shade ? obstructionsOf(site, layout, models) : null
    const warmth = obstructions ? seatWarmth({ site, brief, layout, models, obstructions }) : plain.warmth
    return { warmth, totals: layoutTotals(warmth, layout, models, brief) }
  }, [alive, site, brief, layout, models, shade, plain])
  const late = useDeferredValue(plain)
  const findings = useMemo(
    () => (alive ? checkLayout({ site, brief, models, ...late }) : notYet.findings),
    [alive, site, brief, models, late],
  )
  return useMemo(() => ({ ...shown, findings }), [shown, findings])
}
