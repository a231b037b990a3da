import type { Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import { Axonometric, type AxonometricProps } from '#app/drawing/axonometric/axonometric-drawing.tsx'
import { downDeg, turnedDeg } from '#app/drawing/axonometric/projection.ts'
import { Legend } from '#app/drawing/heat/legend.tsx'
import { fontFamily } from '#app/drawing/theme.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** Size of the picture, px, and the room of its head and its foot. */
const size = { width: 1000, height: 640, head: 56, foot: 92 }

interface AxonometricSheetProps extends Omit<AxonometricProps, 'name' | 'width' | 'height'> {
  readonly job: string
  readonly variant: { readonly number: number; readonly title: string; readonly revision: number }
  readonly date: string
  readonly organisation: string
  /** What nobody has confirmed yet. */
  readonly assumed: readonly string[]
  /** Height of the map's plane, m. */
  readonly plane: number
}

/** The drawing as a picture to send: whose and which variant, the scale of the heat, how it is projected, its caution. */
export function AxonometricSheet(props: AxonometricSheetProps) {
  const { job, variant, date, organisation, assumed, site, quantity, corner, plane, pen, ...drawing } = props
  const { width, height, head, foot } = size
  const { line, secondLine, ground } = pen.colours
  const room = { width, height: height - head - foot }
  const title = `${variant.number} ${variant.title}`
  const titleSize = [18, 14].find((each) => textWidth(title, each, 600) <= 560) ?? 12
  return (
    <svg width={width} height={height} viewBox={`0 0 ${width} ${height}`} role="img" aria-label={`${job}, ${title}, as a picture`}>
      <g fontFamily={fontFamily}>
        <rect width={width} height={height} fill={ground} />
        <Words x={24} y={34} size={titleSize} weight={600} colour={line}>
          {shortened(title, 560, titleSize)}
        </Words>
        {assumed.length > 0 && (
          <Words x={24} y={52} size={11} colour={secondLine}>
            {shortened(`Assumed: ${assumed.join('; ')}.`, 600, 11)}
          </Words>
        )}
        <Words x={width - 24} y={26} anchor="end" size={11} colour={line}>
          {shortened(`${job} · ${organisation}`, 380, 11)}
        </Words>
        <Words x={width - 24} y={42} anchor="end" size={11} colour={secondLine}>
          {`Revision ${variant.revision}, ${date}, not yet checked`}
        </Words>
        <g transform={`translate(0 ${head})`}>
          <Axonometric name="picture" {...{ site, quantity, corner, pen }} {...drawing} {...room} />
        </g>
        <Legend name="scale" {...{ quantity, pen }} x={24} y={height - 58} width={380} ink={line} />
        {footWords(site, plane, corner).map((words, i) => (
          <Words key={words} x={width - 24} y={height - 58 + 16 * i} anchor="end" size={11} colour={i < 2 ? line : secondLine}>
            {words}
          </Words>
        ))}
      </g>
    </svg>
  ) // prettier-ignore
}

const footWords = (site: Site, plane: number, corner: string): string[] => [
  `Irradiance at ${formatLength(plane, site.displayUnits)} above the floor, W/m², laid on the floor`,
  `Seen from the ${corner} of the plan; walls in front dashed, covers as outlines`,
  `Parallel projection: turned ${turnedDeg}°, from ${downDeg}° above`,
  'Calculated, not a thermal photograph',
]

/** Words cut to a width, px. */
function shortened(words: string, width: number, textSize: number): string {
  if (textWidth(words, textSize, 600) <= width) return words
  let kept = words
  while (kept.length > 1 && textWidth(`${kept}…`, textSize, 600) > width) kept = kept.slice(0, -1)
  return `${kept.trimEnd()}…`
}
