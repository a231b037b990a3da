import { wrap, type Remote } from 'comlink'
import { useEffect, useState } from 'react'
import { areaAtLeast, differenceOf } from '#app/domain/comparison/area.ts'
import type { LayoutFigures } from '#app/domain/comparison/layout-figures.ts'
import type { Brief } from '#app/domain/brief/brief.ts'
import type { MapQuantity } from '#app/domain/flux/map-question.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { House } from '#app/domain/rules/house.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { MapAnswer } from '#app/drawing/heat/map-picture.ts'
import { differenceScale, irradianceScale, overlapScale, type QuantityScale } from '#app/drawing/heat/quantity.ts'
import { cellOf, emittersOf } from '#app/editor/map-questions.ts'
import type { FluxWorker } from '#workers/flux.worker.ts'

/** What is compared; the same object for the same comparison. */
export interface ComparisonSubject {
  readonly site: Site
  readonly brief: Brief
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly house: House
  readonly layouts: readonly Layout[]
  /** Height of the plane, m. */
  readonly plane: number
}

/** What is known of one variant so far; null: still being worked out. `flux` stays null without heat to map. */
export interface ComparedMaps {
  readonly figures: LayoutFigures | null
  readonly flux: MapAnswer | null
  readonly overlap: MapAnswer | null
  /** Where two heaters or more each alone give the threshold, m². */
  readonly overlapArea: number | null
  /** This variant less the first one, W/m²; null for the first. */
  readonly difference: MapAnswer | null
}

/** The comparison as far as it is known. */
export interface ComparisonState {
  readonly variants: readonly ComparedMaps[]
  readonly state: 'working' | 'ready' | 'broken'
}

const nothing: ComparedMaps = { figures: null, flux: null, overlap: null, overlapArea: null, difference: null }

/** Works out maps and figures of every variant in one worker, one after the other; `attempt` starts anew after a break. */
export function useComparison(subject: ComparisonSubject, attempt: number): ComparisonState {
  const [known, setKnown] = useState<{ subject: ComparisonSubject; state: ComparisonState } | null>(null)
  useEffect(() => {
    let current = true
    const variants = subject.layouts.map(() => nothing)
    const tell = (state: ComparisonState['state']) =>
      current && setKnown({ subject, state: { variants: [...variants], state } })
    const worker = startWorker()
    const remote = wrap<FluxWorker>(worker)
    const broken = () => tell('broken')
    worker.addEventListener('error', broken)
    const update = (i: number, more: Partial<ComparedMaps>) => {
      variants[i] = { ...(variants[i] ?? nothing), ...more }
      tell('working')
    }
    const work = async () => {
      for (const i of subject.layouts.keys()) await answerMaps(remote, subject, i, (more) => update(i, more))
      for (const i of subject.layouts.keys()) await answerFigures(remote, subject, i, (more) => update(i, more))
      await answerDifferences(remote, variants, update)
      tell('ready')
    }
    work().catch(broken)
    return () => {
      current = false
      worker.terminate()
    }
  }, [subject, attempt])
  const fits = known && known.subject.layouts === subject.layouts
  return fits ? known.state : { variants: subject.layouts.map(() => nothing), state: 'working' }
}

function startWorker(): Worker {
  return new Worker(new URL('../../../workers/flux.worker.ts', import.meta.url), { type: 'module' })
}

type Update = (more: Partial<ComparedMaps>) => void

/** Irradiance and overlap of one variant; the second is made of the first's kept parts. */
async function answerMaps(
  remote: Remote<FluxWorker>,
  { site, brief, models, layouts, plane, house }: ComparisonSubject,
  i: number,
  update: Update,
): Promise<void> {
  const layout = layouts[i]
  const emitters = layout ? emittersOf(layout, models) : []
  if (emitters.length === 0) return update({ overlapArea: 0 })
  const threshold = house.rules.overlapThreshold
  const shared = { emitters, floor: site.floor, z: plane, cell: cellOf(site, 'sharp') }
  const asked = (quantity: MapQuantity, { levels, edges, labelled }: QuantityScale) =>
    remote.answerMap({ ...shared, quantity, levels, edges, written: labelled })
  update({ flux: await asked({ kind: 'flux' }, irradianceScale('dusk', brief.target)) })
  const overlap = await asked({ kind: 'overlap', threshold }, overlapScale('dusk', threshold))
  update({ overlap, overlapArea: areaAtLeast(overlap.values, overlap.grid, 2) })
}

async function answerFigures(
  remote: Remote<FluxWorker>,
  { site, brief, models, layouts, house }: ComparisonSubject,
  i: number,
  update: Update,
): Promise<void> {
  const layout = layouts[i]
  if (layout) update({ figures: await remote.answerFigures({ site, brief, layout, models, house }) })
}

async function answerDifferences(
  remote: Remote<FluxWorker>,
  variants: readonly ComparedMaps[],
  update: (i: number, more: Partial<ComparedMaps>) => void,
): Promise<void> {
  const first = variants[0]?.flux
  const { levels, edges } = differenceScale('dusk')
  for (const i of variants.keys()) {
    const own = variants[i]?.flux
    if (i === 0 || !first || !own) continue
    const values = differenceOf(own.values, first.values)
    const picture = await remote.answerPicture(values, own.grid, levels, edges)
    update(i, { difference: { ...own, values, picture } })
  }
}
