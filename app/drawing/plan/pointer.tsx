import type { Vec2 } from '#app/domain/vector.ts'
import type { PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

const paper = '#f7f1e5'
const ink = '#1d2233'

/** What the tag beside the pointer says: a figure, where it is, and up to four lines more. */
export interface PointerReading {
  readonly figure: string
  readonly place: string
  readonly lines: readonly string[]
}

/** The cross of 30 px, white with a dark edge, and a small paper tag beside it that stays inside the drawing. */
export function Pointer({
  at: [x, y],
  reading,
  view,
  pen,
}: {
  at: Vec2
  reading: PointerReading
  view: PlanView
  pen: Pen
}) {
  const cross = `M${x - 15} ${y}H${x - 4}M${x + 4} ${y}H${x + 15}M${x} ${y - 15}V${y - 4}M${x} ${y + 4}V${y + 15}`
  const head = textWidth(reading.figure, 13, 600) + 14 + textWidth(reading.place, pen.text, 400)
  const width = Math.max(head, ...reading.lines.map((line) => textWidth(line, pen.text, 400))) + 20
  const height = 24 + reading.lines.length * 13.5
  const left = x + 20 + width > view.width - 4 ? Math.max(4, x - 20 - width) : x + 20
  const top = Math.min(view.height - height - 4, Math.max(4, y - height + 3))
  return (
    <g pointerEvents="none">
      <path d={cross} stroke={ink} strokeWidth={5} strokeLinecap="round" fill="none" />
      <path d={cross} stroke="#ffffff" strokeWidth={2} strokeLinecap="round" fill="none" />
      <circle cx={x} cy={y} r={1.6} fill="#ffffff" stroke={ink} strokeWidth={0.8} />
      <rect x={left} y={top} width={width} height={height} rx={3} fill={paper} stroke={ink} strokeWidth={1.5} />
      <Words x={left + 10} y={top + 16} size={13} weight={600} colour={ink}>
        {reading.figure}
      </Words>
      <Words x={left + width - 10} y={top + 16} anchor="end" size={pen.text} weight={400} colour={ink}>
        {reading.place}
      </Words>
      {reading.lines.map((line, i) => (
        <Words key={i} x={left + 10} y={top + 30 + i * 13.5} size={pen.text} weight={400} colour={ink}>
          {line}
        </Words>
      ))}
    </g>
  )
}
