import { patternIds } from '#app/drawing/heat/patterns.tsx'
import type { Target } from '#app/drawing/heat/scale.ts'
import type { PlotInk } from '#app/drawing/plot/plot-ink.ts'
import type { PlotSeat, SeatGroup } from '#app/drawing/plot/seat-groups.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** Where a plot's columns and heights are, px, and what they are drawn with. */
export interface PlotFrame {
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

/** Heights, the target band with its zones, and their figures and words. */
export function PlotGround({
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
}: PlotFrame & { name: string; target: Target; top: number }) {
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

/** Lines between groups, the seats' numbers and the groups' names below. */
export function PlotColumns({
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
}: PlotFrame & { groups: readonly SeatGroup[]; seats: readonly PlotSeat[]; below: number }) {
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
        textWidth(group.name, pen.text, 600) + 1 < group.count * column ? (
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
