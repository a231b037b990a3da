import { memo, useState } from 'react'
import { Link } from 'react-router'
import type { SeatFigures, TargetOutcome } from '#app/domain/comfort/seat-warmth.ts'
import type { Brief } from '#app/domain/brief/brief.ts'
import { fromSi, unitSymbol, type DisplayUnits } from '#app/domain/units.ts'
import { Choice } from '#app/components/choice.tsx'
import { fluxFigure, warmthFigure } from '#app/editor/figures.ts'
import type { FluxUnit } from '#app/editor/view-choice.ts'

const orders = [
  { value: 'coolest', label: 'Coolest' },
  { value: 'hottest', label: 'Hottest' },
  { value: 'table', label: 'By table' },
] as const
type Order = (typeof orders)[number]['value']

interface SeatsTableProps {
  readonly warmth: readonly SeatFigures[]
  readonly brief: Brief
  readonly units: DisplayUnits
  readonly fluxUnit: FluxUnit
  readonly seatId: string | null
  readonly onSeat: (id: string | null) => void
  readonly onExplain: (id: string) => void
}

/** Every seat with its irradiance at body and head and how it feels; the text of the plan, linked both ways. */
export function SeatsTable({ warmth, brief, units, fluxUnit, seatId, onSeat, onExplain }: SeatsTableProps) {
  const [order, setOrder] = useState<Order>('coolest')
  const { low, high } = brief.target
  return (
    <section aria-labelledby="seats-title" className="border-t border-rule px-4.5 py-3.5">
      <header className="mb-2 flex items-center justify-between gap-2.5">
        <h2 id="seats-title" className="text-sm font-strong">
          Seats
        </h2>
        <Choice label="Order of the seats" options={orders} value={order} onChange={setOrder} />
      </header>
      <table className="w-full border-collapse">
        <caption className="sr-only">
          Seats: irradiance on the body plane and at the head, and how it feels at the design wind
        </caption>
        <thead className="text-2xs text-ink-3 [&_th]:pb-1.5 [&_th]:font-medium">
          <tr>
            <th scope="col" className="text-left">
              Seat
            </th>
            <th scope="col" className="text-left">
              Flux, target {fluxFigure(low, fluxUnit)}–{fluxFigure(high, fluxUnit)}
            </th>
            <th scope="col" className="pl-2 text-right">
              {fluxUnit}
            </th>
            <th scope="col" className="pl-2 text-right">
              Head
            </th>
            <th scope="col" className="pl-2 text-right">
              Feels like {unitSymbol('temperature', units)}
            </th>
          </tr>
        </thead>
        <tbody>
          {ordered(warmth, order).map((each) => (
            <SeatRow
              key={each.seat.id}
              id={each.seat.id}
              target={each.target}
              part={each.body === null ? 0 : Math.min(1, each.body / 600)}
              low={low}
              high={high}
              body={fluxFigure(each.body, fluxUnit)}
              head={fluxFigure(each.head, fluxUnit)}
              before={warmthFigure(each.feelsLike.design.before, units)}
              after={warmthFigure(each.feelsLike.design.after, units)}
              aside={asideOf(each)}
              pointed={seatId === each.seat.id}
              onSeat={onSeat}
              onExplain={onExplain}
            />
          ))}
        </tbody>
      </table>
      {warmth.length === 0 && (
        <p className="py-2 text-ink-2">
          No seats yet.{' '}
          <Link relative="path" to="../../site" className="underline pointer-coarse:py-3">
            Enter them on the site
          </Link>
        </p>
      )}
    </section>
  )
}

function ordered(warmth: readonly SeatFigures[], order: Order): readonly SeatFigures[] {
  const byName = (a: SeatFigures, b: SeatFigures) => a.seat.id.localeCompare(b.seat.id, 'en', { numeric: true })
  if (order === 'table')
    return warmth.toSorted((a, b) => a.seat.group.localeCompare(b.seat.group, 'en', { numeric: true }) || byName(a, b))
  const sign = order === 'coolest' ? 1 : -1
  const figure = ({ body }: SeatFigures) => Math.round(fromSi(body ?? 0, 'irradiance', 'metric'))
  const uncounted = ({ onFloor, target }: SeatFigures) => Number(!onFloor || target === 'not heated')
  return warmth.toSorted((a, b) => uncounted(a) - uncounted(b) || sign * (figure(a) - figure(b)) || byName(a, b))
}

