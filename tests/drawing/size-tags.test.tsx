import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { screenPen } from '#app/drawing/pen.ts'
import { meets, patch } from '#app/drawing/plan/occupied.ts'
import { planViewOf } from '#app/drawing/plan/plan-view.ts'
import { placeSizeTags, SizeTags, sizeText } from '#app/drawing/plan/size-tags.tsx'
import { slopeText } from '#app/drawing/plan/cover-mark.tsx'
import { textWidth } from '#app/drawing/text/widths.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'

const pen = screenPen('day')
const [a, , c] = demoSites().map(({ site }) => site)

describe('sizes on the plan', () => {
  it('say value, tolerance and source; told and guessed ones that they are assumed', () => {
    const said = a!.dimensions.map((size) => sizeText(size, 'metric'))
    expect(said).toContain('roof underside at house wall 3.30 ± 0.06, drawing')
    expect(said).toContain('beam spacing 2.64 ± 0.03, told, assumed')
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
