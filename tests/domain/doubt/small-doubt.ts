import { plainHouse } from '#tests/support/plain-site.ts'
import type { FiguresQuestion } from '#app/domain/comparison/layout-figures.ts'
import type { Dimension, Site } from '#app/domain/site/site.ts'
import { brief, heater, model, modelsOf, seat, site } from '#tests/domain/comfort/terrace.ts'

/** A dimension that moves these coordinates one to one. */
export const dimension = (
  id: string,
  value: number,
  tolerance: number,
  moves: Dimension['moves'],
  change: Partial<Dimension> = {},
): Dimension => ({ id, label: `Size ${id}`, value, tolerance, source: 'photo', note: null, moves, ...change })

/** Height of the element over the body plane of the seat below it, m: 2.40 + 0.05 − 0.60. */
export const above = 1.85

/** A point of a source, so that the flux straight below it goes by 1 / h² and nothing else. */
const pointModel = model({
  elementLength: 1e-3,
  clearanceToCombustible: { above: 0.3, side: 0.2, end: 0.2, frontOfBeam: null, below: null },
})

/** Underside of the combustible cover, m; its clearance over the body's top at 2.50 m is 0.30 m. */
export const coverAt = 3

const cover = {
  id: 'roof',
  name: 'roof',
  corners: [[-4, -4, coverAt], [4, -4, coverAt], [4, 4, coverAt], [-4, 4, coverAt]], // prettier-ignore
  material: 'combustible',
  opening: false,
  swing: 0,
  voidDepth: null,
  note: null,
} satisfies Site['covers'][number]

/** Moves of the whole cover up and down. */
export const coverMoves = [0, 1, 2, 3].map((i) => ({
  of: 'cover' as const,
  id: 'roof',
  coordinate: `corners.${i}.2`,
  by: 1,
}))

/** One heater straight over one seat under a level combustible cover. */
export function oneHeater(dimensions: readonly Dimension[], change: Partial<FiguresQuestion> = {}): FiguresQuestion {
  return {
    site: site([seat('S1')], { covers: [cover], dimensions: [...dimensions] }),
    brief: brief(),
    layout: { title: 'One', heaters: [heater('H1')] },
    models: modelsOf(pointModel),
    house: plainHouse(),
    ...change,
  }
}

/** What a generator returns when it is let run, and all that it told before. */
export function finish<Told, Made>(steps: Generator<Told, Made, undefined>): { told: Told[]; made: Made } {
  const told: Told[] = []
  for (;;) {
    const step = steps.next()
    if (step.done) return { told, made: step.value }
    told.push(step.value)
  }
}
