import { describe, expect, it } from 'vitest'
import { seatWarmth, type SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { Brief } from '#app/domain/brief/brief.ts'
import { plainBrief, plainHeater, plainModel, plainSite, plainHouse } from '#tests/support/plain-site.ts'

const epsilon = 1e-3
const site = plainSite()
const layout = { heaters: [plainHeater()] }
const models = new Map([['betony-2-0', plainModel()]])

/** A seat measured without tolerance, so that a figure at its limit is neither side of it. */
const exact = plainSite({
  dimensions: ['x', 'y', 'bodyHeight', 'headHeight'].map((coordinate) => ({
    id: coordinate,
    label: coordinate,
    value: 1,
    tolerance: 0,
    source: 'laser' as const,
    note: null,
    moves: [{ of: 'seat' as const, id: 'S1', coordinate, by: 1 }],
  })),
})

function found(rule: string, seat: Partial<SeatWarmth>, brief: Partial<Brief> = {}, on = exact): Finding[] {
  const full = plainBrief(brief)
  const warmth = seatWarmth({ site: on, brief: full, layout, models }).map((warm) => ({ ...warm, ...seat }))
  return checkLayout({ site: on, brief: full, layout, models, warmth, house: plainHouse() }).filter(
    (finding) => finding.rule === rule,
  )
}

describe('head-flux', () => {
  const soft = (head: number | null, stayMinutes = 90) => found('head-flux', { head }, { stayMinutes }).find(({ weight }) => weight === 'soft') // prettier-ignore
  it.each([
    [600 - epsilon, 90, 'pass'],
    [600, 90, 'pass'],
    [600 + epsilon, 90, 'fails'],
    [600 + epsilon, 20, 'pass'],
    [1000, 20, 'pass'],
    [1000 + epsilon, 20, 'fails'],
  ])('%s W/m² at the head for %s minutes: %s', (head, stay, expected) => {
    expect(soft(head, stay)?.outcome).toBe(expected)
  })

  it.each([
    [1580 - epsilon, 'pass'],
    [1580, 'pass'],
    [1580 + epsilon, 'fails'],
  ])('%s W/m² against the stop line, at head or body: %s', (figure, expected) => {
    const stop = (seat: Partial<SeatWarmth>) => found('head-flux', seat).find(({ weight }) => weight === 'hard stop')
    expect(stop({ head: figure })?.outcome).toBe(expected)
    expect(stop({ head: 1, bodyLargest: figure })?.outcome).toBe(expected)
  })

  it('cannot be told without a figure, nor while a heater is without beam data', () => {
    expect(soft(null)?.outcome).toBe('cannot tell')
    const partly = found('head-flux', { head: 100, cannotTell: ['H2'] })
    expect(partly.map(({ outcome }) => outcome)).toEqual(['cannot tell', 'cannot tell'])
  })

  it('wants measuring within what 25 mm of the seat’s place change', () => {
    const [warm] = seatWarmth({ site, brief: plainBrief(), layout, models })
    const near = { ...warm!, head: 599.9 }
    const findings = checkLayout({ site, brief: plainBrief(), layout, models, warmth: [near], house: plainHouse() })
    const finding = findings.find(({ rule, weight }) => rule === 'head-flux' && weight === 'soft')
    expect(finding?.outcome).toBe('measure first')
    expect(finding?.tolerance).toBeGreaterThan(0.1)
  })

  it('wants measuring as far off as a guessed size may bring it', () => {
    const guessed = { ...exact.dimensions[1]!, tolerance: 1, source: 'guessed' as const }
    const on = plainSite({ dimensions: [exact.dimensions[0]!, guessed, ...exact.dimensions.slice(2)] })
    const outcome = (head: number, at = on) => found('head-flux', { head }, {}, at).find(({ weight }) => weight === 'soft')?.outcome // prettier-ignore
    expect(outcome(480)).toBe('measure first')
    expect(outcome(480, exact)).toBe('pass')
  })

  it('says nothing without heaters', () => {
    const none = checkLayout({
      site,
      brief: plainBrief(),
      layout: { heaters: [] },
      models,
      warmth: [],
      house: plainHouse(),
    })
    expect(none.map(({ rule }) => rule)).toEqual(['site-given'])
  })
})

describe('seat-target', () => {
  it.each([
    [150 - epsilon, 'fails'],
    [150, 'pass'],
    [150 + epsilon, 'pass'],
    [350 - epsilon, 'pass'],
    [350, 'pass'],
    [350 + epsilon, 'fails'],
  ])('%s W/m² in a band of 150 to 350: %s', (body, expected) => {
    const [finding] = found('seat-target', { body })
    expect([finding?.outcome, finding?.weight]).toEqual([expected, 'advice'])
  })

  it('cannot be told without a figure', () => {
    expect(found('seat-target', { body: null })[0]?.outcome).toBe('cannot tell')
  })

  it('takes the band of the brief', () => {
    const target = { low: 200, high: 300, source: 'brief' }
    expect(found('seat-target', { body: 190 }, { target })[0]).toMatchObject({
      outcome: 'fails',
      limit: 200,
      source: 'brief',
    })
  })

  it('gives the tolerance that moving the seat 25 mm each way gives (own differences)', () => {
    const brief = plainBrief({ target: { low: 40, high: 1000, source: 'brief' } })
    const at = (dx: number, dy: number, dz: number) => {
      const seat = site.seats[0]!
      const seats = [{ ...seat, x: seat.x + dx, y: seat.y + dy, bodyHeight: seat.bodyHeight + dz }]
      return seatWarmth({ site: plainSite({ seats }), brief, layout, models })[0]!.body!
    }
    const nominal = at(0, 0, 0)
    // half the way from one end to the other: to first order
    const change = (dx: number, dy: number, dz: number) => (at(dx, dy, dz) - at(-dx, -dy, -dz)) / 2
    const expected = Math.hypot(change(0.025, 0, 0), change(0, 0.025, 0), change(0, 0, 0.025))
    const low = nominal - expected / 2
    const warmth = seatWarmth({ site, brief, layout, models })
    const tight = { ...brief, target: { low, high: 1000, source: 'brief' } }
    const [finding] = checkLayout({ site, brief: tight, layout, models, warmth, house: plainHouse() }).filter(
      ({ rule }) => rule === 'seat-target',
    )
    expect(finding?.outcome).toBe('measure first')
    // 1 %: what is left of the third order over 25 mm
    expect(Math.abs(finding!.tolerance! / expected - 1)).toBeLessThan(0.01)
  })
})

describe('near-infrared', () => {
  // 18 t^−0.75 kW/m² for t seconds (ICNIRP, from memory): 10 minutes
  const tenMinutes = 18_000 * 600 ** -0.75
  it.each([
    ['100 beyond 1,000 s in warm air', 100, { airTemperature: 25 }],
    ['200 at 17.5 °C (house rule)', 200, { airTemperature: 17.5 }],
    ['300 at 10 °C (from memory)', 300, { airTemperature: 10 }],
    ['400 at 0 °C (from memory)', 400, { airTemperature: 0 }],
    ['for a short stay', tenMinutes, { airTemperature: 25, stayMinutes: 10 }],
  ])('judges by the limit of the cautions: %s', (_, limit, brief) => {
    const outcome = (nearInfraredAtEye: number) => found('near-infrared', { nearInfraredAtEye }, brief)[0]
    expect(outcome(limit - epsilon)).toMatchObject({ outcome: 'pass', weight: 'advice' })
    expect(outcome(limit)?.outcome).toBe('pass')
    expect(outcome(limit + epsilon)?.outcome).toBe('fails')
    expect(outcome(limit)?.limit).toBeCloseTo(limit, 9)
    expect(outcome(limit)?.source).toMatch(/ICNIRP.*from memory/)
  })

  it('cannot be told without a figure, nor while a heater is without beam data', () => {
    expect(found('near-infrared', { nearInfraredAtEye: null })[0]?.outcome).toBe('cannot tell')
    expect(found('near-infrared', { cannotTell: ['H2'] })[0]?.outcome).toBe('cannot tell')
  })
})

describe('site-given', () => {
  const check = (on: ReturnType<typeof plainSite>) =>
    checkLayout({ site: on, brief: plainBrief(), layout, models, house: plainHouse(), warmth: seatWarmth({ site: on, brief: plainBrief(), layout, models }) }) // prettier-ignore

  it('stops blank geometry', () => {
    const flat = plainSite({ floor: [[0, 0], [6, 0], [3, 0]] }) // prettier-ignore
    const [finding] = check(flat).filter(({ rule }) => rule === 'site-given')
    expect([finding?.outcome, finding?.weight]).toEqual(['cannot tell', 'hard stop'])
    expect(check(plainSite({ seats: [] })).some(({ title }) => title === 'The site has no seats')).toBe(true)
    expect(check(site).find(({ rule }) => rule === 'site-given')?.outcome).toBe('pass')
  })

  it('names a seat outside the floor', () => {
    const outside = plainSite({ seats: [{ ...site.seats[0]!, x: 7 }] })
    expect(check(outside).find(({ rule }) => rule === 'seat-on-floor')?.title).toBe('Seat S1 is outside the floor')
  })
})
