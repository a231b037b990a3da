import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { bodyOf } from '#app/domain/layout/body.ts'
import { pointLoads, railReactions, railRests, weightOf } from '#app/domain/layout/support-loads.ts'
import { supportOf } from '#app/domain/layout/supports.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'
import { plainSite } from '#tests/support/plain-site.ts'

const models = new Map(demoModels().map((model) => [model.code, model]))
function loadsIn(key: 'A' | 'B' | 'C', number: number, id: string, changes: Partial<MountedHeater> = {}) {
  const demo = demoSites().find((found) => found.key === key)!
  const variant = demo.variants.find((found) => found.number === number)!
  const heater = { ...variant.layout.heaters.find((found) => found.id === id)!, ...changes }
  const model = models.get(heater.model)!
  return {
    loads: pointLoads(demo.site, model, bodyOf(heater, model), supportOf(demo.site, heater, model, plainHouseRules)),
    weight: model.body.mass * 9.80665,
  }
}

describe('the load at each point', () => {
  it('is half the weight at each of two eyes, all of it should one let go', () => {
    const { loads, weight } = loadsIn('A', 2, 'H1')
    expect(loads.map(({ supportId }) => supportId)).toEqual(['beam-1', 'beam-1'])
    for (const { load, alone, moment } of loads) {
      expect([load, alone, moment]).toEqual([expect.closeTo(weight / 2, 9), expect.closeTo(weight, 9), 0])
    }
  })

  it('is all of it on a wall bracket, with a moment by its distance', () => {
    const { loads, weight } = loadsIn('C', 2, 'H1')
    // 120 mm from the wall.
    expect(loads).toEqual([
      expect.objectContaining({ supportId: 'wall', load: weight, moment: expect.closeTo(0.12 * weight, 9) }),
    ])
  })

  it('is shared by levers between both members of a recess box, and sums to the weight', () => {
    const { loads, weight } = loadsIn('C', 3, 'H2', { x: 3.2 })
    // Joists at 3.0 and 3.6 m: 0.2 m from one, 0.4 m from the other.
    const shares = new Map(loads.map(({ supportId, load }) => [supportId, load]))
    expect(shares.get('joist-5')).toBeCloseTo((weight * 2) / 3, 9)
    expect(shares.get('joist-6')).toBeCloseTo(weight / 3, 9)
  })

  it('is nothing while a heater is unsupported', () => {
    expect(loadsIn('A', 1, 'H1').loads).toEqual([])
    expect(weightOf(models.get('betony-4-5')!)).toBeCloseTo(7.2 * 9.80665, 9)
  })
})

describe('a rail', () => {
  const beam = plainSite().members[0]!
  const rail = { ...beam, id: 'rail-1', kind: 'rail', from: [2, 2] as [number, number], to: [2, 3] as [number, number] }
  const site = plainSite({ members: [beam, { ...beam, id: 'far', from: [0, 3.02], to: [6, 3.02] }, rail] })

  it('rests on the members that pass within 10 mm of its ends', () => {
    expect(railRests(site, rail).map(({ onId }) => onId)).toEqual(['beam', null])
    const met = { ...rail, to: [2, 3.0105] as [number, number] }
    expect(railRests({ ...site, members: [...site.members.slice(0, 2), met] }, met)[1].onId).toBe('far')
  })

  it('passes its loads on by levers', () => {
    // 30 N at a quarter of the span, 10 N at its end.
    expect(railReactions(rail, [{ at: [2, 2.25], load: 30 }, { at: [2, 3], load: 10 }])).toEqual([22.5, 17.5]) // prettier-ignore
  })
})
