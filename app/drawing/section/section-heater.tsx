import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { bodyOf, elementCentres, type Body } from '#app/domain/layout/body.ts'
import { hungPlaces } from '#app/domain/layout/hanging.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { coverHeightAt } from '#app/domain/site/cover.ts'
import type { Site } from '#app/domain/site/site.ts'
import { add, scale, type Vec2, type Vec3 } from '#app/domain/vector.ts'
import { supportPoint } from '#app/drawing/plan/heater-place.ts'
import {
  alongCut,
  alongDirectionOf,
  onSection,
  projected,
  type SectionView,
} from '#app/drawing/section/section-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { Words } from '#app/drawing/text/words.tsx'

const rounded = (value: number): number => Math.round(value * 10) / 10

/** Corners of a convex outline around points, in order (gift of the monotone chain). */
function hull(points: readonly Vec2[]): Vec2[] {
  const sorted = [...points].sort((a, b) => a[0] - b[0] || a[1] - b[1])
  const half = (list: readonly Vec2[]): Vec2[] => {
    const kept: Vec2[] = []
    for (const p of list) {
      for (;;) {
        const [a, b] = [kept.at(-2), kept.at(-1)]
        if (!a || !b || (b[0] - a[0]) * (p[1] - a[1]) - (b[1] - a[1]) * (p[0] - a[0]) > 0) break
        kept.pop()
      }
      kept.push(p)
    }
    return kept.slice(0, -1)
  }
  return [...half(sorted), ...half(sorted.reverse())]
}

function cornersOf(body: Body): Vec3[] {
  return [-1, 1].flatMap((a) =>
    [-1, 1].flatMap((b) =>
      [-1, 1].map((c) =>
        add(
          add(body.centre, scale(body.u, a * body.half.u)),
          add(scale(body.v, b * body.half.v), scale(body.w, c * body.half.w)),
        ),
      ),
    ),
  )
}

const pathOf = (points: readonly Vec2[]): string => `M${points.map((p) => p.map(rounded).join(' ')).join('L')}Z`

interface HeaterProps {
  readonly heater: MountedHeater
  readonly model: HeaterModel
  readonly site: Site
  readonly rules: HouseRules
  readonly view: SectionView
  readonly pen: Pen
}

interface HangerLine {
  readonly from: Vec3
  readonly to: Vec3
  /** Plumb length, m; null for what is not hung. */
  readonly drop: number | null
}

/** What holds a heater: hangers up to its member or the cover, or an arm to its wall or pole. */
export function hangersOf({
  heater,
  model,
  site,
  rules,
}: Pick<HeaterProps, 'heater' | 'model' | 'site' | 'rules'>): HangerLine[] {
  const hung = hungPlaces(site, heater, model, rules)
  if (hung)
    return hung.map(({ eye, anchor, underside, sideways }) => ({
      from: eye,
      to: anchor,
      drop: sideways > 0 ? null : underside - eye[2],
    }))
  if (heater.mount === 'recess box') return []
  const body = bodyOf(heater, model)
  const top = add(body.centre, scale(body.w, -body.half.w))
  const held = heater.mount === 'wall bracket' || heater.mount === 'pole clamp' ? supportPoint(heater, site) : null
  if (held) return [{ from: top, to: [held[0], held[1], top[2]], drop: null }]
  const half = (model.suspensionEyePitch ?? model.body.length * 0.8) / 2
  return [-half, half].flatMap((offset): HangerLine[] => {
    const from = add(top, scale(body.u, offset))
    const over = site.covers.flatMap((cover) => coverHeightAt(cover, from[0], from[1]) ?? [])
    const above = Math.min(...over.filter((z) => z > from[2]))
    return Number.isFinite(above) ? [{ from, to: [from[0], from[1], above], drop: above - from[2] }] : []
  })
}

/** A drop beside its hanger: whole millimetres, or inches to the half. */
const dropText = (metres: number, displayUnits: Site['displayUnits']): string =>
  displayUnits === 'metric' ? String(Math.round(metres * 1000)) : `${Math.round(metres / 0.0127) / 2}″`

