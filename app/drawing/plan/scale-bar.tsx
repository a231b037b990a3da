import type { Site } from '#app/domain/site/site.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { Words } from '#app/drawing/text/words.tsx'

const foot = 0.3048

/** Length of one part of a scale bar, in the drawing's unit: the largest round one of which `parts` fit in `most` px. */
function scaleBarStep(pxPerUnit: number, most: number, parts: number): number {
  const steps = [0.25, 0.5, 1, 2, 5, 10, 20, 50]
  return steps.findLast((step) => step * parts * pxPerUnit <= most) ?? 0.1
}

/** A scale bar of equal parts with figures below; (x, y) is its lower right or left corner, `scale` px per m. */
export function ScaleBar({
  x,
  y,
  scale,
  displayUnits,
  pen,
  most = 224,
  parts = 3,
  anchor = 'right',
}: {
  x: number
  y: number
  scale: number
  displayUnits: Site['displayUnits']
  pen: Pen
  most?: number
  parts?: number
  anchor?: 'left' | 'right'
}) {
  const pxPerUnit = displayUnits === 'metric' ? scale : scale * foot
  const step = scaleBarStep(pxPerUnit, most, parts)
  const part = step * pxPerUnit
  const left = anchor === 'right' ? x - parts * part : x
  const unit = displayUnits === 'metric' ? ' m' : ' ft'
  return (
    <g>
      {Array.from({ length: parts }, (_, i) => (
        <rect
          key={i}
          x={left + i * part}
          y={y - 5 * pen.k}
          width={part}
          height={5 * pen.k}
          fill={i % 2 === 0 ? pen.colours.line : pen.colours.ground}
          stroke={pen.colours.line}
          strokeWidth={pen.k}
        />
      ))}
      {Array.from({ length: parts + 1 }, (_, i) => (
        <Words
          key={i}
          x={left + i * part}
          y={y + pen.text + 1.5 * pen.k}
          anchor="middle"
          size={pen.text}
          colour={pen.colours.line}
        >{`${i * step}${i === parts ? unit : ''}`}</Words>
      ))}
    </g>
  )
}
