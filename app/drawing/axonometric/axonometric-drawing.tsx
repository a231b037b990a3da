import { memo, useMemo } from 'react'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec2, Vec3 } from '#app/domain/vector.ts'
import { PieceDrawing } from '#app/drawing/axonometric/piece-drawing.tsx'
import { piecesOf, type Piece } from '#app/drawing/axonometric/pieces.ts'
import { paintingOrder } from '#app/drawing/axonometric/painting-order.ts'
import {
  axonometricView,
  planeTransform,
  projectionFrom,
  toDrawing,
  type AxonometricView,
  type Corner,
} from '#app/drawing/axonometric/projection.ts'
import type { HeatPicture } from '#app/drawing/heat/contours.ts'
import { HeatFill, Isolines } from '#app/drawing/heat/heat-fill.tsx'
import { patternIds, ZonePatterns } from '#app/drawing/heat/patterns.tsx'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { fontFamily } from '#app/drawing/theme.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** Pieces up to which the order is worked out; beyond, guests are left out. */
const mostPieces = 900

/** A drawing of site, heaters and map for people who do not read plans. */
export interface AxonometricProps {
  /** Unique in the page: names the drawing's patterns and clip. */
  readonly name: string
  readonly site: Site
  readonly layout: Pick<Layout, 'heaters'>
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly rules: HouseRules
  /** The map, laid on the floor; null without heat and while it is computed. */
  readonly picture: HeatPicture | null
  readonly quantity: QuantityScale
  readonly corner: Corner
  readonly pen: Pen
  readonly width: number
  readonly height: number
}

/** The drawing as a group: floor with its heat, then everything from the back to the front, then what is see-through. */
export const Axonometric = memo(function Axonometric(props: AxonometricProps) {
  const { site, layout, models, rules, corner, pen, width, height } = props
  const { pieces, front, order, view, withoutGuests } = useMemo(() => {
    const projection = projectionFrom(corner)
    const all = piecesOf(site, layout, models, rules, projection.toEye)
    const withoutGuests = all.pieces.length > mostPieces
    const kept = withoutGuests ? all.pieces.filter(({ look }) => look !== 'seat') : all.pieces
    const painted = paintingOrder(kept.map(({ solid }) => solid), projection) // prettier-ignore
    const points: Vec3[] = [
      ...site.floor.map(([x, y]): Vec3 => [x, y, 0]),
      ...site.covers.flatMap((cover) => cover.corners),
      ...[...kept.map(({ solid }) => solid), ...all.front].flatMap((solid) => solid.corners),
    ]
    return {
      ...all,
      withoutGuests,
      order: painted.flatMap((i) => kept[i] ?? []),
      view: axonometricView(points, corner, { width, height, margin: 14 }),
    }
  }, [site, layout, models, rules, corner, width, height])
  return (
    <g fontFamily={fontFamily} strokeLinejoin="round">
      <Floor {...props} view={view} />
      {order.map((piece) => (
        <PieceDrawing key={piece.key} {...{ piece, view, pen }} />
      ))}
      <SeeThrough {...{ site, front, view, pen }} />
      <HeaterNames {...{ pieces, view, pen }} />
      {withoutGuests && (
        <Words x={24} y={height - 10} size={pen.text} colour={pen.colours.secondLine}>
          {`Over ${mostPieces} things: the guests are not drawn.`}
        </Words>
      )}
    </g>
  )
})

const path = (points: readonly Vec2[]): string =>
  `M${points.map((p) => p.map((v) => Math.round(v * 10) / 10).join(' ')).join('L')}Z`

function Floor({ name, site, picture, quantity, pen, view }: AxonometricProps & { view: AxonometricView }) {
  const outline = path(site.floor.map(([x, y]) => toDrawing(view, [x, y, 0])))
  const transform = planeTransform(view, 0)
  const ids = patternIds(name)
  return (
    <>
      <defs>
        <ZonePatterns name={name} pen={pen} scale={view.scale} />
        <clipPath id={ids.clip}>
          <path d={outline} />
        </clipPath>
      </defs>
      <path d={outline} fill={pen.colours.floor} />
      {picture ? (
        <g clipPath={`url(#${ids.clip})`}>
          <HeatFill {...{ picture, quantity, transform, name }} />
          <Isolines {...{ picture, quantity, transform, pen }} scale={view.scale} />
        </g>
      ) : null}
      <path d={outline} fill="none" stroke={pen.colours.line} strokeWidth={pen.weights.outline * pen.k} />
    </>
  )
}

/** Covers and the walls in front of the eye, as outlines over everything. */
function SeeThrough({
  site,
  front,
  view,
  pen,
}: {
  site: Site
  front: readonly { readonly corners: readonly Vec3[]; readonly faces: readonly (readonly number[])[] }[]
  view: AxonometricView
  pen: Pen
}) {
  const line = { fill: 'none', stroke: pen.colours.line, strokeWidth: 0.9 * pen.k }
  return (
    <>
      {front.map(({ corners, faces }, i) => (
        <path
          key={i}
          data-front=""
          d={faces.map((face) => path(face.map((at) => toDrawing(view, corners[at] ?? [0, 0, 0])))).join('')}
          {...line}
          strokeDasharray={`${5 * pen.k} ${4 * pen.k}`}
          opacity={0.5}
        />
      ))}
      {site.covers.map(({ id, corners }) => (
        <path
          key={id}
          data-cover={id}
          d={path(corners.map((corner) => toDrawing(view, corner)))}
          {...line}
          fill={pen.colours.line}
          fillOpacity={0.05}
          opacity={0.85}
        />
      ))}
    </>
  )
}

/** Names over the heaters, over everything else; where two would touch, the one nearer to the eye stays. */
function HeaterNames({ pieces, view, pen }: { pieces: readonly Piece[]; view: AxonometricView; pen: Pen }) {
  const taken: Vec2[] = []
  const names = pieces.flatMap(({ heater, look, solid }) => {
    if (look !== 'heater' || !heater) return []
    const points = solid.corners.map((corner) => toDrawing(view, corner))
    const x = points.reduce((sum, p) => sum + p[0], 0) / points.length
    const y = Math.min(...points.map((p) => p[1])) - 5 * pen.k
    return [{ id: heater.id, x, y }]
  })
  const shown = names
    .toSorted((a, b) => b.y - a.y)
    .filter(({ x, y }) => {
      const free = taken.every(([tx, ty]) => Math.abs(tx - x) > 2.4 * pen.text || Math.abs(ty - y) > 1.1 * pen.text)
      if (free) taken.push([x, y])
      return free
    })
  return shown.map(({ id, x, y }) => (
    <Words
      key={id}
      x={x}
      y={y}
      anchor="middle"
      size={pen.text}
      weight={600}
      colour={pen.colours.line}
      halo={pen.colours.halo}
    >
      {id}
    </Words>
  ))
}

/** The drawing as a picture of its own; `label` is its text for those who do not see it. */
export function AxonometricDrawing({ label, ...drawing }: AxonometricProps & { label: string }) {
  const { width, height, pen } = drawing
  return (
    <svg width={width} height={height} viewBox={`0 0 ${width} ${height}`} role="img" aria-label={label}>
      <rect width={width} height={height} fill={pen.colours.ground} />
      <Axonometric {...drawing} />
    </svg>
  )
}
