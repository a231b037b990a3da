import { expect, it } from 'vitest'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import {
  atTrueSize,
  enlarge,
  interimTransform,
  pinch,
  shift,
  transformedView,
  wholePlan,
} from '#app/editor/view-transform.ts'

const view: PlanView = { scale: 60, x0: 50, y0: 400, width: 1000, height: 500 }

it('keeps the point under the pointer where it is', () => {
  const pointer = [50 + 60 * 4, 400 - 60 * 2] as const
  const larger = transformedView(view, enlarge(shift(wholePlan, 0, 0), 2.5, pointer))
  expect(larger.scale).toBe(150)
  expect(toScreen(larger, [4, 2])).toEqual([expect.closeTo(pointer[0], 9), expect.closeTo(pointer[1], 9)])
})
it('stops at its ends', () => {
  expect(enlarge(wholePlan, 1e6, [0, 0]).size).toBe(16)
  expect(enlarge(wholePlan, 1e-6, [0, 0]).size).toBe(0.4)
})
it('keeps what lay under two fingers under them', () => {
  const moved = pinch(
    wholePlan,
    [
      [100, 100],
      [300, 100],
    ],
    [
      [150, 200],
      [550, 200],
    ],
  )
  expect(moved.size).toBe(2)
  expect([100 * moved.size + moved.x, 100 * moved.size + moved.y]).toEqual([150, 200])
  expect([300 * moved.size + moved.x, 100 * moved.size + moved.y]).toEqual([550, 200])
})
it('draws 1 m as 2 cm of a 96 px per inch screen at 100 %', () => {
  expect(transformedView(view, atTrueSize(view)).scale).toBeCloseTo((0.02 / 0.0254) * 96, 6)
})
it('shows the wanted view by one transform of the drawn one', () => {
  const drawn = enlarge(wholePlan, 2, [10, 20])
  const wanted = shift(enlarge(drawn, 1.5, [200, 80]), 5, -9)
  const [a, , , , e, f] =
    interimTransform(drawn, wanted)
      .match(/-?[\d.]+(?:e-?\d+)?/g)
      ?.map(Number) ?? []
  const [px, py] = toScreen(transformedView(view, drawn), [3, 1])
  const [wx, wy] = toScreen(transformedView(view, wanted), [3, 1])
  expect([px * (a ?? 0) + (e ?? 0), py * (a ?? 0) + (f ?? 0)]).toEqual([expect.closeTo(wx, 6), expect.closeTo(wy, 6)])
})