/** Hangers of a heater with their lengths beside them: chains dotted, rods and arms solid. */
export function SectionHangers(props: HeaterProps) {
  const { heater, site, view, pen } = props
  const lines = hangersOf(props).map((line) => ({
    ...line,
    a: projected(view, line.from),
    b: projected(view, line.to),
  }))
  const xs = lines.map(({ a }) => a[0])
  const isApart = Math.max(...xs) - Math.min(...xs) > 9
  return lines.map(({ a, b, drop }, i) => {
    const isLeft = a[0] <= Math.min(...xs)
    const isShown = drop !== null && (isApart || i === 0) && a[1] - b[1] > pen.text + 2
    return (
      <g key={i}>
        <line
          x1={rounded(a[0])}
          y1={rounded(a[1])}
          x2={rounded(b[0])}
          y2={rounded(b[1])}
          stroke={pen.colours.line}
          strokeWidth={1.5 * pen.k}
          strokeDasharray={heater.mount === 'chain' ? `${2 * pen.k} ${1.3 * pen.k}` : undefined}
        />
        {isShown && isApart ? (
          <Words
            x={a[0] + (isLeft ? -4 : 4) * pen.k}
            y={(a[1] + b[1]) / 2 + 4}
            anchor={isLeft ? 'end' : 'start'}
            size={pen.text}
            colour={pen.colours.line}
            halo={pen.colours.ground}
            haloWidth={2.6 * pen.k}
          >
            {dropText(drop, site.displayUnits)}
          </Words>
        ) : null}
      </g>
    )
  })
}

/** A heater's body as it looks along the direction of view, its elements as ember lines or dots, its tilt in degrees. */
export function SectionHeater({
  heater,
  model,
  view,
  pen,
  selected,
}: Omit<HeaterProps, 'rules'> & { selected: boolean }) {
  const body = bodyOf(heater, model)
  const outline = hull(cornersOf(body).map((corner) => projected(view, corner)))
  const xs = outline.map((p) => p[0])
  const ys = outline.map((p) => p[1])
  const beamAside = alongDirectionOf(view.cut, body.w)
  const tiltSeen = Math.abs(beamAside) > 0.03
  return (
    <g data-heater={heater.id}>
      {selected ? (
        <rect
          x={Math.min(...xs) - 7}
          y={Math.min(...ys) - 7}
          width={Math.max(...xs) - Math.min(...xs) + 14}
          height={Math.max(...ys) - Math.min(...ys) + 14}
          rx={3}
          fill="none"
          stroke={pen.colours.selection}
          strokeWidth={1.8}
        />
      ) : null}
      <path d={pathOf(outline)} fill={pen.colours.heater} stroke={pen.colours.heaterEdge} strokeWidth={pen.k} />
      {elementCentres(body, model).map((centre, i) => {
        const half = scale(body.u, model.elementLength / 2)
        const [x1, y1] = projected(view, add(centre, scale(half, -1)))
        const [x2, y2] = projected(view, add(centre, half))
        return Math.abs(x2 - x1) < 4 ? (
          <circle key={i} cx={rounded(x1)} cy={rounded(y1)} r={1.8 * pen.k} fill={pen.colours.element} />
        ) : (
          <line
            key={i}
            x1={rounded(x1)}
            y1={rounded(y1)}
            x2={rounded(x2)}
            y2={rounded(y2)}
            stroke={pen.colours.element}
            strokeWidth={1.6 * pen.k}
          />
        )
      })}
      {tiltSeen ? (
        <Words
          x={beamAside > 0 ? Math.max(...xs) + 8 : Math.min(...xs) - 8}
          y={Math.min(...ys) - 2}
          anchor={beamAside > 0 ? 'start' : 'end'}
          size={pen.text}
          colour={pen.colours.line}
          halo={pen.colours.ground}
          haloWidth={2.6 * pen.k}
        >
          {`${Math.round(Math.abs(heater.tiltDeg))}°`}
        </Words>
      ) : null}
    </g>
  )
}

/** Foot and head of the line that gives a heater's height, on the drawing. */
export const heightLine = (heater: MountedHeater, view: SectionView): { foot: Vec2; head: Vec2 } => {
  const along = alongCut(view.cut, [heater.x, heater.y])
  return { foot: onSection(view, along, 0), head: onSection(view, along, heater.lowestPoint) }
}
