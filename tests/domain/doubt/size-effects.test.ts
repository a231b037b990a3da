import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { seatTolerance, fluxTolerances } from '#app/domain/comfort/uncertainty.ts'
import { seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { rankEffects } from '#app/domain/doubt/ranking.ts'
import { sizeEffects } from '#app/domain/doubt/size-effects.ts'
import { above, coverMoves, dimension, finish, oneHeater } from '#tests/domain/doubt/small-doubt.ts'
import { seat, site } from '#tests/domain/comfort/terrace.ts'

const bodyHeight = (tolerance: number) =>
  dimension('body', 0.6, tolerance, [{ of: 'seat', id: 'S1', coordinate: 'bodyHeight', by: 1 }])
const effectsOf = (...asked: Parameters<typeof sizeEffects>) => finish(sizeEffects(...asked)).made
const nominalBody = (question: ReturnType<typeof oneHeater>) => seatWarmth(question)[0]!.body!

describe('effects of one size', () => {
  it('follow the inverse square of the distance at the coldest seat', () => {
    const question = oneHeater([bodyHeight(0.1)])
    const { effects, nominal } = effectsOf(question, false)
    const E = nominalBody(question)
    expect(nominal.coldest).toMatchObject({ seatId: 'S1', irradiance: E })
    const { coldest } = effects[0]!
    expect(coldest.higher! / (E * ((above / (above - 0.1)) ** 2 - 1))).toBeCloseTo(1, 5)
    expect(coldest.lower! / (E * ((above / (above + 0.1)) ** 2 - 1))).toBeCloseTo(1, 5)
  })
  it('follow the head height at the hottest head and leave the body alone', () => {
    const head = dimension('head', 1.1, 0.05, [{ of: 'seat', id: 'S1', coordinate: 'headHeight', by: 1 }])
    const question = oneHeater([head])
    const { effects } = effectsOf(question, false)
    const E = seatWarmth(question)[0]!.head!
    expect(effects[0]!.head.higher! / (E * ((1.35 / 1.3) ** 2 - 1))).toBeCloseTo(1, 5)
    expect(effects[0]!.coldest).toEqual({ lower: 0, higher: 0 })
  })
  it('move a clearance one to one with a level cover, and half as much at half a lever', () => {
    const [whole, half] = [
      dimension('whole', 3, 0.04, coverMoves),
      dimension('half', 3, 0.04, coverMoves.map((move) => ({ ...move, by: 0.5 }))), // prettier-ignore
    ]
    const { effects, nominal } = effectsOf(oneHeater([whole, half]), false)
    expect(nominal.tightest!.margin).toBeCloseTo(3 - 2.5 - 0.3, 9)
    expect(effects[0]!.margin.lower).toBeCloseTo(-0.04, 9)
    expect(effects[0]!.margin.higher).toBeCloseTo(0.04, 9)
    expect(effects[1]!.margin.lower).toBeCloseTo(-0.02, 9)
  })
  it('go with the efficiency and with the square of the voltage, and leave every clearance', () => {
    const question = oneHeater([])
    const { effects } = effectsOf(question, false)
    const E = nominalBody(question)
    const [efficiency, voltage] = effects
    expect(efficiency!.size.key).toBe('efficiency plain-2-0')
    expect(efficiency!.coldest.higher! / E).toBeCloseTo(0.05, 9)
    expect(efficiency!.coldest.lower! / E).toBeCloseTo(-0.05, 9)
    expect(voltage!.coldest.higher! / E).toBeCloseTo(1.05 ** 2 - 1, 9)
    expect(voltage!.coldest.lower! / E).toBeCloseTo(0.95 ** 2 - 1, 9)
    expect(voltage!.margin).toEqual({ lower: 0, higher: 0 })
    expect(voltage!.turns.filter((check) => check.startsWith('voltage-offered'))).toEqual([])
  })
  it('say which checks turn at either end', () => {
    const { effects } = effectsOf(oneHeater([dimension('whole', 3, 0.25, coverMoves)]), false)
    expect(effects[0]!.turns).toContain('clearance-above||heater|H1|')
  })
  it('are nothing for a size that moves nothing and for a tolerance of nothing', () => {
    const { effects } = effectsOf(
      oneHeater([dimension('idle', 2, 0.1, []), dimension('exact', 2, 0, coverMoves)]),
      false,
    )
    expect(effects.map(({ size }) => size.label)).not.toContain('Size exact')
    expect(effects[0]).toMatchObject({ coldest: { lower: 0, higher: 0 }, margin: { lower: 0, higher: 0 }, turns: [] })
  })
  it('have no figures without heaters', () => {
    const { effects, nominal } = effectsOf(
      oneHeater([bodyHeight(0.1)], { layout: { title: 'None', heaters: [] } }),
      false,
    )
    expect(nominal.coldest).toBeNull()
    expect(effects[0]!.coldest).toEqual({ lower: null, higher: null })
  })
})

describe('effects of all sizes', () => {
  it('add up, by their squares, to the tolerance that the seat has to first order', () => {
    const small = 0.001
    const aside = seat('S1', { x: 0.8, y: 0.5 })
    const dimensions = [
      dimension('x', 0.8, small, [{ of: 'seat', id: 'S1', coordinate: 'x', by: 1 }]),
      dimension('y', 0.5, 2 * small, [{ of: 'seat', id: 'S1', coordinate: 'y', by: 1 }]),
      dimension('z', 0.6, small, [{ of: 'seat', id: 'S1', coordinate: 'bodyHeight', by: 1 }]),
    ]
    const question = oneHeater(dimensions, { site: site([aside], { dimensions }) })
    const { effects } = effectsOf(question, false)
    const changes = effects
      .filter(({ size }) => size.kind === 'dimension')
      .map(({ coldest }) => (coldest.higher! - coldest.lower!) / 2)
    const { total } = seatTolerance(question, aside, { quantity: 'body' }, 'seat', fluxTolerances(plainHouseRules))!
    expect(Math.hypot(...changes) / total).toBeCloseTo(1, 4)
  })
  it('take sizes that nobody stated together by their thing, each by 25 mm', () => {
    const question = oneHeater([])
    const { effects, leftOut } = effectsOf(question, true)
    const E = nominalBody(question)
    const group = effects.find(({ size }) => size.key === 'unstated seat S1')!
    expect(leftOut).toBe(0)
    expect(group.size).toMatchObject({ label: 'Seat S1', sizes: 4, tolerance: 0.025, value: null })
    // Raised by 25 mm; sideways moves lower the flux a little, which the root of squares adds.
    expect(group.coldest.higher! / (E * ((above / (above - 0.025)) ** 2 - 1))).toBeCloseTo(1, 4)
    const roof = effects.find(({ size }) => size.key === 'unstated cover roof')!
    expect(roof.size.sizes).toBe(12)
    expect(roof.margin.lower).toBeLessThan(0)
  })
  it('stop at the most unstated sizes and say how many things were left out', () => {
    const seats = Array.from({ length: 10 }, (_, i) => seat(`S${i}`, { x: -4 + i * 0.05 }))
    const question = oneHeater([], { site: site(seats), layout: { title: 'None', heaters: [] } })
    const { effects, leftOut } = effectsOf(question, true, 30)
    const sizes = effects.reduce((sum, { size }) => sum + size.sizes, 0)
    expect(sizes).toBeLessThanOrEqual(30)
    expect(leftOut).toBe(10 - effects.filter(({ size }) => size.label.startsWith('Seat')).length)
    expect(leftOut).toBeGreaterThan(0)
  })
  it('tell their progress from nothing done up to the last', () => {
    const { told } = finish(sizeEffects(oneHeater([bodyHeight(0.1)]), false))
    expect(told).toEqual([0, 1, 2].map((done) => ({ done, total: 3 })))
  })
})

describe('the ranking of sizes', () => {
  const dimensions = [
    dimension('a', 0.6, 0.01, [{ of: 'seat', id: 'S1', coordinate: 'bodyHeight', by: 1 }]),
    dimension('b', 0.6, 0.03, [{ of: 'seat', id: 'S1', coordinate: 'bodyHeight', by: 1 }]),
    dimension('c', 3, 0.1, coverMoves),
    dimension('d', 3, 0.02, coverMoves),
    dimension('e', 9, 0.1, []),
    dimension('f', 9, 0.1, []),
  ]
  const ranked = (of: typeof dimensions, by: Parameters<typeof rankEffects>[2]) => {
    const { effects, nominal } = effectsOf(oneHeater(of), false)
    return rankEffects(effects, nominal, by, plainHouseRules).filter(({ size }) => size.kind === 'dimension').map(({ size }) => size.label.slice(-1)).join('') // prettier-ignore
  }
  it.each([
    ['coldest', 'bacdef'],
    ['margin', 'cdabef'],
    ['head', 'abcdef'],
  ] as const)('by %s puts the larger change first and equals by name', (by, order) => {
    expect(ranked(dimensions, by)).toBe(order)
  })
  it('is the same in whatever order the site lists them', () => {
    const orders = [[5, 3, 1, 0, 2, 4], [2, 4, 0, 5, 1, 3], [4, 5, 2, 3, 0, 1]] // prettier-ignore
    for (const order of orders)
      for (const by of ['overall', 'coldest', 'head', 'margin'] as const)
        expect(ranked(order.map((i) => dimensions[i]!), by)).toBe(ranked(dimensions, by)) // prettier-ignore
  })
})
