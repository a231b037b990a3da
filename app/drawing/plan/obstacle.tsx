import type { Obstacle } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { outlinePath } from '#app/drawing/plan/outline.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'

/** A long thin thing that is drawn as a line: the middle of its two ends, m, and its thickness, m. */
export interface Strip {
  readonly from: Vec2
  readonly to: Vec2
  readonly thickness: number
}

/** An obstacle that is much longer than it is deep in plan, as a strip; null for the others. */
export function stripOf({ shape }: Obstacle): Strip | null {
  if (shape.kind !== 'box') return null
  const [x0, x1] = shape.x
  const [y0, y1] = shape.y
  const [across, deep] = [x1 - x0, y1 - y0]
  if (Math.min(across, deep) > 0.3 || Math.max(across, deep) < 4 * Math.min(across, deep)) return null
  return across > deep
    ? { from: [x0, (y0 + y1) / 2], to: [x1, (y0 + y1) / 2], thickness: deep }
    : { from: [(x0 + x1) / 2, y0], to: [(x0 + x1) / 2, y1], thickness: across }
}

const figure = (value: number): number => Math.round(value * 100) / 100
const path = (points: readonly Vec2[]): string => `M${points.map((p) => p.map(figure).join(' ')).join('L')}`

/** A saw-tooth along a line between two points of the drawing; the teeth stay within `depth` px about it. */
export function sawTooth(from: Vec2, to: Vec2, pitch: number, depth: number): string {
  const length = Math.hypot(to[0] - from[0], to[1] - from[1])
  const count = Math.max(2, 2 * Math.round(length / pitch))
  const normal: Vec2 = [-(to[1] - from[1]) / (length || 1), (to[0] - from[0]) / (length || 1)]
  return path(
    Array.from({ length: count + 1 }, (_, i) => {
      const side = (i % 2 === 0 ? 0.5 : -0.5) * depth
      const t = i / count
      return [from[0] + t * (to[0] - from[0]) + normal[0] * side, from[1] + t * (to[1] - from[1]) + normal[1] * side]
    }),
  )
}

interface PieceProps {
  readonly obstacle: Obstacle
  readonly view: PlanView
  readonly pen: Pen
}

function CableLine({ strip, view, pen }: { strip: Strip; view: PlanView; pen: Pen }) {
  const a = toScreen(view, strip.from)
  const b = toScreen(view, strip.to)
  const length = Math.hypot(strip.to[0] - strip.from[0], strip.to[1] - strip.from[1])
  const beads = Math.max(1, Math.round(length / 0.66))
  return (
    <>
      <line x1={a[0]} y1={a[1]} x2={b[0]} y2={b[1]} stroke={pen.colours.secondLine} strokeWidth={0.8 * pen.k} />
      {Array.from({ length: beads }, (_, i) => {
        const t = (i + 0.5) / beads
        return (
          <circle
            key={i}
            cx={figure(a[0] + t * (b[0] - a[0]))}
            cy={figure(a[1] + t * (b[1] - a[1]))}
            r={1.7 * pen.k}
            fill={pen.colours.ground}
            stroke={pen.colours.secondLine}
            strokeWidth={0.8 * pen.k}
          />
        )
      })}
    </>
  )
}

function EdgeLine({ strip, view, pen, burns }: { strip: Strip; view: PlanView; pen: Pen; burns: boolean }) {
  const a = toScreen(view, strip.from)
  const b = toScreen(view, strip.to)
  const depth = Math.min(5, Math.max(3, strip.thickness * view.scale)) * pen.k
  return burns ? (
    <path
      d={sawTooth(a, b, 9 * pen.k, depth)}
      fill="none"
      stroke={pen.colours.line}
      strokeWidth={0.8 * pen.k}
      opacity={0.8}
    />
  ) : (
    <line x1={a[0]} y1={a[1]} x2={b[0]} y2={b[1]} stroke={pen.colours.line} strokeWidth={0.8 * pen.k} opacity={0.8} />
  )
}

/**
 * A thing on the plan: a cable with beads, a long edge (saw-tooth where it may burn), anything else at its largest size
 * with a dashed line where it moves. An unknown material is drawn as one that burns.
 */
export function ObstacleMark({ obstacle, view, pen }: PieceProps) {
  const strip = stripOf(obstacle)
  const { shape } = obstacle
  const outline = {
    fill: 'none',
    stroke: pen.colours.line,
    strokeWidth: 0.9 * pen.k,
    strokeDasharray: obstacle.movable || obstacle.kind === 'fan' ? `${4 * pen.k} ${3 * pen.k}` : undefined,
    opacity: 0.9,
  }
  return (
    <g data-obstacle={obstacle.id}>
      {strip && obstacle.kind === 'cable' ? <CableLine strip={strip} view={view} pen={pen} /> : null}
      {strip && obstacle.kind !== 'cable' ? (
        <EdgeLine strip={strip} view={view} pen={pen} burns={obstacle.material !== 'non-combustible'} />
      ) : null}
      {!strip && shape.kind === 'box' ? (
        <path d={outlinePath(boxCorners(shape.x, shape.y), view)} strokeLinejoin="round" {...outline} />
      ) : null}
      {shape.kind === 'prism' ? (
        <path d={outlinePath(shape.outline, view)} strokeLinejoin="round" {...outline} />
      ) : null}
      {shape.kind === 'cylinder' ? <RoundMark obstacle={obstacle} view={view} outline={outline} /> : null}
    </g>
  )
}

const boxCorners = (x: readonly [number, number], y: readonly [number, number]): Vec2[] => [
  [x[0], y[0]],
  [x[1], y[0]],
  [x[1], y[1]],
  [x[0], y[1]],
]

interface Outline {
  readonly fill: string
  readonly stroke: string
  readonly strokeWidth: number
  readonly strokeDasharray: string | undefined
  readonly opacity: number
}

function RoundMark({ obstacle, view, outline }: { obstacle: Obstacle; view: PlanView; outline: Outline }) {
  if (obstacle.shape.kind !== 'cylinder') return null
  const [x, y] = toScreen(view, obstacle.shape.centre)
  const r = obstacle.shape.radius * view.scale
  const arms = obstacle.kind === 'umbrella' ? 8 : obstacle.kind === 'fan' ? 4 : 0
  const spokes = Array.from({ length: arms }, (_, i) => {
    const turn = ((i + 0.5) * 2 * Math.PI) / arms
    return path([
      [x + 0.12 * r * Math.cos(turn), y + 0.12 * r * Math.sin(turn)],
      [x + 0.96 * r * Math.cos(turn), y + 0.96 * r * Math.sin(turn)],
    ])
  })
  return (
    <>
      <circle cx={figure(x)} cy={figure(y)} r={figure(r)} {...outline} />
      {arms > 0 ? (
        <path d={spokes.join('')} stroke={outline.stroke} strokeWidth={outline.strokeWidth * 0.7} opacity={0.28} />
      ) : null}
    </>
  )
}
