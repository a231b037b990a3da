import { lazy, Suspense, useMemo, useState, type ReactNode } from 'react'
import type { Brief } from '#app/domain/brief/brief.ts'
import type { Efficiency } from '#app/domain/flux/emitter.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import { irradianceScale, type QuantityScale } from '#app/drawing/heat/quantity.ts'
import type { SectionQuestion } from '#app/drawing/heat/section-answer.ts'
import type { PlanView } from '#app/drawing/plan/plan-view.ts'
import type { SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { emittersOf } from '#app/editor/map-questions.ts'
import { SectionLinePanel } from '#app/editor/section-line/section-line-panel.tsx'
import { usePlacedCut } from '#app/editor/section-line/use-placed-cut.ts'
import { cutsOf } from '#app/editor/sections.tsx'
import type { Room } from '#app/editor/use-media.ts'

const CutHandles = lazy(() => import('#app/editor/section-line/cut-handles.tsx'))

interface Cut {
  readonly site: Site
  readonly brief: Brief
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  /** The radiant efficiency that the heat is drawn with. */
  readonly efficiency: Efficiency
  readonly selected: readonly string[]
  readonly room: Room
  readonly touch: boolean
}

/** Where a layout is cut and what the sections show. */
export interface Cutting {
  readonly cuts: readonly SectionCut[]
  /** The scale of the heat in sections: always irradiance. */
  readonly heat: QuantityScale
  /** What is to be asked for the sections; null while none are shown. */
  readonly about: SectionQuestion | null
  /** A desk shows sections always, smaller screens when they are wanted. */
  readonly wanted: boolean
  readonly onWanted: (wanted: boolean) => void
  /** The panel that places a line of one's own, and that line's handles over the plan. */
  readonly line: ReactNode
  readonly overPlan: ((view: PlanView) => ReactNode) | null
}

/** The sections through a layout: those of its heaters and one along a line that the person places. */
export function useCutting(cut: Cut, variantId: string): Cutting {
  const { site, brief, layout, models, efficiency, selected, room, touch } = cut
  const [wanted, onWanted] = useState(false)
  const [placed, place] = usePlacedCut(variantId)
  const cuts = useMemo(() => cutsOf(site, layout, selected, placed), [site, layout, selected, placed])
  const heat = useMemo(() => irradianceScale('dusk', brief.target), [brief])
  const about = useMemo(
    () => ({ emitters: emittersOf(layout, models, efficiency), site, cuts, levels: heat.levels, edges: heat.edges }),
    [layout, models, efficiency, site, cuts, heat],
  )
  const line = useMemo(() => <SectionLinePanel cut={placed} site={site} onChange={place} />, [placed, site, place])
  const isShown = (room === 'desk' || wanted) && cuts.length > 0
  const overPlan =
    placed && isShown
      ? (view: PlanView) => (
          <Suspense>
            <CutHandles cut={placed} onChange={place} {...{ view, site, touch }} />
          </Suspense>
        )
      : null
  return { cuts, heat, about: isShown ? about : null, wanted, onWanted, line, overPlan }
}
