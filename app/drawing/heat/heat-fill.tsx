import type { HeatPicture } from '#app/drawing/heat/contours.ts'
import { patternIds } from '#app/drawing/heat/patterns.tsx'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import type { Pen } from '#app/drawing/pen.ts'

/** Where a picture in metres is laid on a drawing. */
export interface HeatFillProps {
  readonly picture: HeatPicture
  readonly quantity: QuantityScale
  /** SVG transform from the picture's metres to the drawing, and its px per m. */
  readonly transform: string
  readonly scale: number
  /** Name of the drawing's patterns. */
  readonly name: string
  readonly pen: Pen
}

const pathAt = (picture: HeatPicture, level: number): string =>
  picture.lines.find((line) => line.level === level)?.path ??
  picture.bands.find((band) => band.from === level)?.path ??
  ''

/** Fills of a map, the lowest first, then dots where it is in target and a hatch where it is above. */
export function HeatFill({ picture, quantity, transform, name }: Omit<HeatFillProps, 'pen' | 'scale'>) {
  const ids = patternIds(name)
  const { target } = quantity
  const low = target ? pathAt(picture, target.low) : ''
  const high = target ? pathAt(picture, target.high) : ''
  return (
    <g transform={transform} fillRule="evenodd">
      {picture.bands.map((band) => (
        <path key={band.from} d={band.path} fill={quantity.fill(band.from, band.to)} />
      ))}
      {low ? <path d={low + high} fill={`url(#${ids.dots})`} /> : null}
      {high ? <path d={high} fill={`url(#${ids.hatch})`} /> : null}
    </g>
  )
}

/** Isolines of a map: quiet, the target's edges strong. */
export function Isolines({ picture, quantity, transform, scale, pen }: Omit<HeatFillProps, 'name'>) {
  const { weights, colours } = pen
  return (
    <g transform={transform} fill="none" stroke={colours.isoline} strokeLinejoin="round">
      {picture.lines.map((line) => {
        const isHeavy = quantity.heavy.includes(line.level)
        return (
          <path
            key={line.level}
            d={line.path}
            strokeWidth={((isHeavy ? weights.targetEdge : weights.isoline) * pen.k) / scale}
            strokeOpacity={isHeavy ? 0.97 : weights.isolineOpacity}
          />
        )
      })}
    </g>
  )
}
