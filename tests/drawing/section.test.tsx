import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { emitterOf } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { irradianceScale } from '#app/drawing/heat/quantity.ts'
import { screenPen } from '#app/drawing/pen.ts'
import { cutAlong } from '#app/drawing/plan/section-cut.tsx'
import { heatersInCut, SectionDrawing, sectionTitle } from '#app/drawing/section/section-drawing.tsx'
import { behindCut, onSection, projected, sectionViewOf } from '#app/drawing/section/section-view.ts'
import { sectionPicture, sectionValues } from '#app/drawing/section/section-values.ts'
import { cutCovers } from '#app/drawing/section/section-structure.tsx'
import { smallHeater, smallLayout, smallModel, smallModels, smallTerrace } from '#tests/drawing/small-terrace.ts'

const along = (axis: 'x' | 'y', at: number, looking: 1 | -1) => cutAlong(smallTerrace, 'A', axis, at, looking)
const cutA = along('y', 2, -1)
const emitter = emitterOf(smallHeater(), smallModel)!
const quantity = irradianceScale('dusk', { low: 150, high: 350 })

describe('the view of a section', () => {
  it.each([
    ['looking along +y, x runs to the right', along('x', 1.5, 1), 1],
    ['looking along −y, x runs to the left', along('x', 1.5, -1), -1],
    ['looking along +x, y runs to the left', along('y', 2, 1), -1],
    ['looking along −x, y runs to the right', cutA, 1],
  ])('%s', (_, cut, side) => {
    const view = sectionViewOf(smallTerrace, cut, { width: 300 })
    const ways = [1, 2].map((place) => projected(view, [place, place, 1])[0])
    expect(Math.sign((ways[1] ?? 0) - (ways[0] ?? 0))).toBe(side)
    expect(onSection(view, 1, 2)[1]).toBeLessThan(onSection(view, 1, 1)[1])
  })
  it('knows what lies behind the cut', () => {
    expect(behindCut(along('x', 1, 1), [0, 2.5])).toBeCloseTo(1.5, 12)
    expect(behindCut(along('y', 1, -1), [0, 2.5])).toBeCloseTo(1, 12)
  })
  it('has the heaters that stand in it, in their order', () => {
    const heaters = [smallHeater({ id: 'H2', y: 2.4 }), smallHeater(), smallHeater({ id: 'H3', x: 3 })]
    const layout = { title: 'Three', heaters }
    expect(heatersInCut(layout, cutA).map(({ id }) => id)).toEqual(['H1', 'H2'])
    expect(sectionTitle(layout, cutA)).toBe('Section A–A through H1 and H2')
  })
})

describe('the field of a section', () => {
  const field = sectionValues([emitter], smallTerrace, cutA)!
  it('is cheap: no more than 2,000 points', () => {
    expect(field.values.length).toBeLessThanOrEqual(2000)
    expect(field.values.length).toBeGreaterThan(1000)
  })
  it('has isolines that agree with the engine at the heights of people', () => {
    const picture = sectionPicture(field, quantity)
    let compared = 0
    for (const line of picture.lines) {
      for (const [, a, z] of line.path.matchAll(/([-\d.]+) ([-\d.]+)/g)) {
        const [y, height] = [Number(a), Number(z)]
        if (height < 0.2 || height > 1.3 || y < 0.2 || y > 2.8) continue
        expect(Math.abs(irradianceAt(emitter, [2, y, height], [0, 0, 1]) / line.level - 1)).toBeLessThan(0.02)
        compared++
      }
    }
    expect(compared).toBeGreaterThan(40)
  })
  it('is nothing without heaters', () => expect(sectionValues([], smallTerrace, cutA)).toBeNull())
})

describe('a drawn section', () => {
  const view = sectionViewOf(smallTerrace, cutA, { width: 380, height: 260 })
  const drawn = renderToStaticMarkup(
    <SectionDrawing
      name="s"
      label="Section A–A"
      site={smallTerrace}
      layout={smallLayout()}
      models={smallModels}
      rules={plainHouseRules}
      view={view}
      pen={screenPen('dusk')}
      quantity={quantity}
      picture={null}
    />,
  )
  it('gives the slope and both heights of the cover', () => {
    const [cover] = cutCovers(smallTerrace, view)
    expect(cover?.from.z).toBeCloseTo(3, 4)
    expect(cover?.to.z).toBeCloseTo(2.6, 4)
    expect(cover?.slopeDeg).toBeCloseTo((Math.atan(0.4 / 3) * 180) / Math.PI, 3)
    expect(drawn).toContain('7.6°')
    expect(drawn).toMatch(/3\.00 ± 0\.0\d/)
  })
  it('gives the plumb length of each hanger in millimetres', () => {
    // Underside at the eyes y = 1.3 and 1.7: 3 − 0.4/3 · y; the eyes are the top of the body, 2.2 + 0.1.
    for (const y of [1.3, 1.7]) expect(drawn).toContain(`>${Math.round((3 - (0.4 / 3) * y - 2.3) * 1000)}<`)
  })
  it('names both planes with their heights', () => {
    expect(drawn).toContain('Head 1.10')
    expect(drawn).toContain('Body 0.60')
  })
  it('fills no higher than 1.30 m', () => {
    const clip = /id="s-people"><rect x="[\d.]+" y="([\d.]+)"/.exec(drawn)!
    expect(Number(clip[1])).toBeCloseTo(onSection(view, 0, 1.3)[1], 6)
  })
})
