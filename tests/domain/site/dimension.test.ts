import { describe, expect, it } from 'vitest'
import { coverHeightAt } from '#app/domain/site/cover.ts'
import { moveDimension } from '#app/domain/site/dimension.ts'
import type { Dimension, Site } from '#app/domain/site/site.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'
import { plainSite } from '#tests/support/plain-site.ts'
import { largestTolerance, toleranceOf } from '#app/domain/site/tolerance.ts'

const roofHeights = (site: Site) => coverHeightAt(site.covers[0]!, 6.6, 4.05)

/** What a size nobody named may be wrong by, m. */
const bare = 0.025

describe('moving a dimension', () => {
  const { site } = demoSites().find(({ key }) => key === 'A')!
  const dimension = (label: string): Dimension => site.dimensions.find((found) => found.label === label)!

  it('moves every coordinate it decides, by its share, and nothing else', () => {
    const moved = moveDimension(site, dimension('beam spacing'), 0.01)
    moved.members.forEach((member, k) => expect(member.from[0] - site.members[k]!.from[0]).toBeCloseTo(0.01 * k, 12))
    expect(moved.covers).toEqual(site.covers)
    expect(moved.seats).toBe(site.seats)
  })

  it('comes back when moved back', () => {
    const there = moveDimension(site, dimension('timber trim, underside height'), 0.05)
    const back = moveDimension(there, dimension('timber trim, underside height'), -0.05)
    expect(there.obstacles).not.toEqual(site.obstacles)
    const trim = (of: Site) => of.obstacles.find(({ id }) => id === 'trim')!.shape
    expect(trim(back)).toMatchObject({ z: [expect.closeTo(2.9, 12), expect.closeTo(3.05, 12)] })
  })

  it.each([
    { of: 'pole' as const, id: 'nowhere', coordinate: 'top' },
    { of: 'member' as const, id: 'beam-1', coordinate: 'nowhere.0' },
    { of: 'member' as const, id: 'beam-1', coordinate: 'name' },
    { of: 'member' as const, id: 'beam-1', coordinate: 'constructor.length' },
  ])('leaves a thing as it is that has no such number: $of $id $coordinate', (move) => {
    const none = { ...dimension('beam spacing'), moves: [{ ...move, by: 1 }] }
    expect(moveDimension(site, none, 1)).toEqual(site)
  })
})

describe('the combined tolerance', () => {
  it('is the root of the sum of squares of each change: a roof three quarters of the way down', () => {
    const { site } = demoSites().find(({ key }) => key === 'A')!
    // Height at y = 4.05 of 5.40 m rests a quarter on the wall height and three quarters on the river height, ± 60 mm
    // each; depth ± 30 mm tips the plane by 0.55 · 4.05/5.4² · 0.03 = 2.3 mm; the corners' bare x and y count ± 25 mm
    // each, which through the slope of 0.102 moves at most 2.5 mm apiece.
    const two = Math.hypot(0.25 * 0.06, 0.75 * 0.06)
    const tolerance = toleranceOf(roofHeights, site, bare, [{ of: 'cover', id: 'cover' }])!
    expect(tolerance).toBeGreaterThan(two)
    expect(tolerance).toBeLessThan(Math.hypot(two, 0.0024, 0.0026, 0.0026, 0.0026))
  })

  it('is 25 mm for a coordinate that no dimension moves, and its dimension where one does', () => {
    const height = (site: Site) => site.covers[0]?.corners[0]?.[2] ?? null
    const site = plainSite()
    expect(toleranceOf(height, site, bare, [{ of: 'cover', id: 'roof' }])).toBeCloseTo(0.025, 12)
    const measured = plainSite({
      dimensions: [
        {
          id: 'd1',
          label: 'roof',
          value: 3,
          tolerance: 0.004,
          source: 'laser',
          note: null,
          moves: [{ of: 'cover', id: 'roof', coordinate: 'corners.0.2', by: 1 }],
        },
      ],
    })
    expect(toleranceOf(height, measured, bare, [{ of: 'cover', id: 'roof' }])).toBeCloseTo(0.004, 12)
    expect(toleranceOf(height, measured, bare)).toBeCloseTo(0.004, 12)
  })

  it('counts a dimension once though it moves several things', () => {
    const { site } = demoSites().find(({ key }) => key === 'C')!
    const fan = (of: Site) => {
      const shape = of.obstacles.find(({ id }) => id === 'fan')!.shape
      return shape.z[1] - (of.covers[0]?.corners[0]?.[2] ?? 0)
    }
    const things = [{ of: 'cover' as const, id: 'cover' }, { of: 'obstacle' as const, id: 'fan' }] // prettier-ignore
    // Ceiling and fan go up together, so their distance has no tolerance at all.
    expect(toleranceOf(fan, site, bare, things)).toBeCloseTo(0, 12)
    // Their sum moves twice as far, once: 2 · 8 mm.
    const sum = (of: Site) => {
      const shape = of.obstacles.find(({ id }) => id === 'fan')!.shape
      return shape.z[1] + (of.covers[0]?.corners[0]?.[2] ?? 0)
    }
    expect(toleranceOf(sum, site, bare, things)).toBeCloseTo(0.016, 9)
  })

  it('is null when the figure is, and at most the largest tolerance of the thing', () => {
    const site = plainSite()
    expect(toleranceOf(() => null, site, bare)).toBeNull()
    const things = [{ of: 'cover' as const, id: 'roof' }]
    expect(toleranceOf((of) => of.covers[0]?.corners[1]?.[2] ?? null, site, bare, things)!).toBeLessThanOrEqual(
      largestTolerance(site, things[0]!, bare),
    )
  })
})
