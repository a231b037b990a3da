import { coverHeightAt } from '#app/domain/site/cover.ts'
import type { Site, Wall } from '#app/domain/site/site.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { wallBand } from '#app/drawing/plan/wall.tsx'
import { stretchesIn, stripOutline } from '#app/drawing/section/cut-outline.ts'
import { onSection, pointOfCut, type SectionView } from '#app/drawing/section/section-view.ts'

/** A wall that the section cuts: a hatched band on the side away from the floor, up to its top or past the cover. */
export function CutWall({
  wall,
  site,
  view,
  pen,
  hatch,
}: {
  wall: Wall
  site: Site
  view: SectionView
  pen: Pen
  hatch: string
}) {
  const [stretch] = stretchesIn(stripOutline(wall.from, wall.to, 0, wallBand), view.cut)
  if (!stretch) return null
  const near = 0.01
  const beside = [stretch[0] - near, stretch[1] + near].map((along) => pointOfCut(view.cut, along))
  const covers = beside.flatMap(([x, y]) => site.covers.flatMap((cover) => coverHeightAt(cover, x, y) ?? []))
  const top = wall.top ?? Math.max(2.4, ...covers) + 0.2
  const [x1, y1] = onSection(view, stretch[0], top)
  const [x2, y2] = onSection(view, stretch[1], 0)
  const box = { x: x1, y: y1, width: x2 - x1, height: y2 - y1 }
  return (
    <g data-wall={wall.id}>
      <rect
        {...box}
        fill={pen.colours.wall}
        stroke={pen.theme === 'day' ? pen.colours.line : undefined}
        strokeWidth={pen.k}
      />
      <rect {...box} fill={`url(#${hatch})`} />
    </g>
  )
}
