import { describe, expect, it } from 'vitest'
import { beamOf } from '#app/domain/flux/beam.ts'
import { emitterOf, type Emitter } from '#app/domain/flux/emitter.ts'
import { gridOf, type Grid } from '#app/domain/flux/grid.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { irradianceMap } from '#app/domain/flux/map.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { demoModels } from '#drizzle/seed/demo-sites.ts'
import { cosine, line } from '#tests/support/emitters.ts'

const floor: Vec2[] = [
  [0, 0],
  [6, 0],
  [6, 5],
  [0, 5],
]

/** The greatest difference between a map and the closed form, as a share of the closed form's peak on the map. */
function errorOf(grid: Grid, emitters: readonly Emitter[]): number {
  const { total } = irradianceMap(null, grid, emitters)
  let [peak, worst] = [0, 0]
  total.forEach((value, at) => {
    const x = grid.x0 + ((at % grid.columns) + 0.5) * grid.cell
    const y = grid.y0 + (Math.floor(at / grid.columns) + 0.5) * grid.cell
    const exact = emitters.reduce((sum, each) => sum + irradianceAt(each, [x, y, grid.z], [0, 0, 1]), 0)
    peak = Math.max(peak, exact)
    worst = Math.max(worst, Math.abs(value - exact))
  })
  return worst / peak
}

const models = demoModels().filter((model) => model.beam !== null)
const hung = (model: string, lowestPoint: number, turnDeg: number, tiltDeg: number): MountedHeater => ({
  id: 'h',
  model,
  supplyVoltage: 230,
  x: 2.9,
  y: 2.4,
  lowestPoint,
  turnDeg,
  tiltDeg,
  mount: 'chain',
  memberId: null,
})

describe('the map against the closed form: 0.1 % of the peak', () => {
  it('there are demo models to check', () => expect(models.length).toBeGreaterThanOrEqual(10))

  it.each(models.map((model) => [model.code, model] as const))('%s at every height its manual allows', (_, model) => {
    const { min, recommendedMax } = model.mountingHeight
    const heights = [min ?? 2, ((min ?? 2) + (recommendedMax ?? 4)) / 2, recommendedMax ?? 4, 6]
    const tilts = [0, (model.tiltDeg?.max ?? 0) / 2, model.tiltDeg?.max ?? 0]
    for (const height of heights) {
      for (const tilt of tilts) {
        for (const turn of [0, 90, 37]) {
          const emitter = emitterOf(hung(model.code, height, turn, tilt), model)!
          // Floor, body and head planes, the last ones of a standing person.
          for (const z of [0, 0.6, 1.1, 1.7]) {
            expect(errorOf(gridOf(floor, z, 0.4), [emitter]), `${height} m, ${tilt}°, ${turn}°, z ${z}`).toBeLessThan(
              1e-3,
            )
          }
        }
      }
    }
  })

  it.each([0.02, 0.05, 0.1, 0.3, 0.6])('also %d m beneath an element, where only the closed form serves', (gap) => {
    const emitter = line(cosine(2.2, 1.4), { at: [2.9, 2.4, 2], length: 0.6, turnDeg: 25 })
    expect(errorOf(gridOf(floor, 2 - gap, 0.1), [emitter])).toBeLessThan(1e-3)
    expect(errorOf(gridOf(floor, 2 - gap, 0.1), [line(cosine(2.2, 1.4), { at: [2.9, 2.4, 2] })])).toBeLessThan(1e-3)
  })

  it.each([
    ['of small exponents', cosine(0, 0.3)],
    ['of great exponents', cosine(40, 25)],
    ['of unequal exponents', cosine(0.5, 12)],
    [
      'tabulated and lopsided',
      beamOf({
        kind: 'table',
        acrossDeg: [-90, -40, 0, 30, 90],
        alongDeg: [-90, -20, 10, 60, 90],
        intensity: [
          [0, 0.1, 0.2, 0, 0],
          [0, 0.6, 1, 0.3, 0],
          [0, 1, 2, 0.5, 0],
          [0, 0.4, 1.5, 0.9, 0],
          [0, 0, 0.1, 0.2, 0],
        ],
        source: 'test',
      }),
    ],
  ])('beams %s', (_, beam) => {
    for (const [turnDeg, tiltDeg] of [
      [0, 0],
      [90, 30],
      [-58, -45],
      [180, 10],
    ] as const) {
      const emitter = line(beam, { at: [2.9, 2.4, 2.4], length: 0.7, turnDeg, tiltDeg })
      expect(errorOf(gridOf(floor, 0.6, 0.2), [emitter])).toBeLessThan(1e-3)
    }
  })

  it('elements out of level and very short ones', () => {
    const slanted = line(cosine(2, 1.5), { at: [3, 2.5, 2.4] })
    const [c, s] = [Math.cos(0.2), Math.sin(0.2)]
    const frame = { u: [c, 0, s], v: [0, -1, 0], w: [s, 0, -c] } as const
    expect(errorOf(gridOf(floor, 0.6, 0.2), [{ ...slanted, frame }])).toBeLessThan(1e-6)
    expect(errorOf(gridOf(floor, 0.6, 0.2), [line(cosine(2, 1.5), { at: [3, 2.5, 2.4], length: 0.01 })])).toBeLessThan(
      1e-6,
    )
  })
})

