import { describe, expect, it } from 'vitest'
import { cautionLimits, cautionsAt, eyeLimit, headCaution, relaxedEyeLimit } from '#app/domain/comfort/cautions.ts'
import { seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { brief, heater, model, modelsOf, seat, site } from '#tests/domain/comfort/terrace.ts'

const warmth = (heaters = [heater('H1', { x: 1, tiltDeg: 20 })], change = {}) =>
  seatWarmth({ site: site([seat('S1')]), brief: brief(), layout: { heaters }, models: modelsOf(model(change)) })[0]!

describe('limits on what falls on a guest', () => {
  it('are data with a source, and say what is from memory', () => {
    const limits = cautionLimits(brief({ stayMinutes: 90, airTemperature: 8 }))
    expect(limits.map(({ caution, limit, relaxed }) => [caution, limit, relaxed])).toEqual([
      ['stop line', 1580, null],
      ['head', 600, null],
      ['near infrared at the eye', 100, 320],
    ])
    for (const { source, note } of limits) expect(source.length * note.length).toBeGreaterThan(100)
    expect(limits.map(({ fromMemory }) => fromMemory)).toEqual([true, false, true])
  })

  // house caution: 600 W/m² for a long stay, 1,000 for a short one; a stay is long from 30 minutes
  it.each([
    [29, 1000],
    [30, 600],
    [31, 600],
  ])('a stay of %d minutes has %d W/m² at the head', (minutes, limit) => {
    expect(headCaution(minutes)).toBe(limit)
  })

  // from memory: about 300 W/m² at 10 °C, 400 at 0 °C; nothing above
  it.each([
    [-10, 400],
    [0, 400],
    [5, 350],
    [10, 300],
    [10.1, null],
    [20, null],
  ])('the eye’s limit at %d °C is relaxed to %s', (airTemperature, limit) => {
    expect(relaxedEyeLimit(airTemperature)).toBe(limit)
  })

  it('the eye’s limit is relaxed only for a stay beyond 1,000 s', () => {
    const [, , eye] = cautionLimits(brief({ stayMinutes: 10, airTemperature: 0 }))
    expect(eye).toMatchObject({ relaxed: null })
    expect(eye!.limit).toBeCloseTo(eyeLimit(600), 10)
  })
})

describe('cautions at a seat', () => {
  it('judge body, head and eye by the largest direction', () => {
    const given = brief({ airTemperature: 20 })
    const each = warmth()
    const cautions = cautionsAt(each, given)
    expect(cautions.map(({ caution, at, irradiance }) => [caution, at, irradiance])).toEqual([
      ['stop line', 'body', each.bodyLargest],
      ['stop line', 'head', each.head],
      ['head', 'head', each.head],
      ['near infrared at the eye', 'head', each.nearInfraredAtEye],
    ])
    for (const { margin, limit, irradiance } of cautions) expect(margin).toBeCloseTo(limit - irradiance!, 9)
    const relaxed = cautionsAt(each, brief({ airTemperature: 0 })).at(-1)!
    expect(relaxed.margin).toBeCloseTo(400 - each.nearInfraredAtEye!, 9)
  })

  it('cannot tell without a heater or without the element’s temperature', () => {
    expect(
      cautionsAt(warmth([]), brief()).every(({ irradiance, margin }) => irradiance === null && margin === null),
    ).toBe(true)
    const untold = cautionsAt(warmth([heater('H1')], { elementTemperature: null }), brief())
    expect(untold.map(({ margin }) => margin === null)).toEqual([false, false, false, true])
  })
})
