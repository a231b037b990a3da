import type { FontWeight } from '#app/drawing/text/widths.ts'

/** Words on a drawing, with a halo where they lie over other things. Colours and sizes in px. */
export interface WordsProps {
  readonly x: number
  readonly y: number
  readonly children: string
  readonly size: number
  readonly colour: string
  readonly weight?: FontWeight
  readonly anchor?: 'start' | 'middle' | 'end'
  readonly halo?: string | undefined
  readonly haloWidth?: number
  readonly haloOpacity?: number
  readonly opacity?: number | undefined
  /** Degrees clockwise about (x, y). */
  readonly turn?: number
  /** Whether y is the middle of the letters' height instead of their base line. */
  readonly centred?: boolean
}

const figure = (value: number): number => Math.round(value * 100) / 100

/** One line of words. */
export function Words(props: WordsProps) {
  const { children, size, colour, weight = 500, anchor = 'start', halo, haloWidth = 3, haloOpacity = 0.85 } = props
  const x = figure(props.x)
  const y = figure(props.y)
  return (
    <text
      x={x}
      y={y}
      dy={props.centred ? '.35em' : undefined}
      transform={props.turn ? `rotate(${figure(props.turn)} ${x} ${y})` : undefined}
      textAnchor={anchor === 'start' ? undefined : anchor}
      fontSize={size}
      fontWeight={weight}
      fill={colour}
      opacity={props.opacity}
      stroke={halo}
      strokeWidth={halo ? haloWidth : undefined}
      strokeOpacity={halo ? haloOpacity : undefined}
      strokeLinejoin={halo ? 'round' : undefined}
      paintOrder={halo ? 'stroke' : undefined}
    >
      {children}
    </text>
  )
}
