import { describe, expect, it } from 'vitest'
import {
  addSeats,
  facingTowards,
  seatsAlong,
  seatsAround,
  seatsAtSides,
  seatsAtTable,
  setSeatsAt,
  seatsInRows,
  usualHeights,
} from '#app/domain/site/seating.ts'
import { radians, type Vec2 } from '#app/domain/vector.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'
import { plainSite } from '#tests/support/plain-site.ts'

const demoC = demoSites().find(({ key }) => key === 'C')!.site
const table = { centre: [2.6, 1.55] as Vec2, size: [2.4, 0.9] as [number, number], turnDeg: 0 }

describe('seats around a table', () => {
  it.each([
    [0.4, 1],
    [0.8, 1],
    [1.2, 2],
    [2.4, 4],
  ])('an edge of %s m has %i, 0.60 m each (common practice, no source)', (edge, count) => {
    expect(seatsAlong(edge)).toBe(count)
  })

  it('are the eight of demo site C: four at each long side, 0.27 m from the edge', () => {
    const places = seatsAtSides(table as never, { below: 4, above: 4, left: 0, right: 0 }, 0.27)
    const wanted = demoC.seats.slice(0, 8).map(({ x, y, facingDeg }) => ({ x, y, facingDeg }))
    expect(places).toEqual(wanted)
  })

  it('a turned table turns its people about its middle (closed form)', () => {
    const sides = { below: 2, above: 1, left: 1, right: 1 }
    const straight = seatsAtSides({ ...table, centre: [0, 0], turnDeg: 0 } as never, sides, 0.3)
    const turned = seatsAtSides({ ...table, centre: [1, 2], turnDeg: 30 } as never, sides, 0.3)
    const [c, s] = [Math.cos(radians(30)), Math.sin(radians(30))]
    straight.forEach(({ x, y, facingDeg }, i) => {
      expect(turned[i]!.x).toBeCloseTo(1 + x * c - y * s, 4)
      expect(turned[i]!.y).toBeCloseTo(2 + x * s + y * c, 4)
      expect((turned[i]!.facingDeg - facingDeg - 30 + 720) % 360).toBeCloseTo(0, 9)
    })
  })

  it('round: equal angles, everybody at one distance and looking at the middle', () => {
    const round = { centre: [3, 2] as [number, number], size: [1.2, 1.2] as [number, number], turnDeg: 15 }
    const places = seatsAround(round, 5, 0.25)
    for (const { x, y, facingDeg } of places) {
      expect(Math.hypot(x - 3, y - 2)).toBeCloseTo(0.85, 4)
      expect(Math.cos(radians(facingDeg - facingTowards([x, y], [3, 2])))).toBeCloseTo(1, 4)
    }
    const [a, b] = places
    const chord = Math.hypot(a!.x - b!.x, a!.y - b!.y)
    expect(chord).toBeCloseTo(2 * 0.85 * Math.sin(radians(36)), 3)
    expect(a).toMatchObject({ x: expect.closeTo(3 + 0.85 * Math.cos(radians(15)), 4) as number, facingDeg: -165 })
  })
})

describe('seats in rows', () => {
  it('run along the direction, rows to its left, all looking one way', () => {
    const places = seatsInRows({
      from: [1, 1],
      turnDeg: 90,
      perRow: 3,
      spacing: 0.5,
      rows: 2,
      rowSpacing: 0.9,
      facingDeg: 0,
    })
    expect(places.map(({ x, y }) => [x, y])).toEqual([[1, 1], [1, 1.5], [1, 2], [0.1, 1], [0.1, 1.5], [0.1, 2]]) // prettier-ignore
    expect(new Set(places.map(({ facingDeg }) => facingDeg))).toEqual(new Set([0]))
  })
})

describe('adding seats to a site', () => {
  const facts = { group: 'S', priority: 'secondary', posture: 'seated', ...usualHeights.seated } as const
  it('numbers them within their group past every id that is taken', () => {
    const site = plainSite({ tables: [{ id: 'S-2', centre: [1, 1], size: [1, 1], turnDeg: 0, height: 0.7, material: 'unknown' }] }) // prettier-ignore
    const once = addSeats(site, seatsAround({ centre: [1, 1], size: [1, 1], turnDeg: 0 }, 3, 0.2), facts)
    expect(once.ids).toEqual(['S-1', 'S-3', 'S-4'])
    const twice = addSeats(once.site, [{ x: 0, y: 0, facingDeg: 0 }], { ...facts, group: '' })
    expect(twice.ids).toEqual(['seat-1'])
    expect(twice.site.seats).toHaveLength(5)
    expect(twice.site.seats[0]).toBe(site.seats[0])
  })
})

describe('setting the seats of a table', () => {
  const facts = { group: 'T', priority: 'primary', posture: 'seated', ...usualHeights.seated } as const
  const tableAt = (id: string, x: number, form?: 'round') =>
    ({ id, centre: [x, 1.5], size: [1.2, 0.8], turnDeg: 0, height: 0.74, material: 'unknown', ...(form ? { form } : {}) }) as const // prettier-ignore
  const [one, two] = [tableAt('T1', 1), tableAt('T2', 2.6)]
  const sides = (below: number) => ({ below, above: 2, left: 0, right: 1 })
  const places = (table: typeof one, below: number) => seatsAtSides(table as never, sides(below), 0.25)
  const bare = plainSite({ tables: [one, two] as never, seats: [] })
  const set = (site: typeof bare, table: typeof one, below: number) =>
    setSeatsAt(site, table as never, places(table, below), facts).site

  it('twice leaves nobody upon another', () => {
    const once = set(bare, one, 2)
    expect(once.seats).toHaveLength(5)
    expect(set(once, one, 2)).toEqual(once)
  })
  it('anew leaves the other table’s seats, other groups and what stands far away', () => {
    const far = { id: 'X-1', ...facts, x: 1, y: 4, facingDeg: 90 }
    const other = { id: 'Y-1', ...facts, group: 'Y', x: 1, y: 0.85, facingDeg: 90 }
    const both = set(set({ ...bare, seats: [far, other] }, one, 1), two, 2)
    expect(both.seats).toHaveLength(2 + 4 + 5)
    const after = set(both, one, 2)
    expect(after.seats).toHaveLength(2 + 5 + 5)
    for (const kept of [far, other, ...seatsAtTable(both, two as never, 'T')]) expect(after.seats).toContainEqual(kept)
    expect(new Set(after.seats.map(({ id }) => id)).size).toBe(12)
  })
  it('reaches around a round table to its edge, not to its square', () => {
    const round = { ...tableAt('T1', 0, 'round'), size: [2, 2], centre: [0, 0] }
    const at = (reach: number) => ({
      id: 'T-1',
      ...facts,
      x: reach / Math.SQRT2,
      y: reach / Math.SQRT2,
      facingDeg: -135,
    })
    const found = (reach: number) =>
      seatsAtTable(plainSite({ tables: [round] as never, seats: [at(reach)] }), round as never, 'T').length
    expect([found(1.25), found(2.19), found(2.21)]).toEqual([1, 1, 0])
  })
})
