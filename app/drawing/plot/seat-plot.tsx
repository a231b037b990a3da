import { scaleLinear } from 'd3-scale'
import { patternIds, ZonePatterns } from '#app/drawing/heat/patterns.tsx'
import type { Target } from '#app/drawing/heat/scale.ts'
import { VariantMark, type VariantMarkKind } from '#app/drawing/plot/variant-mark.tsx'
import { groupsOf, type PlotSeat, type SeatGroup } from '#app/drawing/plot/seat-groups.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { WarmthDisc, type WarmthWord } from '#app/drawing/plan/seat.tsx'
import { fontFamily } from '#app/drawing/theme.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** Colours of a plot: those of the page or the sheet it stands on (CSS values). */
export interface PlotInk {
  readonly ink: string
  readonly quiet: string
  readonly rule: string
  readonly paper: string
  readonly ember: string
}

/** Colours of a plot on a printed sheet. */
export const sheetInk: PlotInk = {
  ink: '#1d2233',
  quiet: '#5a6072',
  rule: '#d9d2c6',
  paper: '#ffffff',
  ember: '#b4471a',
}

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
export const plotTop = (series: readonly PlotSeries[]): number =>
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
function WordRow({ series, y, left, along, column, pen, ink }: Frame & { series: PlotSeries }) {
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

interface Frame {
  readonly left: number
  readonly right: number
  readonly y: number
  readonly bottom: number
  readonly up: (value: number) => number
  readonly column: number
  readonly along: (i: number) => number
  readonly pen: Pen
  readonly ink: PlotInk
  readonly format: (irradiance: number) => string
}

function PlotGround({
  name,
  target,
  top,
  left,
  right,
  y,
  bottom,
  up,
  pen,
  ink,
  format,
}: Frame & { name: string; target: Target; top: number }) {
  const ids = patternIds(name)
  const lines = Array.from({ length: Math.floor(top / 50) + 1 }, (_, i) => i * 50)
  const written = lines.filter(
    (v) => v % 100 === 0 && [target.low, target.high].every((edge) => Math.abs(up(edge) - up(v)) > pen.text),
  )
  const zones = [
    ['above target', (y + up(target.high)) / 2],
    ['in target', (up(target.low) + up(target.high)) / 2],
    ['below target', (up(target.low) + bottom) / 2],
  ] as const
  return (
    <>
      {lines.map((value) => (
        <line
          key={value}
          x1={left}
          x2={right}
          y1={up(value)}
          y2={up(value)}
          stroke={ink.rule}
          strokeWidth={0.8 * pen.k}
        />
      ))}
      <rect
        x={left}
        y={up(target.high)}
        width={right - left}
        height={up(target.low) - up(target.high)}
        fill={`url(#${ids.dots})`}
        opacity={0.55}
      />
      <rect
        x={left}
        y={y}
        width={right - left}
        height={Math.max(0, up(target.high) - y)}
        fill={`url(#${ids.hatch})`}
        opacity={0.22}
      />
      {[target.low, target.high].map((value) => (
        <line
          key={value}
          x1={left}
          x2={right}
          y1={up(value)}
          y2={up(value)}
          stroke={ink.ink}
          strokeWidth={1.6 * pen.k}
        />
      ))}
      {[...written, target.low, target.high].map((value) => (
        <Words
          key={value}
          x={left - 7 * pen.k}
          y={up(value)}
          centred
          anchor="end"
          size={pen.text}
          weight={value === target.low || value === target.high ? 600 : 400}
          colour={value === target.low || value === target.high ? ink.ink : ink.quiet}
        >
          {format(value)}
        </Words>
      ))}
      {zones.map(([word, at]) => (
        <Words key={word} x={right + 8 * pen.k} y={at} centred size={pen.text} weight={500} colour={ink.ink}>
          {word}
        </Words>
      ))}
    </>
  )
}

function PlotColumns({
  groups,
  seats,
  left,
  right,
  y,
  bottom,
  column,
  along,
  pen,
  ink,
  below,
}: Frame & { groups: readonly SeatGroup[]; seats: readonly PlotSeat[]; below: number }) {
  const hasNumbers = seats.every((seat) => textWidth(seat.number, pen.text, 400) + 2 < column)
  return (
    <>
      {groups.slice(1).map((group) => (
        <line
          key={group.name}
          x1={left + group.from * column}
          x2={left + group.from * column}
          y1={y}
          y2={bottom + below + 7 * pen.k}
          stroke={group.isNewRow ? ink.quiet : ink.rule}
          strokeWidth={(group.isNewRow ? 1.5 : 0.8) * pen.k}
        />
      ))}
      <line x1={right} x2={right} y1={y} y2={bottom} stroke={ink.rule} strokeWidth={0.8 * pen.k} />
      {hasNumbers
        ? seats.map((seat, i) => (
            <Words
              key={seat.id}
              x={along(i)}
              y={bottom + below + 6 * pen.k + pen.text}
              anchor="middle"
              size={pen.text}
              weight={400}
              colour={ink.quiet}
            >
              {seat.number}
            </Words>
          ))
        : null}
      {groups.map((group) =>
        textWidth(group.name, pen.text, 600) + 4 < group.count * column ? (
          <Words
            key={group.name}
            x={left + (group.from + group.count / 2) * column}
            y={bottom + below + (hasNumbers ? 12 : 7) * pen.k + (hasNumbers ? 2 : 1) * pen.text}
            anchor="middle"
            size={pen.text}
            weight={600}
            colour={ink.ink}
          >
            {group.name}
          </Words>
        ) : null,
      )}
    </>
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

/** The plot as a picture of its own. */
export function SeatPlotDrawing({ label, ...plot }: Omit<SeatPlotProps, 'x' | 'y'> & { label: string }) {
  const { width, height } = plot
  return (
    <svg width={width} height={height} viewBox={`0 0 ${width} ${height}`} role="img" aria-label={label}>
      <SeatPlot {...plot} x={0} y={6} height={height - 6} />
    </svg>
  )
}
