import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { siteSchema, type Dimension, type Site } from '#app/domain/site/site.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'
import { demoFile } from '#drizzle/seed/demo-file.ts'
import reference from '#tests/published/demo-reference.json'

const sites = demoSites()
const siteOf = (key: string): Site => sites.find((one) => one.key === key)!.site
const idsOf = (site: Site): string[] =>
  [site.covers, site.members, site.walls, site.poles, site.obstacles, site.tables, site.seats]
    .flat()
    .map(({ id }) => id)

/** The thing of the site that a dimension's move names. */
function moved(site: Site, move: Dimension['moves'][number]): unknown {
  if (move.of === 'floor') return site.floor
  const room = { cover: site.covers, member: site.members, wall: site.walls, pole: site.poles }
  const rest = { obstacle: site.obstacles, table: site.tables, seat: site.seats }
  return [...{ ...room, ...rest }[move.of]].find(({ id }) => id === move.id)
}

const at = (thing: unknown, path: string): unknown =>
  path
    .split('.')
    .reduce<unknown>((inner, key) => z.looseObject({}).or(z.array(z.unknown())).parse(inner)[key as never], thing)

describe('the demo catalogue', () => {
  const models = demoModels()

  it('has every model once, one without beam data, one withdrawn without a price', () => {
    expect(new Set(models.map(({ code }) => code)).size).toBe(demoFile.catalogue.length)
    expect(models.filter(({ beam }) => beam === null).map(({ code }) => code)).toEqual(['dulse-3-0'])
    const withdrawn = models.filter(({ status }) => status === 'withdrawn')
    expect(withdrawn.map(({ code, listPrice }) => ({ code, listPrice }))).toEqual([
      { code: 'betony-2-0-r1', listPrice: {} },
    ])
  })

  it('states reach only for mounts that the model offers', () => {
    for (const model of models) {
      expect(model.mounts).toEqual(expect.arrayContaining(Object.keys(model.mountReach)))
    }
    expect(models.find(({ code }) => code === 'betony-2-0')?.mountReach).toEqual({
      chain: 0.02,
      'drop rods': 0.25,
      'wall bracket': 0.25,
      'pole clamp': 0.2,
    })
  })
})

describe('the demo sites', () => {
  it.each(['A', 'B', 'C'])('%s has unique ids, and its heaters hang from things that exist', (key) => {
    const ids = idsOf(siteOf(key))
    expect(new Set(ids).size).toBe(ids.length)
    const codes = demoModels().map(({ code }) => code)
    for (const { layout } of sites.find((one) => one.key === key)!.variants) {
      for (const heater of layout.heaters) {
        expect(codes).toContain(heater.model)
        if (heater.memberId !== null) expect(ids).toContain(heater.memberId)
      }
    }
  })

  it.each(['A', 'B', 'C'])('%s: every size moves coordinates that are numbers', (key) => {
    const site = siteOf(key)
    for (const dimension of site.dimensions) {
      for (const move of dimension.moves)
        expect(at(moved(site, move), move.coordinate), move.coordinate).toBeTypeOf('number')
    }
    const idle = site.dimensions.filter(({ moves }) => moves.length === 0).map(({ label }) => label)
    expect(idle).toEqual(key === 'B' ? ['parapet glass height'] : [])
  })

  it('A: 5.8° of opening roof over six beams; the spacing moves beam 5 five times as far', () => {
    const site = siteOf('A')
    const [roof] = site.covers
    expect(roof).toMatchObject({ opening: true, swing: 0.085, material: 'non-combustible', voidDepth: null })
    const slope = Math.atan2(roof!.corners[0]![2] - roof!.corners[2]![2], roof!.corners[2]![1])
    expect((slope * 180) / Math.PI).toBeCloseTo(5.8, 1)
    expect(site.members).toHaveLength(6)
    expect(site.members[1]).toMatchObject({ width: 0.06, depth: 0.12, material: 'non-combustible' })
    const spacing = site.dimensions.find(({ label }) => label === 'beam spacing')!
    expect(spacing.moves).toContainEqual({ of: 'member', id: 'beam-5', coordinate: 'from.0', by: 5 })
    expect(site.beyond).toEqual([{ edge: 2, kind: 'water', name: 'the weir' }])
    expect(site.seats).toHaveLength(40)
  })

  it('A: a deeper terrace takes the screen along and leaves the trim at the wall', () => {
    const depth = siteOf('A').dimensions.find(({ label }) => label === 'terrace depth, y')!
    const obstacles = depth.moves
      .filter(({ of }) => of === 'obstacle')
      .map(({ id, coordinate }) => `${id} ${coordinate}`)
    expect(obstacles).toEqual(['screen shape.y.0', 'screen shape.y.1'])
    expect(depth.moves.filter(({ of }) => of === 'member')).toHaveLength(6)
  })

  it('B: open sky, six poles, four movable umbrellas, a wall that ends at 3.454 m', () => {
    const site = siteOf('B')
    expect(site.covers).toEqual([])
    expect(site.poles).toHaveLength(6)
    expect(site.walls[0]?.top).toBe(3.454)
    expect(site.obstacles.every(({ kind, movable }) => kind === 'umbrella' && movable)).toBe(true)
  })

  it('C: a closed timber ceiling with a void of 205 ± 25 mm', () => {
    const site = siteOf('C')
    expect(site.covers[0]).toMatchObject({ opening: false, swing: 0, material: 'combustible', voidDepth: 0.205 })
    const voidSize = site.dimensions.find(({ label }) => label === 'ceiling void')
    expect(voidSize).toMatchObject({ tolerance: 0.025, source: 'guessed', moves: [{ coordinate: 'voidDepth' }] })
    expect(site.obstacles.map(({ kind, movable }) => `${kind} ${movable}`)).toEqual([
      'fan false',
      'lamp false',
      'blind false',
      'door true',
    ])
  })

  it('survives a journey through JSON and the schema, as storage does', () => {
    for (const { site } of sites) expect(siteSchema.parse(JSON.parse(JSON.stringify(site)))).toEqual(site)
  })

  it('has a reference for every seat of all nine variants', () => {
    for (const { site, variants } of reference.sites) {
      const demo = sites.find(({ key }) => key === site)!
      expect(variants.map(({ number }) => number)).toEqual(demo.variants.map(({ number }) => number))
      for (const variant of variants) {
        expect(variant.reference.perSeat.map(({ seat }) => seat)).toEqual(demo.site.seats.map(({ id }) => id))
      }
    }
  })
})
