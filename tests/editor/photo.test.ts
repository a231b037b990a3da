import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { demoMarks } from '#drizzle/seed/demo-photo.ts'
import { photoMarksSchema } from '#app/domain/photo/measurements.ts'
import { changePlane } from '#app/domain/photo/edits.ts'
import { errorWords, figureWords, measuredIn } from '#app/editor/photo/measured.ts'
import { marksAsked, placed, type Mark, type Placing } from '#app/editor/photo/placing.ts'

const marks = demoMarks()
const points: Mark[] = [[100, 900], [900, 900], [800, 500], [200, 500]] // prettier-ignore

describe('marking one after the other', () => {
  const placings: Placing[] = [
    { kind: 'plane', name: 'Mat', width: 2, depth: 1, tolerance: 0.01 },
    { kind: 'uprights', planeId: 'ceiling', height: 1, tolerance: 0.01 },
    { kind: 'length', label: 'bench', from: 'deck', to: 'deck' },
    { kind: 'height', label: 'post', plane: 'deck' },
  ]
  it.each(placings)('$kind asks for its marks and keeps them in their order', (placing) => {
    const asked = marksAsked(placing).length
    const after = placed(marks, placing, points.slice(0, asked))
    expect(photoMarksSchema.parse(after)).toEqual(after)
    const flat = JSON.stringify(after)
    for (const point of points.slice(0, asked)) expect(flat).toContain(JSON.stringify(point))
    expect(after).not.toEqual(marks)
  })

  it('gives every new thing an id of its own', () => {
    const twice = placed(placed(marks, placings[0]!, points), placings[0]!, points)
    expect(new Set(twice.planes.map(({ id }) => id)).size).toBe(5)
  })

  it('keeps nothing of a trace', () => expect(placed(marks, { kind: 'trace' }, points)).toBe(marks))
})

describe('what a photo gives', () => {
  const measured = measuredIn({ id: 'one', marks }, [], plainHouseRules)
  const figure = (label: string) => measured.find(({ measurement }) => measurement.label === label)!

  it('is said with the tolerance that is used and the error behind it', () => {
    const { own, mean } = figure('joist spacing')
    expect('value' in own && figureWords(own, 'metric')).toBe('0.60 m ± 0.05 m')
    expect('value' in own && errorWords(own, 'metric', plainHouseRules)).toMatch(
      /^± is 0\.05 m, the least for photos by house rule\. Standard error 12 mm: marks 12 mm, reference/,
    )
    expect(mean).toBeNull()
  })

  it('is refused in words where it cannot be', () => {
    const without = measuredIn(
      { id: 'one', marks: changePlane(marks, 'deck', { vertical: null }) },
      [],
      plainHouseRules,
    )
    expect(without.find(({ measurement }) => measurement.id === 'height')?.own).toMatchObject({ refused: 'no upright' })
  })

  it('is a mean over photos, with a warning when they do not fit', () => {
    const far = changePlane(marks, 'ceiling', { name: 'Other ceiling', width: 9, depth: 3.9 })
    const both = measuredIn({ id: 'one', marks }, [{ id: 'two', marks: far }], plainHouseRules)
    const joists = both.find(({ measurement }) => measurement.id === 'joists')!
    expect(joists).toMatchObject({ photos: 2, mean: { count: 2, warning: expect.stringContaining('standard errors') } })
    const fits = measuredIn({ id: 'one', marks }, [{ id: 'two', marks }], plainHouseRules)
    expect(fits.find(({ measurement }) => measurement.id === 'joists')?.mean?.warning).toBeNull()
  })
})
