import type { PhotoMarks, PhotoPlane } from '#app/domain/photo/measurements.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { endsOf, photoTextSize, placePhotoLabels } from '#app/drawing/photo/photo-labels.ts'

interface PhotoMarksProps {
  readonly marks: PhotoMarks
  /** Where a px of the photo is drawn. */
  readonly toScreen: (mark: Vec2) => Vec2
  /** What each measurement gives in words, by its id. */
  readonly figures: ReadonlyMap<string, string>
  /** The plane or measurement that is shown strongest. */
  readonly chosen: string | null
}

const pale = '#efe6d6'
const dark = '#0c1322'
const strong = '#ffb27a'

/** A line that is seen on light and on dark. */
function Line({ points, ink, broken = false }: { points: readonly Vec2[]; ink: string; broken?: boolean }) {
  const shared = { points: points.map(([x, y]) => `${x.toFixed(1)},${y.toFixed(1)}`).join(' '), fill: 'none' }
  return (
    <>
      <polyline {...shared} stroke={dark} strokeOpacity="0.75" strokeWidth="4" strokeLinejoin="round" />
      <polyline {...shared} stroke={ink} strokeWidth="1.6" strokeDasharray={broken ? '6 4' : undefined} />
    </>
  )
}

interface PlaneProps {
  readonly plane: PhotoPlane
  readonly toScreen: PhotoMarksProps['toScreen']
  readonly chosen: boolean
}

/** A reference rectangle, and its plumb edges; chosen, its first side is told from the others. */
function Plane({ plane, toScreen, chosen }: PlaneProps) {
  const ink = chosen ? strong : pale
  const corners = plane.corners.map(toScreen)
  const [first, second] = corners
  const { vertical } = plane
  return (
    <g>
      <Line points={[...corners, ...corners.slice(0, 1)]} ink={ink} broken />
      {chosen && first && second && <Line points={[first, second]} ink={ink} />}
      {vertical && <Line points={[toScreen(vertical.known.foot), toScreen(vertical.known.top)]} ink={ink} />}
      {vertical && <Line points={[toScreen(vertical.other.foot), toScreen(vertical.other.top)]} ink={ink} broken />}
    </g>
  )
}

/** Everything that is marked in a photo, over its picture: rectangles broken, lengths and heights whole, their figures. */
export function PhotoMarksDrawing({ marks, toScreen, figures, chosen }: PhotoMarksProps) {
  const ink = (id: string) => (id === chosen ? strong : pale)
  return (
    <g pointerEvents="none">
      {marks.planes.map((plane) => (
        <Plane key={plane.id} plane={plane} toScreen={toScreen} chosen={plane.id === chosen} />
      ))}
      {marks.measurements.map((measurement) => {
        const [from, to] = endsOf(measurement)
        return <Line key={measurement.id} points={[toScreen(from), toScreen(to)]} ink={ink(measurement.id)} />
      })}
      {placePhotoLabels(marks, toScreen, figures, chosen).map(({ of, text, at: [x, y] }) => (
        <text
          key={`${of} ${text}`}
          x={x}
          y={y}
          fontSize={photoTextSize}
          fontWeight="500"
          textAnchor="middle"
          fill={ink(of)}
          stroke={dark}
          strokeWidth="3.5"
          strokeLinejoin="round"
          paintOrder="stroke"
        >
          {text}
        </text>
      ))}
    </g>
  )
}
