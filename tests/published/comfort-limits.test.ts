import { describe, expect, it } from 'vitest'
import { eyeLimit } from '#app/domain/comfort/cautions.ts'
import { seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { electricalPower } from '#app/domain/heaters/power.ts'
import { brief, heater, model, modelsOf, seat, site } from '#tests/domain/comfort/terrace.ts'

describe('infrared at the eye', () => {
  // C20: ICNIRP short-time limit 18 t^−0.75 kW/m² (from memory), 100 W/m² beyond 1,000 s as quoted from ICNIRP 1997.
  it.each([
    [10, 3201],
    [100, 569],
    [1000, 101],
  ])('C20: for %d s it is %d W/m², ± 1', (seconds, limit) => {
    expect(Math.abs(eyeLimit(seconds) - limit)).toBeLessThanOrEqual(1)
  })

  it('beyond 1,000 s it is 100 W/m²', () => {
    expect(eyeLimit(1001)).toBe(100)
    expect(eyeLimit(86_400)).toBe(100)
  })
})

describe('the voltage behind a seat’s warmth', () => {
  const at = (rated: number, power: number, supplyVoltage: number) => {
    const supplyOptions = [{ voltage: rated, phases: 1 as const, ratedPower: power, ratedCurrent: power / rated }]
    const own = model({ supplyOptions, stages: [power] })
    const mounted = heater('H1', { supplyVoltage, ratedVoltage: rated })
    const input = { site: site([seat('S1')]), brief: brief(), layout: { heaters: [mounted] }, models: modelsOf(own) }
    return { power: electricalPower(mounted, own).power, body: seatWarmth(input)[0]?.body ?? Number.NaN }
  }

  // E1, E2: P ∝ V² for metal elements, ± 0.1 W; irradiance is linear in the power.
  it.each([
    ['E1', 240, 4000, 208, 3004.4],
    ['E1', 240, 4000, 220, 3361.1],
    ['E1', 240, 4000, 230, 3673.6],
    ['E2', 230, 2000, 240, 2177.7],
  ])('%s: %d V, %d W on %d V gives %d W, and the seat as much less or more', (_, rated, power, supply, expected) => {
    const [actual, nominal] = [at(rated, power, supply), at(rated, power, rated)]
    expect(Math.abs(actual.power - expected)).toBeLessThanOrEqual(0.1)
    expect(actual.body / nominal.body).toBeCloseTo(expected / power, 4)
  })
})
