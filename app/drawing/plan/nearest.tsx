import type { Vec2, Vec3 } from '#app/domain/vector.ts'
import { NearestDimension, type NearestPair } from '#app/drawing/nearest/nearest-dimension.tsx'
import type { Patch } from '#app/drawing/plan/occupied.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'

/** Where both ends of a pair stand on the plan, px. */
export const pairOnPlan = (view: PlanView, { from, to }: NearestPair): readonly [Vec2, Vec2] => {
  const onPlan = ([x, y]: Vec3): Vec2 => toScreen(view, [x, y])
  return [onPlan(from), onPlan(to)]
}

/** A pair that runs mostly up or down says so after its figure: on the plan its line is short. */
export function planFigure({ from, to, figure }: NearestPair): string {
  const rise = to[2] - from[2]
  const aside = Math.hypot(to[0] - from[0], to[1] - from[1])
  if (Math.abs(rise) <= aside) return figure
  return `${figure} ${rise > 0 ? 'up' : 'down'}`
}

/** The nearest pair of a finding as a dimension on the plan. */
export function PlanNearest({
  pair,
  view,
  pen,
  taken,
}: {
  readonly pair: NearestPair
  readonly view: PlanView
  readonly pen: Pen
  readonly taken: readonly Patch[]
}) {
  const [from, to] = pairOnPlan(view, pair)
  return <NearestDimension {...{ from, to, taken, pen }} figure={planFigure(pair)} chosen={pair.chosen} />
}
