import type { ReactNode } from 'react'
import { hasOthersThanPrimary, type LayoutTotals, type SeatFigures } from '#app/domain/comfort/seat-warmth.ts'
import type { Brief } from '#app/domain/brief/brief.ts'
import { formatMoney } from '#app/domain/comparison/list-price.ts'
import { formatQuantity, unitSymbol, type DisplayUnits } from '#app/domain/units.ts'
import { fluxFigure, noFigure, warmthFigure } from '#app/editor/figures.ts'
import type { FluxUnit } from '#app/editor/view-choice.ts'

interface FiguresRowProps {
  readonly totals: LayoutTotals
  readonly warmth: readonly SeatFigures[]
  readonly brief: Brief
  readonly units: DisplayUnits
  readonly fluxUnit: FluxUnit
  /** Opens the inputs, formula and source of a seat's figure. */
  readonly onExplain: (seatId: string) => void
  /** At the right end where there is no row of tools: the scale. */
  readonly children?: ReactNode
}

/** The figures a layout is judged by, in one row; a seat's figure opens how it was made. */
export function FiguresRow(props: FiguresRowProps) {
  const { totals, warmth, brief, units, fluxUnit, onExplain, children } = props
  const { coldest, headMaximum, costPerEvening } = totals
  const coolest = hasOthersThanPrimary(warmth) ? 'Coolest primary seat' : 'Coolest seat'
  const seat = (figure: { seatId: string } | null) => (figure ? () => onExplain(figure.seatId) : undefined)
  return (
    <div className="flex flex-none items-center overflow-x-auto border-b border-rule">
      <dl className="flex flex-1">
        <Figure label="Seats in target" value={totals.heaters === 0 ? noFigure : totals.seatsInTarget}>
          of {totals.seatsCounted}
        </Figure>
        <Figure
          label={coldest ? `${coolest}, ${coldest.seatId}` : coolest}
          value={fluxFigure(coldest?.irradiance ?? null, fluxUnit)}
          onExplain={seat(coldest)}
        >
          {fluxUnit}
        </Figure>
        <Figure label="Evenness, min / mean" value={totals.evenness === null ? noFigure : totals.evenness.toFixed(2)} />
        <Figure
          label={headMaximum ? `Hottest head, ${headMaximum.seatId}` : 'Hottest head'}
          value={fluxFigure(headMaximum?.irradiance ?? null, fluxUnit)}
          onExplain={seat(headMaximum)}
        >
          {fluxUnit}
        </Figure>
        <Figure
          label={`Feels like, at ${formatQuantity(brief.windDesign, 'speed', units)}`}
          value={feelsLikeRange(warmth, units)}
          wide
        >
          {unitSymbol('temperature', units)}
        </Figure>
        <Figure
          label={`Power, ${totals.heaters} ${totals.heaters === 1 ? 'heater' : 'heaters'}`}
          value={(totals.power / 1000).toFixed(1)}
          wide
        >
          kW
        </Figure>
        <Figure
          label="Per evening"
          value={costPerEvening ? formatMoney(costPerEvening.amount, costPerEvening.currency, true) : noFigure}
          wide
        />
      </dl>
      {children}
    </div>
  )
}

/** Before with the heaters off, and the least and most after, at the design wind: "4.2 → 7.2–8.6". */
function feelsLikeRange(warmth: readonly SeatFigures[], units: DisplayUnits): string {
  const counted = warmth.filter(({ onFloor, seat }) => onFloor && seat.priority !== 'not heated')
  const before = counted.map(({ feelsLike }) => feelsLike.design.before)
  if (before.length === 0) return noFigure
  const after = counted.map(({ feelsLike }) => feelsLike.design.after).filter((each) => each !== null)
  const start = warmthFigure(Math.min(...before), units)
  if (after.length === 0) return `${start} → ${noFigure}`
  const [least, most] = [warmthFigure(Math.min(...after), units), warmthFigure(Math.max(...after), units)]
  return least === most ? `${start} → ${least}` : `${start} → ${least}–${most}`
}

interface FigureProps {
  readonly label: string
  readonly value: ReactNode
  /** Left out where the page is narrow. */
  readonly wide?: boolean
  readonly onExplain?: (() => void) | undefined
  readonly children?: ReactNode
}

function Figure({ label, value, wide = false, onExplain, children }: FigureProps) {
  const figure = (
    <>
      {value}
      {children !== undefined && <small className="ml-1 text-xs font-regular text-ink-2">{children}</small>}
    </>
  )
  return (
    <div
      className={`flex-auto border-l border-rule px-2.5 pt-2 pb-1.5 whitespace-nowrap first:border-l-0 first:pl-4.5 wide:px-3.5 ${wide ? 'hidden desk:block' : ''}`}
    >
      <dt className="text-2xs text-ink-3">{label}</dt>
      <dd className="text-lg leading-6 font-medium tracking-[-0.01em] wide:text-[1.1875rem]">
        {onExplain ? (
          <button
            type="button"
            onClick={onExplain}
            aria-label={`How this figure is made: ${label}`}
            className="-mx-1 cursor-pointer rounded-sm px-1 decoration-1 underline-offset-4 hover:underline pointer-coarse:-mt-5 pointer-coarse:-mb-1.5 pointer-coarse:pt-5 pointer-coarse:pb-1.5"
          >
            {figure}
          </button>
        ) : (
          figure
        )}
      </dd>
    </div>
  )
}