describe('layers', () => {
  const grid = gridOf(floor, 0.6, 0.25)
  const heaters = [1, 3, 5].map((x) => ({ ...line(cosine(2, 1.3), { at: [x, 2.5, 2.4] }), id: `h${x}` }))

  it('only changed emitters are computed again, and the sum is that of a new map', () => {
    const first = irradianceMap(null, grid, heaters)
    expect(first.computed).toBe(3)
    const moved = heaters.map((each, i) =>
      i === 1 ? { ...line(cosine(2, 1.3), { at: [3.2, 2, 2.3] }), id: each.id } : each,
    )
    const second = irradianceMap(first, gridOf(floor, 0.6, 0.25), structuredClone(moved))
    expect(second.computed).toBe(1)
    const anew = irradianceMap(null, grid, moved)
    second.total.forEach((value, at) => expect(value).toBeCloseTo(anew.total[at]!, 9))
    expect(irradianceMap(second, grid, moved).computed).toBe(0)
  })

  it('follows heaters that come, go and change places', () => {
    let map = irradianceMap(null, grid, heaters)
    for (const now of [heaters.slice(1), [...heaters].reverse(), [], heaters, [heaters[0]!, heaters[0]!]]) {
      map = irradianceMap(map, grid, now)
      const anew = irradianceMap(null, grid, now)
      map.total.forEach((value, at) => expect(value).toBeCloseTo(anew.total[at]!, 9))
    }
  })

  it('another plane or floor starts anew', () => {
    const map = irradianceMap(null, grid, heaters)
    expect(irradianceMap(map, gridOf(floor, 1.1, 0.25), heaters).computed).toBe(3)
  })

  it('no drift: a thousand moves of one heater leave the sum of a new map', () => {
    let map = irradianceMap(null, grid, heaters)
    for (let i = 0; i < 1000; i++) {
      const there = { ...line(cosine(2, 1.3), { at: [1 + (i % 40) / 10, 1 + (i % 7) / 3, 2.4] }), id: 'h1' }
      map = irradianceMap(map, grid, [there, ...heaters.slice(1)])
    }
    map = irradianceMap(map, grid, heaters)
    const anew = irradianceMap(null, grid, heaters)
    map.total.forEach((value, at) => expect(Math.abs(value - anew.total[at]!)).toBeLessThan(1e-9))
  })

  it('nothing reaches a plane above the heater', () => {
    expect(irradianceMap(null, gridOf(floor, 2.5, 0.25), heaters).total.every((value) => value === 0)).toBe(true)
  })
})

describe('what has no meaning', () => {
  const grid = gridOf(floor, 0.6, 0.5)
  const heater = line(cosine(2, 1), { at: [1, 1, 2] })

  it.each([
    ['at', 0.6],
    ['under', 0.5],
  ])('an element %s the plane adds nothing to what one over it gives, whichever way it is tilted', (_, height) => {
    const grid = gridOf(floor, 0.6, 0.2)
    const over = line(cosine(2, 1.4), { at: [3, 2, 2.4], length: 0.6 })
    for (const tiltDeg of [0, 120, 180]) {
      for (const turnDeg of [0, 90, 37]) {
        const low = { ...line(cosine(2, 1.4), { at: [2, 3, height], length: 0.6, tiltDeg, turnDeg }), id: 'low' }
        expect(irradianceMap(null, grid, [over, low]).total).toEqual(irradianceMap(null, grid, [over]).total)
      }
    }
  })

  it('more than 200 heaters are refused with the limit', () => {
    expect(() =>
      irradianceMap(
        null,
        grid,
        Array.from({ length: 10_000 }, () => heater),
      ),
    ).toThrow('at most 200')
  })

  it.each([
    { ...heater, elements: [{ ...heater.elements[0]!, radiantPower: NaN }] },
    { ...heater, elements: [{ ...heater.elements[0]!, length: Infinity }] },
    { ...heater, frame: { ...heater.frame, u: [NaN, 0, 0] as const } },
  ])('figures that are not finite are refused', (broken) => {
    expect(() => irradianceMap(null, grid, [broken])).toThrow(RangeError)
  })

  it('a heater without elements or without length gives no NaN', () => {
    const empty = { ...heater, elements: [] }
    const point = { ...heater, elements: [{ ...heater.elements[0]!, length: 0 }] }
    const { total } = irradianceMap(null, grid, [empty, point])
    expect(total.every((value) => Number.isFinite(value) && value > 0)).toBe(true)
  })

  it('throws where there is a document: the map is computed in a worker', () => {
    Reflect.set(globalThis, 'document', {})
    try {
      expect(() => irradianceMap(null, grid, [heater])).toThrow('the map is computed in a worker')
    } finally {
      Reflect.deleteProperty(globalThis, 'document')
    }
  })
})
