import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import { DimensionChain } from '#app/drawing/plan/dimension-line.tsx'
import { dimensionText } from '#app/drawing/plan/dimension-text.ts'
import { heightLine } from '#app/drawing/section/section-heater.tsx'
import { coverTolerance, type CutCover } from '#app/drawing/section/section-structure.tsx'
import { alongCut, cutExtent, onSection, type SectionView } from '#app/drawing/section/section-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** The height that most seats share, m; the default of a seated guest without seats. */
function usual(heights: readonly number[], fallback: number): number {
  const count = new Map<number, number>()
  for (const height of heights) count.set(height, (count.get(height) ?? 0) + 1)
  return [...count].reduce<[number, number]>((best, one) => (one[1] > best[1] ? one : best), [fallback, 0])[0]
}

/** The body plane, long dashes, and the head plane, dash-dot, at the height most seats have; named at the right. */
export function PlaneLines({ site, view, pen }: { site: Site; view: SectionView; pen: Pen }) {
  const [low, high] = cutExtent(view.cut)
  const planes = [
    {
      word: 'Head',
      z: usual(
        site.seats.map(({ headHeight }) => headHeight),
        1.1,
      ),
      dash: '7 3 1.5 3',
    },
    {
      word: 'Body',
      z: usual(
        site.seats.map(({ bodyHeight }) => bodyHeight),
        0.6,
      ),
      dash: '7 3',
    },
  ]
  return planes.map(({ word, z, dash }) => {
    const [a, y] = onSection(view, low, z)
    const [b] = onSection(view, high, z)
    return (
      <g key={word}>
        <line
          x1={a}
          x2={b}
          y1={y}
          y2={y}
          stroke={pen.colours.line}
          strokeWidth={0.9 * pen.k}
          strokeDasharray={dash}
          opacity={0.95}
        />
        <Words
          x={Math.max(a, b) + 7 * pen.k}
          y={y}
          centred
          size={pen.text}
          colour={pen.colours.line}
          halo={pen.colours.ground}
        >
          {`${word} ${dimensionText(z, site.displayUnits)}`}
        </Words>
      </g>
    )
  })
}

const upright = (view: SectionView, from: number, to: number) => [
  { px: onSection(view, 0, to)[1], metres: to },
  { px: onSection(view, 0, from)[1], metres: from },
]

/** Heights of the covers at both ends of the section with their tolerance, and the slope in degrees. */
export function SectionHeights({
  site,
  covers,
  view,
  pen,
  bareTolerance,
}: {
  site: Site
  covers: readonly CutCover[]
  view: SectionView
  pen: Pen
  bareTolerance: number
}) {
  return covers.map((cut) => {
    const ends = [cut.from, cut.to].map((end) => ({ ...end, x: onSection(view, end.along, 0)[0] }))
    const [a, b] = ends
    if (!a || !b) return null
    const isLevel = cut.slopeDeg < 0.1
    const [left, right] = a.x < b.x ? [a, b] : [b, a]
    const [mx, my] = onSection(view, (a.along + b.along) / 2, (a.z + b.z) / 2)
    const textOf = (end: { along: number; z: number }): string => {
      const inner = end.along + (end === left ? 1 : -1) * 1e-4
      const tolerance = coverTolerance(site, cut, view, inner, bareTolerance)
      const size = dimensionText(end.z, site.displayUnits)
      if (tolerance === null || tolerance === 0) return size
      return `${size} ± ${site.displayUnits === 'metric' ? tolerance.toFixed(2) : `${Math.round(tolerance / 0.0127) / 2}″`}`
    }
    return (
      <g key={cut.cover.id}>
        <DimensionChain
          direction="upright"
          at={left.x - 31 * pen.k}
          stops={upright(view, 0, left.z)}
          text={() => textOf(left)}
          pen={pen}
        />
        {isLevel ? null : (
          <DimensionChain
            direction="upright"
            at={right.x + (site.displayUnits === 'metric' ? 80 : 106) * pen.k}
            stops={upright(view, 0, right.z)}
            text={() => textOf(right)}
            pen={pen}
          />
        )}
        {isLevel ? (
          <Words
            x={right.x + 7 * pen.k}
            y={onSection(view, right.along, right.z)[1] + 4}
            size={pen.text}
            colour={pen.colours.line}
            halo={pen.colours.ground}
          >
            {`Roof ${dimensionText(right.z, site.displayUnits)}`}
          </Words>
        ) : (
          <Words
            x={mx}
            y={my - 10 * pen.k}
            anchor="middle"
            size={pen.text}
            colour={pen.colours.line}
            halo={pen.colours.ground}
          >
            {`${cut.slopeDeg.toFixed(1)}°`}
          </Words>
        )}
      </g>
    )
  })
}

/** The height of one heater's lowest point above the floor. */
export function HeightOf({
  heater,
  site,
  view,
  pen,
}: {
  heater: MountedHeater
  site: Site
  view: SectionView
  pen: Pen
}) {
  const { foot, head } = heightLine(heater, view)
  const aside = heightLineAside(heater, view)
  const x = foot[0] + aside
  const arm = 3.6 * pen.k
  return (
    <g>
      <line
        x1={x}
        x2={x}
        y1={head[1]}
        y2={foot[1]}
        stroke={pen.colours.line}
        strokeWidth={0.8 * pen.k}
        opacity={0.85}
      />
      <line x1={head[0]} x2={x} y1={head[1]} y2={head[1]} stroke={pen.colours.secondLine} strokeWidth={0.6 * pen.k} />
      {[head[1], foot[1]].map((y) => (
        <line
          key={y}
          x1={x - arm}
          x2={x + arm}
          y1={y + arm}
          y2={y - arm}
          stroke={pen.colours.line}
          strokeWidth={1.2 * pen.k}
        />
      ))}
      <Words
        x={x - 4 * pen.k}
        y={head[1] + (foot[1] - head[1]) * 0.3}
        turn={-90}
        anchor="middle"
        size={pen.text}
        colour={pen.colours.line}
        halo={pen.colours.halo}
      >
        {dimensionText(heater.lowestPoint, site.displayUnits)}
      </Words>
    </g>
  )
}

/** The height stands a little aside of the heater, towards the middle of the drawing. */
const heightLineAside = (heater: MountedHeater, view: SectionView): number => {
  const [x] = onSection(view, alongCut(view.cut, [heater.x, heater.y]), 0)
  return (x < view.width / 2 ? 1 : -1) * 0.62 * view.scale
}
