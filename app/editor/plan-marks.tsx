import { memo } from 'react'
import type { SeatFigures } from '#app/domain/comfort/seat-warmth.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { HeatPicture } from '#app/drawing/heat/contours.ts'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { PlanDimensions } from '#app/drawing/plan/dimensions.tsx'
import { PlanGround, PlanHeat, PlanHeatFigures, PlanNames, PlanStructure } from '#app/drawing/plan/plan-parts.tsx'
import type { PlanView } from '#app/drawing/plan/plan-view.ts'
import { ScaleBar } from '#app/drawing/plan/scale-bar.tsx'
import { seatsCarryFigures } from '#app/drawing/plan/seat.tsx'
import { SectionCutMark, type SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { fluxFigure } from '#app/editor/figures.ts'
import { PlanHeater, PlanSeat } from '#app/editor/plan-objects.tsx'
import type { FluxUnit } from '#app/editor/view-choice.ts'

interface PlanUnderProps {
  readonly site: Site
  /** What words on the map keep clear of. */
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly view: PlanView
  readonly pen: Pen
  readonly scale: QuantityScale
  readonly picture: HeatPicture | null
  /** Figures on the isolines; left out while something moves. */
  readonly figures: boolean
  /** Names, left out where the plan is small. */
  readonly words: boolean
  /** What names keep clear of. */
  readonly cuts: readonly SectionCut[]
  readonly label: string
}

interface PlanMarksProps extends Pick<
  PlanUnderProps,
  'site' | 'layout' | 'models' | 'view' | 'pen' | 'words' | 'cuts'
> {
  /** As kept: what names keep clear of, so that they stand still during a gesture. */
  readonly kept: Layout
  readonly warmth: readonly SeatFigures[]
  readonly selected: ReadonlySet<string>
  readonly seatId: string | null
  readonly fluxUnit: FluxUnit
  readonly readOnly: boolean
}

/** Name of the plan's patterns and clip in this page. */
const name = 'plan'

/** What lies under the hand: ground, map and structure; a picture of its own, so that it rests while heaters move. */
export const PlanUnder = memo(function PlanUnder(props: PlanUnderProps) {
  const { site, layout, models, view, pen, scale, picture, words, cuts } = props
  const withFigure = seatsCarryFigures(site.seats, view, pen)
  return (
    <g role="img" aria-label={props.label}>
      <PlanGround {...{ name, site, view, pen, cuts }} named={words} />
      {picture && <PlanHeat {...{ name, site, view, pen, picture }} quantity={scale} />}
      {picture && props.figures && (
        <PlanHeatFigures {...{ site, layout, models, view, pen, picture, withFigure }} quantity={scale} />
      )}
      <PlanStructure {...{ name, site, view, pen }} named={words} />
    </g>
  )
})

/** What the hand works on: seats with their figures, heaters, dimensions and names; heaters and seats are Tab stops. */
export function PlanMarks(props: PlanMarksProps) {
  const { site, layout, kept, models, warmth, view, pen, selected, cuts, words } = props
  const withFigure = seatsCarryFigures(site.seats, view, pen)
  return (
    <>
      {site.seats.map((seat, i) => (
        <PlanSeat
          key={seat.id}
          seat={seat}
          figure={figureOf(warmth[i], props.fluxUnit)}
          outcome={warmth[i]?.target ?? 'no heater'}
          unit={props.fluxUnit}
          pointed={props.seatId === seat.id}
          {...{ view, pen, withFigure }}
        />
      ))}
      {layout.heaters.map((heater) => (
        <PlanHeater
          key={heater.id}
          heater={heater}
          model={models.get(heater.model)}
          selected={selected.has(heater.id)}
          readOnly={props.readOnly}
          {...{ site, view, pen }}
        />
      ))}
      <g aria-hidden="true" pointerEvents="none">
        <PlanDimensions heaters={layout.heaters} overall={words} {...{ selected, site, view, pen }} />
        {words && <PlanNames {...{ site, models, view, pen, withFigure, cuts }} layout={kept} />}
        {cuts.map((cut) => (
          <SectionCutMark key={cut.letter} {...{ cut, site, view, pen }} />
        ))}
      </g>
    </>
  )
}

/** The figure in a seat's disc; null with no heater and before figures are reckoned. */
const figureOf = (warmth: SeatFigures | undefined, unit: FluxUnit): string | null =>
  warmth && warmth.body !== null ? fluxFigure(warmth.body, unit) : null

/** The scale bar at the lower right; it stays there whatever the plan's size. */
export const PlanScaleBar = memo(function PlanScaleBar({
  view,
  pen,
  units,
}: {
  view: PlanView
  pen: Pen
  units: Site['displayUnits']
}) {
  return (
    <g aria-hidden="true" pointerEvents="none">
      <ScaleBar x={view.width - 54} y={view.height - 21} scale={view.scale} displayUnits={units} pen={pen} />
    </g>
  )
})
