import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { cautionLimits, eyeLimit, eyeLimitInAir } from '#app/domain/comfort/cautions.ts'
import { brief } from '#tests/domain/comfort/terrace.ts'

describe('limits on what falls on a guest', () => {
  it('are data with a source, and say what is from memory', () => {
    const { stop, head, eye } = cautionLimits(brief({ stayMinutes: 90, airTemperature: 8 }), plainHouseRules)
    expect([stop, head, eye].map(({ value, relaxedFrom }) => [value, relaxedFrom])).toEqual([
      [1580, null],
      [600, null],
      [320, 100],
    ])
    for (const { source, note } of [stop, head, eye]) expect(source.length * note.length).toBeGreaterThan(100)
    expect([stop, head, eye].map(({ fromMemory }) => fromMemory)).toEqual([true, false, true])
  })

  // house caution: 600 W/m² for a long stay, 1,000 for a short one; a stay is long from 30 minutes
  it.each([
    [29, 1000],
    [30, 600],
    [31, 600],
  ])('a stay of %d minutes has %d W/m² at the head', (stayMinutes, limit) => {
    expect(cautionLimits(brief({ stayMinutes }), plainHouseRules).head.value).toBe(limit)
  })
})

describe('the eye’s limit in the cold', () => {
  // from memory: about 300 W/m² at 10 °C, 400 at 0 °C; house rule: from 10 °C straight down to 100 at 25 °C
  it.each([
    [-10, 400],
    [0, 400],
    [5, 350],
    [10, 300],
    [17.5, 200],
    [25, 100],
    [35, 100],
  ])('at %d °C is %d W/m² for a continuous exposure', (airTemperature, limit) => {
    expect(eyeLimitInAir(airTemperature)).toBeCloseTo(limit, 9)
    expect(cautionLimits(brief({ airTemperature }), plainHouseRules).eye.value).toBeCloseTo(limit, 9)
  })

  it('never steps: a tenth of a degree is at most 1.4 W/m², and warmer air never allows more', () => {
    for (let tenths = -300; tenths < 350; tenths++) {
      const fall = eyeLimitInAir(tenths / 10) - eyeLimitInAir((tenths + 1) / 10)
      expect(fall).toBeGreaterThanOrEqual(-1e-9)
      expect(fall).toBeLessThan(1.4)
    }
  })

  it('names memory and house rule only where they hold', () => {
    const sourceAt = (airTemperature: number) => cautionLimits(brief({ airTemperature }), plainHouseRules).eye.source
    expect(sourceAt(30)).not.toMatch(/relaxed|house rule/)
    expect(sourceAt(5)).toMatch(/relaxed in the cold.*from memory/)
    expect(sourceAt(5)).not.toMatch(/house rule/)
    expect(sourceAt(15)).toMatch(/relaxed in the cold.*house rule/)
  })

  it('holds for shorter stays too: staying longer never allows more', () => {
    for (const airTemperature of [-5, 8, 16, 30]) {
      const limits = Array.from(
        { length: 60 },
        (_, i) => cautionLimits(brief({ airTemperature, stayMinutes: i + 1 }), plainHouseRules).eye,
      )
      limits.slice(1).forEach(({ value }, i) => expect(value).toBeLessThanOrEqual(limits[i]!.value))
    }
    const short = cautionLimits(brief({ stayMinutes: 2, airTemperature: 0 }), plainHouseRules).eye
    expect(short).toMatchObject({ value: eyeLimit(120), relaxedFrom: null })
    const longer = cautionLimits(brief({ stayMinutes: 10, airTemperature: 0 }), plainHouseRules).eye
    expect(longer).toMatchObject({ value: 400, relaxedFrom: eyeLimit(600) })
  })
})
