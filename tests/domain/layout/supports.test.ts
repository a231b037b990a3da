import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import type { Mount } from '#app/domain/heaters/heater-model.ts'
import { movedToSupport, railsFor } from '#app/domain/layout/support-remedies.ts'
import { supportOf } from '#app/domain/layout/supports.ts'
import type { Member, Site } from '#app/domain/site/site.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'
import { plainHeater, plainModel, plainSite } from '#tests/support/plain-site.ts'

const site = plainSite()
const model = plainModel()
const beam = site.members[0]!
const reasonOf = (changes: Parameters<typeof plainHeater>[0], on: Site = site, of = model) =>
  supportOf(on, plainHeater(changes), of, plainHouseRules).reason
const second: Member = { ...beam, id: 'second', name: 'second', from: [0, 2.448], to: [6, 2.448] }

describe('chain', () => {
  it('hangs plumb: up to 20 mm sideways of its member, no farther', () => {
    expect(reasonOf({ y: 2.0199 })).toBe('held')
    expect(reasonOf({ y: 2.02 })).toBe('held')
    expect(reasonOf({ y: 2.0201 })).toBe('out of reach')
  })

  it('wants something above each eye', () => {
    expect(reasonOf({ turnDeg: 90 })).toBe('an eye has no member')
    // The eyes are 448 mm apart: a second member that far away carries the other one.
    const both = plainSite({ members: [beam, second] })
    const support = supportOf(both, plainHeater({ turnDeg: 90, y: 2.224 }), model, plainHouseRules)
    expect([support.reason, support.ids]).toEqual(['held', ['beam', 'second']])
  })

  it('cannot hold a tilt about its own axis; drop rods can', () => {
    expect(reasonOf({ tiltDeg: 10 })).toBe('tilt not held')
    expect(reasonOf({ tiltDeg: 10, mount: 'drop rods' })).toBe('held')
  })

  it('takes the nearest member when none is named, and says so when another is named', () => {
    expect(reasonOf({ memberId: null })).toBe('held')
    expect(reasonOf({ memberId: 'second' }, plainSite({ members: [beam, second] }))).toBe('out of reach')
    expect(reasonOf({ memberId: 'gone' })).toBe('held')
  })

  it('cannot hang from what is lower, nor be told where a height is not known', () => {
    expect(reasonOf({ lowestPoint: 2.895 })).toBe('held')
    expect(reasonOf({ lowestPoint: 2.896 })).toBe('support too low')
    expect(reasonOf({}, plainSite({ covers: [] }))).toBe('height not known')
    expect(reasonOf({}, site, plainModel({ suspensionEyePitch: null }))).toBe('eyes not stated')
  })
})

describe('rigid mounts', () => {
  const wall = { id: 'wall', name: 'wall', from: [0, 0] as [number, number], to: [6, 0] as [number, number], top: 2.6, material: 'non-combustible' as const, loadStatus: 'sound' } // prettier-ignore
  const pole = { id: 'pole', name: 'pole', at: [3, 3] as [number, number], top: 2.9, diameter: 0.06, material: 'non-combustible' as const, loadStatus: 'new' } // prettier-ignore
  const around = plainSite({ walls: [wall], poles: [pole] })
  const at = (mount: Mount, memberId: string, y: number, more = {}) => reasonOf({ mount, memberId, y, ...more }, around)

  it('reach from a wall as far as the manual says, below its top', () => {
    expect(at('wall bracket', 'wall', 0.25)).toBe('held')
    expect(at('wall bracket', 'wall', 0.2501)).toBe('out of reach')
    expect(at('wall bracket', 'wall', 0.2, { lowestPoint: 2.6 })).toBe('support too low')
  })

  it('reach from the surface of a pole', () => {
    expect(at('pole clamp', 'pole', 3 - 0.03 - 0.2)).toBe('held')
    expect(at('pole clamp', 'pole', 3 - 0.03 - 0.2001)).toBe('out of reach')
  })

  it('cannot be told without a stated reach, nor held without the thing', () => {
    expect(at('ceiling bracket', 'beam', 2)).toBe('reach not stated')
    expect(reasonOf({ mount: 'pole clamp' })).toBe('nothing to fix to')
  })
})

