import { describe, expect, it } from 'vitest'
import { seatWarmth, windNames, type WindName } from '#app/domain/comfort/seat-warmth.ts'
import { obstructionsOf } from '#app/domain/flux/shading.ts'
import type { Cover } from '#app/domain/site/site.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { answerMap, emptyMapCache, type MapAnswer } from '#app/drawing/heat/map-picture.ts'
import { farHeatersNote, mapNotes } from '#app/editor/map-notes.ts'
import { emittersOf, mapQuestion, scaleOf, type MapSubject } from '#app/editor/map-questions.ts'
import { mapValueAt } from '#app/editor/read-out.tsx'
import { hasEfficiencyRange, offeredView, plainView, type ViewChoice } from '#app/editor/view-choice.ts'
import { brief, heater, model, modelsOf, seat, site } from '#tests/domain/comfort/terrace.ts'

const coverOf = (id: string, corners: Vec3[]): Cover => ({
  ...{ id, name: id, material: 'non-combustible', opening: false, swing: 0, voidDepth: null, note: null },
  corners: corners.map(([x, y, z]): [number, number, number] => [x, y, z]),
})
/** A level cover over the front half, and a low one, under whose height a body stands out, in the far corner. */
const covers = [
  coverOf('front', [
    [-5, -5, 3],
    [5, -5, 3],
    [5, 0, 3],
    [-5, 0, 3],
  ]),
  coverOf('low', [
    [3, 3, 0.5],
    [5, 3, 0.5],
    [5, 5, 0.5],
    [3, 5, 0.5],
  ]),
]
const heaters = [heater('H1', { x: -0.6, y: 0.4, turnDeg: 30 }), heater('H2', { x: 1.2, y: -0.8, tiltDeg: 25 })]
const cold = brief({ surroundingsTemperature: -8 })
const subjectOf = (choice: Partial<ViewChoice>, change: Partial<MapSubject> = {}): MapSubject => ({
  site: site([], { covers }),
  brief: cold,
  layout: { title: 'As drawn', heaters },
  models: modelsOf(model()),
  choice: { ...plainView, ...choice },
  ...change,
})
const questionOf = (subject: MapSubject) =>
  mapQuestion(subject, scaleOf(subject.choice, subject.brief, 'metric'), 'sharp')!
const answerOf = (subject: MapSubject) => answerMap({ ...questionOf(subject), levels: [], edges: [] }, emptyMapCache())

/** Centre of the cell at a place: where the cell's value is to be right. */
function centreAt({ grid }: MapAnswer, x: number, y: number) {
  const at = (from: number, value: number) => from + (Math.floor((value - from) / grid.cell) + 0.5) * grid.cell
  return { x: at(grid.x0, x), y: at(grid.y0, y) }
}

/** What a seat at a place feels like before and after, °C, the mean over all facings: the map does not know which. */
function meanSeat(subject: MapSubject, place: { x: number; y: number }, wind: WindName, isShaded: boolean) {
  const facings = Array.from({ length: 72 }, (_, k) => k * 5)
  const seats = facings.map((facingDeg) => seat(`S${facingDeg}`, { ...place, facingDeg }))
  const { layout, models } = subject
  const there = { ...subject.site, seats }
  const obstructions = isShaded ? { obstructions: obstructionsOf(there, layout, models) } : {}
  const warmth = seatWarmth({ site: there, brief: subject.brief, layout, models, ...obstructions })
  const mean = (of: (each: (typeof warmth)[number]) => number) => warmth.reduce((sum, each) => sum + of(each), 0) / 72
  return {
    before: mean(({ feelsLike }) => feelsLike[wind].before),
    after: mean(({ feelsLike }) => feelsLike[wind].after!),
    underCover: warmth[0]!.surroundings.underCover,
  }
}

describe('the feels-like map', () => {
  const places = [
    { where: 'under the cover', x: 0.4, y: -1.2, underCover: true },
    { where: 'under the cover, at its edge', x: 0.4, y: -0.08, underCover: true },
    { where: 'beside the cover, at its edge', x: 0.4, y: 0.08, underCover: false },
    { where: 'under open sky', x: -1, y: 1.4, underCover: false },
    { where: 'over a cover that is lower than the body', x: 4, y: 4, underCover: false },
  ]
  const cases = places.flatMap((place) => windNames.map((wind) => ({ ...place, wind })))

  it.each(cases)('equals the seat $where, $wind', ({ x, y, wind, underCover }) => {
    for (const shade of [false, true]) {
      const subject = subjectOf({ map: { kind: 'feels-like', wind }, shade })
      const answer = answerOf(subject)
      const place = centreAt(answer, x, y)
      const expected = meanSeat(subject, place, wind, shade)
      expect(expected.underCover).toBe(underCover)
      const value = mapValueAt(answer, [place.x, place.y])!
      expect(Math.abs(value - expected.after)).toBeLessThan(0.005 * (expected.after - expected.before) + 0.01)
    }
  })

  it('follows the covers and the height between questions', () => {
    const cache = emptyMapCache()
    const ask = (change: Partial<MapSubject>, height = 0.6) => {
      const choice = { map: { kind: 'feels-like', wind: 'calm' }, plane: { kind: 'height', height } } as const
      const answer = answerMap({ ...questionOf(subjectOf(choice, change)), levels: [], edges: [] }, cache)
      return mapValueAt(answer, [-4.5, -4.5])!
    }
    const under = ask({})
    expect(structuredClone(cache.covered!.cells).some((is) => is === 1)).toBe(true)
    const kept = cache.covered
    ask({ brief: brief({ surroundingsTemperature: -8, windDesign: 2 }) })
    expect(cache.covered).toBe(kept)
    expect(ask({ site: site([], { covers: [] }) })).toBeLessThan(under - 1)
    expect(ask({ site: site([], { covers }) })).toBe(under)
    const above = ask({}, 3.2)
    expect(above).toBeLessThan(under - 1)
  })
})

