import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { emitterOf } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { irradianceScale } from '#app/drawing/heat/quantity.ts'
import { screenPen } from '#app/drawing/pen.ts'
import { cutLength, turnCut, type SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { halfSeen, stretchesIn, stretchesOfShape, stripOutline } from '#app/drawing/section/cut-outline.ts'
import { heatersBehindCut, SectionDrawing, sectionTitle } from '#app/drawing/section/section-drawing.tsx'
import { cutCovers } from '#app/drawing/section/section-structure.tsx'
import { sectionValues } from '#app/drawing/section/section-values.ts'
import { alongCut, behindCut, pointOfCut, sectionViewOf } from '#app/drawing/section/section-view.ts'
import { smallHeater, smallLayout, smallModel, smallModels, smallTerrace } from '#tests/drawing/small-terrace.ts'

/** From corner to corner of the 4 × 3 m floor: a 3-4-5 triangle, so that every expected figure is a fraction. */
const diagonal: SectionCut = { letter: 'C', from: [0, 0], to: [4, 3], placed: true }
const view = sectionViewOf(smallTerrace, diagonal, { width: 640, height: 400 })
const drawn = (cut = diagonal, layout = smallLayout()) =>
  renderToStaticMarkup(
    <SectionDrawing
      name="s"
      label="Section C–C"
      site={smallTerrace}
      layout={layout}
      models={smallModels}
      rules={plainHouseRules}
      view={sectionViewOf(smallTerrace, cut, { width: 640, height: 400 })}
      pen={screenPen('dusk')}
      quantity={irradianceScale('dusk', { low: 150, high: 350 })}
      picture={null}
    />,
  )
/** Points of the path that has a mark, or of the first path inside the group that has it. */
const pointsOf = (markup: string, mark: string): Vec2[] => {
  const at = markup.indexOf(mark)
  const from = markup.startsWith('<path', markup.lastIndexOf('<', at)) ? markup.lastIndexOf('<', at) : at
  const [, path] = / d="(M[^"]+)"/.exec(markup.slice(from))!
  return [...path!.matchAll(/([-\d.]+) ([-\d.]+)/g)].map(([, x, y]): Vec2 => [Number(x), Number(y)])
}

describe('an oblique cut', () => {
  it('measures along itself and square to itself', () => {
    expect(cutLength(diagonal)).toBe(5)
    // (2, 3) = 3.4 along (4, 3)/5 and 1.2 to its left.
    expect(alongCut(diagonal, [2, 3])).toBeCloseTo(3.4, 12)
    expect(behindCut(diagonal, [2, 3])).toBeCloseTo(1.2, 12)
    expect(behindCut(diagonal, [2, 0])).toBeCloseTo(-1.2, 12)
    expect(pointOfCut(diagonal, 2.5)).toEqual([2, 1.5])
  })
  it('is mirrored when it is turned the other way', () => {
    const turned = turnCut(diagonal)
    for (const point of [
      [2, 3],
      [1, 0.2],
      [4, 1],
    ] as const) {
      // prettier-ignore
      expect(alongCut(turned, point)).toBeCloseTo(5 - alongCut(diagonal, point), 12)
      expect(behindCut(turned, point)).toBeCloseTo(-behindCut(diagonal, point), 12)
    }
  })
  it('follows a sloping cover at its own, gentler slope', () => {
    const [cover] = cutCovers(smallTerrace, view)
    // The cover falls by 0.4 m over y = 0 to 3: along the diagonal over 5 m.
    expect(cover!.from).toMatchObject({ along: expect.closeTo(0, 9), z: expect.closeTo(3, 9) })
    expect(cover!.to).toMatchObject({ along: expect.closeTo(5, 9), z: expect.closeTo(2.6, 9) })
    expect(cover!.slopeDeg).toBeCloseTo((Math.atan(0.4 / 5) * 180) / Math.PI, 9)
  })
  it('shows a cover from end to end', () => {
    const short: SectionCut = { ...diagonal, from: [1.6, 1.2], to: [2.4, 1.8] }
    const [cover] = cutCovers(smallTerrace, sectionViewOf(smallTerrace, short, { width: 300 }))
    expect([cover!.from.along, cover!.to.along]).toEqual([0, expect.closeTo(1, 9)])
    expect(cover!.from.z).toBeCloseTo(3 - (0.4 / 3) * 1.2, 9)
  })
})

