import type { Vec2 } from '#app/domain/vector.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { chainFigures, type ChainFigure, type ChainStop } from '#app/drawing/plan/chain-figures.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** A chain of dimensions, level (at = y px) or upright (at = x px), its stops in rising px. */
export interface DimensionChainProps {
  readonly direction: 'level' | 'upright'
  readonly at: number
  readonly stops: readonly ChainStop[]
  readonly text: (metres: number) => string
  readonly pen: Pen
  /** The drawing's size along the chain, px; figures stay within it. */
  readonly length?: number
}

const rounded = (value: number): number => Math.round(value * 10) / 10

/** Dimensions one after another: a line, 45° ticks, the figure above each, elsewhere where it is too short. */
export function DimensionChain({ direction, at, stops, text, pen, length }: DimensionChainProps) {
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
      {chainFigures(stops, text, pen, length).map((figure) => (
        <Figure key={`${figure.place} ${figure.at}`} {...{ direction, at, figure, pen }} />
      ))}
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
  readonly figure: ChainFigure
  readonly pen: Pen
}

function Figure({ direction, at, figure: { text, place, at: along }, pen }: FigureProps) {
  const level = direction === 'level'
  const aside = { above: -4 * pen.k, below: pen.text + 1.5 * pen.k, before: pen.text * 0.35, after: pen.text * 0.35 }
  const across = at + aside[place]
  const anchor = place === 'before' || place === 'after' ? ((place === 'before') === level ? 'end' : 'start') : 'middle'
  return (
    <Words
      x={level ? along : across}
      y={level ? across : along}
      turn={level ? 0 : -90}
      anchor={anchor}
      size={pen.text}
      colour={pen.colours.line}
      halo={pen.colours.halo}
      haloWidth={3 * pen.k}
    >
      {text}
    </Words>
  )
}
