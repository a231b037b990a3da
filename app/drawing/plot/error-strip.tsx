import type { PlotInk } from '#app/drawing/plot/plot-ink.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** A place on the strip where something turns, as a share; `good` when it turns for the better. */
export interface StripMark {
  readonly key: string
  readonly error: number
  readonly good: boolean
}

/**
 * Errors from −most to +most with a mark for each that turns something: a filled tick down for the worse, a hollow one up
 * for the better; the present error as a line across.
 */
export function ErrorStrip({
  marks,
  most,
  at,
  width,
  ink,
}: {
  marks: readonly StripMark[]
  most: number
  at: number
  width: number
  ink: PlotInk
}) {
  const margin = 20
  const line = 26
  const x = (error: number) => margin + ((error + most) / (2 * most)) * (width - 2 * margin)
  const figures = Array.from({ length: 7 }, (_, i) => (i - 3) * (most / 3))
  return (
    <svg width={width} height={62} viewBox={`0 0 ${width} 62`} aria-hidden="true" className="block">
      <line x1={x(-most)} x2={x(most)} y1={line} y2={line} stroke={ink.quiet} strokeWidth={1} />
      {figures.map((error) => (
        <g key={error}>
          <line x1={x(error)} x2={x(error)} y1={line - 3} y2={line + 3} stroke={ink.quiet} strokeWidth={1} />
          <Words x={x(error)} y={58} anchor="middle" size={11} colour={ink.quiet}>
            {`${error > 0 ? '+' : error < 0 ? '−' : ''}${Math.round(Math.abs(error) * 100)} %`}
          </Words>
        </g>
      ))}
      {marks.map(({ key, error, good }) => (
        <path
          key={key}
          d={good ? `M${x(error)} ${line}l-4 -9h8Z` : `M${x(error)} ${line}l-4 9h8Z`}
          fill={good ? ink.paper : ink.ink}
          stroke={ink.ink}
          strokeWidth={1.1}
        />
      ))}
      <line x1={x(at)} x2={x(at)} y1={6} y2={46} stroke={ink.ember} strokeWidth={2.2} />
    </svg>
  )
}
