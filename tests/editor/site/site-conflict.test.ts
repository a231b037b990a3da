import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { changeCover, changeObstacle, changeTable, changeWall } from '#app/domain/site/edits.ts'
import { addFloorCorner, moveFloorCorner } from '#app/domain/site/floor-edits.ts'
import { placedByHand } from '#app/domain/site/placed-by-hand.ts'
import { siteSchema, type Site } from '#app/domain/site/site.ts'
import { usualStates } from '#app/domain/site/usual-states.ts'
import { chosenThing } from '#app/editor/site/choice.ts'
import { moveChosen, removeChosen } from '#app/editor/site/chosen.ts'
import { mergedSite, siteDifferences } from '#app/editor/site/site-conflict.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'

const site = demoSites().find(({ key }) => key === 'A')!.site
const seats = (...ids: string[]) => ({ kind: 'seat' as const, ids, part: null })

describe('a site that two people changed', () => {
  const mine = moveChosen(site, seats('R1-1'), 0.2, 0)
  const theirs = removeChosen(moveChosen(site, chosenThing('member', 'beam-3'), 0.3, 0), seats('W5-1'))

  it('is told thing by thing with both values', () => {
    expect(siteDifferences(mine, theirs).map(({ key }) => key)).toEqual(['seat R1-1', 'seat W5-1', 'member beam-3'])
    expect(siteDifferences(mine, theirs)[1]).toMatchObject({ label: 'Seat W5-1', theirs: 'none' })
    const reordered = { ...site, seats: site.seats.map((seat) => Object.fromEntries(Object.entries(seat).reverse())) }
    expect(siteDifferences(site, siteSchema.parse(reordered))).toEqual([])
    expect(siteDifferences(site, reordered as typeof site)).toEqual([])
  })
  it('tells what was changed there alone from what was changed here', () => {
    const alone = siteDifferences(mine, theirs, site).map(({ key, theirsAlone }) => [key, theirsAlone])
    expect(alone).toEqual([
      ['seat R1-1', false],
      ['seat W5-1', true],
      ['member beam-3', true],
    ])
    expect(siteDifferences(mine, theirs).every(({ theirsAlone }) => !theirsAlone)).toBe(true)
  })
  it('becomes one site by the choice for each thing', () => {
    const merged = mergedSite(mine, theirs, new Set(['member beam-3', 'seat W5-1']))
    expect(siteDifferences(merged, mine).map(({ key }) => key)).toEqual(['seat W5-1', 'member beam-3'])
    expect(siteDifferences(merged, theirs).map(({ key }) => key)).toEqual(['seat R1-1'])
    expect(siteDifferences(mergedSite(mine, theirs, new Set()), mine)).toEqual([])
  })
})

