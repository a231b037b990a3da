import type { Wall } from '#app/domain/site/site.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'
import type { Vec2 } from '#app/domain/vector.ts'

/** How thick a wall is drawn, m: its real thickness is not asked for. */
export const wallBand = 0.24

/** The four corners of a wall's band on the drawing; it lies on the side away from the floor. */
export function wallCorners(wall: Wall, view: PlanView): Vec2[] {
  const a = toScreen(view, wall.from)
  const b = toScreen(view, wall.to)
  const length = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1
  const band = wallBand * view.scale
  const away: Vec2 = [(-(b[1] - a[1]) / length) * band, ((b[0] - a[0]) / length) * band]
  return [a, b, [b[0] + away[0], b[1] + away[1]], [a[0] + away[0], a[1] + away[1]]]
}

/** A house wall: a solid band with a 45° hatch and its name where there is room for words of the least size. */
export function WallBand({
  wall,
  view,
  pen,
  hatch,
  named,
}: {
  wall: Wall
  view: PlanView
  pen: Pen
  /** Id of the hatch pattern. */
  hatch: string
  named: boolean
}) {
  const corners = wallCorners(wall, view)
  const path = `M${corners.map((corner) => corner.map((v) => v.toFixed(1)).join(' ')).join('L')}Z`
  const middle: Vec2 = [corners.reduce((sum, c) => sum + c[0], 0) / 4, corners.reduce((sum, c) => sum + c[1], 0) / 4]
  const [a, b] = corners
  const length = a && b ? Math.hypot(b[0] - a[0], b[1] - a[1]) : 0
  const turn = a && b && Math.abs(b[1] - a[1]) > Math.abs(b[0] - a[0]) ? -90 : 0
  const name = wallName(wall)
  const fits = wallBand * view.scale >= pen.text + 2 && length > textWidth(name, pen.text, 500) + 12
  return (
    <g data-wall={wall.id}>
      <path
        d={path}
        fill={pen.colours.wall}
        stroke={pen.theme === 'day' ? pen.colours.line : undefined}
        strokeWidth={pen.theme === 'day' ? 1.1 * pen.k : undefined}
      />
      <path d={path} fill={`url(#${hatch})`} />
      {named && fits ? (
        <Words
          x={middle[0]}
          y={middle[1]}
          centred
          anchor="middle"
          turn={turn}
          size={pen.text}
          colour={pen.colours.line}
          halo={pen.colours.halo}
        >
          {name}
        </Words>
      ) : null}
    </g>
  )
}

const wallName = (wall: Wall): string =>
  `${wall.name.charAt(0).toUpperCase()}${wall.name.slice(1)}${wall.material === 'combustible' ? ', combustible' : ''}`
