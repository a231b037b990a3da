import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { moveDimension } from '#app/domain/site/dimension.ts'
import { siteFaults } from '#app/domain/site/site-faults.ts'
import { siteSchema, type Site } from '#app/domain/site/site.ts'
import { siteTemplates } from '#app/domain/site/templates/site-templates.ts'
import type { SiteTemplate } from '#app/domain/site/templates/template.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'
import { chance } from '#tests/support/chance.ts'

const base = { name: 'Somewhere', displayUnits: 'metric', trace: null } as const
const start = (template: SiteTemplate, given: Record<string, number> = {}): Site => {
  const made = template.start(new Map(Object.entries(given)), 'tape', base, plainHouseRules)
  if ('error' in made) throw new Error(made.error)
  return made
}
const called = (key: string) => siteTemplates.find((each) => each.key === key)!

it('there are four, each with a name of its own', () => {
  expect(new Set(siteTemplates.map(({ name }) => name)).size).toBe(4)
})

describe.each(siteTemplates)('$name', (template) => {
  it('makes a site without faults, of usual sizes that count as guessed', () => {
    const site = start(template)
    expect(siteSchema.parse(site)).toEqual(site)
    expect(siteFaults(site)).toEqual([])
    expect(site.dimensions.map(({ source }) => source)).toEqual(template.sizes.map(() => 'guessed'))
    for (const { value, tolerance } of site.dimensions) expect(tolerance).toBeCloseTo(0.1 * value, 4)
  })

  it('takes given sizes with the tolerance of their source', () => {
    const [first] = template.sizes
    const site = start(template, { [first!.key]: first!.usual + 0.5 })
    expect(site.dimensions[0]).toMatchObject({ value: first!.usual + 0.5, source: 'tape', tolerance: 0.01 })
    expect(site.dimensions[1]).toMatchObject({ source: 'guessed' })
  })

  it('a size measured afterwards makes what it would have made from the start', () => {
    for (const { key } of template.sizes) {
      const before = start(template)
      const size = before.dimensions.find(({ id }) => id === `size-${key}`)!
      // Small enough, and in the direction, that no thing more or less comes in.
      const by = key === 'spacing' ? -0.004 : 0.004
      const longer = moveDimension(before, size, by)
      const afresh = start(template, { [key]: size.value + by })
      expect(close(longer), key).toEqual(close(afresh))
    }
  })

  it('never makes a faulty site, whatever is typed within the limits', () => {
    const random = chance(23)
    for (let round = 0; round < 150; round++) {
      const given = new Map(template.sizes.map(({ key, min, max }) => [key, min + random() ** 2 * (max - min)]))
      const made = template.start(given, 'laser', base, plainHouseRules)
      if ('error' in made) expect(made.error).toMatch(/\.$/)
      else expect(siteFaults(made)).toEqual([])
    }
  })
})

/** Everything but the sizes, figures to the millimetre. */
const close = (site: Site): unknown =>
  JSON.parse(
    JSON.stringify({ ...site, dimensions: [] }, (_key, value: unknown) =>
      typeof value === 'number' ? Math.round(value * 1e3) / 1e3 : value,
    ),
  )

describe('the veranda of demo site C', () => {
  const demo = demoSites().find(({ key }) => key === 'C')!.site
  const given = { length: 7.2, depth: 3.1, 'wall-height': 2.65, 'edge-height': 2.65, spacing: 0.6 }
  it('has its floor, its ceiling and its thirteen joists', () => {
    const site = start(called('veranda'), given)
    expect(site.floor).toEqual(demo.floor)
    expect(site.covers[0]!.corners).toEqual(demo.covers[0]!.corners)
    expect(site.members.map(({ from, to }) => [from, to])).toEqual(demo.members.map(({ from, to }) => [from, to]))
    expect(site.members[0]).toMatchObject({ width: 0.045, depth: 0.195 })
  })
})
