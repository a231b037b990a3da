import type { Seat } from '#app/domain/site/site.ts'
import { dot, radians, type Vec2, type Vec3 } from '#app/domain/vector.ts'
import { tableTop, type Piece } from '#app/drawing/axonometric/pieces.ts'
import { toDrawing, type AxonometricView } from '#app/drawing/axonometric/projection.ts'
import { faceNormal, facesSeen, type DrawnSolid } from '#app/drawing/axonometric/solid.ts'
import type { Pen } from '#app/drawing/pen.ts'

interface PieceProps {
  readonly piece: Piece
  readonly view: AxonometricView
  readonly pen: Pen
}

const at = (point: Vec2): string => point.map((v) => Math.round(v * 10) / 10).join(' ')

/** One piece: the faces of a solid that are seen, a guest, a table on its leg, a heater, a hanger. */
export function PieceDrawing({ piece, view, pen }: PieceProps) {
  const { look, solid, seat, table, heater } = piece
  const { colours } = pen
  if (seat) return <Guest seat={seat} view={view} pen={pen} />
  if (look === 'hanger') return <Hanger {...{ piece, view, pen }} />
  if (table) {
    const foot: Vec3 = [table.centre[0], table.centre[1], 0]
    const [a, b] = [toDrawing(view, foot), toDrawing(view, [foot[0], foot[1], table.height])]
    return (
      <g data-table={table.id}>
        <path d={`M${at(a)}L${at(b)}`} stroke={colours.line} strokeWidth={1.6 * pen.k} opacity={0.8} />
        <Faces solid={tableTop(table)} fill={colours.ground} {...{ view, pen }} opacity={0.82} />
      </g>
    )
  }
  if (look === 'heater')
    return (
      <g data-heater={heater?.id}>
        <Faces {...{ solid, view, pen }} fill={colours.heater} stroke={colours.element} weight={1.3} />
      </g>
    )
  if (look === 'see-through')
    return (
      <Faces {...{ solid, view, pen }} fill="none" stroke={colours.secondLine} dash={`${3 * pen.k} ${2 * pen.k}`} />
    )
  return <Faces {...{ solid, view, pen }} fill={look === 'wall' ? colours.wall : colours.ground} />
}

interface FacesProps {
  readonly solid: DrawnSolid
  readonly view: AxonometricView
  readonly pen: Pen
  readonly fill: string
  readonly stroke?: string
  readonly weight?: number
  readonly dash?: string
  readonly opacity?: number
}

/** The faces that the eye sees; the upright ones turned farther from it a little darker, by a veil of the line's colour. */
function Faces({ solid, view, pen, fill, stroke = pen.colours.line, weight = 0.8, dash, opacity }: FacesProps) {
  const { toEye } = view.projection
  return facesSeen(solid, toEye).map((face) => {
    const d = `M${face.map((i) => at(toDrawing(view, solid.corners[i] ?? [0, 0, 0]))).join('L')}Z`
    const veil = fill === 'none' ? 0 : 0.1 * (1 - dot(faceNormal(solid, face), toEye))
    return (
      <g key={face.join()} opacity={opacity}>
        <path d={d} fill={fill} stroke={stroke} strokeWidth={weight * pen.k} strokeDasharray={dash} />
        {veil > 0.02 ? <path d={d} fill={pen.colours.line} fillOpacity={Math.round(veil * 100) / 100} /> : null}
      </g>
    )
  })
}

function Hanger({ piece: { solid, heater }, view, pen }: PieceProps) {
  const [a, b] = solid.corners.map((corner) => toDrawing(view, corner))
  if (!a || !b) return null
  return (
    <path
      d={`M${at(a)}L${at(b)}`}
      data-hanger={heater?.id}
      stroke={pen.colours.line}
      strokeWidth={1.2 * pen.k}
      strokeDasharray={heater?.mount === 'chain' ? `${2 * pen.k} ${1.3 * pen.k}` : undefined}
    />
  )
}

/** A guest as a small figure: head, back, thighs and legs in the direction in which the seat faces; or standing. */
function Guest({ seat, view, pen }: { seat: Seat; view: AxonometricView; pen: Pen }) {
  const turn = radians(seat.facingDeg)
  const point = (ahead: number, z: number) =>
    toDrawing(view, [seat.x + ahead * Math.cos(turn), seat.y + ahead * Math.sin(turn), z])
  const hip = seat.posture === 'seated' ? Math.max(0.3, seat.bodyHeight - 0.13) : seat.bodyHeight
  const neck = seat.headHeight - 0.12
  const body =
    seat.posture === 'seated'
      ? [point(-0.02, neck), point(-0.06, hip), point(0.34, hip), point(0.36, 0.02)]
      : [point(0, neck), point(0, hip), point(0.03, 0.02)]
  const [x, y] = point(0, seat.headHeight)
  const d = `M${body.map(at).join('L')}`
  const line = { d, fill: 'none', strokeLinecap: 'round' as const }
  return (
    <g data-seat={seat.id}>
      <path {...line} stroke={pen.colours.halo} strokeWidth={4.4 * pen.k} strokeOpacity={0.6} />
      <path {...line} stroke={pen.colours.line} strokeWidth={2.2 * pen.k} />
      <circle
        cx={Math.round(x * 10) / 10}
        cy={Math.round(y * 10) / 10}
        r={Math.max(2.4 * pen.k, 0.104 * view.scale)}
        fill={pen.colours.seat}
        stroke={pen.colours.line}
        strokeWidth={1.2 * pen.k}
      />
    </g>
  )
}