describe('radiant efficiency with a range', () => {
  const ranged = modelsOf(model({ radiantEfficiencyRange: { low: 0.4, high: 0.6 } }))
  const layout = { title: 'As drawn', heaters }
  const flux = (efficiency: ViewChoice['efficiency'], models = ranged) =>
    answerOf(subjectOf({ efficiency }, { models }))

  it('the map goes with the chosen figure, nominal unless another one is chosen', () => {
    const [low, nominal, high] = [flux('low'), flux('nominal'), flux('high')]
    expect(nominal.peak!).toBeGreaterThan(100)
    expect(answerOf(subjectOf({}, { models: ranged })).values).toEqual(nominal.values)
    // 0.4, 0.5 and 0.6 of the electrical power
    low.values.forEach((value, at) => expect(value).toBeCloseTo(0.8 * nominal.values[at]!, 3))
    high.values.forEach((value, at) => expect(value).toBeCloseTo(1.2 * nominal.values[at]!, 3))
    const asked = emittersOf(layout, ranged, 'low')
    expect(emittersOf(layout, ranged, 'low')[0]).toBe(asked[0])
    expect(emittersOf(layout, ranged)[0]).not.toBe(asked[0])
  })

  it('every kind of map takes it', () => {
    const maps: ViewChoice['map'][] = [
      { kind: 'share', heaterId: 'H1' },
      { kind: 'feels-like', wind: 'design' },
    ]
    for (const map of maps) {
      const peak = (efficiency: ViewChoice['efficiency']) =>
        answerOf(subjectOf({ map, efficiency }, { models: ranged })).peak!
      expect(peak('low')).toBeLessThan(peak('nominal'))
      expect(peak('nominal')).toBeLessThan(peak('high'))
    }
  })

  it('a model without a range stays as it is', () =>
    expect(flux('low', modelsOf(model())).peak).toBe(flux('nominal').peak))

  it('is offered only where a heater of the layout has a range; a choice does not outlive it', () => {
    const low: ViewChoice = { ...plainView, efficiency: 'low' }
    const other = model({ code: 'other', radiantEfficiencyRange: { low: 0.4, high: 0.6 } })
    expect(hasEfficiencyRange(layout, ranged)).toBe(true)
    expect(offeredView(low, layout, ranged)).toBe(low)
    for (const models of [modelsOf(model()), modelsOf(model(), other), modelsOf()]) {
      expect(hasEfficiencyRange(layout, models)).toBe(false)
      expect(offeredView(low, layout, models)).toEqual(plainView)
    }
    expect(hasEfficiencyRange({ ...layout, heaters: [] }, ranged)).toBe(false)
    expect(plainView.efficiency).toBe('nominal')
  })

  it('is said in the name of the scale and beside it', () => {
    for (const map of [plainView.map, { kind: 'feels-like', wind: 'calm' } as const]) {
      const named = (efficiency: ViewChoice['efficiency']) =>
        scaleOf({ ...plainView, map, efficiency }, cold, 'metric').name
      expect(named('low')).toBe(`${named('nominal')} with low radiant efficiency`)
      expect(named('high')).toBe(`${named('nominal')} with high radiant efficiency`)
      expect(named('nominal')).not.toContain('efficiency')
    }
    expect(mapNotes({ ...plainView, efficiency: 'high' }, null)).toEqual([
      'Heat with high radiant efficiency; seat figures stay nominal.',
    ])
  })
})

describe('far heaters that a map leaves out', () => {
  const noted = (errorBound: number, fluxUnit: ViewChoice['fluxUnit'] = 'W/m²') =>
    mapNotes({ ...plainView, fluxUnit }, { errorBound })

  it('are spoken of with what may be missing, rounded up', () => {
    expect(noted(8.2)).toEqual(['Far heaters left out: at most 9 W/m² missing at any place.'])
    expect(noted(9)).toEqual(['Far heaters left out: at most 9 W/m² missing at any place.'])
    expect(noted(0.01)).toEqual(['Far heaters left out: at most 1 W/m² missing at any place.'])
    // 9 W/m² are 0.836 W/ft²
    expect(noted(9, 'W/ft²')).toEqual(['Far heaters left out: at most 0.9 W/ft² missing at any place.'])
  })

  it('of maps beside each other, the most of them', () => {
    const [less, more, none] = [{ errorBound: 2 }, { errorBound: 7.5 }, { errorBound: 0 }]
    expect(farHeatersNote([less, null, more, none], 'W/m²')).toContain('at most 8 W/m²')
    expect(farHeatersNote([null, none], 'W/m²')).toBeNull()
  })

  it('are not spoken of where none are', () => {
    expect(noted(0)).toEqual([])
    expect(mapNotes(plainView, null)).toEqual([])
  })

  it('on a site of 100 × 60 m with 200 heaters', () => {
    const rows = Array.from({ length: 200 }, (_, i) =>
      heater(`H${i}`, { x: (i % 20) * 5 - 47, y: Math.floor(i / 20) * 6 - 27 }),
    )
    const floor: [number, number][] = [
      [-50, -30],
      [50, -30],
      [50, 30],
      [-50, 30],
    ]
    const subject = subjectOf({}, { site: site([], { floor }), layout: { title: 'Large', heaters: rows } })
    const answer = answerOf(subject)
    expect(answer.errorBound).toBeGreaterThan(0)
    expect(mapNotes(plainView, answer)).toEqual([expect.stringMatching(/^Far heaters left out: at most \d+ W\/m²/)])
  })
})