function asideOf({ onFloor, target, seat }: SeatFigures): string | null {
  if (!onFloor) return 'outside the floor, not counted'
  if (target === 'not heated') return 'not heated'
  return seat.priority === 'secondary' ? 'secondary' : null
}

interface SeatRowProps {
  readonly id: string
  readonly target: TargetOutcome
  /** Of the scale's 600 W/m². */
  readonly part: number
  readonly low: number
  readonly high: number
  readonly body: string
  readonly head: string
  readonly before: string
  readonly after: string
  readonly aside: string | null
  readonly pointed: boolean
  readonly onSeat: (id: string | null) => void
  readonly onExplain: (id: string) => void
}

/** One seat; drawn again only when one of its figures changes. */
const SeatRow = memo(function SeatRow(row: SeatRowProps) {
  return (
    <tr
      className={`border-t border-rule ${row.pointed ? 'bg-ember-wash' : 'hover:bg-paper-sunk'}`}
      onPointerEnter={() => row.onSeat(row.id)}
      onPointerLeave={() => row.onSeat(null)}
    >
      <th scope="row" className="py-0.5 text-left font-medium whitespace-nowrap">
        <button
          type="button"
          onClick={() => row.onExplain(row.id)}
          onFocus={() => row.onSeat(row.id)}
          aria-label={`Seat ${row.id}, ${row.target}: how its figures are made`}
          className="inline-flex min-h-6 cursor-pointer items-center gap-2 hover:underline pointer-coarse:min-h-11"
        >
          <TargetMark target={row.target} />
          {row.id}
        </button>
        {row.aside && <span className="ml-2 text-2xs font-regular text-ink-3">{row.aside}</span>}
      </th>
      <td className="py-0.5">
        <FluxBar part={row.part} low={row.low} high={row.high} within={row.target === 'in target'} />
      </td>
      <td className="py-0.5 pl-2 text-right font-strong">{row.body}</td>
      <td className="py-0.5 pl-2 text-right text-ink-2">{row.head}</td>
      <td className="py-0.5 pl-2 text-right whitespace-nowrap text-ink-2">
        {row.before} → <span className="text-ink">{row.after}</span>
      </td>
    </tr>
  )
})

/** Ring of a seat as on the plan: dashed below the target, plain in it, double above. */
function TargetMark({ target }: { target: TargetOutcome }) {
  const dashed = target === 'below' || target === 'no heater'
  return (
    <svg width="12" height="12" viewBox="0 0 12 12" fill="none" stroke="currentColor" aria-hidden="true">
      <circle cx="6" cy="6" r="5" strokeWidth="1.3" strokeDasharray={dashed ? '2 1.6' : undefined} />
      {target === 'above' && <circle cx="6" cy="6" r="2.6" strokeWidth="1.2" />}
    </svg>
  )
}

/** A bar on the scale of 0 to 600 W/m², with the target's limits. */
function FluxBar({ part, low, high, within }: { part: number; low: number; high: number; within: boolean }) {
  const at = (irradiance: number) => (irradiance / 600) * 124
  return (
    <svg width="124" height="14" viewBox="0 0 124 14" aria-hidden="true" className="w-full max-w-31">
      <rect x="0" y="4" width={part * 124} height="6" rx="2" className={within ? 'fill-ink' : 'fill-ink-2'} />
      <path d={`M${at(low)} 0v13M${at(high)} 0v13`} strokeWidth="1" className="stroke-rule-strong" />
      <path d={`M${at(low)} 12.5H${at(high)}`} strokeWidth="2" strokeDasharray="2 2" className="stroke-rule-strong" />
    </svg>
  )
}
