import { coverOutline, coverSlope } from '#app/domain/site/cover.ts'
import type { Cover, Level, Site } from '#app/domain/site/site.ts'
import { formatQuantity } from '#app/domain/units.ts'
import { degrees, type Vec2 } from '#app/domain/vector.ts'
import { dimensionText } from '#app/drawing/plan/dimension-text.ts'
import { outlinePath } from '#app/drawing/plan/outline.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { Words } from '#app/drawing/text/words.tsx'

const middleOf = (outline: readonly Vec2[]): Vec2 => [
  outline.reduce((sum, [x]) => sum + x, 0) / outline.length,
  outline.reduce((sum, [, y]) => sum + y, 0) / outline.length,
]

/** A fall per length below this is none that anybody could see or measure. */
const level = 5e-4

/** The slope of a cover in words: degrees and inches per foot; "level" when it has none. */
export function slopeText(cover: Cover): string {
  const slope = coverSlope(cover)
  if (!slope) return 'no plane'
  if (slope.fall < level) return 'level'
  return `${degrees(slope.angle).toFixed(1)}°, ${formatQuantity(slope.angle, 'slope', 'imperial')}`
}

/** A cover over the floor: its edge dashed, because it is overhead, an arrow downhill and the slope. */
export function CoverMark({ cover, view, pen }: { cover: Cover; view: PlanView; pen: Pen }) {
  const outline = coverOutline(cover)
  const slope = coverSlope(cover)
  const [x, y] = toScreen(view, middleOf(outline))
  const [dx, dy] = slope ? [slope.downhill[0], -slope.downhill[1]] : [0, 0]
  const isSloping = slope !== null && slope.fall >= level
  const half = 16 * pen.k
  const [tx, ty] = [x + dx * half, y + dy * half]
  const wing = (side: 1 | -1) => `${tx - dx * 7 + side * dy * 4} ${ty - dy * 7 - side * dx * 4}`
  return (
    <g data-cover={cover.id} opacity={0.75}>
      <path
        d={outlinePath(outline, view)}
        fill="none"
        stroke={pen.colours.secondLine}
        strokeWidth={0.9 * pen.k}
        strokeDasharray={`${9 * pen.k} ${4 * pen.k}`}
      />
      {isSloping ? (
        <path
          d={`M${x - dx * half} ${y - dy * half}L${tx} ${ty}M${wing(1)}L${tx} ${ty}L${wing(-1)}`}
          fill="none"
          stroke={pen.colours.secondLine}
          strokeWidth={pen.k}
        />
      ) : null}
      {isSloping ? (
        <Words
          x={x + 8 * pen.k}
          y={y - 8 * pen.k}
          size={pen.text}
          colour={pen.colours.secondLine}
          halo={pen.colours.halo}
        >
          {slopeText(cover)}
        </Words>
      ) : null}
    </g>
  )
}

/** A part of the floor that lies higher or lower: its edge and by how much. */
export function LevelMark({
  level: part,
  view,
  pen,
  units,
}: {
  level: Level
  view: PlanView
  pen: Pen
  units: Site['displayUnits']
}) {
  const [x, y] = toScreen(view, middleOf(part.outline))
  const sign = part.height > 0 ? '+' : part.height < 0 ? '−' : ''
  return (
    <g data-level={part.id}>
      <path
        d={outlinePath(part.outline, view)}
        fill={pen.colours.secondLine}
        fillOpacity={0.12}
        stroke={pen.colours.line}
        strokeWidth={0.7 * pen.k}
      />
      <Words x={x} y={y} centred anchor="middle" size={pen.text} colour={pen.colours.line} halo={pen.colours.halo}>
        {`${sign}${dimensionText(Math.abs(part.height), units)}`}
      </Words>
    </g>
  )
}
