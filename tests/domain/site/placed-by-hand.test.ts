import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { changeCover, changeObstacle, moveThings, removeThings } from '#app/domain/site/edits.ts'
import { addFloorCorner, moveFloorCorner } from '#app/domain/site/floor-edits.ts'
import { placedByHand, placedInWords } from '#app/domain/site/placed-by-hand.ts'
import type { Dimension, Site } from '#app/domain/site/site.ts'
import { toleranceOf } from '#app/domain/site/tolerance.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'
import { plainSite } from '#tests/support/plain-site.ts'

const demo = (key: string): Site => demoSites().find((each) => each.key === key)!.site
const labelled = (site: Site, label: string): Dimension => site.dimensions.find((each) => each.label === label)!

/** A box that hangs on a wall, and sizes of it. */
function boxSite(...dimensions: Partial<Dimension>[]): Site {
  const size = { tolerance: 0.005, source: 'laser' as const, note: null, moves: [] }
  return plainSite({
    obstacles: [
      {
        id: 'box',
        name: 'box',
        kind: 'other',
        material: 'unknown',
        movable: false,
        shape: { kind: 'box', x: [1, 1.4], y: [0, 0.2], z: [2.2, 2.5] },
        transmittance: 0,
        note: null,
      },
    ],
    dimensions: dimensions.map((each, i) => ({ id: `size-${i}`, label: `size ${i}`, value: 1, ...size, ...each })),
  })
}
const of = (coordinate: string, by = 1) => ({ of: 'obstacle' as const, id: 'box', coordinate, by })
const shaped = (site: Site, z: [number, number]) =>
  changeObstacle(site, 'box', ({ shape }) => ({ shape: { ...shape, z } }))

describe('a thing placed by hand that one size decides alone', () => {
  const site = boxSite({ label: 'from the corner', value: 1, moves: [of('shape.x.0'), of('shape.x.1')] })
  const placed = placedByHand(site, moveThings(site, 'obstacle', ['box'], 0.35, 0.1), plainHouseRules)

  it('takes the value along, as a guess with a tenth of it for a tolerance, and keeps what was known in words', () => {
    expect(placed.site.dimensions).toEqual([
      {
        ...site.dimensions[0],
        value: 1.35,
        source: 'guessed',
        tolerance: 0.135,
        note: 'placed by hand; before 1.00 m ± 0.005 m, laser',
      },
    ])
    expect(placed.released).toEqual([])
    const left = (of: Site) => {
      const shape = of.obstacles[0]!.shape
      return shape.kind === 'box' ? shape.x[0] : null
    }
    expect(toleranceOf(left, placed.site, 0.025)).toBeCloseTo(0.135, 9)
  })
  it('says so', () => {
    expect(placedInWords(placed, 'metric', plainHouseRules)).toBe(
      'Placed by hand: from the corner is 1.35 m ± 0.135 m, guessed; it was 1.00 m ± 0.005 m, laser.',
    )
  })
  it('does not repeat itself when it is moved again, and is no better known for it', () => {
    const again = placedByHand(placed.site, moveThings(placed.site, 'obstacle', ['box'], -1, 0), plainHouseRules)
    expect(again.site.dimensions[0]).toMatchObject({ value: 0.35, source: 'guessed', tolerance: 0.135 })
    expect(again.site.dimensions[0]!.note).toBe(placed.site.dimensions[0]!.note)
  })
  it('leaves the size alone where the thing moves another way, or not at all', () => {
    const aside = moveThings(site, 'obstacle', ['box'], 0, 0.2)
    expect(placedByHand(site, aside, plainHouseRules)).toEqual({ site: aside, followed: [], released: [] })
    expect(placedInWords(placedByHand(site, aside, plainHouseRules), 'metric', plainHouseRules)).toBeNull()
  })
  it('counts at least ± 25 mm, however short the size', () => {
    const near = placedByHand(site, moveThings(site, 'obstacle', ['box'], -0.95, 0), plainHouseRules)
    expect(near.site.dimensions[0]).toMatchObject({ value: 0.05, tolerance: 0.025 })
  })
  it('lets go of it rather than make it less than nothing, on the far side of what the size is from', () => {
    const beyond = placedByHand(site, moveThings(site, 'obstacle', ['box'], -1.2, 0), plainHouseRules)
    expect(beyond.site.dimensions).toEqual([{ ...site.dimensions[0], moves: [] }])
    expect([beyond.followed.length, beyond.released.length]).toEqual([0, 1])
  })
  it('forgets the photo that the value is not of any more', () => {
    const photo = { photoId: '00000000-0000-4000-8000-000000000001', measurementId: 'm' }
    const seen = boxSite({ value: 1, photo, moves: [of('shape.x.0'), of('shape.x.1')] })
    const moved = placedByHand(seen, moveThings(seen, 'obstacle', ['box'], 0.1, 0), plainHouseRules)
    expect(moved.site.dimensions[0]).not.toHaveProperty('photo')
  })
})

