import { coverHeightAt } from '#app/domain/site/cover.ts'
import type { Site, Wall } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { wallBand } from '#app/drawing/plan/wall.tsx'
import { alongCut, behindCut, onSection, type SectionView } from '#app/drawing/section/section-view.ts'

/** Where a section cuts a wall, m in plan; null when it passes by. */
function crossing(wall: Wall, view: SectionView): Vec2 | null {
  const [a, b] = [behindCut(view.cut, wall.from), behindCut(view.cut, wall.to)]
  if (a * b > 0 || a === b) return null
  const t = a / (a - b)
  return [wall.from[0] + t * (wall.to[0] - wall.from[0]), wall.from[1] + t * (wall.to[1] - wall.from[1])]
}

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
  const at = crossing(wall, view)
  if (!at) return null
  const along = alongCut(view.cut, at)
  const [dx, dy] = [wall.to[0] - wall.from[0], wall.to[1] - wall.from[1]]
  const outward = Math.sign(view.cut.along === 'y' ? -dx : dy) || -1
  const near = 0.01
  const inside: Vec2 = view.cut.along === 'y' ? [at[0], at[1] - outward * near] : [at[0] - outward * near, at[1]]
  const over = Math.max(2.4, ...site.covers.flatMap((cover) => coverHeightAt(cover, inside[0], inside[1]) ?? [])) + 0.2
  const top = wall.top ?? over
  const [x1, y1] = onSection(view, along, top)
  const [x2, y2] = onSection(view, along + outward * wallBand, 0)
  const box = { x: Math.min(x1, x2), y: y1, width: Math.abs(x2 - x1), height: y2 - y1 }
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
