import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { explainSeat } from '#app/domain/comfort/explain.ts'
import { seatWarmth, windNames, type WarmthInput } from '#app/domain/comfort/seat-warmth.ts'
import type { SeatFigure } from '#app/domain/comfort/uncertainty.ts'
import { figureOf } from '#app/domain/comfort/uncertainty.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { brief, heater, model, modelsOf, seat, site } from '#tests/domain/comfort/terrace.ts'

const figures: SeatFigure[] = [
  { quantity: 'body' },
  { quantity: 'head' },
  ...windNames.map((wind): SeatFigure => ({ quantity: 'feels-like', wind })),
]

const input = (change: Partial<WarmthInput> = {}): WarmthInput => ({
  site: site([seat('S1', { x: 0.4, y: 0.2, facingDeg: 30 }), seat('S2')]),
  brief: brief(),
  layout: { heaters: [heater('H1', { x: -0.5 }), heater('H2', { x: 1, y: 0.6, tiltDeg: 20, turnDeg: 70 })] },
  models: modelsOf(model({ elementCount: 2 })),
  ...change,
})

const explained = (given: WarmthInput, figure: SeatFigure) => {
  const explanation = explainSeat(given, 'S1', figure, plainHouseRules)
  if (!explanation) throw new Error('no such seat')
  return explanation
}
const sum = (values: readonly { value: number }[]) => values.reduce((total, { value }) => total + value, 0)
const shown = (given: WarmthInput, figure: SeatFigure) => figureOf(seatWarmth(given)[0]!, figure)!

describe.each(figures)('a figure explained: $quantity $wind', (figure) => {
  it('is the figure of the table, and its parts make it', () => {
    const explanation = explained(input(), figure)
    expect(explanation.value).toBe(shown(input(), figure))
    expect(explanation.parts).toHaveLength(4)
    expect(explanation.base + sum(explanation.parts)).toBeCloseTo(explanation.value!, 9)
    expect(explanation.base + sum(explanation.byHeater)).toBeCloseTo(explanation.value!, 9)
    expect(explanation.parts.reduce((total, { share }) => total + share, 0)).toBeCloseTo(1, 9)
    expect(explanation.byHeater.map(({ heaterId }) => heaterId)).toEqual(['H1', 'H2'])
    for (const part of explanation.parts) expect(part.value).toBeGreaterThan(0)
  })

  it('says formula, source, inputs and tolerance', () => {
    const { formula, source, notModelled, inputs, tolerance, unit } = explained(input(), figure)
    for (const text of [formula, source, notModelled]) expect(text.length).toBeGreaterThan(20)
    expect(unit).toBe(figure.quantity === 'feels-like' ? '°C' : 'W/m²')
    expect(inputs.length).toBeGreaterThan(10)
    for (const each of inputs) {
      expect(Number.isFinite(each.value)).toBe(true)
      expect(each.source).not.toBe('')
    }
    expect(tolerance!.total).toBeGreaterThan(0)
  })

  const changes: [string, Partial<WarmthInput>][] = [
    ['a heater’s place', { layout: { heaters: [heater('H1', { x: -0.6 }), input().layout.heaters[1]!] } }],
    [
      'its supply',
      { layout: { heaters: [heater('H1', { x: -0.5, supplyVoltage: 220 }), input().layout.heaters[1]!] } },
    ],
    ['the radiant efficiency', { models: modelsOf(model({ elementCount: 2, radiantEfficiency: 0.55 })) }],
    [
      'the beam',
      {
        models: modelsOf(
          model({
            elementCount: 2,
            beam: { kind: 'angles', acrossFullAngleDeg: 80, alongFullAngleDeg: 90, source: '' },
          }),
        ),
      },
    ],
    ['the seat’s place', { site: site([seat('S1', { x: 0.5, y: 0.2, facingDeg: 30 })]) }],
    ['its heights', { site: site([seat('S1', { x: 0.4, y: 0.2, facingDeg: 30, bodyHeight: 0.65, headHeight: 1.2 })]) }],
  ]
  it.each(changes)('changes figure and parts together with %s', (_, change) => {
    const [before, after] = [explained(input(), figure), explained(input(change), figure)]
    expect(after.value).not.toBe(before.value)
    expect(sum(after.parts)).not.toBe(sum(before.parts))
    expect(after.value).toBe(shown(input(change), figure))
    expect(after.base + sum(after.parts)).toBeCloseTo(after.value!, 9)
    expect(JSON.stringify(after.parts)).not.toBe(JSON.stringify(before.parts))
  })
})

describe('feels-like explained', () => {
  const figure: SeatFigure = { quantity: 'feels-like', wind: 'design' }
  it.each([
    ['the air', { airTemperature: 4 }],
    ['the wind', { windDesign: 1.5 }],
    ['the clothing', { clothing: 1 }],
    ['the sky', { surroundingsTemperature: -8 }],
  ])('changes with %s, and its inputs show it', (_, change) => {
    const [before, after] = [explained(input(), figure), explained(input({ brief: brief(change) }), figure)]
    expect(after.value).not.toBe(before.value)
    expect(after.base + sum(after.parts)).toBeCloseTo(after.value!, 9)
    expect(JSON.stringify(after.inputs)).not.toBe(JSON.stringify(before.inputs))
  })

  it('marks what nobody has confirmed', () => {
    const { inputs } = explained(input({ brief: brief({ assumed: ['clothing'] }) }), figure)
    const assumed = inputs.filter((each) => each.assumed).map(({ name }) => name)
    expect(assumed).toEqual(['clothing', 'surroundings'])
    const given = explained(input({ brief: brief({ surroundingsTemperature: 3 }) }), figure)
    expect(given.inputs.some((each) => each.assumed)).toBe(false)
  })
})

describe('what it would take to feel like indoors', () => {
  it('is said of a feels-like temperature at its own wind, and of nothing else', () => {
    const cold = input({ brief: brief({ airTemperature: -5, windDesign: 2 }) })
    expect(explained(cold, { quantity: 'feels-like', wind: 'design' }).indoors).toContain('indoors at 2.0 m/s of wind')
    expect(explained(cold, { quantity: 'body' }).indoors).toBeNull()
  })
})

describe('what cannot be explained', () => {
  it('has no seat, no heater or no beam data', () => {
    expect(explainSeat(input(), 'nobody', { quantity: 'body' }, plainHouseRules)).toBeNull()
    const bare = explained(input({ layout: { heaters: [] } }), { quantity: 'body' })
    expect(bare).toMatchObject({ value: null, base: 0, parts: [], byHeater: [], tolerance: null })
    const models: ReadonlyMap<string, HeaterModel> = modelsOf(model({ beam: null }))
    expect(explained(input({ models }), { quantity: 'head' })).toMatchObject({ value: null, cannotTell: ['H1', 'H2'] })
  })

  it('gives shares of 0 where the heaters give nothing', () => {
    const dark = explained(input({ layout: { heaters: [heater('H1', { lowestPoint: 0.1 })] } }), { quantity: 'body' })
    expect(dark.value).toBe(0)
    expect(dark.parts.map(({ share }) => share)).toEqual([0, 0])
  })
})
