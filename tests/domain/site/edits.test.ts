import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import {
  addThing,
  listOf,
  moveThings,
  removeThings,
  repeatMember,
  unusedId,
  type ThingKind,
} from '#app/domain/site/edits.ts'
import { copyParts, copyWhole } from '#app/domain/site/copy-site.ts'
import {
  addFloorCorner,
  moveFloorCorner,
  removeFloorCorner,
  replaceFloor,
  setBeyond,
  setFloorEdge,
} from '#app/domain/site/floor-edits.ts'
import { undersideAt } from '#app/domain/site/member.ts'
import { siteFaults } from '#app/domain/site/site-faults.ts'
import { siteSchema, type Dimension, type Site } from '#app/domain/site/site.ts'
import { assumedInWords, assumedSizes, usualTolerance } from '#app/domain/site/size-source.ts'
import { solidOf } from '#app/domain/site/solids.ts'
import { statesAfter, usualStates } from '#app/domain/site/usual-states.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'
import { plainSite } from '#tests/support/plain-site.ts'

const [a, b, c] = demoSites().map(({ site }) => site) as [Site, Site, Site]
const level = { id: 'step', name: 'step', outline: [[0, 0], [1, 0], [1, 1]] as [number, number][], height: 0.2 } // prettier-ignore
const full: Site = { ...a, poles: b.poles, obstacles: [...a.obstacles, ...b.obstacles], levels: [level] }

describe('moving and removing', () => {
  it.each(Object.keys(listOf) as ThingKind[])(
    '%s: one thing moves in plan by the step, the rest is the same object',
    (kind) => {
      const [thing] = full[listOf[kind]]
      const moved = moveThings(full, kind, [thing!.id], 0.3, -0.2)
      expect(siteSchema.parse(moved)).toEqual(moved)
      const changed = Object.keys(listOf).filter((each) =>
        moved[listOf[each as ThingKind]].some((t, i) => t !== full[listOf[each as ThingKind]][i]),
      )
      expect(changed).toEqual([kind])
      const solid = solidOf(full, { of: kind as 'cover', id: thing!.id, stateIndex: null })
      const after = solidOf(moved, { of: kind as 'cover', id: thing!.id, stateIndex: null })
      solid?.parts.forEach(({ middle }, i) => {
        expect(after!.parts[i]!.middle[0]).toBeCloseTo(middle[0] + 0.3, 4)
        expect(after!.parts[i]!.middle[1]).toBeCloseTo(middle[1] - 0.2, 4)
      })
      const gone = removeThings(full, kind, [thing!.id])
      expect(gone[listOf[kind]]).toHaveLength(full[listOf[kind]].length - 1)
      expect(
        gone.dimensions.flatMap(({ moves }) => moves).some((move) => move.of === kind && move.id === thing!.id),
      ).toBe(false)
      expect(siteFaults(gone)).toEqual([])
    },
  )

  it('members keep the height they had when their cover goes', () => {
    const gone = removeThings(a, 'cover', ['cover'])
    const [member] = gone.members
    for (const y of [0, 2, 5.4])
      expect(undersideAt(gone, member!, 0, y)).toBeCloseTo(undersideAt(a, a.members[0]!, 0, y)!, 4)
  })

  it('copies of a member stand at equal spacing', () => {
    const many = repeatMember(a, 'beam-0', 0.9, 0, 3)
    expect(many.members.slice(-3).map(({ from }) => from[0])).toEqual([0.9, 1.8, 2.7])
    expect(new Set(many.members.map(({ id }) => id)).size).toBe(many.members.length)
  })

  it('a new id is free whatever has the name', () => {
    const site = addThing(plainSite(), 'pole', { id: 'wall-1', name: '', at: [0, 0], top: 2, diameter: 0.1, material: 'unknown', loadStatus: '' }) // prettier-ignore
    expect(unusedId(site, 'wall')).toBe('wall-2')
    expect(unusedId(site, 'T', '')).toBe('T1')
  })
})

describe('the floor', () => {
  const at = (site: Site, dimension: Dimension) =>
    dimension.moves
      .filter(({ of }) => of === 'floor')
      .map(({ coordinate }) => {
        const [corner = '', axis = ''] = coordinate.split('.')
        return site.floor[Number(corner)]![Number(axis) as 0 | 1]
      })

  it('a corner more or less: sizes keep deciding the same corners, beyond stays at its edge', () => {
    const more = addFloorCorner(c, 0)
    expect(more.floor[1]).toEqual([3.6, 0])
    c.dimensions.forEach((dimension, i) => expect(at(more, more.dimensions[i]!)).toEqual(at(c, dimension)))
    expect(more.beyond[0]!.edge).toBe(3)
    const back = removeFloorCorner(more, 1)
    expect(back.floor).toEqual(c.floor)
    expect(back.beyond).toEqual(c.beyond)
    expect(back.dimensions).toEqual(c.dimensions)
  })

  it('a corner that goes takes along what was decided about it', () => {
    const less = removeFloorCorner(c, 2)
    expect(less.beyond).toEqual([])
    expect(less.dimensions[0]!.moves.filter(({ of }) => of === 'floor').map(({ coordinate }) => coordinate)).toEqual([
      '1.0',
    ])
  })

  it('moves, sets an edge, and replaces', () => {
    expect(moveFloorCorner(c, 0, [-0.5, 0.1]).floor[0]).toEqual([-0.5, 0.1])
    expect(setFloorEdge(c, 0, 8, 'last').floor[1]).toEqual([8, 0])
    const other = replaceFloor(c, [[0, 0], [1, 0], [1, 1]]) // prettier-ignore
    expect(other.beyond).toEqual(c.beyond)
    expect(replaceFloor(c, [[0, 0], [1, 0]]).beyond).toEqual([]) // prettier-ignore
    expect(other.dimensions.flatMap(({ moves }) => moves).some(({ of }) => of === 'floor')).toBe(false)
    expect(setBeyond(setBeyond(c, 0, { kind: 'street', name: 'lane' }), 2, null).beyond).toEqual([{ edge: 0, kind: 'street', name: 'lane' }]) // prettier-ignore
  })
})

