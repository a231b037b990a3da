import { describe, expect, it } from 'vitest'
import { hangScheduleOf, splayedPair } from '#app/domain/layout/hanging.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'
import { plainHeater, plainModel, plainSite } from '#tests/support/plain-site.ts'

const models = new Map(demoModels().map((model) => [model.code, model]))
const siteA = demoSites().find(({ key }) => key === 'A')!

function schedule(number: number, id: string) {
  const { layout } = siteA.variants.find((variant) => variant.number === number)!
  const heater = layout.heaters.find((found) => found.id === id)!
  return hangScheduleOf(siteA.site, heater, models.get(heater.model)!)!
}

// The hang schedules of the demonstration: drop, chain net, links and residual of the wall and the river end, mm.
const expected = [
  [2, ['H1', 'H3', 'H5', 'H7'], [618, 523, 19, -9], [556, 461, 16, 13], -2.07],
  [2, ['H2', 'H4', 'H6', 'H8'], [364, 269, 10, -11], [302, 207, 7, 11], -2.07],
  [3, ['H3', 'H5', 'H7', 'H9'], [720, 625, 22, 9], [674, 580, 21, -8], 2.17],
  [3, ['H4', 'H6', 'H8', 'H10'], [466, 370, 13, 6], [420, 325, 12, -11], 2.17],
] as const

describe.each(expected)('site A, variant %i, heaters %s', (number, ids, wall, river, tilt) => {
  it.each([...ids])('%s hangs by the links of the schedule', (id) => {
    const { hangers, residualTiltDeg, tiltLeftDeg } = schedule(number, id)
    for (const [i, end] of [wall, river].entries()) {
      const hanger = hangers[i]!
      // Whole millimetres, either way at the half.
      expect(Math.abs(hanger.drop * 1000 - end[0])).toBeLessThanOrEqual(0.55)
      expect(Math.abs(hanger.net * 1000 - end[1])).toBeLessThanOrEqual(0.55)
      expect(hanger.links).toBe(end[2])
      expect(Math.abs(hanger.residual * 1000 - end[3])).toBeLessThanOrEqual(0.75)
      expect(hanger.left).toBe(0)
    }
    // The schedule's tilt is of residuals rounded to whole millimetres: half a millimetre at each of two eyes 448 mm
    // apart is 0.13°.
    expect(Math.abs(residualTiltDeg - tilt)).toBeLessThan(0.13)
    expect(tiltLeftDeg).toBe(0)
  })
})

describe('hangers under a slope', () => {
  const slope = (15 * Math.PI) / 180
  const rise = 6 * Math.tan(slope)
  const site = plainSite({
    covers: [{ ...plainSite().covers[0]!, corners: [[0, 0, 3], [6, 0, 3 + rise], [6, 4, 3 + rise]] }], // prettier-ignore
  })

  it('differ by d · tan θ: 0.8 m apart under 15°, 0.300 m and 0.5144 m (closed form)', () => {
    const model = plainModel({ suspensionEyePitch: 0.8 })
    const short = 3 + 2.6 * Math.tan(slope) - 0.3
    const heater = plainHeater({ x: 3, lowestPoint: short - model.body.depth })
    const { hangers } = hangScheduleOf(site, heater, model)!
    expect(hangers[0].drop).toBeCloseTo(0.3, 9)
    expect(hangers[1].drop).toBeCloseTo(0.5144, 4)
  })

  it('says when the fittings alone are too long for a chain, and what tilt that leaves', () => {
    const model = plainModel({ suspensionEyePitch: 0.8 })
    const heater = plainHeater({ x: 3, lowestPoint: 3 + 2.6 * Math.tan(slope) - 0.03 - model.body.depth })
    const { hangers, tiltLeftDeg } = hangScheduleOf(site, heater, model)!
    expect(hangers.map(({ tooShort }) => tooShort)).toEqual([true, false])
    // Drop 30 mm, fittings 95 mm, taken up 40 mm: 25 mm are left over 800 mm.
    expect(hangers[0].left).toBeCloseTo(-0.025, 9)
    expect(tiltLeftDeg).toBeCloseTo((-Math.atan(0.025 / 0.8) * 180) / Math.PI, 6)
  })

  it('are cut to length for rods, with nothing left over', () => {
    const rods = plainHeater({ mount: 'drop rods', lowestPoint: 2.2 })
    const { hangers } = hangScheduleOf(plainSite(), rods, plainModel())!
    // 3.000 − 2.200 − 0.105 body − 0.095 fittings.
    expect(hangers[0].links).toBeNull()
    expect(hangers[0].cutLength).toBeCloseTo(0.6, 9)
    expect(hangers[0].residual).toBe(0)
  })

  it('are not scheduled for brackets or without a member above', () => {
    expect(hangScheduleOf(plainSite(), plainHeater({ mount: 'wall bracket' }), plainModel())).toBeNull()
    expect(hangScheduleOf(plainSite(), plainHeater({ y: 3 }), plainModel())).toBeNull()
  })
})

it('splays a pair 0.3 m sideways and 0.4 m up under 120 N: 0.500 m and 75 N each (closed form)', () => {
  const { length, tension } = splayedPair(0.3, 0.4, 120)
  expect(length).toBeCloseTo(0.5, 9)
  expect(tension).toBeCloseTo(75, 9)
})
