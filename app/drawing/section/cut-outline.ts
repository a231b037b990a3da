import type { Table } from '#app/domain/site/site.ts'
import type { Shape } from '#app/domain/site/site.ts'
import { radians, type Vec2 } from '#app/domain/vector.ts'
import type { SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { alongCut, alongDirectionOf, behindCut, cutExtent } from '#app/drawing/section/section-view.ts'

/** A stretch along a cut, m, its lesser end first. */
export type Stretch = readonly [from: number, to: number]

/** How far outside its ends a section still shows walls and posts at the edge of the floor, m. */
const beyondEnds = 0.3

/**
 * The stretches along a cut in which it runs through an outline in plan, between its ends or `beyond` outside them, m. An
 * edge that lies in the cut belongs to the side behind it.
 */
export function stretchesIn(outline: readonly Vec2[], cut: SectionCut, beyond = beyondEnds): Stretch[] {
  const crossings = outline.flatMap((a, i) => {
    const b = outline[(i + 1) % outline.length] ?? a
    const [da, db] = [behindCut(cut, a), behindCut(cut, b)]
    if (da < 0 === db < 0) return []
    const t = da / (da - db)
    return [alongCut(cut, a) + t * (alongCut(cut, b) - alongCut(cut, a))]
  })
  crossings.sort((a, b) => a - b)
  const stretches: Stretch[] = []
  for (let i = 0; i + 1 < crossings.length; i += 2) {
    const kept = betweenEnds([crossings[i] ?? 0, crossings[i + 1] ?? 0], cut, beyond)
    if (kept) stretches.push(kept)
  }
  return stretches
}

/** What of a stretch a section shows; null outside its ends. */
function betweenEnds([from, to]: Stretch, cut: SectionCut, beyond = beyondEnds): Stretch | null {
  const [low, high] = cutExtent(cut)
  const kept: Stretch = [Math.max(from, low - beyond), Math.min(to, high + beyond)]
  return kept[1] - kept[0] < 1e-9 ? null : kept
}

/** The stretches along a cut in which it runs through a shape. */
export function stretchesOfShape(shape: Shape, cut: SectionCut): Stretch[] {
  if (shape.kind === 'prism') return stretchesIn(shape.outline, cut)
  if (shape.kind === 'box') {
    const [[x1, x2], [y1, y2]] = [shape.x, shape.y]
    return stretchesIn([[x1, y1], [x2, y1], [x2, y2], [x1, y2]], cut) // prettier-ignore
  }
  const off = behindCut(cut, shape.centre)
  if (Math.abs(off) >= shape.radius) return []
  const half = Math.sqrt(shape.radius ** 2 - off ** 2)
  const middle = alongCut(cut, shape.centre)
  const kept = betweenEnds([middle - half, middle + half], cut)
  return kept ? [kept] : []
}

/** The four corners in plan of a strip along a line, `left` and `right` of it, m. */
export function stripOutline(from: Vec2, to: Vec2, left: number, right: number): Vec2[] {
  const length = Math.hypot(to[0] - from[0], to[1] - from[1]) || 1
  const [nx, ny] = [-(to[1] - from[1]) / length, (to[0] - from[0]) / length]
  const beside = ([x, y]: Vec2, by: number): Vec2 => [x + nx * by, y + ny * by]
  return [beside(from, left), beside(to, left), beside(to, -right), beside(from, -right)]
}

/** Half of how wide a table looks square to the cut, m. */
export function halfSeen({ form, size: [width, depth], turnDeg }: Table, cut: SectionCut): number {
  if (form === 'round') return width / 2
  const turn = radians(turnDeg)
  const [along, across] = [alongDirectionOf(cut, [Math.cos(turn), Math.sin(turn)]), alongDirectionOf(cut, [-Math.sin(turn), Math.cos(turn)])] // prettier-ignore
  return (Math.abs(along) * width + Math.abs(across) * depth) / 2
}
