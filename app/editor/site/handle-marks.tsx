import { coverPlane, planeHeightAt } from '#app/domain/site/cover.ts'
import { edgeLength } from '#app/domain/site/outline.ts'
import type { Site } from '#app/domain/site/site.ts'
import { dimensionText } from '#app/drawing/plan/dimension-text.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { Words } from '#app/drawing/text/words.tsx'
import type { Chosen } from '#app/editor/site/choice.ts'
import { handlesOf, hasOutline } from '#app/editor/site/handles.ts'

interface HandleMarksProps {
  readonly site: Site
  readonly chosen: Chosen
  readonly view: PlanView
  readonly pen: Pen
}

/** More corners than these carry no figures between them. */
const manyCorners = 40

/** Corners and ends of the chosen thing that can be dragged; along outlines the edges' lengths and where a corner can be added. */
export function HandleMarks({ site, chosen, view, pen }: HandleMarksProps) {
  const handles = handlesOf(site, chosen)
  const outlined = hasOutline(site, chosen)
  const cover = chosen.kind === 'cover' ? site.covers.find(({ id }) => id === chosen.ids[0]) : undefined
  const plane = cover ? coverPlane(cover) : null
  const colour = pen.colours.selection
  return (
    <g>
      {outlined && handles.length <= manyCorners
        ? handles.map((at, i) => {
            const next = handles[(i + 1) % handles.length] ?? at
            const [a, b] = [toScreen(view, at), toScreen(view, next)]
            const [x, y] = [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2]
            const room = Math.hypot(b[0] - a[0], b[1] - a[1])
            if (room < 30) return null
            return (
              <g key={i}>
                <path
                  d={`M${x - 4} ${y}H${x + 4}M${x} ${y - 4}V${y + 4}`}
                  stroke={colour}
                  strokeWidth={1.4}
                  opacity={0.9}
                />
                {room > 60 ? (
                  <Words x={x + 7} y={y - 7} size={pen.text} weight={600} colour={colour} halo={pen.colours.halo}>
                    {dimensionText(edgeLength(handles, i), site.displayUnits)}
                  </Words>
                ) : null}
              </g>
            )
          })
        : null}
      {handles.map((at, i) => {
        const [x, y] = toScreen(view, at)
        const here = chosen.part === i
        const height = cover?.corners[i]?.[2]
        return (
          <g key={i}>
            <rect
              x={x - 5}
              y={y - 5}
              width={10}
              height={10}
              rx={1.5}
              fill={here ? colour : pen.colours.ground}
              stroke={colour}
              strokeWidth={1.6}
            />
            {height === undefined || !plane ? null : (
              <Words x={x + 9} y={y - 8} size={pen.text} weight={600} colour={colour} halo={pen.colours.halo}>
                {dimensionText(i < 3 ? height : planeHeightAt(plane, at[0], at[1]), site.displayUnits)}
              </Words>
            )}
          </g>
        )
      })}
    </g>
  )
}
