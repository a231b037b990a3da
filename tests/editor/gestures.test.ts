import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { GestureStart } from '#app/editor/tools/gesture.ts'
import { heatersWithin, selectionAfterClick } from '#app/editor/tools/marquee.ts'
import { moveGesture } from '#app/editor/tools/move.ts'
import { aimDistance, tiltGesture } from '#app/editor/tools/tilt.ts'
import { turnGesture } from '#app/editor/tools/turn.ts'
import { demoModels } from '#drizzle/seed/demo-models.ts'
import { beamedSite, heaterAt, layoutOf } from '#tests/support/layouts.ts'

const models: ReadonlyMap<string, HeaterModel> = new Map(demoModels().map((model) => [model.code, model]))
const layout = layoutOf(heaterAt('H1', 3, 2), heaterAt('H2', 6, 2, { memberId: 'beam-2' }))
const start: GestureStart = {
  site: beamedSite,
  models,
  rules: plainHouseRules,
  layout,
  ids: ['H1'],
  leadId: 'H1',
  from: [3.05, 2.02],
  pull: 0.12,
  plane: 0.6,
  say: (metres) => `${metres.toFixed(2)} m`,
}
const first = (step: { layout: typeof layout }) => step.layout.heaters[0]

describe('moving', () => {
  it('moves by the whole way of the pointer, however many steps it took', () => {
    const steps = [0.3, 1.7, 2.4, 0.8].map((dx) => moveGesture(start, [3.05 + dx, 2.02], true))
    expect(first(steps[3] ?? moveGesture(start, [0, 0], true))).toMatchObject({ x: 3.8, y: 2 })
  })
  it('takes the new member as support, and none between members', () => {
    expect(first(moveGesture(start, [9.1, 2.5], false))).toMatchObject({ x: 9, memberId: 'beam-3' })
    expect(first(moveGesture(start, [4.5, 2.6], false))?.memberId).toBeNull()
  })
  it('lets go of everything when asked to', () => {
    const free = moveGesture(start, [9.0937, 2.5], true)
    expect(first(free)?.x).toBeCloseTo(9.044, 9)
    expect(free.reason).toBeNull()
    expect(moveGesture(start, [9.0937, 2.5], false).reason).toContain('Held to Beam 3')
  })
  it('moves a group together', () => {
    const step = moveGesture({ ...start, ids: ['H1', 'H2'] }, [3.05, 3.02], true)
    expect(step.layout.heaters.map((heater) => heater.y)).toEqual([3, 3])
  })
})

describe('turning', () => {
  it('follows the angle of the pointer about the heater, and holds near 15° steps', () => {
    const from = { ...start, from: [4, 2] as const }
    expect(first(turnGesture(from, [3, 3], false))?.turnDeg).toBe(90)
    expect(first(turnGesture(from, [3.98, 3.02], false))).toMatchObject({ turnDeg: 45 })
    expect(turnGesture(from, [3.98, 3.02], false).reason).toBe('Held to 45°.')
    expect(first(turnGesture(from, [3.98, 3.02], true))?.turnDeg).toBe(46)
  })
  it('turns the same way round when the pointer crosses behind the heater', () => {
    const behind = { ...start, from: [2, 2.1] as const }
    expect(first(turnGesture(behind, [2, 1.9], true))?.turnDeg).toBeCloseTo(11, 9)
  })
})

describe('tilting', () => {
  it('moves the spot where the beam meets the plane', () => {
    const drop = 2.35 - 0.6
    const step = tiltGesture(start, [3.05, 2.02 + drop * Math.tan((30 * Math.PI) / 180)], false)
    expect(first(step)?.tiltDeg).toBe(30)
    expect(aimDistance(heaterAt('H1', 0, 0, { tiltDeg: 45 }), 0.6)).toBeCloseTo(1.75, 9)
  })
  it('holds to the manual and says its limits; free passes them', () => {
    const far = [3.05, 2.02 - 4] as const
    expect(tiltGesture(start, far, false)).toMatchObject({
      reason: 'Tilt 0 to 45° by the manual of Betony 2.0.',
      layout: { heaters: [{ tiltDeg: -45 }, {}] },
    })
    expect(first(tiltGesture(start, far, true))?.tiltDeg).toBe(-66)
  })
})

describe('choosing', () => {
  it('takes what lies inside the rectangle, from any corner', () => {
    expect(heatersWithin(layout, [5, 3], [2, 1])).toEqual(['H1'])
    expect(heatersWithin(layout, [3, 2], [6, 2])).toEqual(['H1', 'H2'])
  })
  it('chooses one, or with Shift adds and takes out', () => {
    expect(selectionAfterClick(['H1', 'H2'], 'H3', false)).toEqual(['H3'])
    expect(selectionAfterClick(['H1'], 'H2', true)).toEqual(['H1', 'H2'])
    expect(selectionAfterClick(['H1', 'H2'], 'H1', true)).toEqual(['H2'])
  })
})
