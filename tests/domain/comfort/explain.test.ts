import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { explainSeat, type ExplainInput } from '#app/domain/comfort/explain.ts'
import { seatWarmth, windNames } from '#app/domain/comfort/seat-warmth.ts'
import type { SeatFigure } from '#app/domain/comfort/uncertainty.ts'
import { cautionLimits } from '#app/domain/comfort/cautions.ts'
import { figureOf } from '#app/domain/comfort/uncertainty.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Obstacle } from '#app/domain/site/site.ts'
import { brief, heater, model, modelsOf, seat, site } from '#tests/domain/comfort/terrace.ts'

const figures: SeatFigure[] = [
  { quantity: 'body' },
  { quantity: 'body-largest' },
  { quantity: 'head' },
  { quantity: 'near-infrared' },
  ...windNames.map((wind): SeatFigure => ({ quantity: 'feels-like', wind })),
]

const laid = (...heaters: ExplainInput['layout']['heaters']) => ({ title: 'Test', heaters })
const input = (change: Partial<ExplainInput> = {}): ExplainInput => ({
  site: site([seat('S1', { x: 0.4, y: 0.2, facingDeg: 30 }), seat('S2')]),
  brief: brief(),
  layout: laid(heater('H1', { x: 0, y: 1.2 }), heater('H2', { x: 1, y: 0.6, tiltDeg: 20, turnDeg: 70 })),
  shade: 'none',
  models: modelsOf(model({ elementCount: 2 })),
  ...change,
})

const explained = (given: ExplainInput, figure: SeatFigure) => {
  const explanation = explainSeat(given, 'S1', figure, plainHouseRules)
  if (!explanation) throw new Error('no such seat')
  return explanation
}
const sum = (values: readonly { value: number }[]) => values.reduce((total, { value }) => total + value, 0)
const shown = (given: ExplainInput, figure: SeatFigure) => figureOf(seatWarmth(given)[0]!, figure)!

