import type { Layout } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import { lengthOf, subtract } from '#app/domain/vector.ts'
import { figurePatch, placeFigure } from '#app/drawing/nearest/label-place.ts'
import { NearestDimension, type NearestPair } from '#app/drawing/nearest/nearest-dimension.tsx'
import { patch, type Patch } from '#app/drawing/plan/occupied.ts'
import { behindCut, onSection, alongCut, projected, type SectionView } from '#app/drawing/section/section-view.ts'
import type { Pen } from '#app/drawing/pen.ts'

/** A pair this near to the cut at both ends is drawn in its section, m. */
const near = 1
/** And shows at least this share of its length there. */
const leastShare = 0.7

/** Whether a section shows a pair: near the cut, and not running towards the eye. */
export function isInSection(view: SectionView, { from, to }: NearestPair): boolean {
  if ([from, to].some((end) => Math.abs(behindCut(view.cut, end)) > near)) return false
  const seen = Math.hypot(alongCut(view.cut, to) - alongCut(view.cut, from), to[2] - from[2])
  return seen >= leastShare * lengthOf(subtract(to, from))
}

/** The room that seated people and heaters take in a section, px; figures stand clear of it. */
function takenInSection(site: Site, layout: Layout, view: SectionView): Patch[] {
  const person = 0.6 * view.scale
  const seats = site.seats.map(({ x, y, headHeight }) => {
    const [px, py] = onSection(view, alongCut(view.cut, [x, y]), headHeight / 2)
    return patch(px, py, person, headHeight * view.scale)
  })
  const heaters = layout.heaters.map(({ x, y, lowestPoint }) => {
    const [px, py] = onSection(view, alongCut(view.cut, [x, y]), lowestPoint + 0.06)
    return patch(px, py, 0.5 * view.scale, 0.2 * view.scale)
  })
  return [...seats, ...heaters]
}

/** The nearest pairs that a section shows, as dimensions. */
export function SectionNearest({
  pairs,
  site,
  layout,
  view,
  pen,
}: {
  readonly pairs: readonly NearestPair[]
  readonly site: Site
  readonly layout: Layout
  readonly view: SectionView
  readonly pen: Pen
}) {
  const shown = pairs.filter((pair) => isInSection(view, pair))
  if (shown.length === 0) return null
  const taken = takenInSection(site, layout, view)
  return shown.map((pair, i) => {
    const [from, to] = [projected(view, pair.from), projected(view, pair.to)]
    const around = [...taken]
    taken.push(figurePatch(placeFigure(from, to, pair.figure, around, pen), pair.figure, pen))
    return <NearestDimension key={i} {...{ from, to, pen }} taken={around} figure={pair.figure} chosen={pair.chosen} />
  })
}