describe('the two remedies', () => {
  it('moves a heater under the nearest member, along it and level, and it is then held', () => {
    const heater = plainHeater({ x: 2.5, y: 3.1, turnDeg: 100, tiltDeg: 15, memberId: null })
    const moved = movedToSupport(site, heater, model, plainHouseRules)!
    expect(moved).toMatchObject({ x: 2.5, y: 2, turnDeg: 180, tiltDeg: 0, memberId: 'beam', lowestPoint: 2.3 })
    expect(supportOf(site, moved, model, plainHouseRules).outcome).toBe('held')
  })

  it('keeps the tilt that a mount can hold', () => {
    const rods = plainHeater({ y: 3, tiltDeg: 15, turnDeg: 20, mount: 'drop rods' })
    expect(movedToSupport(site, rods, model, plainHouseRules)).toMatchObject({ tiltDeg: 15, turnDeg: 0 })
  })

  it.each(['A', 'B', 'C'] as const)('gives every unsupported heater of site %s a place that holds it', (key) => {
    const demo = demoSites().find((found) => found.key === key)!
    const models = new Map(demoModels().map((found) => [found.code, found]))
    for (const { layout } of demo.variants)
      for (const heater of layout.heaters) {
        const of = models.get(heater.model)!
        if (supportOf(demo.site, heater, of, plainHouseRules).outcome !== 'not held') continue
        const moved = movedToSupport(demo.site, heater, of, plainHouseRules)!
        expect(supportOf(demo.site, moved, of, plainHouseRules)).toMatchObject({ outcome: 'held', reason: 'held' })
      }
  })

  it('has nowhere to move to on a site without members', () => {
    expect(movedToSupport(plainSite({ members: [] }), plainHeater(), model, plainHouseRules)).toBeNull()
    expect(railsFor(site, plainHeater({ y: 3 }), model)).toBeNull()
  })

  it('proposes a rail between two members, its underside straight between theirs', () => {
    const { site: terrace, variants } = demoSites().find(({ key }) => key === 'A')!
    const drawn = variants[0]!.layout.heaters[0]!
    const of = demoModels().find(({ code }) => code === drawn.model)!
    const [rail, ...more] = railsFor(terrace, drawn, of)!
    expect(more).toEqual([])
    // Roof at y = 2.70 of 5.40 m: half way from 3.30 to 2.75 m.
    const ends = [rail!.from, rail!.to].toSorted((a, b) => a[0] - b[0])
    expect(ends).toEqual([[0, 2.7], [2.64, 2.7]]) // prettier-ignore
    expect(rail).toMatchObject({ kind: 'rail', underside: { from: 3.025, to: 3.025 }, allowedPointLoad: null })
    expect(rail!.loadStatus).toContain('to be confirmed')
    const railed = { ...terrace, members: [...terrace.members, rail!] }
    expect(supportOf(railed, { ...drawn, lowestPoint: 2.4 }, of, plainHouseRules).outcome).toBe('held')
  })

  it('proposes two rails, one over each eye, where the element runs along the members', () => {
    const { site: terrace, variants } = demoSites().find(({ key }) => key === 'A')!
    const drawn = { ...variants[0]!.layout.heaters[1]!, turnDeg: 90, lowestPoint: 2.4 }
    const of = demoModels().find(({ code }) => code === drawn.model)!
    const rails = railsFor(terrace, drawn, of)!
    // Eyes 0.640 m apart along y about 2.70: rails across x at 2.38 and 3.02, under a roof that falls 0.55 m in 5.40.
    expect(rails.map(({ from, to }) => [from[1], to[1]])).toEqual([[2.38, 2.38], [3.02, 3.02]]) // prettier-ignore
    expect(rails.map(({ id }) => id)).toEqual(['rail-1', 'rail-2'])
    for (const [i, y] of [2.38, 3.02].entries()) {
      const underside = 3.3 - (0.55 / 5.4) * y
      expect(rails[i]!.underside).toEqual({ from: expect.closeTo(underside, 3), to: expect.closeTo(underside, 3) })
    }
    const railed = { ...terrace, members: [...terrace.members, ...rails] }
    expect(supportOf(railed, drawn, of, plainHouseRules)).toMatchObject({ outcome: 'held', ids: ['rail-1', 'rail-2'] })
  })

  it('proposes none for walls, poles and bays, nor where it would lie below the eyes', () => {
    const { site: terrace, variants } = demoSites().find(({ key }) => key === 'A')!
    const drawn = variants[0]!.layout.heaters[0]!
    const of = demoModels().find(({ code }) => code === drawn.model)!
    for (const mount of ['wall bracket', 'pole clamp', 'recess box'] as const)
      expect(railsFor(terrace, { ...drawn, mount }, of)).toBeNull()
    // Body 130 mm deep: its eyes lie at the underside from a lowest point of 2.895 m.
    expect(railsFor(terrace, { ...drawn, lowestPoint: 2.894 }, of)).not.toBeNull()
    expect(railsFor(terrace, { ...drawn, lowestPoint: 2.896 }, of)).toBeNull()
  })
})