describe('what an oblique cut runs through', () => {
  const lengths = (stretches: readonly (readonly [number, number])[]) => stretches.map(([a, b]) => b - a)
  it.each([
    ['a thin box along y, wider by 1 / cos', { kind: 'box', x: [1, 1.2], y: [-9, 9], z: [0, 1] }, 0.2 / (4 / 5)],
    ['a thin box along x, wider by 1 / sin', { kind: 'box', x: [-9, 9], y: [1, 1.2], z: [0, 1] }, 0.2 / (3 / 5)],
    ['a square over its diagonal', { kind: 'prism', outline: [[2, 0.5], [3, 1.5], [2, 2.5], [1, 1.5]], z: [0, 1] }, 10 / 7], // prettier-ignore
    ['a cylinder by its chord', { kind: 'cylinder', centre: [2, 3], radius: 1.3, z: [0, 1] }, 2 * Math.sqrt(1.69 - 1.44)], // prettier-ignore
  ] as const)('%s', (_, shape, length) => {
    const own = structuredClone(shape) as Parameters<typeof stretchesOfShape>[0]
    expect(lengths(stretchesOfShape(own, diagonal))).toEqual([expect.closeTo(length, 9)])
  })
  it('is both arms of an angle, not the gap between them', () => {
    const arms: Vec2[] = [[1, 0], [1.2, 0], [1.2, 5], [2.8, 5], [2.8, 0], [3, 0], [3, 6], [1, 6]] // prettier-ignore
    expect(lengths(stretchesIn(arms, diagonal))).toEqual([expect.closeTo(0.25, 9), expect.closeTo(0.25, 9)])
  })
  it('is nothing of what it passes by or ends before', () => {
    expect(stretchesOfShape({ kind: 'cylinder', centre: [2, 3], radius: 1.19, z: [0, 1] }, diagonal)).toEqual([])
    expect(stretchesOfShape({ kind: 'box', x: [5, 6], y: [3.6, 4.6], z: [0, 1] }, diagonal)).toEqual([])
  })
  it('is a wall band wider by its angle', () => {
    // A wall along x is met at the sine 3/5.
    expect(lengths(stretchesIn(stripOutline([-5, 1], [9, 1], 0, 0.24), diagonal))).toEqual([expect.closeTo(0.4, 9)])
  })
  it('shows a table as wide as it looks, turned or not', () => {
    const table = { ...smallTerrace.tables[0]!, size: [1.2, 0.8] as [number, number], turnDeg: 0 }
    expect(halfSeen(table, diagonal)).toBeCloseTo((1.2 * 4 + 0.8 * 3) / 10, 12)
    expect(halfSeen({ ...table, turnDeg: 90 }, diagonal)).toBeCloseTo((1.2 * 3 + 0.8 * 4) / 10, 12)
    expect(halfSeen({ ...table, form: 'round', size: [0.9, 0.9] }, diagonal)).toBe(0.45)
  })
})

describe('an oblique section as it is drawn', () => {
  it('shows a member wider by its angle, its underside sloping with the cover', () => {
    const points = pointsOf(drawn(), 'data-member="beam-1"')
    const low = points.slice(0, 2)
    // 0.06 m wide along y, cut at the cosine 4/5; it stands at x = 2, 2.5 m along.
    const wide = (low[1]![0] - low[0]![0]) / view.scale
    expect(wide).toBeCloseTo(Math.max(0.06 / 0.8, 3 / view.scale), 2)
    expect((low[0]![0] + low[1]![0]) / 2).toBeCloseTo(view.x0 + 2.5 * view.scale, 0)
    expect(low[0]![1]).toBeCloseTo(view.y0 - (3 - 0.2) * view.scale, 0)
    // The beam runs on: it falls over its width as y does.
    expect(low[1]![1]).toBeGreaterThanOrEqual(low[0]![1])
  })
  it('shows a heater as wide as its body looks along the direction of view', () => {
    const heater = smallHeater({ tiltDeg: 0, turnDeg: 0 })
    const points = pointsOf(drawn(diagonal, { title: 'One', heaters: [heater] }), 'data-heater="H1"')
    const xs = points.map(([x]) => x)
    const { length, width } = smallModel.body
    expect((Math.max(...xs) - Math.min(...xs)) / view.scale).toBeCloseTo((length * 4 + width * 3) / 5, 2)
  })
  it('names the heaters that it runs through and those behind it', () => {
    const heaters = [smallHeater({ id: 'H1', x: 2, y: 1.5 }), smallHeater({ id: 'H2', x: 1.4, y: 2.3 }), smallHeater({ id: 'H3', x: 2.6, y: 0.7 })] // prettier-ignore
    const layout = { title: 'Three', heaters }
    expect(heatersBehindCut(layout, diagonal).map(({ id }) => id)).toEqual(['H2'])
    expect(sectionTitle(layout, diagonal)).toBe('Section C–C through H1, H2 behind it')
    expect(sectionTitle(layout, turnCut(diagonal))).toBe('Section C–C through H1, H3 behind it')
    expect(drawn(diagonal, layout)).not.toContain('data-heater="H3"')
  })
})

describe('the heat of an oblique section', () => {
  it('is the engine’s at the places of the line', () => {
    const emitter = emitterOf(smallHeater(), smallModel)!
    const { grid, values } = sectionValues([emitter], smallTerrace, diagonal)!
    for (const [i, j] of [
      [5, 3],
      [20, 10],
      [40, 18],
    ] as const) {
      // prettier-ignore
      const along = (i + 0.5) * grid.cell
      const exact = irradianceAt(emitter, [(4 * along) / 5, (3 * along) / 5, (j + 0.5) * grid.cell], [0, 0, 1])
      expect(values[j * grid.columns + i]! / exact).toBeCloseTo(1, 5)
    }
  })
})
