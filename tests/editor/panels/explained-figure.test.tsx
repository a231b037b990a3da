import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { explainSeat, type ExplainInput } from '#app/domain/comfort/explain.ts'
import { seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { SeatFigure } from '#app/domain/comfort/uncertainty.ts'
import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { ExplainedFigure } from '#app/editor/panels/explained-figure.tsx'
import { SeatSensation } from '#app/editor/panels/seat-sensation.tsx'
import { brief, heater, model, modelsOf, seat, site } from '#tests/domain/comfort/terrace.ts'

/** One half of the element of H1 is behind the awning; nothing is before that of H2. */
const input = (change: Partial<ExplainInput> = {}): ExplainInput => ({
  site: site([seat('S1')], {
    obstacles: [
      {
        id: 'awning-1',
        name: 'Awning',
        kind: 'other',
        material: 'combustible',
        movable: false,
        shape: { kind: 'box', x: [0, 3], y: [-0.5, 0.5], z: [1.4, 1.5] },
        transmittance: 0,
        note: null,
      },
    ],
  }),
  brief: brief(),
  layout: { title: 'Test', heaters: [heater('H1'), heater('H2', { y: 3 })] },
  models: modelsOf(model()),
  shade: 'in-place',
  ...change,
})

const textOf = (markup: string) => markup.replaceAll(/<[^>]+>/g, ' ').replaceAll(/\s+/g, ' ')
const shown = (given: ExplainInput, figure: SeatFigure) =>
  textOf(
    renderToStaticMarkup(
      <ExplainedFigure
        explained={explainSeat(given, 'S1', figure, plainHouseRules)!}
        site={given.site}
        units="metric"
        fluxUnit="W/m²"
      />,
    ),
  )

describe('a figure taken apart on the page', () => {
  it('says how much of each heater the seat sees, and past what', () => {
    const text = shown(input(), { quantity: 'body' })
    expect(text).toContain('With shade')
    expect(text).toContain('Seen of each heater from the body’s height')
    expect(text).toContain('H1 50.0 % past Awning')
    expect(text).toContain('H2 100 % nothing in the way')
    expect(text).not.toContain('from the head’s height')
  })

  it('says of a hidden heater that it is', () => {
    const over = input().site.obstacles.map((each) => ({
      ...each,
      shape: {
        kind: 'box' as const,
        x: [-3, 3] as [number, number],
        y: [-0.5, 0.5] as [number, number],
        z: [1.4, 1.5] as [number, number],
      },
    }))
    expect(shown(input({ site: { ...input().site, obstacles: over } }), { quantity: 'body' })).toContain(
      'H1 0 % hidden by Awning',
    )
  })

  it('tells two things of one name by their ids', () => {
    const [awning] = input().site.obstacles
    const both = [awning!, { ...awning!, id: 'awning-2' }]
    const text = shown(input({ site: { ...input().site, obstacles: both } }), { quantity: 'body' })
    expect(text).toContain('past Awning (awning-1), Awning (awning-2)')
  })

  it('says without shade that it is so, and nothing of what is seen', () => {
    const text = shown(input({ shade: 'none' }), { quantity: 'body' })
    expect(text).toContain('Without shade: nothing is taken to stand in the way.')
    expect(text).not.toContain('Seen of each heater')
    expect(text).not.toMatch(/awning/i)
  })

  it('has the stop line with the largest irradiance at the body', () => {
    const text = shown(input(), { quantity: 'body-largest' })
    expect(text).toMatch(/Stop line at 1,?580 W\/m²/)
    expect(text).toContain('from memory')
  })

  it('has the word and the vote of a sensation, or that it is outside the range of the vote', () => {
    const mild = shown(input({ brief: brief({ airTemperature: 18 }) }), { quantity: 'sensation', wind: 'calm' })
    expect(mild).toMatch(/(slightly cool|neutral|slightly warm), vote −?\d\.\d\d ±/)
    expect(mild).not.toContain('Outside the range')
    const cold = shown(input({ brief: brief({ airTemperature: -5 }) }), { quantity: 'sensation', wind: 'calm' })
    expect(cold).toContain('Outside the range of the vote.')
    expect(cold).not.toContain(', vote')
  })
})

describe('sensation and head to body at a seat', () => {
  const at = (airTemperature: number) => {
    const given = input({ brief: brief({ airTemperature, windDesign: 1 }) })
    const warmth = seatWarmth(given)[0]!
    return { warmth, text: textOf(renderToStaticMarkup(<SeatSensation {...warmth} />)) }
  }

  it('are in the standard’s words, with a vote only inside its range', () => {
    const { text, warmth } = at(18)
    expect(text).toMatch(
      /Calm (cool|slightly cool|neutral) → (slightly cool|neutral|slightly warm) vote \(PMV\) −?\d\.\d/,
    )
    // 1 m/s is outside the range of ISO 7730, whatever the temperature
    expect(text).toMatch(/Design wind [a-z ]+ → [a-z ]+ outside the range of the vote/)
    expect(text).toContain(`horizontal irradiance: ${(warmth.headHorizontal! / warmth.body!).toFixed(2)}`)
  })

  it('have dashes without heaters', () => {
    const warmth = seatWarmth(input({ layout: { title: 'Test', heaters: [] } }))[0]!
    const text = textOf(renderToStaticMarkup(<SeatSensation {...warmth} />))
    expect(text).toMatch(/Calm [a-z ]+ → –/)
    expect(text).toContain('horizontal irradiance: –')
    expect(text).not.toContain('vote')
  })
})