describe('which coordinates a size is told by', () => {
  const foot = { label: 'foot', value: 2.2, moves: [of('shape.z.0'), of('shape.z.1')] }

  it('follows the coordinate that equals it; the rest of the thing is as it was typed', () => {
    const site = boxSite(foot)
    const lower = placedByHand(site, shaped(site, [2.1, 2.5]), plainHouseRules)
    expect(lower.site.dimensions[0]).toMatchObject({ value: 2.1, source: 'guessed', moves: foot.moves })
    const taller = placedByHand(site, shaped(site, [2.2, 2.7]), plainHouseRules)
    expect(taller.site.dimensions[0]).toMatchObject({ value: 2.2, source: 'laser', moves: [of('shape.z.0')] })
    expect(taller.released.map(({ label }) => label)).toEqual(['foot'])
  })
  it('follows by its share: a diameter by twice what the radius grew', () => {
    const site = demo('B')
    const diameter = labelled(site, 'umbrella diameter')
    const wider = site.obstacles.reduce(
      (made, { id }) =>
        changeObstacle(made, id, ({ shape }) =>
          shape.kind === 'cylinder' ? { shape: { ...shape, radius: shape.radius + 0.1 } } : {},
        ),
      site,
    )
    const now = labelled(placedByHand(site, wider, plainHouseRules).site, diameter.label)
    expect(now.value).toBeCloseTo(diameter.value + 0.2, 9)
    expect(now.source).toBe('guessed')
  })
  it('is told by a half of it too', () => {
    const site = boxSite({ value: 2, moves: [of('shape.x.0', 0.5), of('shape.x.1', 0.5)] })
    const wider = changeObstacle(site, 'box', ({ shape }) => (shape.kind === 'box' ? { shape: { ...shape, x: [0.9, 1.4] } } : {})) // prettier-ignore
    expect(placedByHand(site, wider, plainHouseRules).site.dimensions[0]).toMatchObject({
      value: 1.8,
      source: 'guessed',
    })
  })
  it('lets the less known of two sizes follow, and the other decide what it did', () => {
    const site = boxSite(
      { label: 'ceiling', value: 2.7, tolerance: 0.01, moves: [of('shape.z.0')] },
      { label: 'drop', value: 0.5, tolerance: 0.05, source: 'told', moves: [of('shape.z.0', -1)] },
    )
    const { site: now } = placedByHand(site, shaped(site, [2, 2.5]), plainHouseRules)
    expect(labelled(now, 'ceiling')).toEqual(labelled(site, 'ceiling'))
    expect(labelled(now, 'drop')).toMatchObject({ value: 0.7, source: 'guessed', moves: [of('shape.z.0', -1)] })
  })
})

describe('a size that decides more than what was placed by hand', () => {
  it('stays, and decides the one beam no longer: it counts ± 25 mm', () => {
    const site = demo('A')
    const spacing = labelled(site, 'beam spacing')
    const placed = placedByHand(site, moveThings(site, 'member', ['beam-2'], 0.15, 0), plainHouseRules)
    const now = labelled(placed.site, 'beam spacing')
    expect(now).toEqual({ ...spacing, moves: spacing.moves.filter(({ id }) => id !== 'beam-2') })
    expect(spacing.moves.length - now.moves.length).toBe(2)
    const at = (id: string) => (of: Site) => of.members.find((member) => member.id === id)?.from[0] ?? null
    expect(toleranceOf(at('beam-2'), placed.site, 0.025)).toBeCloseTo(0.025, 9)
    expect(toleranceOf(at('beam-3'), placed.site, 0.025)).toBeCloseTo(3 * spacing.tolerance, 9)
    expect(placedInWords(placed, 'metric', plainHouseRules)).toBe(
      'Placed by hand, ± 0.025 m from now on: beam spacing no longer decides what was moved.',
    )
  })
  it('follows when all its beams are moved by their share', () => {
    const site = demo('A')
    const spread = site.members.reduce((made, { id }, k) => moveThings(made, 'member', [id], 0.05 * k, 0), site)
    const now = labelled(placedByHand(site, spread, plainHouseRules).site, 'beam spacing')
    expect(now.value).toBeCloseTo(labelled(site, 'beam spacing').value + 0.05, 9)
  })
  it('lets go of one corner of a floor and of a cover, and of nothing else', () => {
    const site = demo('C')
    const [x, y] = site.floor[2]!
    const moved = placedByHand(site, moveFloorCorner(site, 2, [x + 0.3, y + 0.2]), plainHouseRules)
    expect(moved.followed).toEqual([])
    expect(moved.released.map(({ label }) => label)).toEqual(['veranda length, x', 'veranda depth, y'])
    expect(placedInWords(moved, 'metric', plainHouseRules)).toMatch(
      /: veranda length, x and 1 more size no longer decide what was moved\.$/,
    )
    const length = labelled(moved.site, 'veranda length, x')
    expect(length.moves).toEqual(
      labelled(site, 'veranda length, x').moves.filter(({ coordinate }) => coordinate !== '2.0'),
    )
    const lower = changeCover(site, 'cover', ({ corners }) => ({
      corners: corners.map(([cx, cy, cz], i): [number, number, number] => [cx, cy, i === 0 ? cz - 0.1 : cz]),
    }))
    const ceiling = labelled(placedByHand(site, lower, plainHouseRules).site, 'ceiling height')
    expect(ceiling.moves.length).toBe(labelled(site, 'ceiling height').moves.length - 1)
    expect(ceiling.value).toBe(labelled(site, 'ceiling height').value)
  })
})

describe('edits that are about the sizes themselves, or about nothing that they decide', () => {
  it('are left as they are', () => {
    const site = demo('C')
    const typed = {
      ...site,
      dimensions: site.dimensions.map((size, i) => (i === 0 ? { ...size, value: 9 } : size)),
      floor: site.floor.map(([x, y]): [number, number] => [x + 1, y]),
    }
    for (const after of [
      typed,
      addFloorCorner(site, 0, [3, -1]),
      removeThings(site, 'member', ['joist-1']),
      moveThings(site, 'seat', ['T1'], 0.2, 0),
      { ...site, name: 'another' },
    ])
      expect(placedByHand(site, after, plainHouseRules)).toEqual({ site: after, followed: [], released: [] })
  })
})
