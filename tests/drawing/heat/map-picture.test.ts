import { describe, expect, it } from 'vitest'
import { feelsLike, type Conditions } from '#app/domain/comfort/feels-like.ts'
import { fieldBeforeAbsorption } from '#app/domain/comfort/radiant-field.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import type { MapQuantity, MapQuestion } from '#app/domain/flux/map-question.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { answerMap, emptyMapCache, type MapAnswer } from '#app/drawing/heat/map-picture.ts'
import { cosine, line } from '#tests/support/emitters.ts'

const heater = (id: string, x: number, tiltDeg = 0) => ({
  ...line(cosine(2.1, 1.5), { at: [x, 1.5, 2.3], length: 0.7, tiltDeg, power: 1600 }),
  id,
})
const emitters = [heater('a', 1), heater('b', 2.2, 20), heater('c', 3.9)]
const conditions: Conditions = {
  airTemperature: 10,
  surroundingsTemperature: 6,
  wind: 0.8,
  clothing: 1.3,
  posture: 'seated',
}
const ask = (quantity: MapQuantity, more: Partial<MapQuestion> = {}): MapQuestion => ({
  emitters,
  floor: [
    [0, 0],
    [5, 0],
    [5, 3],
    [1, 3],
    [1, 1],
    [0, 1],
  ],
  z: 0.6,
  cell: 0.1,
  quantity,
  levels: [],
  ...more,
})
const placeOf = ({ grid }: MapAnswer, at: number): Vec3 => [
  grid.x0 + ((at % grid.columns) + 0.5) * grid.cell,
  grid.y0 + (Math.floor(at / grid.columns) + 0.5) * grid.cell,
  grid.z,
]
const exactParts = (point: Vec3) => emitters.map((each) => irradianceAt(each, point, [0, 0, 1]))
const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0)

/** Calls `check` for every cell on the floor; every other one must not be a number. */
function eachInside(answer: MapAnswer, check: (value: number, point: Vec3) => void) {
  let outside = 0
  answer.values.forEach((value, at) => {
    if (answer.grid.inside[at] === 1) check(value, placeOf(answer, at))
    else outside += Number.isNaN(value) ? 1 : -Infinity
  })
  expect(outside * 0.01).toBeCloseTo(2, 6)
}

describe('what a map shows', () => {
  it('flux: the sum of all heaters', () => {
    const answer = answerMap(ask({ kind: 'flux' }), emptyMapCache())
    eachInside(answer, (value, point) => expect(Math.abs(value - sum(exactParts(point)))).toBeLessThan(0.3))
    expect(answer.peak).toBe(answer.values.reduce((most, value) => (value > most ? value : most), 0))
    expect(answer.errorBound).toBe(0)
  })

  it('share: one heater alone', () => {
    const answer = answerMap(ask({ kind: 'share', emitterId: 'b' }), emptyMapCache())
    eachInside(answer, (value, point) => expect(Math.abs(value - exactParts(point)[1]!)).toBeLessThan(0.3))
  })

  it('share of a heater that is not there is nothing', () => {
    const answer = answerMap(ask({ kind: 'share', emitterId: 'z' }), emptyMapCache())
    eachInside(answer, (value) => expect(value).toBe(0))
  })

  it('overlap: how many heaters each alone give the threshold', () => {
    const answer = answerMap(ask({ kind: 'overlap', threshold: 80 }), emptyMapCache())
    const seen = new Set<number>()
    eachInside(answer, (value, point) => {
      const parts = exactParts(point)
      seen.add(value)
      if (parts.some((part) => Math.abs(part - 80) < 0.3)) return
      expect(value).toBe(parts.filter((part) => part >= 80).length)
    })
    expect([...seen].sort()).toEqual([0, 1, 2])
  })

  it.each(['seated', 'standing'] as const)('feels-like: the mean over all facings, %s', (posture) => {
    const given = { ...conditions, posture, absorptance: [0.7, 0.95, 0.8] }
    const answer = answerMap(ask({ kind: 'feels-like', conditions: given }, { cell: 0.5 }), emptyMapCache())
    answer.values.forEach((value, at) => {
      if (answer.grid.inside[at] !== 1) return
      const point = placeOf(answer, at)
      const field = sum(
        emitters.map((emitter, i) => {
          const facings = Array.from({ length: 72 }, (_, k) => (k * Math.PI) / 36)
          const mean = sum(facings.map((facing) => fieldBeforeAbsorption(emitter, { point, posture, facing }))) / 72
          return mean * given.absorptance[i]!
        }),
      )
      // Four nodes there against as many as the height asks for here: 0.3 % of the rise.
      const expected = feelsLike(field, { ...conditions, posture })
      expect(Math.abs(value - expected)).toBeLessThan(
        0.005 * (expected - feelsLike(0, { ...conditions, posture })) + 0.01,
      )
    })
  })

  it('isolines and fill lie at the question’s levels', () => {
    const { picture, peak } = answerMap(
      ask({ kind: 'flux' }, { levels: [50, 100, 5000], edges: [0, 100, 200] }),
      emptyMapCache(),
    )
    expect(picture.lines.map(({ level }) => level)).toEqual([50, 100])
    expect(picture.bands.map(({ from }) => from)).toEqual(peak! > 200 ? [0, 100, 200] : [0, 100])
  })

  it('shade is taken into account when it is asked for', () => {
    const roof = {
      id: 'roof',
      heaterId: null,
      transmittance: 0,
      solids: [
        {
          kind: 'cylinder' as const,
          centre: [2.2, 1.5] as const,
          radius: 20,
          low: [-20, -20, 1.5] as const,
          high: [20, 20, 1.6] as const,
        },
      ],
    }
    for (const quantity of [
      { kind: 'flux' },
      { kind: 'feels-like', conditions: { ...conditions, absorptance: [1, 1, 1] } },
    ] as const) {
      const answer = answerMap(ask(quantity, { obstructions: [roof] }), emptyMapCache())
      const nothing = quantity.kind === 'flux' ? 0 : feelsLike(0, conditions)
      eachInside(answer, (value) => expect(value).toBeCloseTo(nothing, 3))
    }
  })

  it('no heaters: 0 everywhere, not NaN', () => {
    const answer = answerMap(ask({ kind: 'flux' }, { emitters: [] }), emptyMapCache())
    eachInside(answer, (value) => expect(value).toBe(0))
    expect(answer.peak).toBe(0)
  })
})

