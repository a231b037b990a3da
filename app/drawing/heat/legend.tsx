import { patternIds, ZonePatterns } from '#app/drawing/heat/patterns.tsx'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { fontFamily } from '#app/drawing/theme.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** The scale of a quantity as a bar in the map's own colours, patterns and words. */
export interface LegendProps {
  /** Unique in the page: names the bar's patterns. */
  readonly name: string
  readonly quantity: QuantityScale
  readonly pen: Pen
  /** Left end of the bar, its top, and its length, px. */
  readonly x: number
  readonly y: number
  readonly width: number
  /** Colour of ticks and words: that of the page the legend stands on. */
  readonly ink: string
  /** Whether "below target", "in target", "above target" stand above the bar. */
  readonly zoneWords?: boolean
  /** A figure that is pointed at: a tick with the same figure. */
  readonly reading?: number | null
}

const rounded = (value: number): number => Math.round(value * 100) / 100

/** Height of the bar, px at weight 1. */
const legendBar = 9

/** The fill's bands as they lie on the bar: lower and upper value inside the scale's ends. */
export function legendBands(quantity: QuantityScale): { from: number; to: number; fill: string }[] {
  const [low, high] = quantity.domain
  const edges = quantity.edges[0] !== undefined && quantity.edges[0] > low ? [low, ...quantity.edges] : quantity.edges
  return edges.flatMap((edge, i) => {
    const next = edges[i + 1] ?? edge + (edge - (edges[i - 1] ?? edge))
    const from = Math.max(low, edge)
    const to = Math.min(high, next)
    return to > from ? [{ from, to, fill: quantity.fill(edge, next) }] : []
  })
}

/** The legend as a group. */
export function Legend({ name, quantity, pen, x, y, width, ink, zoneWords = true, reading = null }: LegendProps) {
  const [low, high] = quantity.domain
  const at = (value: number): number => rounded(x + ((value - low) / (high - low)) * width)
  const height = legendBar * (pen.k < 1 ? 0.9 : 1)
  const ids = patternIds(name)
  const { target } = quantity
  return (
    <g fontFamily={fontFamily}>
      <defs>
        <ZonePatterns name={name} pen={pen} />
      </defs>
      {legendBands(quantity).map((band) => (
        <rect
          key={band.from}
          x={at(band.from)}
          y={y}
          width={rounded(at(band.to) - at(band.from) + (band.to < high ? 0.4 : 0))}
          height={height}
          fill={band.fill}
        />
      ))}
      {target ? (
        <>
          <rect
            x={at(target.low)}
            y={y}
            width={at(target.high) - at(target.low)}
            height={height}
            fill={`url(#${ids.dots})`}
          />
          <rect
            x={at(target.high)}
            y={y}
            width={at(high) - at(target.high)}
            height={height}
            fill={`url(#${ids.hatch})`}
          />
        </>
      ) : null}
      <rect
        x={x}
        y={y}
        width={width}
        height={height}
        fill="none"
        stroke={ink}
        strokeWidth={0.7 * pen.k}
        opacity={0.5}
      />
      <LegendTicks {...{ quantity, pen, y, ink, height, at }} />
      {target && zoneWords ? <ZoneWords {...{ quantity, pen, x, y, width, ink, at }} /> : null}
      {reading === null ? null : <Reading {...{ quantity, pen, y, ink, height, at }} value={reading} />}
    </g>
  )
}

interface PartProps {
  readonly quantity: QuantityScale
  readonly pen: Pen
  readonly y: number
  readonly ink: string
  readonly at: (value: number) => number
}

