import { wrap } from 'comlink'
import { useEffect, useMemo, useState } from 'react'
import { areaAtLeast } from '#app/domain/comparison/area.ts'
import { layoutTotals, seatFigures, type LayoutTotals } from '#app/domain/comfort/seat-warmth.ts'
import type { Brief } from '#app/domain/brief/brief.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { memberSpacings } from '#app/domain/layout/member-spacings.ts'
import { repeatAtSpacing, type Repeat } from '#app/domain/layout/repeat.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import { planesOf } from '#app/domain/site/planes.ts'
import { cellOf, emittersOf } from '#app/editor/map-questions.ts'
import type { FluxWorker } from '#workers/flux.worker.ts'

/** What the repeat would be made of. */
export interface SpacingSubject {
  readonly site: Site
  readonly brief: Brief
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly rules: HouseRules
  readonly selected: readonly string[]
  readonly repeat: Repeat
}

/** What one spacing costs in warmth and overlap. */
export interface SpacingCost {
  readonly spacing: number
  readonly place: 'under members' | 'as wanted, under members' | 'as wanted, between members'
  readonly totals: LayoutTotals
  /** Area where two heaters or more each alone give the threshold of overlap, m²; null while it is computed. */
  readonly overlap: number | null
}

interface Candidate extends Omit<SpacingCost, 'overlap'> {
  readonly layout: Layout
}

/** The wanted spacing and those that members allow below and above it, rising, with what each comes to. */
function candidatesOf({ site, brief, layout, models, rules, selected, repeat }: SpacingSubject): Candidate[] {
  const heaters = layout.heaters.filter(({ id }) => selected.includes(id))
  const allowed = memberSpacings(site, heaters, models, repeat, rules)
  if (!allowed) return []
  const { below, above, fits } = allowed
  const wanted = fits ? 'as wanted, under members' : 'as wanted, between members'
  const rows = [
    ...(below === null ? [] : [{ spacing: below, place: 'under members' as const }]),
    { spacing: repeat.spacing, place: wanted } as const,
    ...(above === null ? [] : [{ spacing: above, place: 'under members' as const }]),
  ]
  return rows.flatMap(({ spacing, place }): Candidate[] => {
    const placed = repeatAtSpacing(layout, selected, { ...repeat, spacing })
    if ('error' in placed) return []
    const figures = seatFigures({ site, brief, layout: placed.layout, models })
    return [{ spacing, place, layout: placed.layout, totals: layoutTotals(figures, placed.layout, models, brief) }]
  })
}

/** What each spacing that members allow costs: seats at once, the overlap as the worker answers. */
export function useSpacingCosts(subject: SpacingSubject): readonly SpacingCost[] {
  const { site, brief, layout, models, rules, selected, repeat } = subject
  const candidates = useMemo(
    () => candidatesOf({ site, brief, layout, models, rules, selected, repeat }),
    [site, brief, layout, models, rules, selected, repeat],
  )
  const [known, setKnown] = useState<{ of: readonly Candidate[]; areas: readonly number[] }>({ of: [], areas: [] })
  const threshold = rules.overlapThreshold
  useEffect(() => {
    if (candidates.length === 0) return
    let current = true
    const worker = new Worker(new URL('../../workers/flux.worker.ts', import.meta.url), { type: 'module' })
    const remote = wrap<FluxWorker>(worker)
    const work = async () => {
      const areas: number[] = []
      for (const { layout: made } of candidates) {
        const emitters = emittersOf(made, models)
        const question = { emitters, floor: site.floor, z: planesOf(site).body, cell: cellOf(site, 'sharp') }
        const answer = await remote.answerMap({ ...question, quantity: { kind: 'overlap', threshold }, levels: [] })
        areas.push(areaAtLeast(answer.values, answer.grid, 2))
        if (current) setKnown({ of: candidates, areas: [...areas] })
      }
    }
    work().catch(() => undefined)
    return () => {
      current = false
      worker.terminate()
    }
  }, [candidates, models, site, threshold])
  return candidates.map(({ spacing, place, totals }, i) => ({
    ...{ spacing, place, totals },
    overlap: known.of === candidates ? (known.areas[i] ?? null) : null,
  }))
}