describe('what two copies of a site say of one thing', () => {
  /** What is told of the only difference between the site and what an edit makes of it. */
  const told = (change: (old: Site) => Site, from: Site = site) => {
    const rows = siteDifferences(change(from), from)
    expect(rows).toHaveLength(1)
    const { label, mine, theirs } = rows[0]!
    return [label, mine, theirs]
  }
  const trim = site.obstacles.find(({ id }) => id === 'trim')!
  const [cover, wall, table] = [site.covers[0]!, site.walls[0]!, site.tables[0]!]
  const raised = cover.corners.map(([x, y, z], i): [number, number, number] => [x, y, i === 1 ? 3.4 : z])

  it('names a cover, a wall, an obstacle, a table and a level, each with the facts that differ alone', () => {
    expect(cover.corners[1]).toEqual([13.2, 0, 3.3])
    expect(told((old) => changeCover(old, cover.id, { corners: raised }))).toEqual([
      cover.name,
      'corner 2 13.20 m, 0.00 m, 3.40 m',
      'corner 2 13.20 m, 0.00 m, 3.30 m',
    ])
    expect(told((old) => changeCover(old, cover.id, { voidDepth: 0.2, material: 'unknown' }))).toEqual([
      cover.name,
      'unknown, void above 0.20 m',
      `${cover.material}, void above not known`,
    ])
    expect(told((old) => changeWall(old, wall.id, { top: 2.6, loadStatus: 'anchors tested' }))).toEqual([
      wall.name,
      'top 2.60 m, load anchors tested',
      `top past the cover, load ${wall.loadStatus}`,
    ])
    expect(told((old) => changeObstacle(old, 'trim', { shape: { ...trim.shape, z: [2.8, 3.05] } }))).toEqual([
      trim.name,
      'heights 2.80 m to 3.05 m',
      'heights 2.90 m to 3.05 m',
    ])
    expect(told((old) => changeTable(old, table.id, { turnDeg: 90 }))).toEqual([
      `Table ${table.id}`,
      'turned 90°',
      `turned ${table.turnDeg}°`,
    ])
    const level = { id: 'step', name: 'step', height: 0.15, outline: site.floor }
    expect(told((old) => ({ ...old, levels: [{ ...level, height: 0.2 }] }), { ...site, levels: [level] })).toEqual([
      'step',
      'height 0.20 m',
      'height 0.15 m',
    ])
  })
  it('tells states that came along, a beam that follows no cover any more, and a size by hand', () => {
    const states = usualStates('blind', trim.shape)
    expect(told((old) => changeObstacle(old, 'trim', { movable: true, states }))).toEqual([
      trim.name,
      'moves yes, 2 states',
      'moves no',
    ])
    const beam = { ...site.members[1]!, underside: { from: 2.5, to: 2.4 } }
    expect(
      told((old) => ({ ...old, members: old.members.map((each) => (each.id === beam.id ? beam : each)) })),
    ).toEqual([beam.name, 'from 2.50 m, to 2.40 m', 'follows cover'])
    const [size] = site.dimensions
    const sized = siteDifferences({ ...site, dimensions: [{ ...size!, value: 13.5, source: 'guessed' }] }, { ...site, dimensions: [size!] }) // prettier-ignore
    expect(sized).toMatchObject([{ label: size!.label, mine: '13.50 m, guessed', theirs: '13.20 m, laser' }])
  })
  it('says what one of them has whole, and that the other removed it or never had it', () => {
    const without = removeChosen(site, chosenThing('wall', wall.id))
    const row = (base: Site | null) => siteDifferences(without, site, base).find(({ key }) => key === `wall ${wall.id}`)
    expect(row(site)).toMatchObject({ label: wall.name, mine: 'it removed', theirsAlone: false })
    expect(row(site)!.theirs).toMatch(/^13\.20 m long, past the cover/)
    expect(row(null)).toMatchObject({ mine: 'none' })
  })
  it('tells the floor with what lies beyond it, and facts of the whole site', () => {
    expect(told((old) => moveFloorCorner(old, 2, [13, 5.2]))).toEqual([
      'Floor',
      'corner 3 13.00 m, 5.20 m',
      'corner 3 13.20 m, 5.40 m',
    ])
    const cornered = siteDifferences(addFloorCorner(site, 0), site).find(({ key }) => key === 'floor')!
    expect(cornered.mine).toMatch(/^5 corners, .* beyond edge 4/)
    expect(cornered.theirs).toMatch(/^4 corners, .* beyond edge 3/)
    expect(told((old) => ({ ...old, axes: 'x along the quay' }))).toEqual(['Which way x and y run', 'x along the quay', site.axes]) // prettier-ignore
    const trace = { photoId: '00000000-0000-4000-8000-000000000001', at: [0, 0] as [number, number], metresPerPixel: 0.01, turnDeg: 0 } // prettier-ignore
    expect(told((old) => ({ ...old, trace }))).toEqual(['Picture under the plan', 'a picture', 'none'])
    expect(told((old) => ({ ...old, trace: { ...trace, turnDeg: 5 } }), { ...site, trace })).toEqual(['Picture under the plan', 'turned 5°', 'turned 0°']) // prettier-ignore
  })
  it('says lengths in the units of the one who reads them', () => {
    const mine = { ...site, displayUnits: 'imperial' as const }
    const theirs = changeTable(mine, table.id, { height: 0.9144 })
    expect(siteDifferences(mine, theirs)).toMatchObject([{ theirs: 'height 3 ft 0 in' }])
  })
})

describe('one site out of two', () => {
  it('takes each thing, the floor and each fact of the whole from the side that was chosen', () => {
    const theirs: Site = {
      ...changeTable(moveFloorCorner(changeWall(site, site.walls[0]!.id, { top: 2.6 }), 2, [13, 5.2]), 'R1', { height: 0.9 }), // prettier-ignore
      axes: 'x along the quay',
    }
    const keys = siteDifferences(site, theirs).map(({ key }) => key)
    expect(keys).toEqual(['table R1', 'wall wall', 'floor', 'whole axes'])
    expect(mergedSite(site, theirs, new Set(keys))).toEqual(theirs)
    expect(mergedSite(site, theirs, new Set())).toEqual(site)
    for (const key of keys) {
      const merged = mergedSite(site, theirs, new Set([key]))
      expect(siteDifferences(site, merged).map((each) => each.key)).toEqual([key])
      expect(siteSchema.safeParse(merged).success).toBe(true)
    }
  })
  it('counts the corners that sizes decide as on the floor that was taken', () => {
    const theirs = addFloorCorner(site, 0)
    expect(theirs.dimensions).not.toEqual(site.dimensions)
    const floorMoves = (of: Site) => of.dimensions.map(({ moves }) => moves.filter((move) => move.of === 'floor'))
    const every = new Set(site.dimensions.map(({ id }) => `size ${id}`))
    expect(floorMoves(mergedSite(site, theirs, new Set(['floor'])))).toEqual(floorMoves(theirs))
    expect(floorMoves(mergedSite(site, theirs, every))).toEqual(floorMoves(site))
    const dragged = placedByHand(site, moveFloorCorner(site, 2, [13, 5.2]), plainHouseRules).site
    expect(floorMoves(mergedSite(dragged, site, new Set(['floor'])))).toEqual(floorMoves(site))
  })
})
