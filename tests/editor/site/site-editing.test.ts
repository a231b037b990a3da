import { describe, expect, it } from 'vitest'
import { siteSchema } from '#app/domain/site/site.ts'
import { chosenAfterClick, chosenWords, moveChosen, removeChosen, stillThere } from '#app/editor/site/chosen.ts'
import { middleOf, withMemberAt, withSeatAt } from '#app/editor/site/new-things.ts'
import { mergedSite, siteDifferences } from '#app/editor/site/site-conflict.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'

const site = demoSites().find(({ key }) => key === 'A')!.site
const seats = (...ids: string[]) => ({ kind: 'seat' as const, ids })

describe('choosing on the site', () => {
  it('takes the clicked thing; Shift adds a seat and takes it out again', () => {
    expect(chosenAfterClick(seats('R1-1'), seats('R1-2'), false)).toEqual(seats('R1-2'))
    expect(chosenAfterClick(seats('R1-1'), seats('R1-2'), true)).toEqual(seats('R1-1', 'R1-2'))
    expect(chosenAfterClick(seats('R1-1', 'R1-2'), seats('R1-1'), true)).toEqual(seats('R1-2'))
    expect(chosenAfterClick(seats('R1-1'), { kind: 'member', id: 'beam-1' }, true)).toEqual({
      kind: 'member',
      id: 'beam-1',
    })
  })
  it('moves and removes what is chosen and nothing else', () => {
    const moved = moveChosen(site, seats('R1-1', 'R1-2'), 0.1, -0.05)
    expect(moved.seats.filter((seat, i) => seat !== site.seats[i]).map(({ id }) => id)).toEqual(['R1-1', 'R1-2'])
    expect(moved.seats[0]!.x - site.seats[0]!.x).toBeCloseTo(0.1, 9)
    const without = removeChosen(site, { kind: 'member', id: 'beam-2' })
    expect(without.members.map(({ id }) => id)).toEqual(['beam-0', 'beam-1', 'beam-3', 'beam-4', 'beam-5'])
    expect(siteSchema.safeParse(without).success).toBe(true)
  })
  it('forgets what is gone', () => {
    expect(stillThere(site, seats('R1-1', 'gone'))).toEqual(seats('R1-1'))
    expect(stillThere(site, { kind: 'member', id: 'gone' })).toBeNull()
    expect(chosenWords(site, seats('R1-1', 'R1-2'))).toBe('2 seats')
  })
})

describe('adding to the site', () => {
  it('puts a seat where it was asked for, looking at the table beside it', () => {
    const { site: with1, id } = withSeatAt(site, [0.67, 1.9])
    const added = with1.seats.find((seat) => seat.id === id)!
    expect(siteSchema.safeParse(with1).success).toBe(true)
    expect([added.x, added.y]).toEqual([0.67, 1.9])
    // Table W1 stands at (1.32, 1.45): down and to the right.
    expect(added.facingDeg).toBeCloseTo(360 - (Math.atan2(0.45, 0.65) * 180) / Math.PI, 0)
  })
  it('puts a member across the floor under the cover, or at heights of its own under open sky', () => {
    const { site: with1, id } = withMemberAt(site, middleOf(site))
    const added = with1.members.find((member) => member.id === id)!
    expect([added.from, added.to, added.underside]).toEqual([[6.6, 0], [6.6, 5.4], { follows: 'cover' }])
    const open = withMemberAt({ ...site, covers: [], members: [] }, [1, 1]).site
    expect(siteSchema.safeParse(open).success).toBe(true)
  })
  it('gives every thing a name of its own', () => {
    let grown = site
    for (let i = 0; i < 5; i++) grown = withSeatAt(grown, [1, 1]).site
    expect(new Set(grown.seats.map(({ id }) => id)).size).toBe(site.seats.length + 5)
  })
})

describe('a site that two people changed', () => {
  const mine = moveChosen(site, seats('R1-1'), 0.2, 0)
  const theirs = removeChosen(moveChosen(site, { kind: 'member', id: 'beam-3' }, 0.3, 0), seats('W5-1'))

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
