import { plainHouse } from '#tests/support/plain-site.ts'
import { describe, expect, it } from 'vitest'
import { seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { cautionsOnPlan } from '#app/domain/rules/cautions-on-plan.ts'
import { conditionsOfUse } from '#app/domain/rules/conditions-of-use.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'

const models = new Map(demoModels().map((model) => [model.code, model]))

function demo(key: 'A' | 'B' | 'C', number: number) {
  const { site, brief, variants } = demoSites().find((found) => found.key === key)!
  const { layout } = variants.find((variant) => variant.number === number)!
  const warmth = seatWarmth({ site, brief, layout, models })
  return { layout, warmth, findings: checkLayout({ site, brief, layout, models, warmth, house: plainHouse() }) }
}

describe('cautions on the plan', () => {
  it('mark heads over the caution at their seats and tight clearances at their heaters', () => {
    const { layout, warmth, findings } = demo('A', 1)
    const cautions = cautionsOnPlan(layout, warmth, findings)
    expect(cautions.filter(({ kind }) => kind === 'burn').map(({ subject }) => subject.id)).toHaveLength(10)
    const fire = cautions.find(({ kind, subject }) => kind === 'fire' && subject.id === 'H2')!
    expect(fire.at).toEqual([3.96, 2.7])
    expect(fire.sentence.endsWith('.')).toBe(true)
  })

  it('leave out what does not change placement: loads to be confirmed, seats to taste', () => {
    const { layout, warmth, findings } = demo('A', 3)
    expect(findings.some(({ rule, outcome }) => rule === 'support-load' && outcome !== 'pass')).toBe(true)
    expect(cautionsOnPlan(layout, warmth, findings)).toEqual([])
  })

  it('carry the state of a movable thing', () => {
    const { layout, warmth, findings } = demo('B', 3)
    expect(cautionsOnPlan(layout, warmth, findings).every(({ condition }) => condition?.includes('umbrella'))).toBe(
      true,
    )
  })
})

describe('conditions of use', () => {
  it('name each state once, with the heaters that it concerns', () => {
    const { findings } = demo('C', 2)
    expect(conditionsOfUse(findings)).toEqual(['H2 off while outward-opening door leaf, 2.04 m high: open'])
  })
})
