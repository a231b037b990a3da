import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { electricalPower } from '#app/domain/heaters/power.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'

/**
 * The invented demo sites against a simple model of its own: 81 equal segments per element, horizontal planes, no
 * reflection, no shading, computed apart from this program (tests/published/demo-reference.json). Within 1 % or 1 W/m²,
 * whichever is greater; its figures are rounded to the whole W/m².
 */
const file = z.object({
  sites: z.array(
    z.object({
      site: z.string(),
      variants: z.array(
        z.object({
          number: z.number(),
          heaterPowerW: z.record(z.string(), z.number()),
          reference: z.object({
            perSeat: z.array(
              z.object({ seat: z.string(), bodyHorizontalWm2: z.number(), headHorizontalWm2: z.number() }),
            ),
          }),
        }),
      ),
    }),
  ),
})
const { sites } = file.parse(JSON.parse(readFileSync(new URL('demo-reference.json', import.meta.url), 'utf8')))
const models = new Map(demoModels().map((model) => [model.code, model]))
const cases = sites.flatMap(({ site, variants }) =>
  variants.map(({ number, reference, heaterPowerW }) => ({ site, number, seats: reference.perSeat, heaterPowerW })),
)

describe('seats of the demo variants', () => {
  it('there are nine variants, every seat of each with a reference', () => {
    expect(cases).toHaveLength(9)
    for (const { site, seats } of cases) {
      expect(seats).toHaveLength(demoSites().find(({ key }) => key === site)!.site.seats.length)
    }
  })

  it.each(cases)('site $site, variant $number', ({ site: key, number, seats, heaterPowerW }) => {
    const { site, brief, variants } = demoSites().find((each) => each.key === key)!
    const { layout } = variants.find((variant) => variant.number === number)!
    const warmth = new Map(seatWarmth({ site, brief, layout, models }).map((each) => [each.seat.id, each]))
    for (const { seat, bodyHorizontalWm2, headHorizontalWm2 } of seats) {
      const { body, headHorizontal } = warmth.get(seat)!
      for (const [own, reference] of [
        [body, bodyHorizontalWm2],
        [headHorizontal, headHorizontalWm2],
      ] as const) {
        expect(Math.abs(own! - reference), `${seat}: ${own} for ${reference}`).toBeLessThanOrEqual(
          Math.max(1, reference / 100),
        )
      }
    }
    for (const heater of layout.heaters) {
      const { power } = electricalPower(heater, models.get(heater.model)!)
      expect(Math.abs(power - heaterPowerW[heater.id]!)).toBeLessThanOrEqual(1)
    }
  })
})
