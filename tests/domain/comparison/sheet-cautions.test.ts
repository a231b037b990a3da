import { plainHouse } from '#tests/support/plain-site.ts'
import { describe, expect, it } from 'vitest'
import { layoutFigures } from '#app/domain/comparison/layout-figures.ts'
import { sheetCautions } from '#app/domain/comparison/sheet-cautions.ts'
import { brief, heater, model, modelsOf, seat, site } from '#tests/domain/comfort/terrace.ts'

const models = modelsOf(model())
const said = (change: Parameters<typeof brief>[0], heaters = [heater('H1')]) => {
  const place = { site: site([seat('S1')]), brief: brief(change), models, house: plainHouse() }
  const layout = { title: 'One', heaters }
  const variants = [{ number: 1, layout, ...layoutFigures({ ...place, layout }) }]
  return sheetCautions({
    brief: place.brief,
    site: place.site,
    models,
    rules: place.house.rules,
    units: 'metric',
    variants,
  }).join(' ')
}

describe('what a sheet says of the heat', () => {
  it('says plainly when no seat feels like indoors in the wind, and not when one does', () => {
    expect(said({ airTemperature: 2, windDesign: 2 })).toContain('In that wind no seat here feels like indoors.')
    expect(said({ airTemperature: 21, windDesign: 0.1 })).not.toContain('indoors')
  })
})

describe('what a sheet says of a variant that may not be installed', () => {
  const sentence = (heaters: Parameters<typeof said>[1]) =>
    /Variant 1 may not be installed as it stands: (.*?)\. [A-Z]/.exec(said({}, heaters))?.[1] ?? ''

  it('names each reason once, however many heaters have it', () => {
    const one = sentence([heater('H1')])
    expect(one).not.toBe('')
    expect(sentence([heater('H1'), heater('H2', { x: 2 }), heater('H3', { x: 4 })])).toBe(one)
  })
  it('counts the reasons beyond two', () => {
    const reasons = sentence([heater('H1', { lowestPoint: 1.5, tiltDeg: 60 })])
    expect(reasons).toMatch(/^[^;]+; [^;]+; and 1 more$/)
  })
})
