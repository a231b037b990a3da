import type { TargetOutcome } from '#app/domain/comfort/seat-warmth.ts'
import type { SensationWord } from '#app/domain/comfort/sensation.ts'
import type { Seat } from '#app/domain/site/site.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** How a seat stands against the target. */
export type SeatOutcome = TargetOutcome

/** Words of the seven-point scale that a customer's plan shows as strokes. */
export type WarmthWord = SensationWord

/** The words from the coldest to the hottest. */
export const warmthWords = [
  'cold',
  'cool',
  'slightly cool',
  'neutral',
  'slightly warm',
  'warm',
  'hot',
] as const satisfies readonly WarmthWord[]

/** What a seat's disc says: a figure inside and a ring by outcome, or strokes for a customer. */
export type SeatSign =
  | { readonly kind: 'figure'; readonly text: string; readonly outcome: SeatOutcome }
  | { readonly kind: 'warmth'; readonly word: WarmthWord }

/** Radius of a seat's disc in plan, m. */
const discRadius = 0.205
/** Half of the angle of the arc that stands for the back, degrees. */
const backHalfAngle = 66

/** Radius of a seat's disc on the drawing, px: to scale, and large enough for its figure where it carries one. */
export const seatRadius = (view: PlanView, pen: Pen, withFigure: boolean): number =>
  Math.max(discRadius * view.scale, withFigure ? (11.5 * pen.seatText) / 11 : 2.2 * pen.k)

/** Whether the seats stand far enough apart at this scale to carry figures. */
export function seatsCarryFigures(seats: readonly Seat[], view: PlanView, pen: Pen): boolean {
  const least = 2 * seatRadius(view, pen, true) + 1
  const sorted = [...seats].sort((a, b) => a.x - b.x)
  return sorted.every((seat, i) => {
    for (let j = i + 1; j < sorted.length; j++) {
      const other = sorted[j]
      if (!other || (other.x - seat.x) * view.scale > least) return true
      if (Math.hypot(other.x - seat.x, other.y - seat.y) * view.scale < least) return false
    }
    return true
  })
}

const rounded = (value: number): number => Math.round(value * 10) / 10

/** The back of a chair as an arc on the side away from where the person looks. */
export function backArc(x: number, y: number, radius: number, facingDeg: number): string {
  const at = (offset: number): string => {
    const turn = ((facingDeg + 180 + offset) * Math.PI) / 180
    return `${rounded(x + radius * Math.cos(turn))} ${rounded(y - radius * Math.sin(turn))}`
  }
  return `M${at(-backHalfAngle)}A${rounded(radius)} ${rounded(radius)} 0 0 0 ${at(backHalfAngle)}`
}

const strokesOf: Record<WarmthWord, number> = {
  cold: 0,
  cool: 0,
  'slightly cool': 1,
  neutral: 2,
  'slightly warm': 3,
  warm: 3,
  hot: 3,
}

/** Ring of a disc: dashed below target or with no heater, plain in target, double above. */
export function SeatRing({
  x,
  y,
  r,
  outcome,
  pen,
}: {
  x: number
  y: number
  r: number
  outcome: SeatOutcome
  pen: Pen
}) {
  const dashed = outcome === 'below' || outcome === 'no heater'
  return (
    <>
      <circle
        cx={x}
        cy={y}
        r={r}
        fill={pen.colours.seat}
        fillOpacity={pen.theme === 'dusk' ? 0.78 : 0.86}
        stroke={pen.colours.line}
        strokeWidth={pen.k}
        strokeOpacity={outcome === 'not heated' ? 0.45 : undefined}
        strokeDasharray={dashed ? `${2.4 * pen.k} ${2 * pen.k}` : undefined}
      />
      {outcome === 'above' ? (
        <circle
          cx={x}
          cy={y}
          r={rounded(r - 2.4 * pen.k)}
          fill="none"
          stroke={pen.colours.line}
          strokeWidth={0.9 * pen.k}
        />
      ) : null}
    </>
  )
}

/** Strokes of a customer's seat: none cool, one slightly cool, two neutral, three slightly warm. */
function WarmthStrokes({ x, y, r, word, pen }: { x: number; y: number; r: number; word: WarmthWord; pen: Pen }) {
  const count = strokesOf[word]
  const gap = r * 0.36
  return (
    <>
      {Array.from({ length: count }, (_, i) => {
        const at = rounded(x + (i - (count - 1) / 2) * gap)
        return (
          <line
            key={i}
            x1={at}
            x2={at}
            y1={rounded(y - r * 0.42)}
            y2={rounded(y + r * 0.42)}
            stroke={pen.colours.figure}
            strokeWidth={Math.max(1, r * 0.16)}
            strokeLinecap="round"
          />
        )
      })}
    </>
  )
}

/** A small disc with the strokes of a word, for rows and keys; cold has a dashed ring, warm and hot a double one. */
export function WarmthDisc({ x, y, r, word, pen }: { x: number; y: number; r: number; word: WarmthWord; pen: Pen }) {
  const outcome = word === 'cold' ? 'below' : word === 'warm' || word === 'hot' ? 'above' : 'in target'
  return (
    <>
      <SeatRing x={x} y={y} r={r} outcome={outcome} pen={{ ...pen, k: pen.k * 0.75 }} />
      <WarmthStrokes x={x} y={y} r={r} word={word} pen={pen} />
    </>
  )
}

/** A seat: its disc to scale, the back of the chair, and what it says. Without a sign it is an empty dashed disc. */
export function SeatMark({
  seat,
  sign,
  view,
  pen,
  withFigure,
  pointed = false,
}: {
  seat: Seat
  sign: SeatSign | null
  view: PlanView
  pen: Pen
  /** Whether there is room for figures; without it the ring alone says the outcome. */
  withFigure: boolean
  pointed?: boolean
}) {
  const [x, y] = toScreen(view, [seat.x, seat.y]).map(rounded)
  if (x === undefined || y === undefined) return null
  const shown = withFigure && sign?.kind === 'figure'
  const r = rounded(seatRadius(view, pen, withFigure))
  const outcome = sign?.kind === 'figure' ? sign.outcome : sign ? 'in target' : 'no heater'
  return (
    <g data-seat={seat.id}>
      {pointed ? <circle cx={x} cy={y} r={r + 7} fill="none" stroke={pen.colours.selection} strokeWidth={1.8} /> : null}
      <SeatRing x={x} y={y} r={r} outcome={outcome} pen={pen} />
      <path
        d={backArc(x, y, r + 3 * pen.k, seat.facingDeg)}
        fill="none"
        stroke={pen.colours.line}
        strokeWidth={1.9 * pen.k}
        strokeLinecap="round"
      />
      {sign?.kind === 'warmth' ? <WarmthStrokes x={x} y={y} r={r} word={sign.word} pen={pen} /> : null}
      {shown ? (
        <Words
          x={x}
          y={y}
          centred
          anchor="middle"
          size={pen.seatText}
          weight={600}
          colour={pen.colours.figure}
          opacity={outcome === 'not heated' ? 0.75 : undefined}
        >
          {sign.text}
        </Words>
      ) : null}
    </g>
  )
}
