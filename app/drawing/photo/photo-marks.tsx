import type { ReactNode } from 'react'
import type { Measurement, PhotoMarks, PhotoPlane } from '#app/domain/photo/measurements.ts'
import type { Vec2 } from '#app/domain/vector.ts'

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

function Words({ at, ink = pale, children }: { at: Vec2; ink?: string; children: ReactNode }) {
  return (
    <text
      x={at[0]}
      y={at[1]}
      fontSize="12"
      fontWeight="500"
      textAnchor="middle"
      fill={ink}
      stroke={dark}
      strokeWidth="3.5"
      strokeLinejoin="round"
      paintOrder="stroke"
    >
      {children}
    </text>
  )
}

const middle = (...points: readonly Vec2[]): Vec2 => [
  points.reduce((sum, [x]) => sum + x, 0) / points.length,
  points.reduce((sum, [, y]) => sum + y, 0) / points.length,
]

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
      <Words at={middle(...corners)} ink={ink}>
        {plane.name}
      </Words>
      {chosen && first && second && (
        <Words at={middle(first, second)} ink={ink}>
          first side
        </Words>
      )}
      {vertical && <Line points={[toScreen(vertical.known.foot), toScreen(vertical.known.top)]} ink={ink} />}
      {vertical && <Line points={[toScreen(vertical.other.foot), toScreen(vertical.other.top)]} ink={ink} broken />}
    </g>
  )
}

const endsOf = (measurement: Measurement): readonly [Vec2, Vec2] =>
  measurement.kind === 'length' ? [measurement.from.at, measurement.to.at] : [measurement.foot.at, measurement.top]

/** Everything that is marked in a photo, over its picture: rectangles broken, lengths and heights whole, their figures. */
export function PhotoMarksDrawing({ marks, toScreen, figures, chosen }: PhotoMarksProps) {
  const ink = (id: string) => (id === chosen ? strong : pale)
  return (
    <g pointerEvents="none">
      {marks.planes.map((plane) => (
        <Plane key={plane.id} plane={plane} toScreen={toScreen} chosen={plane.id === chosen} />
      ))}
      {marks.measurements.map((measurement) => {
        const [a, b] = endsOf(measurement)
        const [from, to] = [toScreen(a), toScreen(b)]
        const at = middle(from, to)
        return (
          <g key={measurement.id}>
            <Line points={[from, to]} ink={ink(measurement.id)} />
            <Words at={[at[0], at[1] - 7]} ink={ink(measurement.id)}>
              {figures.get(measurement.id) ?? measurement.label}
            </Words>
          </g>
        )
      })}
    </g>
  )
}