describe.each(figures)('a figure explained: $quantity $wind', (figure) => {
  it('is the figure of the table, and its parts make it', () => {
    const explanation = explained(input(), figure)
    expect(explanation.value).toBe(shown(input(), figure))
    expect(explanation.parts).toHaveLength(4)
    expect(explanation.base! + sum(explanation.parts)).toBeCloseTo(explanation.value!, 9)
    expect(explanation.base! + sum(explanation.byHeater)).toBeCloseTo(explanation.value!, 9)
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

  const changes: [string, Partial<ExplainInput>][] = [
    ['a heater’s place', { layout: laid(heater('H1', { x: -0.1, y: 1.2 }), input().layout.heaters[1]!) }],
    ['its supply', { layout: laid(heater('H1', { x: 0, y: 1.2, supplyVoltage: 220 }), input().layout.heaters[1]!) }],
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
    expect(after.base! + sum(after.parts)).toBeCloseTo(after.value!, 9)
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
    expect(after.base! + sum(after.parts)).toBeCloseTo(after.value!, 9)
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
    const bare = explained(input({ layout: laid() }), { quantity: 'body' })
    expect(bare).toMatchObject({ value: null, base: 0, parts: [], byHeater: [], tolerance: null })
    const models: ReadonlyMap<string, HeaterModel> = modelsOf(model({ beam: null }))
    expect(explained(input({ models }), { quantity: 'head' })).toMatchObject({ value: null, cannotTell: ['H1', 'H2'] })
  })

  it('gives shares of 0 where the heaters give nothing', () => {
    const dark = explained(input({ layout: laid(heater('H1', { lowestPoint: 0.1 })) }), { quantity: 'body' })
    expect(dark.value).toBe(0)
    expect(dark.parts.map(({ share }) => share)).toEqual([0, 0])
  })
})

const inputOf = (explanation: ReturnType<typeof explained>, name: string) =>
  explanation.inputs.find((each) => each.name === name)!.value

describe('head to body explained', () => {
  const figure: SeatFigure = { quantity: 'head-to-body' }
  it('is made by its inputs, no sum of parts', () => {
    const explanation = explained(input(), figure)
    expect(explanation).toMatchObject({ unit: 'none', base: null, parts: [], byHeater: [], whyNone: null })
    expect(explanation.value).toBe(shown(input(), figure))
    const [above, below] = ['horizontal irradiance at the head', 'irradiance on the body plane'].map((name) =>
      inputOf(explanation, name),
    )
    expect(above! / below!).toBeCloseTo(explanation.value!, 12)
    expect(below).toBe(shown(input(), { quantity: 'body' }))
    expect(inputOf(explanation, 'body height')).toBe(0.6)
    expect(inputOf(explanation, 'head height')).toBe(1.1)
    expect(explanation.tolerance!.total).toBeGreaterThan(0)
  })

  it('changes together with an input that only one of the two rests on', () => {
    const raised = input({ site: site([seat('S1', { x: 0.4, y: 0.2, headHeight: 1.3 })]) })
    const [before, after] = [explained(input(), figure), explained(raised, figure)]
    expect(after.value).toBeGreaterThan(before.value!)
    expect(inputOf(after, 'head height')).toBe(1.3)
    expect(inputOf(after, 'irradiance on the body plane')).toBe(inputOf(before, 'irradiance on the body plane'))
    expect(inputOf(after, 'horizontal irradiance at the head')).toBeGreaterThan(
      inputOf(before, 'horizontal irradiance at the head'),
    )
  })

  it('says why there is none', () => {
    const dark = explained(input({ layout: laid(heater('H1', { lowestPoint: 0.1 })) }), figure)
    expect(dark).toMatchObject({ value: null, tolerance: null })
    expect(dark.whyNone).toContain('Hardly any heat on the body plane')
  })
})

describe('sensation explained', () => {
  const at = (wind: 'calm' | 'design'): SeatFigure => ({ quantity: 'sensation', wind })
  const mild = (change: Parameters<typeof brief>[0] = {}) =>
    input({ brief: brief({ airTemperature: 16, windDesign: 0.9, ...change }) })

  it('has the vote and the word, made by inputs', () => {
    const explanation = explained(mild(), at('calm'))
    expect(explanation).toMatchObject({ unit: 'none', base: null, parts: [], whyNone: null })
    const { calm } = seatWarmth(mild())[0]!.sensation
    expect(explanation.value).toBe(calm.after!.vote)
    expect(explanation.value).not.toBeNull()
    expect(explanation.words).toEqual({ before: calm.before.word, after: calm.after!.word })
    expect(inputOf(explanation, 'feels like, calm')).toBe(shown(mild(), { quantity: 'feels-like', wind: 'calm' }))
    expect(explanation.source).toContain('ISO 7730')
    expect(explanation.source).toContain('from memory')
    expect(explanation.tolerance!.total).toBeGreaterThan(0)
  })

  it.each([
    ['activity', 'activity', { activity: 1.5 }],
    ['humidity', 'relative humidity', { relativeHumidity: 90 }],
    ['clothing', 'clothing', { clothing: 1.6 }],
    ['air', 'feels like, calm', { airTemperature: 15 }],
  ])('changes with %s, and so does its input', (_, name, change) => {
    const [before, after] = [explained(mild(), at('calm')), explained(mild(change), at('calm'))]
    expect(after.value).not.toBe(before.value)
    expect(inputOf(after, name)).not.toBe(inputOf(before, name))
  })

  it('has a word and no vote outside the range of the vote', () => {
    for (const given of [mild({ windDesign: 1 }), mild({ airTemperature: -10 })]) {
      const explanation = explained(given, at('design'))
      expect(explanation).toMatchObject({ value: null, tolerance: null, whyNone: 'Outside the range of the vote.' })
      expect(explanation.words!.after).not.toBeNull()
    }
  })
})

describe('what cautions judge a figure by', () => {
  it('is the stop line at body and head, the caution at head and eye', () => {
    const { stop, head, eye } = cautionLimits(brief(), plainHouseRules)
    const of = (quantity: 'body' | 'body-largest' | 'head' | 'near-infrared') =>
      explained(input(), { quantity }).limits.map(({ name, value, fromMemory }) => ({ name, value, fromMemory }))
    const line = { name: 'stop line', value: 1580, fromMemory: true }
    expect(stop.value).toBe(1580)
    expect(of('body')).toEqual([])
    expect(of('body-largest')).toEqual([line])
    expect(of('head')).toEqual([{ name: 'caution', value: head.value, fromMemory: false }, line])
    expect(of('near-infrared')).toEqual([{ name: 'caution', value: eye.value, fromMemory: true }])
  })
})

describe('near infrared explained', () => {
  const figure: SeatFigure = { quantity: 'near-infrared' }
  it('grows with the element’s temperature, and its inputs show the share', () => {
    const hotter = input({ models: modelsOf(model({ elementCount: 2, elementTemperature: 1800 })) })
    const [before, after] = [explained(input(), figure), explained(hotter, figure)]
    expect(inputOf(after, 'H1 element temperature')).toBe(1800)
    const ratio = inputOf(after, 'H1 share of 0.78–3 µm') / inputOf(before, 'H1 share of 0.78–3 µm')
    expect(after.value! / before.value!).toBeCloseTo(ratio, 9)
    expect(ratio).toBeGreaterThan(1)
  })

  it('cannot be told of elements whose temperature is not known', () => {
    const unknown = input({ models: modelsOf(model({ elementTemperature: null })) })
    expect(explained(unknown, figure)).toMatchObject({
      value: null,
      parts: [],
      tolerance: null,
      whyNone: 'Cannot tell: no element temperature of H1, H2.',
    })
  })
})

describe('shade', () => {
  /** A slab from `from` m beside the middle of a heater overhead, 1.4 to 1.5 m high. */
  const slab = (from: number, change: Partial<Obstacle> = {}): Obstacle => ({
    id: 'B1',
    name: 'Awning',
    kind: 'other',
    material: 'combustible',
    movable: false,
    shape: { kind: 'box', x: [from, 3], y: [-1, 1], z: [1.4, 1.5] },
    transmittance: 0,
    note: null,
    ...change,
  })
  const under = (obstacle: Obstacle, shade: ExplainInput['shade'] = 'in-place') =>
    input({
      site: site([seat('S1')], { obstacles: [obstacle] }),
      layout: laid(heater('H1')),
      models: modelsOf(model()),
      shade,
    })

  // The element is 0.6 m long, its middle over the seat: the slab hides its one half, whatever the height.
  it.each([
    [0, 0.5],
    [0.3, 0.65],
  ])('that lets through %d of one half leaves %d of figure and heater', (transmittance, left) => {
    const open = explained(under(slab(0), 'none'), { quantity: 'body' })
    const shaded = explained(under(slab(0, { transmittance })), { quantity: 'body' })
    expect(open.seen).toBeNull()
    expect(shaded.seen).toEqual([
      { heaterId: 'H1', at: 'body', seen: expect.closeTo(left, 9), past: ['B1'], ofUnshaded: 1 },
    ])
    expect(shaded.value! / open.value!).toBeCloseTo(left, 9)
    expect(sum(shaded.parts)).toBeCloseTo(shaded.value!, 9)
    expect(inputOf(shaded, 'B1 lets through')).toBe(transmittance)
    expect(shaded.formula).toContain('With shade')
    expect(open.formula).not.toContain('With shade')
  })

  it('is told from each height that the figure is taken at', () => {
    // From 0.6 m a ray to s on the element, 2.45 m up, is at s · 0.9/1.85 where it leaves the slab's top: it meets the
    // slab from s = 0.2056. From 1.1 m it does so only from s = 0.1 · 1.35/0.4 = 0.34, past the element's end.
    const { seen } = explained(under(slab(0.1)), { quantity: 'head-to-body' })
    expect(seen).toEqual([
      {
        heaterId: 'H1',
        at: 'body',
        seen: expect.closeTo((0.3 + (0.1 * 1.85) / 0.9) / 0.6, 9),
        past: ['B1'],
        ofUnshaded: 1,
      },
      { heaterId: 'H1', at: 'head', seen: 1, past: [], ofUnshaded: 1 },
    ])
    expect(explained(under(slab(0.1)), { quantity: 'near-infrared' }).seen!.map(({ at }) => at)).toEqual(['head'])
  })

  it('goes by where movable things are', () => {
    const movable = slab(0, { movable: true })
    const seenWith = (shade: ExplainInput['shade']) => explained(under(movable, shade), { quantity: 'body' })
    expect(seenWith('in-place').seen![0]!.seen).toBeCloseTo(0.5, 9)
    expect(seenWith('away').seen).toEqual([{ heaterId: 'H1', at: 'body', seen: 1, past: [], ofUnshaded: 1 }])
    expect(seenWith('away').value).toBeCloseTo(seenWith('none').value!, 9)
    const words = (['none', 'in-place', 'away'] as const).map((shade) =>
      seenWith(shade).inputs.find(({ name }) => name === 'things that can shade')!,
    )
    // the heater's own body is one of them
    expect(words.map(({ value }) => value)).toEqual([0, 2, 1])
    for (const [i, word] of ['without shade', 'in place', 'away'].entries()) expect(words[i]!.source).toContain(word)
  })

  it('tells a heater that is hidden altogether, and its share of what would come', () => {
    const { layout } = input()
    const whole: Obstacle = slab(-3, { shape: { kind: 'box', x: [-3, 3], y: [-3, 3], z: [1.4, 1.5] } })
    const { seen, value } = explained({ ...under(whole), layout }, { quantity: 'body' })
    expect(value).toBe(0)
    expect(seen!.map(({ heaterId, seen: share }) => [heaterId, share])).toEqual([
      ['H1', 0],
      ['H2', 0],
    ])
    expect(seen!.reduce((total, { ofUnshaded }) => total + ofUnshaded, 0)).toBeCloseTo(1, 9)
    expect(seen!.every(({ past }) => past.includes('B1'))).toBe(true)
  })

  it.each(figures)('on, the parts of $quantity $wind make the figure', (figure) => {
    const { layout, models } = input()
    const given = { ...under(slab(0.05, { transmittance: 0.4 })), layout, models }
    const [open, shaded] = [explained({ ...given, shade: 'none' }, figure), explained(given, figure)]
    expect(shaded.value).not.toBe(open.value)
    expect(shaded.base! + sum(shaded.parts)).toBeCloseTo(shaded.value!, 9)
  })
})
