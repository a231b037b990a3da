import { useMemo } from 'react'
import type { Brief } from '#app/domain/brief/brief.ts'
import {
  layoutTotals,
  seatFigures,
  seatWarmth,
  type LayoutTotals,
  type SeatFigures,
} from '#app/domain/comfort/seat-warmth.ts'
import { obstructionsOf } from '#app/domain/flux/shading.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { House } from '#app/domain/rules/house.ts'
import type { Site } from '#app/domain/site/site.ts'
import { useAlive } from '#app/editor/use-media.ts'
import { usePaced } from '#app/editor/use-paced.ts'

/** What figures rest on. */
export interface FiguresInput {
  readonly site: Site
  readonly brief: Brief
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly house: House
  readonly shade: boolean
  /** Whether a heater is being moved, and the beat of what comes after the frame. */
  readonly moving: boolean
  readonly beat: number
}

/** The figures that the page shows. */
export interface ShownFigures {
  readonly warmth: readonly SeatFigures[]
  readonly totals: LayoutTotals
  readonly findings: readonly Finding[]
}

/** Before the page is alive: the last digits of a figure may differ between two machines, so the server shows none. */
const notYet: ShownFigures = {
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
 * The figures of the layout shown. Seats and totals are of this very frame; the findings are reckoned after it, while
 * something moves at each beat, so that a frame of a drag does not wait for them. Findings are of the plain figures,
 * without shade.
 */
export function useFigures({ site, brief, layout, models, house, shade, moving, beat }: FiguresInput): ShownFigures {
  const alive = useAlive()
  const shown = useMemo(() => {
    if (!alive) return notYet
    const input = { site, brief, layout, models }
    const warmth = seatFigures(shade ? { ...input, obstructions: obstructionsOf(site, layout, models) } : input)
    return { warmth, totals: layoutTotals(warmth, layout, models, brief) }
  }, [alive, site, brief, layout, models, shade])
  const late = usePaced(layout, moving, beat)
  const findings = useMemo(() => {
    if (!alive) return notYet.findings
    const input = { site, brief, layout: late, models }
    return checkLayout({ ...input, house, warmth: seatWarmth(input) })
  }, [alive, site, brief, models, house, late])
  return useMemo(() => ({ ...shown, findings }), [shown, findings])
}
