import type { PlotInk } from '#app/drawing/plot/plot-ink.ts'

/** A figure's change when a size is less and when it is more; null without the figure. */
interface BarChange {
  readonly lower: number | null
  readonly higher: number | null
}

/** Height of a bar and the room between the two, px. */
const thick = 7
const between = 3

/**
 * What one size changes, from a line of no change: above, hollow, with the size less by its tolerance; below, filled,
 * with the size more. `most` is the change that reaches the end of the drawing, the same for all bars that are compared.
 */
export function SizeBar({
  change: { lower, higher },
  most,
  width,
  ink,
  label,
}: {
  change: BarChange
  most: number
  width: number
  ink: PlotInk
  label: string
}) {
  const middle = width / 2
  const reach = middle - 2
  const lengthOf = (change: number) => (most > 0 ? Math.min(1, Math.abs(change) / most) * reach : 0)
  const bars = [
    { key: 'lower', change: lower ?? 0, y: 2, fill: ink.paper },
    { key: 'higher', change: higher ?? 0, y: 2 + thick + between, fill: ink.ink },
  ]
  const height = 2 * thick + between + 4
  return (
    <svg width={width} height={height} viewBox={`0 0 ${width} ${height}`} role="img" aria-label={label}>
      <line x1={2} x2={width - 2} y1={height / 2} y2={height / 2} stroke={ink.rule} strokeWidth={1} />
      {bars.map(({ key, change, y, fill }) => {
        const length = lengthOf(change)
        return length < 0.25 ? null : (
          <rect
            key={key}
            data-way={key}
            x={change < 0 ? middle - length : middle}
            y={y}
            width={length}
            height={thick}
            fill={fill}
            stroke={ink.ink}
            strokeWidth={1.2}
          />
        )
      })}
      <line x1={middle} x2={middle} y1={0} y2={height} stroke={ink.ink} strokeWidth={1.2} />
    </svg>
  )
}