describe('what has no meaning is refused with the limit', () => {
  const given = { ...conditions, absorptance: [1, 1, 1] }
  const quantities: readonly MapQuantity[] = [
    { kind: 'flux' },
    { kind: 'share', emitterId: 'b' },
    { kind: 'overlap', threshold: 80 },
    { kind: 'feels-like', conditions: given },
  ]
  const [a, b, c] = [emitters[0]!, emitters[1]!, emitters[2]!]
  const refused = (quantity: MapQuantity, limit: string, more: Partial<MapQuestion> = {}) => {
    const cache = emptyMapCache()
    const ask = () => answerMap({ ...question, ...more, quantity }, cache)
    expect(ask).toThrow(RangeError)
    expect(ask).toThrow(limit)
    expect(cache).toEqual(emptyMapCache())
  }
  const question = ask({ kind: 'flux' })

  it.each(quantities)('$kind: heaters without meaning or without end, before anything is computed', (quantity) => {
    const broken = { ...b, elements: [{ ...b.elements[0]!, radiantPower: NaN }] }
    refused(quantity, 'figures of heater b are not finite', { emitters: [a, broken, c] })
    refused(quantity, 'at most 200', { emitters: Array.from({ length: 10_000 }, () => a) })
    const beam = { kind: 'cosine' as const, across: NaN, along: 1 }
    refused(quantity, 'from 0 to 50', { emitters: [a, b, { ...c, beam }] })
  })

  it.each([
    [{ airTemperature: NaN }, 'temperature must be finite'],
    [{ surroundingsTemperature: -Infinity }, 'temperature must be finite'],
    [{ wind: NaN }, '0 or more'],
    [{ wind: -1 }, '0 or more'],
    [{ clothing: -0.1 }, '0 or more'],
    [{ clothing: Infinity }, '0 or more'],
    [{ absorptance: [1, NaN, 1] }, 'from 0 to 1'],
    [{ absorptance: [1, 1.1, 1] }, 'from 0 to 1'],
    [{ absorptance: [1, 1] }, 'from 0 to 1'],
  ])('feels-like: %o', (change, limit) => {
    refused({ kind: 'feels-like', conditions: { ...given, ...change } }, limit)
  })

  it('overlap: a threshold that is not finite', () => refused({ kind: 'overlap', threshold: NaN }, 'threshold'))
})

describe('between questions', () => {
  it('the cache keeps what has not changed, whichever quantity is asked', () => {
    const cache = emptyMapCache()
    answerMap(ask({ kind: 'flux' }), cache)
    expect(cache.map!.computed).toBe(3)
    answerMap(structuredClone(ask({ kind: 'overlap', threshold: 80 })), cache)
    expect(cache.map!.computed).toBe(0)
    const moved = [emitters[0]!, heater('b', 2.3, 20), emitters[2]!]
    const answer = answerMap(structuredClone(ask({ kind: 'flux' }, { emitters: moved })), cache)
    expect(cache.map!.computed).toBe(1)
    const anew = answerMap(ask({ kind: 'flux' }, { emitters: moved }), emptyMapCache())
    expect(answer.values).toEqual(anew.values)
  })

  it('feels-like keeps the field of a heater while wind, air and clothing change', () => {
    const cache = emptyMapCache()
    const at = (wind: number) =>
      ask({ kind: 'feels-like', conditions: { ...conditions, wind, absorptance: [1, 1, 1] } })
    const calm = answerMap(at(0.2), cache)
    const layers = cache.field!.layers
    const gust = answerMap(structuredClone(at(3)), cache)
    expect(cache.field!.layers.every((layer, i) => layer === layers[i])).toBe(true)
    expect(gust.peak!).toBeLessThan(calm.peak!)
  })

  it('a refused question leaves the cache usable', () => {
    const cache = emptyMapCache()
    const first = answerMap(ask({ kind: 'flux' }), cache)
    const refused = ask({ kind: 'flux' }, { cell: -1 })
    for (let turn = 0; turn < 2; turn++) expect(() => answerMap(refused, cache)).toThrow(RangeError)
    expect(answerMap(ask({ kind: 'flux' }), cache).values).toEqual(first.values)
  })
})
