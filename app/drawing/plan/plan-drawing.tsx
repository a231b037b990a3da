import { memo, type ReactNode } from 'react'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { HeatPicture } from '#app/drawing/heat/contours.ts'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import { PlanDimensions } from '#app/drawing/plan/dimensions.tsx'
import { placeHeaterNames } from '#app/drawing/plan/heater-names.ts'
import { HeaterMark } from '#app/drawing/plan/heater.tsx'
import { type PlanView } from '#app/drawing/plan/plan-view.ts'
import { ScaleBar } from '#app/drawing/plan/scale-bar.tsx'
import { SeatMark, seatsCarryFigures, type SeatSign } from '#app/drawing/plan/seat.tsx'
import { SectionCutMark, type SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { takenBySmallThings } from '#app/drawing/plan/taken.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { PlanGround, PlanHeat, PlanHeatFigures, PlanNames, PlanStructure } from '#app/drawing/plan/plan-parts.tsx'
import { fontFamily } from '#app/drawing/theme.ts'

/** What a plan says beside the site, its heat and its heaters. */
export interface PlanDetail {
  /** Names of members, walls, obstacles and of what lies beyond. */
  readonly names: boolean
  /** Spacings along a row; 'level' leaves out the chain along y and ends that have no room for their figure. */
  readonly spacings: boolean | 'level'
  /** Whole length and depth of the floor. */
  readonly overall: boolean
  readonly scaleBar: boolean
  /** Figures on the isolines. */
  readonly lineFigures: boolean
}

/** Everything a working plan says. */
const workingDetail: PlanDetail = {
  names: true,
  spacings: true,
  overall: true,
  scaleBar: true,
  lineFigures: true,
}

/** A plan of the site with the heaters of one variant. */
export interface PlanProps {
  /** Unique in the page: names the drawing's patterns and its clip. */
  readonly name: string
  readonly site: Site
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly view: PlanView
  readonly pen: Pen
  readonly quantity: QuantityScale
  /** The map; null while it is computed and with no heater. */
  readonly picture: HeatPicture | null
  /** What each seat's disc says, by seat id; a seat without a sign is drawn empty. */
  readonly signs: ReadonlyMap<string, SeatSign>
  readonly detail?: PlanDetail
  readonly selected?: ReadonlySet<string>
  /** Id of a seat that a list points at. */
  readonly pointedSeat?: string | null
  readonly cuts?: readonly SectionCut[]
}

/** A scale bar is at most this share of a narrow drawing, so that there is room beside it. */
const shareOfScaleBar = 0.36
const nothing: ReadonlySet<string> = new Set()
const noCuts: readonly SectionCut[] = []

/**
 * The plan as a group, in the order water, floor, fill, dots, hatch, isolines, wall, outline, beams, obstacles, tables,
 * seats, heaters, dimensions. Heaters, seats and members carry `data-heater`, `data-seat` and `data-member`.
 */
export function Plan(props: PlanProps) {
  const { name, site, layout, models, view, pen, quantity, picture } = props
  const { detail = workingDetail, selected = nothing, cuts = noCuts } = props
  const withFigure = seatsCarryFigures(site.seats, view, pen)
  const modelOf = (code: string) => models.get(code) ?? null
  const names = placeHeaterNames(layout, models, view, pen, takenBySmallThings(site, view, pen, withFigure))
  return (
    <g fontFamily={fontFamily}>
      <PlanGround {...{ name, site, view, pen, cuts }} named={detail.names} />
      {picture ? <PlanHeat {...{ name, site, view, pen, quantity, picture }} /> : null}
      {picture && detail.lineFigures ? (
        <PlanHeatFigures {...{ site, layout, models, view, pen, quantity, picture, withFigure }} named={detail.names} />
      ) : null}
      <PlanStructure {...{ name, site, view, pen }} named={detail.names} />
      {site.seats.map((seat) => (
        <SeatMarkMemo
          key={seat.id}
          {...{ seat, view, pen, withFigure }}
          sign={props.signs.get(seat.id) ?? null}
          pointed={props.pointedSeat === seat.id}
        />
      ))}
      {layout.heaters.map((heater) => (
        <HeaterMarkMemo
          key={heater.id}
          {...{ heater, site, view, pen }}
          model={modelOf(heater.model)}
          selected={selected.has(heater.id)}
          nameAt={names.get(heater.id) ?? null}
        />
      ))}
      {detail.spacings ? (
        <PlanDimensions
          {...{ site, selected, view, pen }}
          heaters={layout.heaters}
          overall={detail.overall}
          upright={detail.spacings !== 'level'}
          narrowEnds={detail.spacings === 'level' ? 'left out' : 'beside'}
        />
      ) : null}
      {detail.names ? <PlanNames {...{ site, layout, models, view, pen, withFigure, cuts }} /> : null}
      {cuts.map((cut) => (
        <SectionCutMark key={cut.letter} {...{ cut, site, view, pen }} />
      ))}
      {detail.scaleBar ? (
        <ScaleBar
          x={view.width - 54 * pen.k}
          y={view.height - 21 * pen.k}
          scale={view.scale}
          displayUnits={site.displayUnits}
          pen={pen}
          most={Math.min(224, shareOfScaleBar * view.width)}
        />
      ) : null}
    </g>
  )
}

/** A sign that says the same is the same sign. */
const saysTheSame = (a: SeatSign | null, b: SeatSign | null): boolean =>
  a === b || JSON.stringify(a) === JSON.stringify(b)

const SeatMarkMemo = memo(
  SeatMark,
  (before, now) =>
    before.seat === now.seat &&
    before.view === now.view &&
    before.pen === now.pen &&
    before.withFigure === now.withFigure &&
    before.pointed === now.pointed &&
    saysTheSame(before.sign, now.sign),
)
const HeaterMarkMemo = memo(
  HeaterMark,
  (before, now) =>
    before.heater === now.heater &&
    before.model === now.model &&
    before.site === now.site &&
    before.view === now.view &&
    before.pen === now.pen &&
    before.selected === now.selected &&
    before.nameAt?.join() === now.nameAt?.join(),
)

/** A plan as a picture of its own. `label` is its text for those who do not see it; `children` lie over everything. */
export function PlanDrawing({ label, children, ...plan }: PlanProps & { label: string; children?: ReactNode }) {
  const { width, height } = plan.view
  return (
    <svg width={width} height={height} viewBox={`0 0 ${width} ${height}`} role="img" aria-label={label}>
      <Plan {...plan} />
      {children}
    </svg>
  )
}
