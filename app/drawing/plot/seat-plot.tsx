import { scaleLinear } from 'd3-scale'
import { ZonePatterns } from '#app/drawing/heat/patterns.tsx'
import type { Target } from '#app/drawing/heat/scale.ts'
import { VariantMark, type VariantMarkKind } from '#app/drawing/plot/variant-mark.tsx'
import { PlotColumns, PlotGround, type PlotFrame } from '#app/drawing/plot/plot-frame.tsx'
import type { PlotInk } from '#app/drawing/plot/plot-ink.ts'
import { groupsOf, type PlotSeat } from '#app/drawing/plot/seat-groups.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { WarmthDisc, type WarmthWord } from '#app/drawing/plan/seat.tsx'
import { fontFamily } from '#app/drawing/theme.ts'

/** The seats of one variant: its mark and the irradiance of each seat, W/m², null where it has no meaning. */
export interface PlotSeries {
  readonly mark: VariantMarkKind
  readonly label: string
  readonly values: readonly (number | null)[]
  /** Each seat's warmth in a word of the seven-point scale, drawn as strokes below the plot; absent: not shown. */
  readonly words?: readonly (WarmthWord | null)[]
}

/** Each seat as a column with a mark per variant over the target band. */
export interface SeatPlotProps {
  /** Unique in the page: names the plot's patterns. */
  readonly name: string
  readonly seats: readonly PlotSeat[]
  readonly series: readonly PlotSeries[]
  readonly target: Target
  readonly pen: Pen
  readonly ink: PlotInk
  readonly x: number
  readonly y: number
  readonly width: number
  readonly height: number
  readonly format?: (irradiance: number) => string
}

const whole = (value: number): string => String(Math.round(value))

/** Upper end of the plot: 450 W/m², or the next 50 above the highest figure. */
const plotTop = (series: readonly PlotSeries[]): number =>
  Math.max(450, ...series.flatMap(({ values }) => values.map((value) => Math.ceil(((value ?? 0) + 10) / 50) * 50)))

/** The plot as a group. */
export function SeatPlot(props: SeatPlotProps) {
  const { name, seats, series, target, pen, ink, x, y, width, height } = props
  const format = props.format ?? whole
  const left = x + 30 * pen.k
  const right = x + width - 76 * pen.k
  const worded = series.filter(({ words }) => words !== undefined)
  const bottom = y + height - (34 + wordRow * worded.length) * pen.k
  const top = plotTop(series)
  const up = scaleLinear().domain([0, top]).range([bottom, y])
  const column = (right - left) / Math.max(1, seats.length)
  const along = (i: number): number => left + (i + 0.5) * column
  const frame = { left, right, y, bottom, up, column, along, pen, ink, format }
  return (
    <g fontFamily={fontFamily}>
      <defs>
        <ZonePatterns name={name} pen={pen} />
      </defs>
      <PlotGround {...frame} name={name} target={target} top={top} />
      {worded.map((one, row) => (
        <WordRow key={one.mark} {...frame} series={one} y={bottom + (row + 0.72) * wordRow * pen.k} />
      ))}
      <PlotColumns {...frame} groups={groupsOf(seats)} seats={seats} below={worded.length * wordRow * pen.k} />
      {seats.map((seat, i) => (
        <SeatMarks key={seat.id} {...{ series, pen, ink, up, column }} i={i} x={along(i)} />
      ))}
    </g>
  )
}

/** Height of a row of strokes, px at weight 1. */
const wordRow = 14

/** One variant's words as strokes below the plot, its mark at the left. */
function WordRow({ series, y, left, along, column, pen, ink }: PlotFrame & { series: PlotSeries }) {
  return (
    <g>
      <VariantMark
        kind={series.mark}
        x={left - 12 * pen.k}
        y={y}
        r={4 * pen.k}
        pen={pen}
        ink={ink.ink}
        paper={ink.paper}
        ember={ink.ember}
      />
      {(series.words ?? []).map((word, i) =>
        word === null ? null : (
          <WarmthDisc
            key={i}
            x={along(i)}
            y={y}
            r={Math.min(5.2 * pen.k, column * 0.42)}
            word={word}
            pen={{ ...pen, colours: { ...pen.colours, figure: ink.ink, line: ink.ink, seat: ink.paper } }}
          />
        ),
      )}
    </g>
  )
}

function SeatMarks({
  series,
  i,
  x,
  up,
  column,
  pen,
  ink,
}: {
  series: readonly PlotSeries[]
  i: number
  x: number
  up: (value: number) => number
  column: number
  pen: Pen
  ink: PlotInk
}) {
  const known = series.flatMap(({ mark, values }) => {
    const value = values[i]
    return value === undefined || value === null ? [] : [{ mark, at: up(value) }]
  })
  const heights = known.map(({ at }) => at)
  const r = Math.min(5 * pen.k, Math.max(1.8, column * 0.42))
  return (
    <g>
      {known.length > 1 ? (
        <line
          x1={x}
          x2={x}
          y1={Math.min(...heights)}
          y2={Math.max(...heights)}
          stroke={ink.quiet}
          strokeWidth={1.1 * pen.k}
        />
      ) : null}
      {known.map(({ mark, at }) => (
        <VariantMark
          key={mark}
          kind={mark}
          x={x}
          y={at}
          r={r}
          pen={pen}
          ink={ink.ink}
          paper={ink.paper}
          ember={ink.ember}
        />
      ))}
    </g>
  )
}