function LegendTicks({ quantity, pen, y, ink, height, at }: PartProps & { height: number }) {
  const heavy = new Set(quantity.target ? [quantity.target.low, quantity.target.high] : [])
  const size = pen.text
  const kept = keptTicks(quantity, pen, at)
  const quiet = quantity.levels.filter((level) => level >= quantity.domain[0] && level <= quantity.domain[1])
  return (
    <>
      {[...new Set([...quiet, ...quantity.ticks])].map((value) => {
        const isHeavy = heavy.has(value)
        return (
          <line
            key={value}
            x1={at(value)}
            x2={at(value)}
            y1={isHeavy ? y - 4 * pen.k : y + height}
            y2={y + height + 3.4 * pen.k}
            stroke={ink}
            strokeWidth={(isHeavy ? 1.7 : 0.7) * pen.k}
          />
        )
      })}
      {kept.map((value) => (
        <Words
          key={value}
          x={at(value)}
          y={y + height + size + 3.5 * pen.k}
          anchor="middle"
          size={size}
          weight={heavy.has(value) ? 600 : 400}
          colour={ink}
        >
          {tickText(quantity, value)}
        </Words>
      ))}
    </>
  )
}

/** The last figure of a scale that saturates says so. */
const tickText = (quantity: QuantityScale, value: number): string =>
  quantity.target && value === quantity.domain[1] ? `${quantity.format(value)}+` : quantity.format(value)

/** Ticks whose figures have room, the target's edges and the ends first. */
function keptTicks(quantity: QuantityScale, pen: Pen, at: (value: number) => number): number[] {
  const first = [
    quantity.domain[0],
    quantity.domain[1],
    ...(quantity.target ? [quantity.target.low, quantity.target.high] : []),
  ]
  const kept: { value: number; half: number }[] = []
  for (const value of [...first.filter((v) => quantity.ticks.includes(v)), ...quantity.ticks]) {
    const half = textWidth(tickText(quantity, value), pen.text, 600) / 2
    const clear = kept.every((other) => Math.abs(at(other.value) - at(value)) > other.half + half + 3 * pen.k)
    if (clear) kept.push({ value, half })
  }
  return kept.map(({ value }) => value)
}

function ZoneWords({ quantity, pen, x, y, width, ink, at }: PartProps & { x: number; width: number }) {
  const { target } = quantity
  if (!target) return null
  const zones = [
    ['below target', x, at(target.low)],
    ['in target', at(target.low), at(target.high)],
    ['above target', at(target.high), x + width],
  ] as const
  return zones.map(([word, from, to]) => {
    const fits = textWidth(word, pen.text, 500) < to - from + 24 * pen.k
    return fits ? (
      <Words key={word} x={(from + to) / 2} y={y - 6 * pen.k} anchor="middle" size={pen.text} colour={ink}>
        {word}
      </Words>
    ) : null
  })
}

function Reading({ quantity, pen, y, ink, height, at, value }: PartProps & { height: number; value: number }) {
  const [low, high] = quantity.domain
  const px = at(Math.min(high, Math.max(low, value)))
  return (
    <>
      <path d={`M${px} ${y - 1.5}l-4 -6h8z`} fill={ink} />
      <line x1={px} x2={px} y1={y - 2} y2={y + height} stroke={pen.colours.heater} strokeWidth={1.2} />
      <Words x={px + 7} y={y - 2.5} size={pen.text} weight={600} colour={ink}>
        {quantity.format(value)}
      </Words>
    </>
  )
}

/** The legend as a picture of its own, as wide as `width` with room for the outermost figures. */
export function LegendDrawing(props: Omit<LegendProps, 'x' | 'y' | 'width'> & { width: number }) {
  const words = props.zoneWords ?? true
  const above = words && props.quantity.target ? 20 : props.reading === undefined ? 5 : 16
  const height = above + legendBar + 18
  const unit = props.quantity.unit ? `, ${props.quantity.unit}` : ''
  return (
    <svg
      width={props.width}
      height={height}
      viewBox={`0 0 ${props.width} ${height}`}
      role="img"
      aria-label={`Scale: ${props.quantity.name}${unit}`}
    >
      <Legend {...props} x={12} y={above} width={props.width - 28} />
    </svg>
  )
}
