import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import { aimDistance, leftOf } from '#app/editor/tools/tilt.ts'

interface HandlesProps {
  readonly heater: MountedHeater
  readonly model: HeaterModel | undefined
  readonly view: PlanView
  readonly plane: number
  readonly touch: boolean
}

/** Two handles of the chosen heater: beyond its end to turn it, where its beam meets the plane to tilt it. */
export function PlanHandles({ heater, model, view, plane, touch }: HandlesProps) {
  const [x, y] = toScreen(view, [heater.x, heater.y])
  const [lx, ly] = leftOf(heater)
  const end = ((model?.body.length ?? 0.5) / 2) * view.scale + 34
  const away = aimDistance(heater, plane) * view.scale
  const side = ((model?.body.width ?? 0.2) / 2) * view.scale + 24
  const reach = away + (heater.tiltDeg < 0 ? -side : side)
  const turn: Vec2 = [x - ly * end, y - lx * end]
  const aim: Vec2 = [x + lx * reach, y - ly * reach]
  const hit = touch ? 22 : 16
  return (
    <g aria-hidden="true" stroke="var(--color-dusk-select)" strokeWidth={1.2} fill="none">
      <path
        d={`M${x} ${y}L${turn[0]} ${turn[1]}M${x} ${y}L${aim[0]} ${aim[1]}`}
        strokeDasharray="2 3"
        opacity={0.7}
        pointerEvents="none"
      />
      <Handle at={turn} hit={hit} name="turn" />
      <Handle at={aim} hit={hit} name="tilt" />
    </g>
  )
}

function Handle({ at: [x, y], hit, name }: { at: Vec2; hit: number; name: 'turn' | 'tilt' }) {
  return (
    <g data-handle={name} className={name === 'turn' ? 'cursor-grab' : 'cursor-crosshair'}>
      <title>{name === 'turn' ? 'Turn' : 'Tilt'}</title>
      <circle cx={x} cy={y} r={hit} stroke="none" fill="transparent" />
      {name === 'turn' ? (
        <circle cx={x} cy={y} r={5} fill="var(--color-dusk-ground)" />
      ) : (
        <path d={`M${x} ${y - 6}l6 6-6 6-6-6z`} fill="var(--color-dusk-ground)" />
      )}
    </g>
  )
}

interface HoldLinesProps {
  readonly lines: readonly { readonly from: Vec2; readonly to: Vec2 }[]
  readonly view: PlanView
}

/** The lines that hold what is being moved. */
export function HoldLines({ lines, view }: HoldLinesProps) {
  const d = lines.map(({ from, to }) => `M${toScreen(view, from).join(' ')}L${toScreen(view, to).join(' ')}`).join('')
  return d ? (
    <path
      d={d}
      stroke="var(--color-dusk-select)"
      strokeWidth={1}
      strokeDasharray="5 3"
      fill="none"
      pointerEvents="none"
    />
  ) : null
}

/** The rectangle that chooses what lies inside. */
export function Marquee({ corners: [a, b], view }: { corners: readonly [Vec2, Vec2]; view: PlanView }) {
  const [x1, y1] = toScreen(view, a)
  const [x2, y2] = toScreen(view, b)
  return (
    <rect
      x={Math.min(x1, x2)}
      y={Math.min(y1, y2)}
      width={Math.abs(x2 - x1)}
      height={Math.abs(y2 - y1)}
      fill="var(--color-dusk-select)"
      fillOpacity={0.12}
      stroke="var(--color-dusk-select)"
    />
  )
}
