import { listOf } from '#app/domain/site/edits.ts'
import type { Site } from '#app/domain/site/site.ts'
import { CoverMark, LevelMark } from '#app/drawing/plan/cover-mark.tsx'
import { PoleMark, TableMark } from '#app/drawing/plan/furniture.tsx'
import { MemberLines } from '#app/drawing/plan/members.tsx'
import { ObstacleMark } from '#app/drawing/plan/obstacle.tsx'
import { outlinePath } from '#app/drawing/plan/outline.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import { SeatMark, seatRadius } from '#app/drawing/plan/seat.tsx'
import { wallCorners } from '#app/drawing/plan/wall.tsx'
import type { Pen } from '#app/drawing/pen.ts'
import type { Chosen } from '#app/editor/site/choice.ts'
import { tableOutline } from '#app/editor/site/thing-at.ts'

interface MarkProps {
  readonly site: Site
  readonly chosen: Chosen
  readonly view: PlanView
  readonly pen: Pen
}

/** More things than these are drawn as outlines alone while they are dragged. */
const manyThings = 60

/** The chosen things themselves, as they are drawn on the plan; for what is being dragged. */
export function ThingMarks({ site, chosen, view, pen }: MarkProps) {
  const { kind, ids } = chosen
  if (kind === 'floor')
    return <path d={outlinePath(site.floor, view)} fill="none" stroke={pen.colours.line} strokeWidth={1.3} />
  const has = new Set(ids)
  const of = <T extends { readonly id: string }>(things: readonly T[]): T[] => things.filter(({ id }) => has.has(id))
  switch (kind) {
    case 'seat': {
      if (ids.length > manyThings) return null
      return of(site.seats).map((seat) => (
        <SeatMark key={seat.id} {...{ seat, view, pen }} sign={null} withFigure={false} />
      ))
    }
    case 'member':
      return of(site.members).map((member) => <MemberLines key={member.id} {...{ member, view, pen }} />)
    case 'obstacle':
      return of(site.obstacles).map((obstacle) => <ObstacleMark key={obstacle.id} {...{ obstacle, view, pen }} />)
    case 'pole':
      return of(site.poles).map((pole) => <PoleMark key={pole.id} {...{ pole, view, pen }} />)
    case 'table':
      return of(site.tables).map((table) => <TableMark key={table.id} {...{ table, view, pen }} />)
    case 'cover':
      return of(site.covers).map((cover) => <CoverMark key={cover.id} {...{ cover, view, pen }} />)
    case 'level':
      return of(site.levels).map((level) => (
        <LevelMark key={level.id} {...{ level, view, pen }} units={site.displayUnits} />
      ))
    case 'wall':
      return of(site.walls).map((wall) => (
        <path
          key={wall.id}
          d={`M${wallCorners(wall, view).map((corner) => corner.join(' ')).join('L')}Z`} // prettier-ignore
          fill={pen.colours.wall}
          stroke={pen.colours.line}
          strokeWidth={0.9}
        />
      ))
  }
}

/** Rings and halos around what is chosen. */
export function ChosenMarks({ site, chosen: { kind, ids }, view, pen }: MarkProps) {
  const stroke = pen.colours.selection
  const wide = { stroke, strokeWidth: 7, strokeOpacity: 0.45, fill: 'none', strokeLinejoin: 'round' } as const
  const has = new Set(ids)
  if (kind === 'floor') return <path d={outlinePath(site.floor, view)} {...wide} strokeWidth={5} />
  if (kind === 'seat' || kind === 'pole') {
    const r = kind === 'seat' ? seatRadius(view, pen, false) + 7 : 9
    const places = kind === 'seat' ? site.seats.map(({ id, x, y }) => ({ id, at: [x, y] as const })) : site.poles
    return (
      <g fill="none" stroke={stroke} strokeWidth="1.8">
        {places
          .filter(({ id }) => has.has(id))
          .map(({ id, at }) => {
            const [cx, cy] = toScreen(view, at)
            return <circle key={id} cx={cx} cy={cy} r={r} />
          })}
      </g>
    )
  }
  return site[listOf[kind]].filter(({ id }) => has.has(id)).map((thing) => <path key={thing.id} d={edgePath(thing, view)} {...wide} />) // prettier-ignore
}

type Outlined = Site['covers' | 'members' | 'walls' | 'obstacles' | 'tables' | 'levels' | 'poles' | 'seats'][number]

/** The edge of a thing in plan as a path, px. */
function edgePath(thing: Outlined, view: PlanView): string {
  if ('corners' in thing) return outlinePath(thing.corners.map(([x, y]) => [x, y] as const), view) // prettier-ignore
  if ('outline' in thing) return outlinePath(thing.outline, view)
  if ('from' in thing) return outlinePath([thing.from, thing.to], view)
  if ('shape' in thing) {
    const { shape } = thing
    if (shape.kind === 'prism') return outlinePath(shape.outline, view)
    if (shape.kind === 'cylinder') return circlePath(toScreen(view, shape.centre), shape.radius * view.scale)
    const [[x0, x1], [y0, y1]] = [shape.x, shape.y]
    return outlinePath([[x0, y0], [x1, y0], [x1, y1], [x0, y1]], view) // prettier-ignore
  }
  if ('centre' in thing)
    return thing.form === 'round'
      ? circlePath(toScreen(view, thing.centre), (thing.size[0] / 2) * view.scale)
      : outlinePath(tableOutline(thing), view)
  return ''
}

const circlePath = ([x, y]: readonly [number, number], r: number): string =>
  `M${x - r} ${y}A${r} ${r} 0 1 0 ${x + r} ${y}A${r} ${r} 0 1 0 ${x - r} ${y}Z`
