import { requireAnswerable } from '#app/domain/flux/answerable.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import type { SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { sectionPicture, sectionValues, type SectionPicture } from '#app/drawing/section/section-values.ts'

/** One question about the heat in sections; plain data. */
export interface SectionQuestion {
  readonly emitters: readonly Emitter[]
  readonly site: Site
  readonly cuts: readonly SectionCut[]
  readonly levels: readonly number[]
  readonly edges: readonly number[]
}

/**
 * Fills and isolines of irradiance in each section, in the order of the cuts; null without emitters. Throws a RangeError
 * as `requireAnswerable` does, and on a page's main thread.
 */
export function answerSections({ emitters, site, cuts, levels, edges }: SectionQuestion): (SectionPicture | null)[] {
  if ('document' in globalThis) throw new Error('sections are computed in a worker')
  requireAnswerable(emitters)
  const scale: Pick<QuantityScale, 'levels' | 'edges'> = { levels, edges }
  return cuts.map((cut) => {
    const field = sectionValues(emitters, site, cut)
    return field && sectionPicture(field, scale)
  })
}
