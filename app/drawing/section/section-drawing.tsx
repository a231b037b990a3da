import { Fragment, memo } from 'react'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { HeatFill, Isolines } from '#app/drawing/heat/heat-fill.tsx'
import { patternIds, ZonePatterns } from '#app/drawing/heat/patterns.tsx'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import type { Pen } from '#app/drawing/pen.ts'
import type { SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { Person } from '#app/drawing/section/person.tsx'
import { HeightOf, PlaneLines, SectionHeights } from '#app/drawing/section/section-figures.tsx'
import { SectionHangers, SectionHeater } from '#app/drawing/section/section-heater.tsx'
import {
  CoverBand,
  cutCovers,
  CutMember,
  CutObstacle,
  SectionPole,
  SectionTable,
  type CutCover,
} from '#app/drawing/section/section-structure.tsx'
import {
  alongCut,
  behindCut,
  cutExtent,
  isBetweenEnds,
  onSection,
  sectionTransform,
  topOf,
  type SectionView,
} from '#app/drawing/section/section-view.ts'
import type { NearestPair } from '#app/drawing/nearest/nearest-dimension.tsx'
import { SectionNearest } from '#app/drawing/section/section-nearest.tsx'
import { CutWall } from '#app/drawing/section/cut-wall.tsx'
import type { SectionPicture } from '#app/drawing/section/section-values.ts'
import { fontFamily } from '#app/drawing/theme.ts'

/** The fill goes up to here, m: above it people are not, and near a heater every value is off the scale. */
const fillTop = 1.3
/** Seats and tables this near to the cut are drawn, m; heaters nearer than the second figure. */
const nearSeats = 0.75
const nearHeaters = 0.25
/** How far behind the cut a section that a person put still shows heaters, m. */
const seenBehind = 1.5

/** A section through some of the heaters of a layout. */
export interface SectionProps {
  /** Unique in the page: names the drawing's patterns and clips. */
  readonly name: string
  readonly site: Site
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly view: SectionView
  /** Of the house: what hangs from what, and how exact unstated sizes are. */
  readonly rules: HouseRules
  readonly pen: Pen
  readonly quantity: QuantityScale
  /** From `sectionPicture`; null while it is computed and without heaters. */
  readonly picture: SectionPicture | null
  readonly selected?: ReadonlySet<string>
  /** Nearest pairs of findings; those that the section shows are drawn. */
  readonly nearest?: readonly NearestPair[]
}

const place = ({ x, y }: MountedHeater): Vec2 => [x, y]

/** Heaters of a layout at a way behind the cut that `isShown` picks, in their order along it. */
const heatersWhere = (layout: Layout, cut: SectionCut, isShown: (behind: number) => boolean): MountedHeater[] =>
  layout.heaters
    .filter((heater) => isShown(behindCut(cut, place(heater))) && isBetweenEnds(cut, alongCut(cut, place(heater))))
    .sort((a, b) => alongCut(cut, place(a)) - alongCut(cut, place(b)))

/** The heaters that stand in a section, in their order along it. */
export const heatersInCut = (layout: Layout, cut: SectionCut): MountedHeater[] =>
  heatersWhere(layout, cut, (behind) => Math.abs(behind) <= nearHeaters)

/** Of a section that a person put: the heaters that are seen a little behind it. */
export const heatersBehindCut = (layout: Layout, cut: SectionCut): MountedHeater[] =>
  cut.placed ? heatersWhere(layout, cut, (behind) => behind > nearHeaters && behind <= seenBehind) : []

/** "Section A–A through H3 and H4". */
export function sectionTitle(layout: Layout, cut: SectionCut): string {
  const ids = heatersInCut(layout, cut).map(({ id }) => id)
  const behind = heatersBehindCut(layout, cut).map(({ id }) => id)
  const through = ids.length > 0 ? ` through ${asRange(ids)}` : ''
  const seen = behind.length > 0 ? `${through ? ',' : ''} ${asRange(behind)} behind it` : ''
  return `Section ${cut.letter}–${cut.letter}${through}${seen}`
}

const asRange = (ids: readonly string[]): string => (ids.length > 2 ? `${ids[0]} to ${ids.at(-1)}` : ids.join(' and '))

/** The section as a group, fill first, figures last. */
function Section(props: SectionProps) {
  const { name, site, layout, models, rules, view, pen, selected = new Set<string>() } = props
  const covers = cutCovers(site, view)
  const known = (heater: MountedHeater) => {
    const model = models.get(heater.model)
    return model ? [{ heater, model }] : []
  }
  const heaters = heatersInCut(layout, view.cut).flatMap(known)
  const behind = heatersBehindCut(layout, view.cut).flatMap(known)
  const isNear = (point: Vec2, near = nearSeats) =>
    Math.abs(behindCut(view.cut, point)) <= near && isBetweenEnds(view.cut, alongCut(view.cut, point), 0.25)
  const shownHeight = heaters.find(({ heater }) => selected.has(heater.id)) ?? heaters[0]
  return (
    <g fontFamily={fontFamily}>
      <SectionAir {...props} covers={covers} />
      {site.walls.map((wall) => (
        <CutWall key={wall.id} {...{ wall, site, view, pen }} hatch={patternIds(name).wall} />
      ))}
      <PlaneLines site={site} view={view} pen={pen} />
      {site.obstacles.map((obstacle) => (
        <CutObstacle key={obstacle.id} {...{ obstacle, view, pen }} />
      ))}
      {covers.map((cut) => (
        <CoverBand key={cut.cover.id} {...{ cut, view, pen }} />
      ))}
      {site.members.map((member) => (
        <CutMember key={member.id} {...{ member, site, view, pen }} />
      ))}
      {site.poles
        .filter((pole) => isNear(pole.at, nearHeaters))
        .map((pole) => (
          <SectionPole key={pole.id} {...{ pole, view, pen }} />
        ))}
      {site.tables
        .filter((table) => isNear(table.centre))
        .map((table) => (
          <SectionTable key={table.id} {...{ table, view, pen }} />
        ))}
      {site.seats
        .filter((seat) => isNear([seat.x, seat.y]))
        .map((seat) => (
          <Person key={seat.id} {...{ seat, view, pen }} />
        ))}
      <g opacity={0.55}>
        {behind.map(({ heater, model }) => (
          <Fragment key={heater.id}>
            <SectionHangers {...{ heater, model, site, rules, view, pen }} />
            <SectionHeater {...{ heater, model, site, view, pen }} selected={selected.has(heater.id)} />
          </Fragment>
        ))}
      </g>
      {heaters.map(({ heater, model }) => (
        <SectionHangers key={heater.id} {...{ heater, model, site, rules, view, pen }} />
      ))}
      {heaters.map(({ heater, model }) => (
        <SectionHeater key={heater.id} {...{ heater, model, site, view, pen }} selected={selected.has(heater.id)} />
      ))}
      {shownHeight ? <HeightOf heater={shownHeight.heater} site={site} view={view} pen={pen} /> : null}
      <SectionHeights {...{ site, covers, view, pen }} bareTolerance={rules.toleranceUnstated} />
      {props.nearest ? <SectionNearest pairs={props.nearest} {...{ site, layout, view, pen }} /> : null}
    </g>
  )
}

/** The air of the section: its fill up to 1.30 m, isolines up to the heaters, the ground. */
const SectionAir = memo(function SectionAir(props: SectionProps & { covers: readonly CutCover[] }) {
  const { name, site, view, pen, quantity, picture, covers } = props
  const [low, high] = cutExtent(view.cut)
  const ids = patternIds(name)
  const [x1, floor] = onSection(view, low, 0)
  const [x2] = onSection(view, high, 0)
  const left = Math.min(x1, x2)
  const width = Math.abs(x2 - x1)
  const people = onSection(view, low, fillTop)[1]
  const top = onSection(view, low, topOf(site, []))[1]
  const lines = onSection(view, low, picture?.top ?? 0)[1]
  const transform = sectionTransform(view)
  const ceiling = covers.flatMap(({ from, to }) => [
    onSection(view, from.along, from.z),
    onSection(view, to.along, to.z),
  ])
  const air =
    ceiling.length === 2
      ? `M${x1} ${floor}L${ceiling.map((p) => p.join(' ')).join('L')}L${x2} ${floor}Z`
      : `M${x1} ${floor}L${x1} ${top}L${x2} ${top}L${x2} ${floor}Z`
  return (
    <>
      <defs>
        <ZonePatterns name={name} pen={pen} />
        <ZonePatterns name={`${name}-air`} pen={pen} scale={view.scale} />
        <clipPath id={ids.clip}>
          <path d={air} />
        </clipPath>
        <clipPath id={`${name}-lines`}>
          <rect x={left} y={lines} width={width} height={floor - lines} />
        </clipPath>
        <clipPath id={`${name}-people`}>
          <rect x={left} y={people} width={width} height={floor - people} />
        </clipPath>
      </defs>
      <rect width={view.width} height={view.height} fill={pen.colours.ground} />
      <path d={air} fill={pen.colours.floor} />
      {picture ? (
        <g clipPath={`url(#${ids.clip})`}>
          <g clipPath={`url(#${name}-people)`}>
            <HeatFill picture={picture} quantity={quantity} transform={transform} name={`${name}-air`} />
          </g>
          <g clipPath={`url(#${name}-lines)`}>
            <Isolines {...{ picture, quantity, transform, pen }} scale={view.scale * 1.2} />
          </g>
        </g>
      ) : null}
      <line
        x1={left - 12}
        x2={left + width + 10}
        y1={floor}
        y2={floor}
        stroke={pen.colours.line}
        strokeWidth={1.3 * pen.k}
      />
    </>
  )
})

/** A section as a picture of its own; `label` is its text for those who do not see it. */
export function SectionDrawing({ label, ...section }: SectionProps & { label: string }) {
  const { width, height } = section.view
  return (
    <svg width={width} height={height} viewBox={`0 0 ${width} ${height}`} role="img" aria-label={label}>
      <Section {...section} />
    </svg>
  )
}
