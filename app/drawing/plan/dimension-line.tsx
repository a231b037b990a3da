import type { Vec2 } from '#app/domain/vector.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** A place on a chain of dimensions: where it is on the drawing, px along the chain, and the site's coordinate, m. */
export interface ChainStop {
  readonly px: number
  readonly metres: number
}

/** A chain of dimensions, level (at = y px) or upright (at = x px), its stops in rising px. */
export interface DimensionChainProps {
  readonly direction: 'level' | 'upright'
  readonly at: number
  readonly stops: readonly ChainStop[]
  readonly text: (metres: number) => string
  readonly pen: Pen
}

const rounded = (value: number): number => Math.round(value * 10) / 10

/** Dimensions one after another: a line, 45° ticks, the figure above each, beside the chain where it is too short. */
export function DimensionChain({ direction, at, stops, text, pen }: DimensionChainProps) {
  const point = (px: number, aside: number): Vec2 => (direction === 'level' ? [px, at + aside] : [at + aside, px])
  const first = stops[0]
  const last = stops.at(-1)
  if (!first || !last || stops.length < 2) return null
  const [x1, y1] = point(first.px, 0)
  const [x2, y2] = point(last.px, 0)
  return (
    <g>
      <line
        x1={rounded(x1)}
        y1={rounded(y1)}
        x2={rounded(x2)}
        y2={rounded(y2)}
        stroke={pen.colours.line}
        strokeWidth={0.8 * pen.k}
        opacity={0.85}
      />
      {stops.map((stop) => (
        <Tick key={stop.px} at={point(stop.px, 0)} direction={direction} pen={pen} />
      ))}
      {stops.slice(1).map((stop, i) => {
        const before = stops[i] ?? stop
        const isEnd = i === 0 ? 'first' : i === stops.length - 2 ? 'last' : null
        return (
          <Figure
            key={stop.px}
            {...{ direction, at, before, stop, isEnd, pen }}
            figure={text(Math.abs(stop.metres - before.metres))}
          />
        )
      })}
    </g>
  )
}

function Tick({ at: [x, y], direction, pen }: { at: Vec2; direction: 'level' | 'upright'; pen: Pen }) {
  const arm = 3.6 * pen.k
  const reach = (direction === 'level' ? [0, 6] : [6, 0]).map((v) => v * pen.k)
  return (
    <>
      <line
        x1={rounded(x - (reach[0] ?? 0))}
        y1={rounded(y - (reach[1] ?? 0))}
        x2={rounded(x + (reach[0] ?? 0) * 0.6)}
        y2={rounded(y + (reach[1] ?? 0) * 0.6)}
        stroke={pen.colours.secondLine}
        strokeWidth={0.6 * pen.k}
      />
      <line
        x1={rounded(x - arm)}
        y1={rounded(y + arm)}
        x2={rounded(x + arm)}
        y2={rounded(y - arm)}
        stroke={pen.colours.line}
        strokeWidth={1.2 * pen.k}
      />
    </>
  )
}

interface FigureProps {
  readonly direction: 'level' | 'upright'
  readonly at: number
  readonly before: ChainStop
  readonly stop: ChainStop
  readonly isEnd: 'first' | 'last' | null
  readonly figure: string
  readonly pen: Pen
}

/** The figure of one dimension: above its line; outside an end or below the line where the dimension is too short. */
function Figure({ direction, at, before, stop, isEnd, figure, pen }: FigureProps) {
  const room = stop.px - before.px
  const width = textWidth(figure, pen.text, 500)
  const fits = width + 6 * pen.k <= room
  const level = direction === 'level'
  const style = { size: pen.text, colour: pen.colours.line, halo: pen.colours.halo, haloWidth: 3 * pen.k }
  const middle = (before.px + stop.px) / 2
  if (fits || isEnd === null) {
    const aside = fits ? -4 * pen.k : pen.text + 1.5 * pen.k
    return (
      <Words
        x={level ? middle : at + aside}
        y={level ? at + aside : middle}
        turn={level ? 0 : -90}
        anchor="middle"
        {...style}
      >
        {figure}
      </Words>
    )
  }
  const outside = isEnd === 'first' ? before.px - 8 * pen.k : stop.px + 8 * pen.k
  const anchor = (isEnd === 'first') === level ? 'end' : 'start'
  return (
    <Words
      x={level ? outside : at + pen.text * 0.35}
      y={level ? at + pen.text * 0.35 : outside}
      turn={level ? 0 : -90}
      anchor={anchor}
      {...style}
    >
      {figure}
    </Words>
  )
}
