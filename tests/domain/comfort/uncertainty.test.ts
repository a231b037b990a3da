import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { seatWarmth, warmthOfSeat, type WarmthInput } from '#app/domain/comfort/seat-warmth.ts'
import { sourcesOf } from '#app/domain/comfort/sources.ts'
import {
  fluxTolerances,
  figureOf,
  seatTolerance,
  type FluxTolerances,
  type SeatFigure,
} from '#app/domain/comfort/uncertainty.ts'
import type { Seat } from '#app/domain/site/site.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'
import { brief, heater, model, modelsOf, seat, site } from '#tests/domain/comfort/terrace.ts'

/** Uniform numbers in [0, 1) from a seed (mulberry32), two of which make a normal one (Box and Muller). */
function normalFrom(seed: number): () => number {
  let state = seed
  const uniform = () => {
    state = (state + 0x6d2b79f5) | 0
    let t = Math.imul(state ^ (state >>> 15), 1 | state)
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296
  }
  return () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform())
}

/** Standard deviation of figures when everything they rest on errs at random, each tolerance as standard deviation. */
function bySampling(
  input: WarmthInput,
  at: Seat,
  figures: readonly SeatFigure[],
  tolerances: FluxTolerances,
  runs: number,
): number[] {
  const normal = normalFrom(20_240_501)
  const values = figures.map((): number[] => [])
  for (let run = 0; run < runs; run++) {
    const voltage = 1 + normal() * tolerances.voltage
    const models = new Map(
      [...input.models].map(([code, each]) => {
        const radiantEfficiency = each.radiantEfficiency * (1 + normal() * tolerances.efficiency)
        return [code, { ...each, radiantEfficiency }]
      }),
    )
    const heaters = input.layout.heaters.map((each) => {
      // the option ordered stays the same whatever the voltage does
      const ratedVoltage = each.ratedVoltage ?? each.supplyVoltage
      return {
        ...each,
        ratedVoltage,
        supplyVoltage: each.supplyVoltage * voltage,
        x: each.x + normal() * tolerances.heaterPosition,
        y: each.y + normal() * tolerances.heaterPosition,
        lowestPoint: each.lowestPoint + normal() * tolerances.heaterHeight,
      }
    })
    const moved = { ...at, x: at.x + normal() * tolerances.seat, y: at.y + normal() * tolerances.seat }
    const lift = normal() * tolerances.seat
    const risen = { ...moved, bodyHeight: at.bodyHeight + lift, headHeight: at.headHeight + lift }
    const { warmth } = warmthOfSeat(risen, sourcesOf({ heaters }, models), input)
    figures.forEach((figure, i) => values[i]!.push(figureOf(warmth, figure)!))
  }
  return values.map((sample) => {
    const mean = sample.reduce((sum, value) => sum + value, 0) / runs
    return Math.sqrt(sample.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (runs - 1))
  })
}

const demoModelsByCode = new Map(demoModels().map((each) => [each.code, each]))
const demo = (key: 'A' | 'B' | 'C', number: number): WarmthInput => {
  const place = demoSites().find((each) => each.key === key)!
  const { layout } = place.variants.find((variant) => variant.number === number)!
  // without dimensions every seat has the same tolerance as in the sampling
  return { site: { ...place.site, dimensions: [] }, brief: place.brief, layout, models: demoModelsByCode }
}

