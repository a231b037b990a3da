import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { siteTemplates } from '#app/domain/site/templates/site-templates.ts'
import { irradianceScale } from '#app/drawing/heat/quantity.ts'
import { screenPen } from '#app/drawing/pen.ts'
import { meets, patch } from '#app/drawing/plan/occupied.ts'
import { Plan } from '#app/drawing/plan/plan-drawing.tsx'
import { planViewOf } from '#app/drawing/plan/plan-view.ts'
import { placeSizeTags, SizeTags, sizeText } from '#app/drawing/plan/size-tags.tsx'
import { slopeText } from '#app/drawing/plan/cover-mark.tsx'
import { textWidth } from '#app/drawing/text/widths.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'

/** The level words of a drawing with the room they take. */
function level(drawing: string) {
  return [...drawing.matchAll(/<text ([^>]*)>([^<]*)<\/text>/g)].flatMap(([, attributes = '', text = '']) => {
    const number = (name: string) => Number(new RegExp(`(?:^| )${name}="([-\\d.]+)"`).exec(attributes)?.[1])
    if (attributes.includes('rotate')) return []
    const [size, width] = [number('font-size'), textWidth(text, number('font-size'), 500)]
    const anchor = /text-anchor="(\w+)"/.exec(attributes)?.[1]
    const from = number('x') - (anchor === 'middle' ? width / 2 : anchor === 'end' ? width : 0)
    const middle = number('y') - (attributes.includes('dy=') ? 0 : size * 0.35)
    return [{ text, room: patch(from + width / 2, middle, width, size * 0.8) }]
  })
}

const pen = screenPen('day')
const [a, , c] = demoSites().map(({ site }) => site)

describe('sizes on the plan', () => {
  it('say value, tolerance and source; told and guessed ones that they are assumed', () => {
    const said = a!.dimensions.map((size) => sizeText(size, 'metric'))
    expect(said).toContain('roof underside at house wall 3.30 ± 0.06, drawing')
    expect(said).toContain('beam spacing 2.64 ± 0.03, told, assumed')
  })

  it('say a small one to the millimetre or the eighth of an inch', () => {
    const [joist] = a!.dimensions
    const size = { ...joist!, label: 'joist width', value: 0.045, tolerance: 0.006, source: 'tape' as const }
    expect(sizeText(size, 'metric')).toBe('joist width 0.045 ± 0.006, tape')
    expect(sizeText({ ...size, value: 0.14 }, 'metric')).toBe('joist width 0.14 ± 0.006, tape')
    expect(sizeText(size, 'imperial')).toBe('joist width 1 3/4″ ± 0.25″, tape')
  })

  it('show assumed ones alone until all are asked for; lengths of the floor stand on its own lines', () => {
    const view = planViewOf(c!, 900, 560)
    expect(placeSizeTags(c!, view, pen, false).map(({ text }) => text)).toEqual([
      expect.stringMatching(/^ceiling void .*assumed$/),
    ])
    const all = placeSizeTags(c!, view, pen, true)
    expect(all.map(({ id }) => id)).toEqual(['size-3', 'size-4', 'size-5'])
  })

  it('stand clear of each other within the drawing', () => {
    const view = planViewOf(a!, 900, 560)
    const tags = placeSizeTags(a!, view, pen, true).map(({ text, x, y }) => {
      const width = textWidth(text, pen.text, 500)
      expect(x).toBeGreaterThanOrEqual(0)
      expect(x + width).toBeLessThanOrEqual(view.width)
      return patch(x + width / 2, y - pen.text * 0.35, width, pen.text)
    })
    expect(tags.length).toBe(5)
    tags.forEach((tag, i) => expect(tags.slice(i + 1).some((other) => meets(tag, other))).toBe(false))
  })

  it.each(siteTemplates.map((template) => [template.key, template] as const))(
    'keep clear of every word of the plan of a fresh %s, where all sizes are guessed',
    (_, template) => {
      const made = template.start(
        new Map(),
        'tape',
        { name: 'new', displayUnits: 'metric', trace: null },
        plainHouseRules,
      )
      if ('error' in made) throw new Error(made.error)
      const view = planViewOf(made, 768, 512)
      const plan = renderToStaticMarkup(
        <svg>
          <Plan
            {...{ name: 'p', site: made, view, pen, quantity: irradianceScale('day', { low: 150, high: 350 }) }}
            layout={{ title: '', heaters: [] }}
            models={new Map()}
            picture={null}
            signs={new Map()}
          />
        </svg>,
      )
      const words = level(plan)
      expect(words.length).toBeGreaterThan(2)
      const tags = placeSizeTags(made, view, pen, true)
      expect(tags).toHaveLength(template.sizes.length)
      for (const { text, x, y } of tags) {
        const width = textWidth(text, pen.text, 500)
        const tag = patch(x + width / 2, y - pen.text * 0.35, width, pen.text * 0.8)
        expect(words.filter(({ room }) => meets(tag, room)).map((word) => word.text)).toEqual([])
      }
    },
  )

  it('cut a long name, never the figure and its source', () => {
    const view = planViewOf(c!, 900, 560)
    const long = { ...c!.dimensions[2]!, label: 'from the corner of the house to the far side of the counter' }
    const [tag] = placeSizeTags({ ...c!, dimensions: [long] }, view, pen, true)
    expect(tag!.text).toMatch(/^from the corner.*… 2\.65 ± 0\.008, tape$/)
  })

  it('are left out where what they decide is off the drawing', () => {
    const view = planViewOf(c!, 900, 560)
    expect(placeSizeTags(c!, { ...view, x0: view.x0 - 2000 }, pen, true)).toEqual([])
  })

  it('are counted where there is no room to name them', () => {
    const view = planViewOf(c!, 360, 280)
    const drawn = renderToStaticMarkup(<SizeTags site={c!} view={view} pen={pen} all={false} />)
    expect(drawn).toContain('1 size assumed')
  })
})

describe('the slope of a cover in words', () => {
  it('is degrees and inches per foot (closed form: 0.55 m in 5.40 m)', () => {
    const degrees = (Math.atan(0.55 / 5.4) * 180) / Math.PI
    expect(slopeText(a!.covers[0]!)).toBe(`${degrees.toFixed(1)}°, ${((12 * 0.55) / 5.4).toFixed(2)} in/ft`)
    expect(slopeText(c!.covers[0]!)).toBe('level')
  })
})
