import { describe, expect, it } from 'vitest'
import { siteSchema } from '#app/domain/site/site.ts'
import { chosenFloor, chosenThing } from '#app/editor/site/choice.ts'
import { chosenAfterClick, chosenWords, moveChosen, removeChosen, stillThere } from '#app/editor/site/chosen.ts'
import { gestureAt } from '#app/editor/site/gesture-start.ts'
import { handlesOf, putHandle } from '#app/editor/site/handles.ts'
import { kindOfNew, middleOf, withThingAt, type NewThing } from '#app/editor/site/new-things.ts'
import { obstacleKinds } from '#app/editor/site/obstacle-kinds.ts'
import { shapeAs } from '#app/editor/site/shape-fields.tsx'
import { thingAt } from '#app/editor/site/thing-at.ts'
import { refusalOf, siteFaults } from '#app/domain/site/site-faults.ts'
import { listOf } from '#app/domain/site/edits.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'

const site = demoSites().find(({ key }) => key === 'A')!.site
const seats = (...ids: string[]) => ({ kind: 'seat' as const, ids, part: null })

describe('choosing on the site', () => {
  it('takes the clicked thing; Shift adds a seat and takes it out again', () => {
    expect(chosenAfterClick(seats('R1-1'), seats('R1-2'), false)).toEqual(seats('R1-2'))
    expect(chosenAfterClick(seats('R1-1'), seats('R1-2'), true)).toEqual(seats('R1-1', 'R1-2'))
    expect(chosenAfterClick(seats('R1-1', 'R1-2'), seats('R1-1'), true)).toEqual(seats('R1-2'))
    const beam = chosenThing('member', 'beam-1')
    expect(chosenAfterClick(seats('R1-1', 'R1-2'), beam, true)).toEqual(beam)
    expect(chosenAfterClick(seats('R1-1'), seats('R1-1'), true)).toBeNull()
  })
  it('moves and removes what is chosen and nothing else', () => {
    const moved = moveChosen(site, seats('R1-1', 'R1-2'), 0.1, -0.05)
    expect(moved.seats.filter((seat, i) => seat !== site.seats[i]).map(({ id }) => id)).toEqual(['R1-1', 'R1-2'])
    expect(moved.seats[0]!.x - site.seats[0]!.x).toBeCloseTo(0.1, 9)
    const without = removeChosen(site, chosenThing('member', 'beam-2'))
    expect(without.members.map(({ id }) => id)).toEqual(['beam-0', 'beam-1', 'beam-3', 'beam-4', 'beam-5'])
    expect(siteSchema.safeParse(without).success).toBe(true)
  })
  it('forgets what is gone', () => {
    expect(stillThere(site, seats('R1-1', 'gone'))).toEqual(seats('R1-1'))
    expect(stillThere(site, chosenThing('member', 'gone'))).toBeNull()
    expect(chosenWords(site, seats('R1-1', 'R1-2'))).toBe('2 seats')
  })
})

describe('adding to the site', () => {
  it('puts a seat where it was asked for, looking at the table beside it', () => {
    const { site: with1, id } = withThingAt(site, 'seat', [0.67, 1.9])
    const added = with1.seats.find((seat) => seat.id === id)!
    expect(siteSchema.safeParse(with1).success).toBe(true)
    expect([added.x, added.y]).toEqual([0.67, 1.9])
    // Table W1 stands at (1.32, 1.45): down and to the right.
    expect(added.facingDeg).toBeCloseTo((-Math.atan2(0.45, 0.65) * 180) / Math.PI, 0)
  })
  it('puts a member across the floor under the cover, or at heights of its own under open sky', () => {
    const { site: with1, id } = withThingAt(site, 'member', middleOf(site))
    const added = with1.members.find((member) => member.id === id)!
    expect([added.from, added.to, added.underside]).toEqual([[6.6, 0], [6.6, 5.4], { follows: 'cover' }])
    const open = withThingAt({ ...site, covers: [], members: [] }, 'member', [1, 1]).site
    expect(siteSchema.safeParse(open).success).toBe(true)
  })
  it('gives every thing a name of its own', () => {
    let grown = site
    for (let i = 0; i < 5; i++) grown = withThingAt(grown, 'seat', [1, 1]).site
    expect(new Set(grown.seats.map(({ id }) => id)).size).toBe(site.seats.length + 5)
  })
})

const whats: NewThing[] = ['cover', 'member', 'wall', 'pole', 'table', 'level', 'seat', ...obstacleKinds]

describe('every kind of new thing', () => {
  it.each(whats)('%s stands on the site without a fault, movable ones in their states', (what) => {
    for (const start of demoSites().map((each) => each.site)) {
      const { site: grown, id } = withThingAt(start, what, middleOf(start))
      expect(siteSchema.parse(grown)).toEqual(grown)
      expect(refusalOf(start, grown)).toBeNull()
      const list = listOf[kindOfNew(what)]
      expect(grown[list]).toHaveLength(start[list].length + 1)
      const obstacle = grown.obstacles.find((each) => each.id === id)
      if (obstacle) expect(obstacle.movable).toBe((obstacle.states?.length ?? 0) > 0)
    }
  })
})

