import { coverHeightAt, coverOutline } from '#app/domain/site/cover.ts'
import { undersideAt } from '#app/domain/site/member.ts'
import type { Cover, Member, Obstacle, Pole, Site, Table } from '#app/domain/site/site.ts'
import { degrees, type Vec2 } from '#app/domain/vector.ts'
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
export function cutCovers(site: Site, view: SectionView): CutCover[] {
  return site.covers.flatMap((cover) => {
    const crossings = crossingsOf(coverOutline(cover), view)
    const [a, b] = [crossings[0], crossings.at(-1)]
    if (a === undefined || b === undefined || b - a < 0.05) return []
    const inner = 1e-6
    const zOf = (along: number) => coverHeightAt(cover, ...pointOfCut(view.cut, along))
    const [za, zb] = [zOf(a + inner), zOf(b - inner)]
    if (za === null || zb === null) return []
    const slopeDeg = degrees(Math.atan2(Math.abs(zb - za), b - a))
    return [{ cover, from: { along: a, z: za }, to: { along: b, z: zb }, slopeDeg }]
  })
}

/** Tolerance of a cover's height over a place of the section, m; null when it cannot be told. */
export const coverTolerance = (site: Site, { cover }: CutCover, view: SectionView, along: number): number | null =>
  toleranceOf(
    (moved) => {
      const same = moved.covers.find(({ id }) => id === cover.id)
      return same ? coverHeightAt(same, ...pointOfCut(view.cut, along)) : null
    },
    site,
    [{ of: 'cover', id: cover.id }],
  )

/** Places along the section where an outline in plan crosses it, m, in rising order. */
function crossingsOf(outline: readonly Vec2[], view: SectionView): number[] {
  const found = outline.flatMap((a, i) => {
    const b = outline[(i + 1) % outline.length] ?? a
    const [da, db] = [behindCut(view.cut, a), behindCut(view.cut, b)]
    if (Math.abs(da) < 1e-9) return [alongCut(view.cut, a)]
    if (da * db >= 0) return []
    const t = da / (da - db)
    return [alongCut(view.cut, a) + t * (alongCut(view.cut, b) - alongCut(view.cut, a))]
  })
  return found.sort((a, b) => a - b)
}

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

/** A member where it is cut (its section, filled) or, lying in the section, its depth along it. */
export function CutMember({ member, site, view, pen }: { member: Member; site: Site; view: SectionView; pen: Pen }) {
  const [da, db] = [behindCut(view.cut, member.from), behindCut(view.cut, member.to)]
  if (Math.abs(da) < 0.06 && Math.abs(db) < 0.06) {
    const ends = [member.from, member.to].map((end) => ({
      along: alongCut(view.cut, end),
      z: undersideAt(site, member, end[0], end[1]),
    }))
    const low = ends.flatMap(({ along, z }) => (z === null ? [] : [onSection(view, along, z)]))
    return low.length === 2 ? (
      <path d={path(low)} stroke={pen.colours.line} strokeWidth={1.6 * pen.k} fill="none" data-member={member.id} />
    ) : null
  }
  if (da * db > 0) return null
  const t = da / (da - db || 1)
  const along = alongCut(view.cut, member.from) + t * (alongCut(view.cut, member.to) - alongCut(view.cut, member.from))
  const z = undersideAt(site, member, ...pointOfCut(view.cut, along))
  if (z === null) return null
  const [x, y] = onSection(view, along, z)
  const width = Math.max(3 * pen.k, member.width * view.scale)
  const depth = Math.max(4 * pen.k, Math.min(member.depth, 0.14) * view.scale)
  return (
    <rect
      x={rounded(x - width / 2)}
      y={rounded(y - depth)}
      width={rounded(width)}
      height={rounded(depth)}
      fill={pen.colours.secondLine}
      stroke={pen.colours.line}
      strokeWidth={0.9 * pen.k}
      data-member={member.id}
    />
  )
}

/** An obstacle that the section cuts, in its true place and height; crossed when solid, dashed when it hangs or moves. */
export function CutObstacle({ obstacle, view, pen }: { obstacle: Obstacle; view: SectionView; pen: Pen }) {
  const { shape } = obstacle
  const range = cutRange(shape, view)
  if (!range) return null
  const [x1, top] = onSection(view, range[0], shape.z[1])
  const [x2, bottom] = onSection(view, range[1], shape.z[0])
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

/** The stretch along the section in which a shape is cut, m. */
function cutRange(shape: Obstacle['shape'], view: SectionView): readonly [number, number] | null {
  if (shape.kind === 'box') {
    const across = view.cut.along === 'x' ? shape.y : shape.x
    if (view.cut.at < across[0] || view.cut.at > across[1]) return null
    return view.cut.along === 'x' ? shape.x : shape.y
  }
  if (shape.kind === 'cylinder') {
    const off = behindCut(view.cut, shape.centre)
    if (Math.abs(off) >= shape.radius) return null
    const half = Math.sqrt(shape.radius ** 2 - off ** 2)
    const middle = alongCut(view.cut, shape.centre)
    return [middle - half, middle + half]
  }
  const crossings = crossingsOf(shape.outline, view)
  const [a, b] = [crossings[0], crossings.at(-1)]
  return a === undefined || b === undefined || b <= a ? null : [a, b]
}

/** A table near the section: its top and two legs. */
export function SectionTable({ table, view, pen }: { table: Table; view: SectionView; pen: Pen }) {
  const half = (view.cut.along === 'x' ? table.size[0] : table.size[1]) / 2
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