describe('first-order tolerance against a seeded Monte Carlo', () => {
  // 3,000 runs: the sampled deviation itself errs by 1.3 % (1/√(2N)); 5 % leaves room for that and for the second order.
  const figures: SeatFigure[] = [{ quantity: 'body' }, { quantity: 'head' }, { quantity: 'feels-like', wind: 'design' }]
  const cases = [
    { key: 'A', number: 2, index: 1 },
    { key: 'A', number: 3, index: 7 },
    { key: 'B', number: 3, index: 3 },
    { key: 'C', number: 2, index: 4 },
  ] as const
  it.each(cases)('site $key variant $number, seat $index: body, head and feels-like', ({ key, number, index }) => {
    const input = demo(key, number)
    const at = input.site.seats[index]!
    const sampled = bySampling(input, at, figures, fluxTolerances(plainHouseRules), 3000)
    figures.forEach((figure, i) => {
      const first = seatTolerance(input, at, figure, 'everything', fluxTolerances(plainHouseRules))!
      expect(Math.abs(first.total / sampled[i]! - 1), figure.quantity).toBeLessThan(0.05)
    })
  })

  const seatAlone: FluxTolerances = { heaterPosition: 0, heaterHeight: 0, seat: 0.025, efficiency: 0, voltage: 0 }
  const atPlace: SeatFigure[] = [{ quantity: 'body' }, { quantity: 'head' }, { quantity: 'body-largest' }]
  it.each(cases)('site $key variant $number, seat $index: from the seat’s place alone', ({ key, number, index }) => {
    const input = demo(key, number)
    const at = input.site.seats[index]!
    const sampled = bySampling(input, at, atPlace, seatAlone, 2000)
    atPlace.forEach((figure, i) => {
      const first = seatTolerance(input, at, figure, 'seat', fluxTolerances(plainHouseRules))!
      expect(Math.abs(first.total / sampled[i]! - 1), figure.quantity).toBeLessThan(0.06)
      expect(first.total).toBeCloseTo(seatTolerance(input, at, figure, 'everything', seatAlone)!.total, 9)
    })
  })

  // Heights of body and head have each a tolerance of their own, sampled as one: the seat's place stays out of these.
  const unmoved = { ...fluxTolerances(plainHouseRules), seat: 0 }
  const others: SeatFigure[] = [{ quantity: 'near-infrared' }, { quantity: 'head-to-body' }]
  it.each(cases)('site $key variant $number, seat $index: near infrared, head to body', ({ key, number, index }) => {
    const input = demo(key, number)
    const at = input.site.seats[index]!
    const sampled = bySampling(input, at, others, unmoved, 2000)
    others.forEach((figure, i) => {
      const first = seatTolerance(input, at, figure, 'everything', unmoved)!
      expect(Math.abs(first.total / sampled[i]! - 1), figure.quantity).toBeLessThan(0.06)
    })
  })

  it('the vote of sensation, where it is in range', () => {
    const { brief: own, ...rest } = demo('A', 2)
    const input = { ...rest, brief: { ...own, airTemperature: 17, clothing: 1 } }
    const at = input.site.seats[1]!
    const figure: SeatFigure = { quantity: 'sensation', wind: 'calm' }
    const [sampled = 0] = bySampling(input, at, [figure], fluxTolerances(plainHouseRules), 2000)
    const first = seatTolerance(input, at, figure, 'everything', fluxTolerances(plainHouseRules))!
    expect(Math.abs(first.total / sampled - 1)).toBeLessThan(0.06)
  })

  it('each thing by itself', () => {
    const input = demo('C', 2)
    const at = input.site.seats[2]!
    const none = { heaterPosition: 0, heaterHeight: 0, seat: 0, efficiency: 0, voltage: 0 }
    for (const only of Object.keys(none)) {
      const tolerances = { ...none, [only]: 0.02 }
      const first = seatTolerance(input, at, { quantity: 'body' }, 'everything', tolerances)!
      const [sampled = 0] = bySampling(input, at, [{ quantity: 'body' }], tolerances, 2000)
      expect(Math.abs(first.total / sampled - 1), only).toBeLessThan(0.06)
    }
  })
})

