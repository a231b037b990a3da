import { useState } from 'react'
import { Link } from 'react-router'
import type { SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Target } from '#app/drawing/heat/scale.ts'
import { screenPen } from '#app/drawing/pen.ts'
import { plotSeats } from '#app/drawing/plot/seat-groups.ts'
import type { PlotInk } from '#app/drawing/plot/plot-ink.ts'
import { SeatPlot } from '#app/drawing/plot/seat-plot.tsx'
import { markOf } from '#app/drawing/plot/variant-mark.tsx'
import { toScreen } from '#app/drawing/plan/plan-view.ts'
import { Choice } from '#app/components/choice.tsx'
import { DataTable, type Column } from '#app/components/table.tsx'
import type { LinkedViews } from '#app/editor/compare/use-linked-views.ts'
import type { PointedStore } from '#app/editor/pointed.ts'

interface SeatBySeatProps {
  readonly site: Site
  readonly target: Target
  readonly head: boolean
  readonly plane: string
  readonly width: number
  readonly variants: readonly {
    readonly number: number
    readonly title: string
    readonly warmth: readonly SeatWarmth[] | null
  }[]
  readonly pointed: PointedStore
  readonly views: LinkedViews
}

const pen = screenPen('dusk')
const ink: PlotInk = {
  ink: 'var(--color-ink)',
  quiet: 'var(--color-ink-2)',
  rule: 'var(--color-rule)',
  paper: 'var(--color-paper)',
  ember: 'var(--color-ember)',
}
const plotHeight = 320
/** Below this many px to a column the dots of two seats would touch. */
const leastColumn = 15

/** Every seat of every variant: as dots over the target band, and as a table of the same figures. */
export function SeatBySeat(props: SeatBySeatProps) {
  const { site, target, head, plane, width, variants } = props
  const [as, setAs] = useState<'dots' | 'table'>('dots')
  const valueOf = (warmth: SeatWarmth | undefined) => (warmth ? (head ? warmth.head : warmth.body) : null)
  const seats = plotSeats(site.seats)
  const series = variants.map(({ number, title, warmth }, i) => ({
    mark: markOf(i),
    label: `${number} ${title}`,
    values: seats.map(({ id }) => valueOf(warmth?.find(({ seat }) => seat.id === id))),
  }))
  const plotWidth = Math.max(width, seats.length * leastColumn + 110)
  return (
    <section aria-labelledby="seat-by-seat" className="min-w-0 border-t border-ink pt-2.5">
      <header className="mb-2 flex flex-wrap items-center gap-x-3 gap-y-1">
        <h2 id="seat-by-seat" className="text-sm font-strong">
          Seat by seat
        </h2>
        <p className="flex-1 text-ink-2">W/m² {plane}</p>
        <Choice
          label="Show as"
          value={as}
          onChange={setAs}
          options={[
            { value: 'dots', label: 'Dots' },
            { value: 'table', label: 'Table' },
          ]}
        />
      </header>
      {seats.length === 0 && (
        <p className="text-ink-2">
          No seats yet.{' '}
          <Link relative="path" to="../site" className="underline pointer-coarse:py-3">
            Enter them on the site
          </Link>
        </p>
      )}
      {as === 'dots' && seats.length > 0 && (
        <div className="overflow-x-auto" tabIndex={0} role="region" aria-label="Dots of every seat">
          <svg
            width={plotWidth}
            height={plotHeight}
            viewBox={`0 0 ${plotWidth} ${plotHeight}`}
            role="img"
            aria-label="Irradiance of every seat in each variant; the table holds the same figures"
          >
            <SeatPlot
              name="seat-plot"
              {...{ seats, series, target, pen, ink }}
              x={0}
              y={4}
              width={plotWidth}
              height={plotHeight - 4}
            />
          </svg>
        </div>
      )}
      {as === 'table' && seats.length > 0 && <SeatTable {...props} series={series} seats={seats} />}
    </section>
  )
}

interface Row {
  readonly id: string
  readonly values: readonly (number | null)[]
}

function SeatTable({
  site,
  views,
  pointed,
  seats,
  series,
}: SeatBySeatProps & {
  seats: readonly { readonly id: string }[]
  series: readonly { readonly label: string; readonly values: readonly (number | null)[] }[]
}) {
  const rows: Row[] = seats.map(({ id }, i) => ({ id, values: series.map(({ values }) => values[i] ?? null) }))
  const figure = (value: number | null) => (value === null ? '–' : String(Math.round(value)))
  const point = (id: string) => {
    const seat = site.seats.find((each) => each.id === id)
    if (!seat) return
    const at = [seat.x, seat.y] as const
    pointed.set({ at, screen: toScreen(views.wanted(), at), seatId: id, by: 'focus' })
  }
  const difference = ({ values }: Row) => {
    const [first, second] = values
    return first == null || second == null ? null : second - first
  }
  const columns: Column<Row>[] = [
    {
      key: 'seat',
      heading: 'Seat',
      names: true,
      sortBy: ({ id }) => id,
      cell: ({ id }) => (
        <button
          type="button"
          className="min-h-6 underline decoration-rule-strong underline-offset-2 pointer-coarse:min-h-11"
          onFocus={() => point(id)}
          onPointerEnter={() => point(id)}
          onPointerLeave={() => pointed.set(null)}
          onBlur={() => pointed.set(null)}
        >
          {id}
        </button>
      ),
    },
    ...series.map(({ label }, i) => ({
      key: label,
      heading: label,
      numeric: true,
      sortBy: ({ values }: Row) => values[i] ?? null,
      cell: ({ values }: Row) => figure(values[i] ?? null),
    })),
    ...(series.length === 2
      ? [
          {
            key: 'difference',
            heading: 'Second less first',
            numeric: true,
            sortBy: difference,
            cell: (row: Row) => signed(difference(row)),
          },
        ]
      : []),
  ]
  return (
    <div className="max-h-96 overflow-y-auto pr-2" tabIndex={0} role="region" aria-label="Table of every seat">
      <DataTable caption="Irradiance of every seat, W/m²" columns={columns} rows={rows} rowKey={({ id }) => id} />
    </div>
  )
}

function signed(value: number | null): string {
  if (value === null) return '–'
  const whole = Math.round(value)
  return whole > 0 ? `+${whole}` : String(whole).replace('-', '−')
}