describe('corners and ends', () => {
  const prism = { kind: 'prism' as const, outline: [[1, 1], [2, 1], [2, 2]] as [number, number][], z: [0, 1] as [number, number] } // prettier-ignore
  const trim = site.obstacles[0]!
  const rich = {
    ...site,
    levels: [{ id: 'step', name: 'step', height: 0.2, outline: [[4, 1], [5, 1], [5, 2]] as [number, number][] }], // prettier-ignore
    obstacles: [...site.obstacles, { ...trim, id: 'prism', shape: prism }, { ...trim, id: 'round', shape: { kind: 'cylinder' as const, centre: [6, 2] as [number, number], radius: 0.5, z: [2, 3] as [number, number] } }], // prettier-ignore
  }
  const all = [
    chosenFloor(),
    chosenThing('level', 'step'),
    chosenThing('cover', 'cover'),
    chosenThing('member', 'beam-1'),
    chosenThing('wall', 'wall'),
    chosenThing('obstacle', 'trim'),
    chosenThing('obstacle', 'prism'),
  ]
  it.each(all)('of $kind $ids: each is put where it is wanted', (chosen) => {
    const handles = handlesOf(rich, chosen)
    expect(handles.length).toBeGreaterThan(1)
    handles.forEach(([x, y], part) => {
      const put = putHandle(rich, chosen, part, [x + 0.05, y + 0.05])
      const [px, py] = handlesOf(put, chosen)[part]!
      expect([px, py]).toEqual([expect.closeTo(x + 0.05, 4), expect.closeTo(y + 0.05, 4)])
      expect(siteSchema.parse(put)).toEqual(put)
    })
  })
  it('of something round: its radius', () => {
    const put = putHandle(rich, chosenThing('obstacle', 'round'), 0, [6, 3.25])
    expect(put.obstacles.at(-1)!.shape).toMatchObject({ centre: [6, 2], radius: 1.25 })
  })
  it('the chosen corner moves and goes alone; three stay', () => {
    expect(moveChosen(rich, chosenFloor(1), 0.5, 0).floor).toEqual([[0, 0], [13.7, 0], [13.2, 5.4], [0, 5.4]]) // prettier-ignore
    const three = removeChosen(rich, chosenFloor(1))
    expect(three.floor).toHaveLength(3)
    expect(removeChosen(three, chosenFloor(1))).toBe(three)
    expect(removeChosen(rich, chosenThing('member', 'beam-1', 0)).members).toHaveLength(5)
    expect(stillThere(three, chosenFloor(3))).toEqual(chosenFloor(null))
    expect(chosenWords(rich, chosenFloor(1))).toBe('Floor, corner 2')
    expect(chosenWords(rich, chosenThing('member', 'beam-1', 0))).toBe('beam 1, end 1')
  })

  it('another form of shape fills about the same room', () => {
    expect(shapeAs(prism, 'box')).toEqual({ kind: 'box', x: [1, 2], y: [1, 2], z: [0, 1] })
    expect(shapeAs(prism, 'cylinder')).toEqual({ kind: 'cylinder', centre: [1.5, 1.5], radius: 0.5, z: [0, 1] })
    expect(shapeAs({ kind: 'cylinder', centre: [1, 1], radius: 0.5, z: [0, 1] }, 'prism')).toMatchObject({
      outline: [[0.5, 0.5], [1.5, 0.5], [1.5, 1.5], [0.5, 1.5]], // prettier-ignore
    })
  })
})

describe('what a pointer means', () => {
  const at = (x: number, y: number, reach = 0.1) => thingAt(site, [x, y], reach)
  it('a seat before its table, a table before a beam, a beam before the cover’s edge, nothing on bare floor', () => {
    expect(at(0.67, 3.95)).toEqual(chosenThing('seat', 'R1-1'))
    expect(at(1.32, 3.95)).toEqual(chosenThing('table', 'R1'))
    expect(at(2.64, 1)).toEqual(chosenThing('member', 'beam-1'))
    expect(at(2.64, 2.7)).toEqual(chosenThing('obstacle', 'lights'))
    expect(thingAt({ ...site, obstacles: [], members: [] }, [8, 5.35], 0.1)).toEqual(chosenThing('cover', 'cover'))
    expect(at(0.4, 0.8)).toBeNull()
  })

  it('a corner of what is chosen, then the middle of its edge, then other things', () => {
    const floor = chosenFloor()
    const corner = gestureAt(site, floor, [13.15, 0.05], 0.1, false)!
    expect(corner.chosen).toEqual(chosenFloor(1))
    expect(corner.step(site, [14.001, -1]).floor[1]).toEqual([14, -1])
    const edge = gestureAt(site, floor, [6.6, 0.02], 0.1, false)!
    expect(edge.chosen).toEqual(chosenFloor(1))
    expect(edge.step(site, [6.6, -0.5]).floor).toEqual([[0, 0], [6.6, -0.5], [13.2, 0], [13.2, 5.4], [0, 5.4]]) // prettier-ignore
    expect(edge.click!(site).floor[1]).toEqual([6.6, 0])
    expect(gestureAt(site, floor, [0.67, 3.95], 0.1, false)!.chosen).toEqual(chosenThing('seat', 'R1-1'))
    expect(gestureAt(site, null, [0.4, 0.8], 0.1, false)).toBeNull()
  })

  it('several chosen things stay together when one of them is dragged', () => {
    const both = seats('R1-1', 'R1-2')
    const drag = gestureAt(site, both, [0.67, 3.95], 0.1, false)!
    expect(drag.chosen).toEqual(both)
    const moved = drag.step(site, [0.77, 3.95])
    expect(moved.seats.filter((seat, i) => seat !== site.seats[i])).toHaveLength(2)
    expect(siteFaults(moved)).toEqual([])
    expect(gestureAt(site, both, [1.32, 3.33], 0.1, true)!.chosen).toEqual(seats('R1-1', 'R1-2', 'R1-3'))
  })
})
