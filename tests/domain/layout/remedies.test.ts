import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { layoutChange } from '#app/domain/comparison/changed-seats.ts'
import { electricalPower } from '#app/domain/heaters/power.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { remediesOf, withoutRails, withRails } from '#app/domain/layout/remedies.ts'
import { supportOf } from '#app/domain/layout/supports.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'
import { directions, integratedIrradiance } from '#tests/support/line-source.ts'
import { plainHeater, plainModel, plainSite } from '#tests/support/plain-site.ts'

const models = new Map(demoModels().map((model) => [model.code, model]))
const siteA = demoSites().find(({ key }) => key === 'A')!
const variant1 = siteA.variants[0]!.layout

/**
 * Horizontal irradiance of one heater at a point by the integrator of the tests: the element's place from the model's
 * figures by the definitions, cosine exponents from the half angles (cos^a(half) = 1/2).
 */
function integrated(heater: MountedHeater, point: [number, number, number]): number {
  const model = models.get(heater.model)!
  const beam = model.beam!
  if (beam.kind !== 'angles') throw new Error('a table')
  const exponent = (full: number) => Math.log(0.5) / Math.log(Math.cos((full * Math.PI) / 360))
  const { w } = directions(heater.turnDeg, heater.tiltDeg)
  if (heater.tiltDeg !== 0) throw new Error('Straight down only: the lowest point is the open face.')
  const at: [number, number, number] = [heater.x, heater.y, heater.lowestPoint - w[2] * model.elementAboveLowest]
  const power = (electricalPower(heater, model).power * model.radiantEfficiency) / model.elementCount
  return Array.from({ length: model.elementCount }, (_, i) =>
    integratedIrradiance(
      {
        at,
        turnDeg: heater.turnDeg,
        tiltDeg: heater.tiltDeg,
        across: exponent(beam.acrossFullAngleDeg),
        along: exponent(beam.alongFullAngleDeg),
        offset: (i - (model.elementCount - 1) / 2) * model.elementPitch,
        length: model.elementLength,
        radiantPower: power,
      },
      point,
      [0, 0, 1],
    ),
  ).reduce((sum, each) => sum + each, 0)
}

describe('moving to the nearest member', () => {
  const heater = variant1.heaters[1]!
  const { move } = remediesOf(siteA.site, heater, models.get(heater.model)!, plainHouseRules)
  const moved = { ...variant1, heaters: variant1.heaters.map((each) => (each.id === heater.id ? move!.heater : each)) }

  it('goes half a bay to a beam, along which the element lies', () => {
    expect(move!.distance).toBeCloseTo(1.32, 9)
    expect(move!.supportName).toMatch(/^beam [12]$/)
    expect(move!.heater.turnDeg % 180).toBe(90)
    expect(supportOf(siteA.site, move!.heater, models.get(heater.model)!, plainHouseRules).outcome).toBe('held')
  })

  it('shows the figures of seats before and after as an integrator of its own has them', () => {
    const input = { site: siteA.site, brief: siteA.brief, layout: variant1, models }
    const change = layoutChange(input, moved)
    expect(change.seats.length).toBeGreaterThan(5)
    for (const { seatId, before, after } of change.seats.slice(0, 6)) {
      const seat = siteA.site.seats.find(({ id }) => id === seatId)!
      const sum = (heaters: readonly MountedHeater[]) =>
        heaters.reduce((total, each) => total + integrated(each, [seat.x, seat.y, seat.bodyHeight]), 0)
      expect(before! / sum(variant1.heaters)).toBeCloseTo(1, 6)
      expect(after! / sum(moved.heaters)).toBeCloseTo(1, 6)
    }
    const changes = change.seats.map(({ before, after }) => Math.abs(after! - before!))
    expect(changes).toEqual([...changes].sort((a, b) => b - a))
    expect(Math.min(...changes)).toBeGreaterThanOrEqual(1)
    expect(change.after.seatsCounted).toBe(change.before.seatsCounted)
  })

  it('changes no seat when nothing is moved', () => {
    const input = { site: siteA.site, brief: siteA.brief, layout: variant1, models }
    expect(layoutChange(input, variant1).seats).toEqual([])
  })
})

describe('what is offered', () => {
  it.each(['A', 'B', 'C'] as const)('does hold every unsupported heater of site %s', (key) => {
    const { site, variants } = demoSites().find((demo) => demo.key === key)!
    let offered = 0
    for (const { layout } of variants)
      for (const heater of layout.heaters) {
        const model = models.get(heater.model)!
        if (supportOf(site, heater, model, plainHouseRules).outcome !== 'not held') continue
        const { move, rails } = remediesOf(site, heater, model, plainHouseRules)
        if (move) expect(supportOf(site, move.heater, model, plainHouseRules).outcome).toBe('held')
        if (rails)
          expect(supportOf(withRails(site, rails.rails), rails.heater, model, plainHouseRules).outcome).toBe('held')
        offered += move || rails ? 1 : 0
        expect(move ?? rails).not.toBeNull()
      }
    expect(offered).toBeGreaterThan(0)
  })

  it('is a rail over a heater that stays, taken away again without a trace', () => {
    const heater = variant1.heaters[0]!
    const { rails } = remediesOf(siteA.site, heater, models.get(heater.model)!, plainHouseRules)
    expect({ ...rails!.heater, memberId: null }).toEqual({ ...heater, memberId: null })
    expect(rails!.rails.map(({ kind }) => kind)).toEqual(['rail'])
    expect(withoutRails(withRails(siteA.site, rails!.rails), rails!.rails)).toEqual(siteA.site)
  })

  it('sets a splayed heater plumb, and offers nothing where nothing holds', () => {
    const model = plainModel()
    const { move } = remediesOf(plainSite(), plainHeater({ y: 3, splayed: true }), model, plainHouseRules)
    expect(move!.heater).toMatchObject({ y: 2, splayed: false, memberId: 'beam' })
    expect(remediesOf(plainSite({ members: [] }), plainHeater(), model, plainHouseRules)).toEqual({
      move: null,
      rails: null,
    })
    // Higher than the member: moving does not help.
    expect(remediesOf(plainSite(), plainHeater({ y: 3, lowestPoint: 2.95 }), model, plainHouseRules).move).toBeNull()
  })
})
