import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { layoutTotals, seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { electricalPower } from '#app/domain/heaters/power.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'

const reference = z
  .object({
    sites: z.array(
      z.object({
        site: z.enum(['A', 'B', 'C']),
        variants: z.array(
          z.object({
            number: z.number(),
            heaterPowerW: z.record(z.string(), z.number()),
            reference: z.object({
              totalKw: z.number(),
              seatMinWm2: z.number(),
              seatMaxWm2: z.number(),
              seatMeanWm2: z.number(),
              minToMean: z.number(),
              headMaxWm2: z.number(),
              perSeat: z.array(
                z.object({ seat: z.string(), bodyHorizontalWm2: z.number(), headHorizontalWm2: z.number() }),
              ),
            }),
          }),
        ),
      }),
    ),
  })
  .parse(JSON.parse(readFileSync(new URL('./demo-reference.json', import.meta.url), 'utf8')))

const models = new Map(demoModels().map((model) => [model.code, model]))
const cases = reference.sites.flatMap(({ site: key, variants }) =>
  variants.map((variant) => {
    const demo = demoSites().find((each) => each.key === key)!
    const { layout } = demo.variants.find(({ number }) => number === variant.number)!
    return { name: `${key}.${variant.number}`, ...demo, layout, ...variant }
  }),
)

/**
 * 1 % or 1 W/m², whichever is greater. The reference is a simple model of its own, computed apart from this program: 81
 * equal segments per element, no reflection, no shading, rounded to whole W/m².
 */
const near = (value: number, expected: number) =>
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(Math.max(1, 0.01 * expected))

describe('demo sites against reference results computed apart from this program', () => {
  it('there are nine variants, every seat of each with a reference', () => {
    expect(cases).toHaveLength(9)
    for (const { site, reference: ref } of cases) expect(ref.perSeat).toHaveLength(site.seats.length)
  })

  it.each(cases)(
    '$name: every seat’s body and head, horizontal, unshaded, and every heater’s power to the watt',
    ({ site, brief, layout, heaterPowerW, reference: ref }) => {
      const warmth = new Map(seatWarmth({ site, brief, layout, models }).map((each) => [each.seat.id, each]))
      for (const { seat, bodyHorizontalWm2, headHorizontalWm2 } of ref.perSeat) {
        near(warmth.get(seat)!.body!, bodyHorizontalWm2)
        near(warmth.get(seat)!.headHorizontal!, headHorizontalWm2)
      }
      for (const heater of layout.heaters) {
        const { power } = electricalPower(heater, models.get(heater.model)!)
        expect(Math.abs(power - heaterPowerW[heater.id]!)).toBeLessThanOrEqual(1)
      }
    },
  )

  it.each(cases)(
    '$name: what the layout comes to over the primary seats',
    ({ site, brief, layout, reference: ref }) => {
      const warmth = seatWarmth({ site, brief, layout, models })
      const totals = layoutTotals(warmth, layout, models, brief)
      expect(Math.abs(totals.power / 1000 - ref.totalKw)).toBeLessThanOrEqual(0.005)
      near(totals.coldest!.irradiance, ref.seatMinWm2)
      near(totals.hottest!.irradiance, ref.seatMaxWm2)
      near(totals.mean!, ref.seatMeanWm2)
      expect(Math.abs(totals.evenness! - ref.minToMean)).toBeLessThanOrEqual(0.01)
      near(Math.max(...warmth.map(({ headHorizontal }) => headHorizontal!)), ref.headMaxWm2)
    },
  )

  // The findings expected of site A, variant 1 name the head by the largest direction: over 600 W/m² at 10 seats, 718 at most.
  it('A.1: heads by the largest direction', () => {
    const { site, brief, layout } = cases.find(({ name }) => name === 'A.1')!
    const heads = seatWarmth({ site, brief, layout, models }).map(({ head }) => head!)
    expect(heads.filter((head) => head > 600)).toHaveLength(10)
    near(Math.max(...heads), 718)
  })

  // Those of site C, variant 1: 606 W/m² at four seats.
  it('C.1: heads by the largest direction', () => {
    const { site, brief, layout } = cases.find(({ name }) => name === 'C.1')!
    const heads = seatWarmth({ site, brief, layout, models }).map(({ head }) => head!)
    expect(heads.filter((head) => Math.round(head) === 606)).toHaveLength(4)
    expect(heads.filter((head) => head > 600)).toHaveLength(4)
  })
})
