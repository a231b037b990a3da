import { memo } from 'react'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { HeatPicture } from '#app/drawing/heat/contours.ts'
import { HeatFill, Isolines } from '#app/drawing/heat/heat-fill.tsx'
import { patternIds, ZonePatterns } from '#app/drawing/heat/patterns.tsx'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import { Beyond } from '#app/drawing/plan/beyond.tsx'
import { takenByOverall } from '#app/drawing/plan/dimensions.tsx'
import { PoleMark, TableMark } from '#app/drawing/plan/furniture.tsx'
import { LineLabels, placeLineLabels, placePeaks } from '#app/drawing/plan/line-labels.tsx'
import { MemberLines, MemberNames, takenByMemberNames } from '#app/drawing/plan/members.tsx'
import { notePatch, placeNotes, placePoleNames, takenAbove } from '#app/drawing/plan/notes.ts'
import { ObstacleMark } from '#app/drawing/plan/obstacle.tsx'
import { outlinePath } from '#app/drawing/plan/outline.ts'
import { siteTransform, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { takenByHeaters, takenBySite, takenBySmallThings } from '#app/drawing/plan/taken.ts'
import { WallBand } from '#app/drawing/plan/wall.tsx'
import type { Pen } from '#app/drawing/pen.ts'
import { Words } from '#app/drawing/text/words.tsx'

const noCuts: readonly SectionCut[] = []

/** Places on the drawing's width where sections along y are cut, px. */
const cutsAcross = (cuts: readonly SectionCut[], view: PlanView): number[] =>
  cuts
    .filter(({ from, to, placed }) => !placed && Math.abs(from[0] - to[0]) < Math.abs(from[1] - to[1]))
    .map(({ from }) => view.x0 + view.scale * from[0])

interface PartProps {
  readonly name: string
  readonly site: Site
  readonly view: PlanView
  readonly pen: Pen
}

/** Ground, what lies beyond, and the bare floor, with the patterns and the floor's clip that the rest uses. */
export const PlanGround = memo(function PlanGround({
  name,
  site,
  view,
  pen,
  named,
  cuts = noCuts,
}: PartProps & { named: boolean; cuts?: readonly SectionCut[] }) {
  const crossed = cutsAcross(cuts, view).map((x) => [x - 14, x + 14] as const)
  const avoid = named ? [...crossed, ...takenAbove(site, view, pen)] : []
  return (
    <>
      <defs>
        <ZonePatterns name={name} pen={pen} />
        <ZonePatterns name={`${name}-site`} pen={pen} scale={view.scale} />
        <clipPath id={patternIds(name).clip}>
          <path d={outlinePath(site.floor, view)} />
        </clipPath>
      </defs>
      <rect width={view.width} height={view.height} fill={pen.colours.ground} />
      <Beyond site={site} view={view} pen={pen} named={named} avoid={avoid} />
      <path d={outlinePath(site.floor, view)} fill={pen.colours.floor} />
    </>
  )
})

/** The map's fills, zones and isolines, clipped to the floor. */
export const PlanHeat = memo(function PlanHeat({
  name,
  view,
  pen,
  quantity,
  picture,
}: Omit<PartProps, 'site'> & { quantity: QuantityScale; picture: HeatPicture }) {
  const transform = siteTransform(view)
  return (
    <g clipPath={`url(#${patternIds(name).clip})`}>
      <HeatFill picture={picture} quantity={quantity} transform={transform} name={`${name}-site`} />
      <Isolines picture={picture} quantity={quantity} transform={transform} scale={view.scale} pen={pen} />
    </g>
  )
})

interface FigureProps {
  readonly site: Site
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly view: PlanView
  readonly pen: Pen
  readonly withFigure: boolean
}

/** The isolines' figures and the figures of what lies above the scale, clear of seats, tables, heaters and cables. */
export const PlanHeatFigures = memo(function PlanHeatFigures({
  quantity,
  picture,
  named = true,
  ...rest
}: FigureProps & { quantity: QuantityScale; picture: HeatPicture; named?: boolean }) {
  const { site, layout, models, view, pen, withFigure } = rest
  const things = [...takenBySite(site, view, pen, withFigure), ...takenByHeaters(layout, models, view, pen)]
  const notes = named ? placeNotes(site, view, pen, things).map((note) => notePatch(note, pen)) : []
  const taken = [...things, ...notes]
  const small = [...takenBySmallThings(site, view, pen, withFigure), ...takenByHeaters(layout, models, view, pen)]
  const peaks = placePeaks(picture, quantity, site.floor, view, pen, small)
  return (
    <>
      <LineLabels
        labels={placeLineLabels(picture, quantity, site.floor, view, pen, taken)}
        quantity={quantity}
        pen={pen}
      />
      {peaks.map((peak) => (
        <Words
          key={`${peak.x} ${peak.y}`}
          x={peak.x}
          y={peak.y}
          centred
          anchor="middle"
          size={pen.text}
          weight={600}
          colour={pen.colours.isoline}
          halo={pen.colours.isolineHalo}
          haloWidth={pen.text * 0.34}
        >
          {peak.text}
        </Words>
      ))}
    </>
  )
})

/** Walls, the floor's outline, members, obstacles, poles and tables. */
export const PlanStructure = memo(function PlanStructure({
  name,
  site,
  view,
  pen,
  named,
}: PartProps & { named: boolean }) {
  return (
    <>
      {site.walls.map((wall) => (
        <WallBand key={wall.id} {...{ wall, view, pen, named }} hatch={patternIds(name).wall} />
      ))}
      <path
        d={outlinePath(site.floor, view)}
        fill="none"
        stroke={pen.colours.line}
        strokeWidth={pen.weights.outline * pen.k}
        strokeLinejoin="round"
      />
      {site.members.map((member) => (
        <MemberLines key={member.id} member={member} view={view} pen={pen} />
      ))}
      {site.obstacles.map((obstacle) => (
        <ObstacleMark key={obstacle.id} obstacle={obstacle} view={view} pen={pen} />
      ))}
      {site.poles.map((pole) => (
        <PoleMark key={pole.id} pole={pole} view={view} pen={pen} />
      ))}
      {site.tables.map((table) => (
        <TableMark key={table.id} table={table} view={view} pen={pen} />
      ))}
    </>
  )
})

/** Names of members and obstacles. */
export const PlanNames = memo(function PlanNames(props: FigureProps & { cuts: readonly SectionCut[] }) {
  const { site, layout, models, view, pen, withFigure, cuts } = props
  const taken = [
    ...takenBySite(site, view, pen, withFigure),
    ...takenByHeaters(layout, models, view, pen),
    ...takenByOverall(site, view, pen),
  ]
  const notes = placeNotes(site, view, pen, taken)
  const across = cutsAcross(cuts, view)
  const members = takenByMemberNames(site.members, view, pen, across)
  const poles = placePoleNames(site, view, pen, [...taken, ...notes.map((note) => notePatch(note, pen)), ...members])
  return (
    <>
      <MemberNames members={site.members} view={view} pen={pen} cuts={across} />
      {[...notes, ...poles].map((note) => (
        <Words
          key={note.id}
          x={note.x}
          y={note.y}
          anchor={note.anchor}
          size={pen.text}
          colour={pen.colours.line}
          halo={pen.colours.halo}
          haloWidth={3.2 * pen.k}
        >
          {note.text}
        </Words>
      ))}
    </>
  )
})
