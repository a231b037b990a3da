import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { indoorsAt } from '#app/domain/comfort/indoors.ts'
import { seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { brief, heater, model, modelsOf, seat, site } from '#tests/domain/comfort/terrace.ts'

const input = (change: Parameters<typeof brief>[0], heaters: MountedHeater[], power = 2000) => ({
  site: site([seat('S1')]),
  brief: brief(change),
  layout: { heaters },
  models: modelsOf(
    model({ stages: [power], supplyOptions: [{ voltage: 230, phases: 1, ratedPower: power, ratedCurrent: 1 }] }),
  ),
})
const at = (
  change: Parameters<typeof brief>[0],
  heaters = [heater('H1')],
  wind: 'calm' | 'design' | 'gust' = 'design',
) => indoorsAt(seatWarmth(input(change, heaters))[0]!, brief(change), wind, plainHouseRules)

describe('what it would take to feel like indoors', () => {
  it('is so many times the heat, and with that heat it does', () => {
    const evening = { airTemperature: 12, windDesign: 0.4 }
    const { times, head } = at(evening)
    expect(times).toBeGreaterThan(1)
    const stronger = seatWarmth(input(evening, [heater('H1')], 2000 * times!))[0]!
    expect(stronger.feelsLike.design.after).toBeCloseTo(20, 6)
    expect(stronger.head).toBeCloseTo(head, 6)
    expect(
      indoorsAt(
        seatWarmth(input(evening, [heater('H1')], 2001 * times!))[0]!,
        brief(evening),
        'design',
        plainHouseRules,
      ),
    ).toMatchObject({
      answer: 'it does',
      sentence: 'It feels like indoors at 0.4 m/s of wind.',
    })
  })

  it('says plainly when no heater does', () => {
    const { answer, sentence } = at({ airTemperature: 0, windGust: 5 }, [heater('H1')], 'gust')
    expect(answer).toBe('over the stop line')
    expect(sentence).toMatch(
      /^No heater makes it feel like indoors at 5\.0 m\/s of wind: it would take \d+ W\/m² at the head, over the stop line\.$/,
    )
  })

  it('without heaters reckons with heat from straight above, by hand', () => {
    // 10 °C, calm 0.2 m/s, 1.3 clo: h_c = 3.16, h_r = 4.184; field for 20 °C, then E = field / (0.95 · 0.696 · 0.177)
    const [radiant, convective, clothing] = [6.012 * 0.696, 8.3 * 0.2 ** 0.6, 0.155 * 1.3]
    const enlarged = 1.05 + 0.645 * clothing
    const factor = (clothing + 1 / (enlarged * (3.1 + radiant))) / (clothing + 1 / (enlarged * (convective + radiant)))
    const operative = 33 - 13 / factor
    const field = (operative - 10) * (convective + radiant)
    const { head, times } = at({ airTemperature: 10 }, [], 'calm')
    expect(times).toBeNull()
    expect(head).toBeCloseTo(field / (0.95 * 0.696 * 0.177), 6)
  })

  it('weighs the heat against the caution for the length of the stay', () => {
    const answers = [14, 11, 6, -10].map((airTemperature) => at({ airTemperature, windDesign: 0.3 }, []).answer)
    expect(answers).toEqual(['within the caution', 'over the caution', 'over the caution', 'over the stop line'])
    expect(at({ airTemperature: 11, windDesign: 0.3, stayMinutes: 15 }, []).answer).toBe('within the caution')
    expect(at({ airTemperature: 22, windDesign: 0.1 }, []).answer).toBe('it does')
  })
})
