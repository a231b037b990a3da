import type { Seat } from '#app/domain/site/site.ts'
import { radians } from '#app/domain/vector.ts'
import { alongCut, alongDirectionOf, onSection, type SectionView } from '#app/drawing/section/section-view.ts'
import type { Pen } from '#app/drawing/pen.ts'

/** Which way a person faces on a section: to the drawing's right (1), left (−1), or towards or away from us (0). */
function facingOn(seat: Seat, view: SectionView): -1 | 0 | 1 {
  const turn = radians(seat.facingDeg)
  const along = alongDirectionOf(view.cut, [Math.cos(turn), Math.sin(turn)])
  return Math.abs(along) < 0.5 ? 0 : along > 0 ? 1 : -1
}

/** A guest on a section: head, back, seat and legs at the seat's own heights, turned as the seat faces. */
export function Person({ seat, view, pen }: { seat: Seat; view: SectionView; pen: Pen }) {
  const along = alongCut(view.cut, [seat.x, seat.y])
  const facing = facingOn(seat, view)
  const hip = seat.posture === 'seated' ? seat.bodyHeight - 0.1 : seat.bodyHeight - 0.2
  const at = (aside: number, z: number): string =>
    onSection(view, along + aside * facing, z)
      .map((v) => Math.round(v * 10) / 10)
      .join(' ')
  const body =
    seat.posture === 'standing'
      ? `M${at(0, seat.headHeight - 0.12)}L${at(0, hip)}L${at(0.05, 0.03)}M${at(0, hip)}L${at(-0.05, 0.03)}`
      : facing === 0
        ? frontView(view, along, seat.headHeight, hip)
        : `M${at(-0.01, seat.headHeight - 0.12)}L${at(-0.05, hip)}L${at(0.33, hip)}L${at(0.36, 0.03)}`
  const [x, y] = onSection(view, along, seat.headHeight)
  return (
    <g data-seat={seat.id}>
      <path
        d={body}
        fill="none"
        stroke={pen.colours.line}
        strokeWidth={1.8 * pen.k}
        strokeLinejoin="round"
        strokeLinecap="round"
      />
      <circle
        cx={x}
        cy={y}
        r={Math.max(3, 0.104 * view.scale)}
        fill={pen.colours.ground}
        fillOpacity={0.85}
        stroke={pen.colours.line}
        strokeWidth={1.1 * pen.k}
      />
    </g>
  )
}

/** Seen from in front: shoulders, body and legs as one outline. */
function frontView(view: SectionView, along: number, head: number, hip: number): string {
  const at = (aside: number, z: number): string =>
    onSection(view, along + aside, z)
      .map((v) => Math.round(v * 10) / 10)
      .join(' ')
  const shoulder = head - 0.2
  return `M${at(-0.12, 0.03)}L${at(-0.12, hip)}L${at(-0.17, shoulder)}L${at(0.17, shoulder)}L${at(0.12, hip)}L${at(0.12, 0.03)}`
}
