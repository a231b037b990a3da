import { describe, expect, it } from 'vitest'
import { chainToOrder, hangScheduleOf } from '#app/domain/layout/hanging.ts'
import { plainHanging } from '#app/domain/layout/plain-hanging.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'
import { chance as seededChance } from '#tests/support/chance.ts'
import { plainHeater, plainModel, plainSite, plainHouse } from '#tests/support/plain-site.ts'

const models = new Map(demoModels().map((model) => [model.code, model]))
const siteA = demoSites().find(({ key }) => key === 'A')!

function schedule(number: number, id: string) {
  const { layout } = siteA.variants.find((variant) => variant.number === number)!
  const heater = layout.heaters.find((found) => found.id === id)!
  return hangScheduleOf(siteA.site, heater, models.get(heater.model)!, plainHouse())!
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
    const { hangers } = hangScheduleOf(site, heater, model, plainHouse())!
    expect(hangers[0]!.drop).toBeCloseTo(0.3, 9)
    expect(hangers[1]!.drop).toBeCloseTo(0.5144, 4)
  })

  it('says when the fittings alone are too long for a chain, and what tilt that leaves', () => {
    const model = plainModel({ suspensionEyePitch: 0.8 })
    const heater = plainHeater({ x: 3, lowestPoint: 3 + 2.6 * Math.tan(slope) - 0.03 - model.body.depth })
    const { hangers, tiltLeftDeg } = hangScheduleOf(site, heater, model, plainHouse())!
    expect(hangers.map(({ outcome }) => outcome)).toEqual(['too short', 'can be made'])
    // Drop 30 mm, fittings 95 mm, taken up 40 mm: 25 mm are left over 800 mm.
    expect(hangers[0]!.left).toBeCloseTo(-0.025, 9)
    expect(tiltLeftDeg).toBeCloseTo((-Math.atan(0.025 / 0.8) * 180) / Math.PI, 6)
  })

  it('are cut to length for rods, with nothing left over', () => {
    const rods = plainHeater({ mount: 'drop rods', lowestPoint: 2.2 })
    const { hangers } = hangScheduleOf(plainSite(), rods, plainModel(), plainHouse())!
    // 3.000 − 2.200 − 0.105 body − 0.095 fittings.
    expect(hangers[0]!.links).toBeNull()
    expect(hangers[0]!.cutLength).toBeCloseTo(0.6, 9)
    expect(hangers[0]!.residual).toBe(0)
  })

  it('are not scheduled for brackets or without a member above', () => {
    expect(hangScheduleOf(plainSite(), plainHeater({ mount: 'wall bracket' }), plainModel(), plainHouse())).toBeNull()
    expect(hangScheduleOf(plainSite(), plainHeater({ y: 3 }), plainModel(), plainHouse())).toBeNull()
  })
})

describe('hangers by an engineer’s own data', () => {
  const hung = (data: Partial<typeof plainHanging>, changes: Parameters<typeof plainHeater>[0] = {}) =>
    hangScheduleOf(plainSite(), plainHeater(changes), plainModel(), {
      ...plainHouse(),
      hanging: { ...plainHanging, ...data },
    })!.hangers[0]!

  it('have links of its pitch, its allowance, and a safety line longer by its slack', () => {
    // 3.000 − 2.300 − 0.105 = 0.595 m; less 0.120 leaves 0.475 m: 14 links of 35 mm are 0.490, 15 mm too long.
    const hanger = hung({ linkPitch: 0.035, hardwareAllowance: 0.12, safetySlack: 0.15 })
    expect([hanger.links, hanger.outcome]).toEqual([14, 'can be made'])
    expect(hanger.cutLength).toBeCloseTo(0.49, 9)
    expect(hanger.takeUp).toBeCloseTo(-0.015, 9)
    expect(hanger.safetyLine).toBeCloseTo(0.745, 9)
  })

  it.each([
    [0.0151, 'can be made'],
    [0.015, 'can be made'],
    [0.0149, 'beyond the turnbuckle'],
  ])('whose turnbuckle shortens by %s m under 15 mm of chain too long: %s', (shortens, expected) => {
    expect(hung({ linkPitch: 0.035, hardwareAllowance: 0.12, shortens }).outcome).toBe(expected)
  })

  it.each([
    // Fittings of 95 mm less 40: 55 mm is the least.
    [3 - 0.105 - 0.0551, 'can be made'],
    [3 - 0.105 - 0.055, 'can be made'],
    [3 - 0.105 - 0.0549, 'too short'],
  ])('at a lowest point of %s m: %s', (lowestPoint, expected) => {
    expect(hung({}, { lowestPoint }).outcome).toBe(expected)
    expect(hung({}, { lowestPoint, mount: 'drop rods' }).outcome).toBe(expected)
  })

  it('are cut from rod in its steps, the nearest', () => {
    // Net 0.500 − 0.0023.
    const rod = hung({}, { mount: 'drop rods', lowestPoint: 2.3023 })
    expect(rod.cutLength).toBeCloseTo(0.5, 9)
    expect(rod.takeUp).toBeCloseTo(-0.0023, 9)
    expect(hung({ rodStep: 0.001 }, { mount: 'drop rods', lowestPoint: 2.3023 }).cutLength).toBeCloseTo(0.498, 9)
  })

  it('take chain in whole metres per order', () => {
    // Net 0.500: 18 links of 28 mm are 0.504 m, two hangers 1.008 m.
    const one = hangScheduleOf(plainSite(), plainHeater(), plainModel(), plainHouse())!
    expect(one.hangers.map(({ links }) => links)).toEqual([18, 18])
    expect(chainToOrder([one], plainHanging)).toBe(2)
    expect(chainToOrder([one], { ...plainHanging, orderStep: 0.5 })).toBe(1.5)
    expect(chainToOrder([], plainHanging)).toBe(0)
    const rods = hangScheduleOf(plainSite(), plainHeater({ mount: 'drop rods' }), plainModel(), plainHouse())!
    expect(chainToOrder([rods], plainHanging)).toBe(0)
  })
})

it('differs by the slope along the element for 200 random covers and turns (independent trigonometry)', () => {
  const chance = seededChance(20)
  for (let i = 0; i < 200; i += 1) {
    const [steep, downhill, turn] = [(20 * Math.PI * chance()) / 180, 2 * Math.PI * chance(), 2 * Math.PI * chance()]
    // A plane that falls `steep` towards `downhill`; along a line at `turn` it falls tan(steep) · cos(turn − downhill).
    const height = (x: number, y: number) => 3.5 - Math.tan(steep) * ((x - 3) * Math.cos(downhill) + (y - 2) * Math.sin(downhill)) // prettier-ignore
    const [dx, dy] = [Math.cos(turn), Math.sin(turn)]
    const site = plainSite({
      covers: [{ ...plainSite().covers[0]!, corners: [[-9, -9, height(-9, -9)], [15, -9, height(15, -9)], [3, 15, height(3, 15)]] }], // prettier-ignore
      members: [{ ...plainSite().members[0]!, from: [3 - 2 * dx, 2 - 2 * dy], to: [3 + 2 * dx, 2 + 2 * dy] }],
    })
    const turnDeg = (((turn * 180) / Math.PI + 180) % 360) - 180
    const { hangers } = hangScheduleOf(site, plainHeater({ turnDeg, lowestPoint: 2.4 }), plainModel(), plainHouse())!
    expect(hangers[0]!.drop - hangers[1]!.drop).toBeCloseTo(0.448 * Math.tan(steep) * Math.cos(turn - downhill), 7)
  }
})
