import { useMemo } from 'react'
import type { Brief } from '#app/domain/brief/brief.ts'
import { layoutTotals, seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { layoutFigures, type LayoutFigures } from '#app/domain/comparison/layout-figures.ts'
import { obstructionsOf } from '#app/domain/flux/shading.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
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

/** The seats' figures, the totals and the findings of a layout. Findings are of the plain figures, without shade. */
function figuresOf({ shade, ...plain }: FiguresInput): LayoutFigures {
  const figures = layoutFigures(plain)
  if (!shade) return figures
  const { site, brief, layout, models } = plain
  const warmth = seatWarmth({ ...plain, obstructions: obstructionsOf(site, layout, models) })
  return { ...figures, warmth, totals: layoutTotals(warmth, layout, models, brief) }
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

/** The figures of the layout shown, reckoned anew only when something they rest on changed. */
export function useFigures({ site, brief, layout, models, shade }: FiguresInput): LayoutFigures {
  const alive = useAlive()
  return useMemo(
    () => (alive ? figuresOf({ site, brief, layout, models, shade }) : notYet),
    [alive, site, brief, layout, models, shade],
  )
}
