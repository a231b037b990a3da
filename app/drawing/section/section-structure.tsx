import { coverHeightAt, coverOutline, coverPlane, planeHeightAt } from '#app/domain/site/cover.ts'
import { undersideAt } from '#app/domain/site/member.ts'
import type { Cover, Member, Obstacle, Pole, Site, Table } from '#app/domain/site/site.ts'
import { degrees, type Vec2 } from '#app/domain/vector.ts'
import {
  halfSeen,
  stretchesIn,
  stretchesOfShape,
  stripOutline,
  type Stretch,
} from '#app/drawing/section/cut-outline.ts'
import { alongCut, behindCut, onSection, pointOfCut, type SectionView } from '#app/drawing/section/section-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { toleranceOf } from '#app/domain/site/tolerance.ts'

const rounded = (value: number): number => Math.round(value * 10) / 10
const path = (points: readonly Vec2[]): string => `M${points.map((p) => p.map(rounded).join(' ')).join('L')}`

/** A cover where the section cuts it: its two ends along the cut with the underside's height and tolerance there, m. */
export interface CutCover {
  readonly cover: Cover
  readonly from: { readonly along: number; readonly z: number }
  readonly to: { readonly along: number; readonly z: number }
  /** Fall along the section, degrees; 0 when level along it. */
  readonly slopeDeg: number
}

/** The covers that a section cuts. */
export function cutCovers(site: Site, { cut }: SectionView): CutCover[] {
  return site.covers.flatMap((cover) => {
    const plane = coverPlane(cover)
    const [stretch] = stretchesIn(coverOutline(cover), cut, cut.placed ? 0 : undefined)
    if (!plane || !stretch || stretch[1] - stretch[0] < 0.05) return []
    const endAt = (along: number) => ({ along, z: planeHeightAt(plane, ...pointOfCut(cut, along)) })
    const [from, to] = [endAt(stretch[0]), endAt(stretch[1])]
    const slopeDeg = degrees(Math.atan2(Math.abs(to.z - from.z), to.along - from.along))
    return [{ cover, from, to, slopeDeg }]
  })
}

/** Tolerance of a cover's height over a place of the section, m; null when it cannot be told. */
export const coverTolerance = (
  site: Site,
  { cover }: CutCover,
  view: SectionView,
  along: number,
  bareTolerance: number,
): number | null =>
  toleranceOf(
    (moved) => {
      const same = moved.covers.find(({ id }) => id === cover.id)
      return same ? coverHeightAt(same, ...pointOfCut(view.cut, along)) : null
    },
    site,
    bareTolerance,
    [{ of: 'cover', id: cover.id }],
  )

/** The cover as a band over its underside. */
export function CoverBand({ cut, view, pen }: { cut: CutCover; view: SectionView; pen: Pen }) {
  const thick = 5.3 * pen.k
  const a = onSection(view, cut.from.along, cut.from.z)
  const b = onSection(view, cut.to.along, cut.to.z)
  const band = path([a, b, [b[0], b[1] - thick], [a[0], a[1] - thick]])
  return (
    <path
      d={`${band}Z`}
      fill={pen.colours.ground}
      stroke={pen.colours.line}
      strokeWidth={pen.k}
      strokeLinejoin="round"
      data-cover={cut.cover.id}
    />
  )
}

/**
 * A member where it is cut: its section, filled, wider the more askew the cut runs to it, with its underside at both
 * edges. Lying in the section: its underside along it.
 */
export function CutMember({ member, site, view, pen }: { member: Member; site: Site; view: SectionView; pen: Pen }) {
  const { cut } = view
  if ([member.from, member.to].every((end) => Math.abs(behindCut(cut, end)) < 0.06)) {
    const low = [member.from, member.to].flatMap((end) => {
      const z = undersideAt(site, member, end[0], end[1])
      return z === null ? [] : [onSection(view, alongCut(cut, end), z)]
    })
    return low.length === 2 ? (
      <path d={path(low)} stroke={pen.colours.line} strokeWidth={1.6 * pen.k} fill="none" data-member={member.id} />
    ) : null
  }
  const half = member.width / 2
  const [stretch] = stretchesIn(stripOutline(member.from, member.to, half, half), cut)
  if (!stretch) return null
  const ends = stretch.flatMap((along) => {
    const z = undersideAt(site, member, ...pointOfCut(cut, along))
    return z === null ? [] : [onSection(view, along, z)]
  })
  const [a, b] = ends
  if (!a || !b) return null
  const wider = Math.max(0, 3 * pen.k - (b[0] - a[0])) / 2
  const depth = Math.max(4 * pen.k, Math.min(member.depth, 0.14) * view.scale)
  const low: readonly Vec2[] = [
    [a[0] - wider, a[1]],
    [b[0] + wider, b[1]],
  ]
  return (
    <path
      d={`${path([...low, ...low.toReversed().map(([x, y]): Vec2 => [x, y - depth])])}Z`}
      fill={pen.colours.secondLine}
      stroke={pen.colours.line}
      strokeWidth={0.9 * pen.k}
      data-member={member.id}
    />
  )
}