describe('copying from another job', () => {
  it('whole: everything but name and units; photos stay behind', () => {
    const photo = { photoId: '3f2c1f0e-8a52-4c6e-9d0a-111111111111', measurementId: 'm' }
    const other = { ...b, dimensions: b.dimensions.map((size) => ({ ...size, photo })) }
    const copy = copyWhole(a, other)
    expect(copy).toEqual({ ...b, name: a.name, displayUnits: a.displayUnits })
  })

  it('chosen kinds are added with free ids and the sizes that decide them', () => {
    const copy = copyParts(a, a, new Set(['cover', 'member']))
    expect(siteFaults(copy)).toEqual([])
    expect(siteSchema.parse(copy)).toEqual(copy)
    expect(copy.members).toHaveLength(12)
    expect(copy.members[6]!.underside).toEqual({ follows: 'cover-2' })
    expect(copy.dimensions.slice(0, 7)).toEqual(a.dimensions)
    const added = copy.dimensions.slice(7)
    expect(added.map(({ label }) => label)).toEqual(a.dimensions.slice(0, 5).map(({ label }) => label))
    expect(new Set(added.flatMap(({ moves }) => moves.map(({ of }) => of)))).toEqual(new Set(['cover', 'member']))
    expect(added.flatMap(({ moves }) => moves.map(({ id }) => id)).every((id) => id.endsWith('-2'))).toBe(true)
  })

  it('members without their cover stand at the heights they had; a floor replaces the floor', () => {
    const copy = copyParts(plainSite({ seats: [] }), a, new Set(['member', 'floor']))
    expect(siteFaults(copy)).toEqual([])
    expect(copy.floor).toEqual(a.floor)
    expect(undersideAt(copy, copy.members[1]!, 0, 5.4)).toBeCloseTo(2.75, 4)
    expect(copy.beyond).toEqual(a.beyond)
  })
})

describe('sizes by source', () => {
  // product.md, Site: laser 5 mm, tape 10 mm, drawing 25 mm, photo the greater of 3 % and 50 mm, guess 10 %.
  it.each([
    ['laser', 7, 0.005],
    ['tape', 7, 0.01],
    ['drawing', 7, 0.025],
    ['photo', 1, 0.05],
    ['photo', 5, 0.15],
    ['guessed', 2.5, 0.25],
    ['told', 2.5, 0.25],
  ] as const)('%s of %d m: ± %d m', (source, value, tolerance) => {
    expect(usualTolerance(source, value, plainHouseRules)).toBeCloseTo(tolerance, 9)
  })
  it('assumed ones in words: three by name, the rest by number', () => {
    const sizes = ['a', 'b', 'c', 'd', 'e'].map((label) => ({ ...c.dimensions[3]!, id: label, label }))
    expect(assumedInWords({ dimensions: sizes }, 'metric')).toEqual([
      'a 0.205 m ± 0.025 m',
      'b 0.205 m ± 0.025 m',
      'c 0.205 m ± 0.025 m',
      '2 more sizes of the site',
    ])
  })
  it('guessed and told ones are assumed', () => {
    expect(assumedSizes(c).map(({ label }) => label)).toEqual(['ceiling void'])
  })
})

describe('states of a movable thing', () => {
  const cylinder = {
    kind: 'cylinder' as const,
    centre: [1, 1] as [number, number],
    radius: 1.5,
    z: [2.2, 2.8] as [number, number],
  }
  const box = {
    kind: 'box' as const,
    x: [0, 4] as [number, number],
    y: [3, 3.1] as [number, number],
    z: [0, 2.6] as [number, number],
  }
  it('door, umbrella, blind, fan and anything else', () => {
    expect(usualStates('door', box)).toEqual([{ name: 'open', shape: box }, { name: 'closed', shape: null }]) // prettier-ignore
    expect(usualStates('umbrella', cylinder)[1]).toEqual({
      name: 'shut',
      shape: { ...cylinder, radius: 0.15, z: [1.1, 2.8] },
    })
    expect(usualStates('blind', box)[1]).toEqual({ name: 'up', shape: { ...box, z: [2.4, 2.6] } })
    expect(usualStates('fan', cylinder)).toEqual([{ name: 'turning', shape: cylinder }])
    expect(usualStates('furniture', box).map(({ name }) => name)).toEqual(['in its place', 'away'])
  })
  it('a state that is the whole sweep follows a change of it; others stay', () => {
    const states = usualStates('umbrella', cylinder)
    const larger = { ...cylinder, radius: 2 }
    expect(statesAfter(states, cylinder, larger).map(({ shape }) => shape)).toEqual([larger, states[1]!.shape])
  })
})