describe('tolerance of a seat’s figure', () => {
  const input = (change: Partial<WarmthInput> = {}): WarmthInput => ({
    site: site([seat('S1', { x: 0.4, y: 0.3 })]),
    brief: brief(),
    layout: { heaters: [heater('H1'), heater('H2', { x: 1.2 })] },
    models: modelsOf(model()),
    ...change,
  })
  const of = (given: WarmthInput, tolerances: FluxTolerances = fluxTolerances(plainHouseRules)) =>
    seatTolerance(given, given.site.seats[0]!, { quantity: 'body' }, 'everything', tolerances)!
  const share = (given: WarmthInput, name: RegExp) => of(given).shares.find((each) => name.test(each.of))!

  it('is the root of the sum of the squares of its shares, the largest first', () => {
    const { total, shares } = of(input())
    expect(total).toBeCloseTo(Math.sqrt(shares.reduce((sum, { change }) => sum + change ** 2, 0)), 12)
    const sizes = shares.map(({ change }) => Math.abs(change))
    expect(sizes).toEqual(sizes.toSorted((a, b) => b - a))
  })

  it('moves with the flux: 5 % of efficiency is 5 % of the flux, 5 % of voltage twice that for a metal element', () => {
    const body = seatWarmth(input())[0]!.body!
    expect(share(input(), /efficiency/).change).toBeCloseTo(0.05 * body, 9)
    expect(share(input(), /voltage/).change).toBeCloseTo(0.1 * body, 9)
  })

  it('takes the data sheet’s range of efficiency where it states one', () => {
    const models = modelsOf(model({ radiantEfficiencyRange: { low: 0.42, high: 0.53 } }))
    const body = seatWarmth(input())[0]!.body!
    expect(share(input({ models }), /efficiency/)).toMatchObject({ tolerance: (0.5 - 0.42) / 0.5 })
    expect(share(input({ models }), /efficiency/).change).toBeCloseTo(0.16 * body, 9)
  })

  it('knows that moving the seat is moving all heaters the other way', () => {
    const { shares } = of(input())
    const changeOf = (name: string) => shares.find((each) => each.of === name)!.change
    expect(changeOf('seat S1 x')).toBeCloseTo(-(changeOf('H1 x') + changeOf('H2 x')), 4)
    expect(changeOf('seat S1 y')).toBeCloseTo(-(changeOf('H1 y') + changeOf('H2 y')), 4)
    expect(changeOf('seat S1 body height')).toBeCloseTo(-(changeOf('H1 height') + changeOf('H2 height')), 4)
  })

  it('takes a seat’s tolerance from the dimensions that move it', () => {
    const moves = [{ of: 'seat' as const, id: 'S1', coordinate: 'x', by: 0.5 }]
    const dimension = {
      id: 'D1',
      label: 'row',
      value: 4,
      tolerance: 0.2,
      source: 'guessed' as const,
      note: null,
      moves,
    }
    const given = input({ site: site([seat('S1', { x: 0.4, y: 0.3 })], { dimensions: [dimension] }) })
    expect(share(given, /S1 x/).tolerance).toBeCloseTo(0.1, 12)
    expect(share(given, /S1 x/).change).toBeCloseTo(4 * share(input(), /S1 x/).change, 9)
    expect(share(given, /S1 y/).tolerance).toBe(0.025)
  })

  it('moves together what one dimension moves: along a diagonal by both slopes at once', () => {
    const by = { of: 'seat' as const, id: 'S1', by: 1 }
    const diagonal = {
      id: 'D1',
      label: 'diagonal',
      value: 4,
      tolerance: 0.025,
      source: 'guessed' as const,
      note: null,
      moves: [
        { ...by, coordinate: 'x' },
        { ...by, coordinate: 'y' },
      ],
    }
    const given = input({ site: site([seat('S1', { x: 0.4, y: 0.3 })], { dimensions: [diagonal] }) })
    const apart = share(input(), /S1 x/).change + share(input(), /S1 y/).change
    expect(share(given, /S1 x and y, diagonal/).change).toBeCloseTo(apart, 4)
    expect(of(given).shares.filter((each) => /S1/.test(each.of))).toHaveLength(2)
  })

  it('is null without heaters that can be told', () => {
    const bare = input({ layout: { heaters: [] } })
    expect(
      seatTolerance(bare, bare.site.seats[0]!, { quantity: 'body' }, 'everything', fluxTolerances(plainHouseRules)),
    ).toBeNull()
    expect(
      seatTolerance(bare, bare.site.seats[0]!, { quantity: 'head' }, 'seat', fluxTolerances(plainHouseRules)),
    ).toBeNull()
  })
})
