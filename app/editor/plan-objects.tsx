import { memo } from 'react'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Seat, Site } from '#app/domain/site/site.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { HeaterMark } from '#app/drawing/plan/heater.tsx'
import type { PlanView } from '#app/drawing/plan/plan-view.ts'
import { SeatMark, type SeatOutcome } from '#app/drawing/plan/seat.tsx'
import { heaterWords } from '#app/editor/figures.ts'

const focusClass =
  'outline-none focus-visible:[&>*]:outline-2 focus-visible:[&>*]:outline-offset-4 focus-visible:[&>*]:outline-dusk-select'

interface PlanHeaterProps {
  readonly heater: MountedHeater
  readonly model: HeaterModel | undefined
  readonly site: Site
  readonly view: PlanView
  readonly pen: Pen
  readonly selected: boolean
  readonly readOnly: boolean
}

/** A heater on the plan: one Tab stop with a name; drawn again only when it or the view changes. */
export const PlanHeater = memo(function PlanHeater({ heater, model, selected, readOnly, ...drawn }: PlanHeaterProps) {
  return (
    <g
      tabIndex={0}
      role="button"
      aria-pressed={selected}
      aria-label={heaterWords(heater, model)}
      data-object={heater.id}
      className={`${focusClass} ${readOnly ? 'cursor-pointer' : 'cursor-move'}`}
    >
      <HeaterMark heater={heater} model={model ?? null} selected={selected} {...drawn} />
    </g>
  )
})

interface PlanSeatProps {
  readonly seat: Seat
  /** The figure in the disc; null with no heater. */
  readonly figure: string | null
  readonly outcome: SeatOutcome
  readonly unit: string
  readonly view: PlanView
  readonly pen: Pen
  readonly withFigure: boolean
  readonly pointed: boolean
}

/** A seat on the plan with its figure: one Tab stop; drawn again only when its figure, ring or the view changes. */
export const PlanSeat = memo(function PlanSeat({ figure, outcome, unit, ...mark }: PlanSeatProps) {
  const said = figure === null ? 'no heater yet' : `${figure} ${unit}, ${outcome}`
  return (
    <g
      tabIndex={0}
      role="button"
      aria-label={`Seat ${mark.seat.id}, ${said}`}
      data-object={mark.seat.id}
      className={`${focusClass} cursor-pointer`}
    >
      <SeatMark {...mark} sign={{ kind: 'figure', text: figure ?? '–', outcome }} />
    </g>
  )
})
