import type { Layout } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { HeatPicture } from '#app/drawing/heat/contours.ts'
import { HeatFill } from '#app/drawing/heat/heat-fill.tsx'
import { patternIds, ZonePatterns } from '#app/drawing/heat/patterns.tsx'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import { heaterPlace } from '#app/drawing/plan/heater-place.ts'
import { outlinePath } from '#app/drawing/plan/outline.ts'
import { planViewOf, siteTransform, toScreen } from '#app/drawing/plan/plan-view.ts'
import { screenPen } from '#app/drawing/pen.ts'
import { fontFamily } from '#app/drawing/theme.ts'

const pen = screenPen('dusk')
const margins = { top: 6, right: 6, bottom: 6, left: 6 }

/** A small plan for a list: heat, the target's edges, members, seats as dots and heaters as bars; it has no words. */
export function PlanThumbnail({
  name,
  site,
  layout,
  models,
  picture,
  quantity,
  label,
  width,
  height,
}: {
  /** Unique in the page. */
  name: string
  site: Site
  layout: Layout
  models: ReadonlyMap<string, HeaterModel>
  picture: HeatPicture | null
  quantity: QuantityScale
  label: string
  width: number
  height?: number
}) {
  const view = planViewOf(site, width, height, margins)
  const ids = patternIds(name)
  const transform = siteTransform(view)
  return (
    <svg
      width={width}
      height={Math.round(view.height)}
      viewBox={`0 0 ${width} ${view.height}`}
      role="img"
      aria-label={label}
      fontFamily={fontFamily}
    >
      <defs>
        <ZonePatterns name={name} pen={{ ...pen, k: 0.72 }} scale={view.scale} />
        <clipPath id={ids.clip}>
          <path d={outlinePath(site.floor, view)} />
        </clipPath>
      </defs>
      <rect width={width} height={view.height} rx={2} fill={pen.colours.ground} />
      <path d={outlinePath(site.floor, view)} fill={pen.colours.floor} />
      <g clipPath={`url(#${ids.clip})`}>
        {picture ? <HeatFill {...{ picture, quantity, transform, name }} /> : null}
        {picture ? (
          <TargetEdges picture={picture} quantity={quantity} transform={transform} scale={view.scale} />
        ) : null}
        {site.members.map((member) => {
          const [x1, y1] = toScreen(view, member.from)
          const [x2, y2] = toScreen(view, member.to)
          return (
            <line key={member.id} {...{ x1, y1, x2, y2 }} stroke={pen.colours.line} strokeWidth={0.6} opacity={0.35} />
          )
        })}
      </g>
      <path
        d={outlinePath(site.floor, view)}
        fill="none"
        stroke={pen.colours.secondLine}
        strokeWidth={0.8}
        opacity={0.8}
      />
      {site.obstacles.map(({ id, shape, movable }) => {
        if (shape.kind !== 'cylinder' || !movable) return null
        const [cx, cy] = toScreen(view, shape.centre)
        return (
          <circle
            key={id}
            {...{ cx, cy }}
            r={shape.radius * view.scale}
            fill="none"
            stroke={pen.colours.secondLine}
            strokeWidth={0.7}
            strokeDasharray="2 1.6"
          />
        )
      })}
      {site.seats.map((seat) => {
        const [cx, cy] = toScreen(view, [seat.x, seat.y])
        return <circle key={seat.id} {...{ cx, cy }} r={1.3} fill={pen.colours.line} />
      })}
      {layout.heaters.map((heater) => {
        const place = heaterPlace(heater, models.get(heater.model) ?? null, view, { ...pen, k: 0.45 })
        return (
          <rect
            key={heater.id}
            x={-place.length / 2}
            y={-place.width / 2}
            width={place.length}
            height={place.width}
            transform={`translate(${place.x} ${place.y}) rotate(${place.turnDeg})`}
            fill={pen.colours.heater}
            stroke={pen.colours.heaterEdge}
            strokeWidth={0.5}
          />
        )
      })}
    </svg>
  )
}

function TargetEdges({
  picture,
  quantity,
  transform,
  scale,
}: {
  picture: HeatPicture
  quantity: QuantityScale
  transform: string
  scale: number
}) {
  return (
    <g transform={transform} fill="none" stroke={pen.colours.isoline} strokeWidth={0.9 / scale} strokeOpacity={0.8}>
      {picture.lines
        .filter((line) => quantity.heavy.includes(line.level))
        .map((line) => (
          <path key={line.level} d={line.path} />
        ))}
    </g>
  )
}
