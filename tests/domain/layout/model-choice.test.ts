import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { firstPlace } from '#app/domain/layout/first-place.ts'
import { listModelChoices, suppliesOf } from '#app/domain/layout/model-choice.ts'
import { supportNear } from '#app/domain/layout/support-near.ts'
import { demoModels } from '#drizzle/seed/demo-models.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'
import { beamedSite, heaterAt, layoutOf } from '#tests/support/layouts.ts'

const models = demoModels()
const [terrace, roofBar] = ['A', 'B'].map((key) => {
  const found = demoSites().find((site) => site.key === key)
  if (!found) throw new Error(`no site ${key}`)
  return found
})
if (!terrace || !roofBar) throw new Error('no sites')
const choice = (code: string, at = terrace) => {
  const found = listModelChoices(models, at.site, at.brief).find((each) => each.model.code === code)
  if (!found) throw new Error(`no ${code}`)
  return found
}

describe('the catalogue for a site', () => {
  it('goes by the supply first', () => {
    expect(suppliesOf(terrace.brief)).toEqual([230, 400])
    expect(choice('betony-3-0').supplyVoltage).toBe(230)
    expect(choice('betony-2-0', roofBar).whyNot[0]).toMatch(/^Made for 230 or 240 V; the supply is (120 or )?208/)
  })
  it('says why each of the others cannot be placed', () => {
    expect(choice('dulse-3-0').whyNot.join(' ')).toMatch(/No beam data for Dulse 3\.0\. It can be seen, not placed\./)
    expect(choice('betony-2-0-r1').whyNot).toContain('Withdrawn from the range.')
    expect(choice('teasel-2-8').whyNot.join(' ')).toContain('recess box')
    expect(choice('betony-2-0').whyNot).toEqual([])
  })
  it('lists what can be placed before what cannot', () => {
    const order = listModelChoices(models, terrace.site, terrace.brief).map((each) => each.whyNot.length > 0)
    expect(order).toEqual([...order].sort())
    expect(order).toHaveLength(models.length)
  })
})

describe('the first place of a heater', () => {
  it('hangs on the member there, along it, within the manual and under the cover', () => {
    const beam = terrace.site.members[2]
    if (!beam) throw new Error('no beam')
    const place = firstPlace(choice('betony-2-0'), terrace.site, layoutOf(), [beam.from[0], 2], plainHouseRules)
    expect(place).toMatchObject({ memberId: beam.id, mount: 'drop rods', turnDeg: 90, supplyVoltage: 230 })
    expect(place?.lowestPoint).toBeGreaterThanOrEqual(1.9)
    expect(place?.lowestPoint).toBeLessThanOrEqual(2.7)
  })
  it('hangs as the last one of its model does', () => {
    const layout = layoutOf(heaterAt('H1', 1, 1, { lowestPoint: 2.51, tiltDeg: 12, turnDeg: 45 }))
    const place = firstPlace(choice('betony-2-0'), terrace.site, layout, [5, 3], plainHouseRules)
    expect(place).toMatchObject({ lowestPoint: 2.51, tiltDeg: 0, turnDeg: 45, x: 5, y: 3 })
  })
  it('is none for a model that cannot be placed', () => {
    expect(firstPlace(choice('dulse-3-0'), terrace.site, layoutOf(), [1, 1], plainHouseRules)).toBeNull()
  })
})

describe('the support near a heater', () => {
  const model = models.find((each) => each.code === 'betony-2-0')
  it('is within the reach of the mount that the manual states, the limit included', () => {
    const at = (x: number) =>
      supportNear(beamedSite, heaterAt('H1', x, 2, { mount: 'drop rods', memberId: null }), model, plainHouseRules)
    expect(at(3.25)).toBe('beam-1')
    expect(at(3.26)).toBeNull()
  })
  it('stays its own while in reach', () => {
    const near = heaterAt('H1', 1.5, 2, { mount: 'drop rods', memberId: 'beam-0' })
    const wide = model && { ...model, mountReach: { 'drop rods': 2 } }
    expect(supportNear(beamedSite, near, wide, plainHouseRules)).toBe('beam-0')
    expect(supportNear(beamedSite, { ...near, memberId: null, x: 1.6 }, wide, plainHouseRules)).toBe('beam-1')
  })
  it('is the nearest where the manual states no reach, or no model is known', () => {
    const far = heaterAt('H1', 1.6, 2, { mount: 'drop rods', memberId: 'beam-0' })
    expect(supportNear(beamedSite, far, model && { ...model, mountReach: {} }, plainHouseRules)).toBe('beam-1')
    expect(supportNear(beamedSite, far, undefined, plainHouseRules)).toBe('beam-1')
  })
  it('is a pole for a clamp and a wall for a bracket', () => {
    expect(
      supportNear(beamedSite, heaterAt('H1', 4.2, 5, { mount: 'pole clamp', memberId: null }), model, plainHouseRules),
    ).toBe('pole-1')
    expect(
      supportNear(
        beamedSite,
        heaterAt('H1', 7, 0.2, { mount: 'wall bracket', memberId: null }),
        model,
        plainHouseRules,
      ),
    ).toBe('wall')
  })
})