/** An obstacle in every stretch in which the section cuts it. */
export function CutObstacle({ obstacle, view, pen }: { obstacle: Obstacle; view: SectionView; pen: Pen }) {
  return stretchesOfShape(obstacle.shape, view.cut).map((stretch) => (
    <ObstacleStretch key={stretch[0]} {...{ obstacle, stretch, view, pen }} />
  ))
}

/** An obstacle where it is cut, in its true place and height; crossed when solid, dashed when it hangs or moves. */
function ObstacleStretch({
  obstacle,
  stretch,
  view,
  pen,
}: {
  obstacle: Obstacle
  stretch: Stretch
  view: SectionView
  pen: Pen
}) {
  const { shape } = obstacle
  const [x1, top] = onSection(view, stretch[0], shape.z[1])
  const [x2, bottom] = onSection(view, stretch[1], shape.z[0])
  const left = Math.min(x1, x2)
  const width = Math.max(1.5 * pen.k, Math.abs(x2 - x1))
  const height = bottom - top
  if (obstacle.kind === 'cable' && width < 12)
    return (
      <circle
        cx={rounded(left + width / 2)}
        cy={rounded((top + bottom) / 2)}
        r={2.4 * pen.k}
        fill={pen.colours.ground}
        stroke={pen.colours.secondLine}
        strokeWidth={pen.k}
      />
    )
  const isSheet = height > 12 * width
  const box = { x: rounded(left), y: rounded(top), width: rounded(width), height: rounded(height) }
  return (
    <g data-obstacle={obstacle.id} opacity={obstacle.movable ? 0.7 : 1}>
      <rect
        {...box}
        fill={isSheet ? 'none' : pen.colours.ground}
        fillOpacity={0.6}
        stroke={isSheet ? pen.colours.secondLine : pen.colours.line}
        strokeWidth={0.9 * pen.k}
        strokeDasharray={isSheet || obstacle.movable ? `${3 * pen.k} ${2 * pen.k}` : undefined}
      />
      {!isSheet && !obstacle.movable && width < 40 ? (
        <path
          d={`M${box.x} ${box.y}l${box.width} ${box.height}M${box.x} ${rounded(top + height)}l${box.width} ${-box.height}`}
          stroke={pen.colours.line}
          strokeWidth={0.7 * pen.k}
        />
      ) : null}
    </g>
  )
}

/** A table near the section: its top and two legs. */
export function SectionTable({ table, view, pen }: { table: Table; view: SectionView; pen: Pen }) {
  const half = halfSeen(table, view.cut)
  const middle = alongCut(view.cut, table.centre)
  const at = (along: number, z: number) => onSection(view, along, z)
  return (
    <path
      d={
        path([at(middle - half, table.height), at(middle + half, table.height)]) +
        path([at(middle, table.height), at(middle, 0.02)]) +
        path([at(middle - half * 0.5, 0.02), at(middle + half * 0.5, 0.02)])
      }
      fill="none"
      stroke={pen.colours.line}
      strokeWidth={pen.k}
      opacity={0.75}
    />
  )
}

/** A pole near the section, from the floor to its top. */
export function SectionPole({ pole, view, pen }: { pole: Pole; view: SectionView; pen: Pen }) {
  const [x, top] = onSection(view, alongCut(view.cut, pole.at), pole.top)
  const width = Math.max(2.5 * pen.k, pole.diameter * view.scale)
  return (
    <rect
      x={rounded(x - width / 2)}
      y={rounded(top)}
      width={rounded(width)}
      height={rounded(view.y0 - top)}
      fill={pen.colours.secondLine}
      stroke={pen.colours.ground}
      strokeWidth={0.8 * pen.k}
      data-pole={pole.id}
    />
  )
}
