import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import type { PlanCaution } from '#app/domain/rules/cautions-on-plan.ts'
import { figurePatch, placeFigure } from '#app/drawing/nearest/label-place.ts'
import { NearestDimension, type NearestPair } from '#app/drawing/nearest/nearest-dimension.tsx'
import { screenPen } from '#app/drawing/pen.ts'
import { placeCautions } from '#app/drawing/plan/caution-places.ts'
import { planFigure } from '#app/drawing/plan/nearest.tsx'
import { isClear, meets, patch, type Patch } from '#app/drawing/plan/occupied.ts'
import { cutAlong } from '#app/drawing/plan/section-cut.tsx'
import { isInSection } from '#app/drawing/section/section-nearest.tsx'
import { sectionViewOf } from '#app/drawing/section/section-view.ts'
import { chance } from '#tests/support/chance.ts'
import { plainSite } from '#tests/support/plain-site.ts'

const pen = screenPen('dusk')
const view = { scale: 80, x0: 0, y0: 400, width: 800, height: 400 }

describe('the figure of a nearest pair', () => {
  it('stands clear of everything taken, in 200 random crowds that leave room', () => {
    const random = chance(71)
    let clear = 0
    for (let i = 0; i < 200; i++) {
      const taken = Array.from({ length: 12 }, (): Patch => patch(400 + random() * 160 - 80, 200 + random() * 160 - 80, 20, 20)) // prettier-ignore
      const at = placeFigure([390, 200], [410, 205], '0.178 ± 0.025', taken, pen)
      if (isClear(figurePatch(at, '0.178 ± 0.025', pen), taken, 2)) clear++
      expect(Math.hypot(at[0] - 400, at[1] - 200)).toBeLessThan(160)
    }
    expect(clear).toBeGreaterThan(190)
  })

  it('stands beside the middle of its line, off the line, where nothing is taken', () => {
    const at = placeFigure([100, 100], [300, 100], '1.000', [], pen)
    expect(at[0]).toBeCloseTo(200, 6)
    expect(Math.abs(at[1] - 100)).toBeGreaterThan(pen.text)
  })
})

describe('a nearest pair on the plan', () => {
  const pair = (to: NearestPair['to']): NearestPair => ({ from: [1, 1, 2.4], to, figure: '0.178', chosen: true })

  it('says that it runs up or down where its line is short', () => {
    expect(planFigure(pair([1, 1, 2.578]))).toBe('0.178 up')
    expect(planFigure(pair([1, 1, 2]))).toBe('0.178 down')
    expect(planFigure(pair([2, 1, 2.5]))).toBe('0.178')
  })

  it('is a line with two ticks, and a ring where it runs towards the eye', () => {
    const drawn = (to: [number, number]) =>
      renderToStaticMarkup(
        <svg>
          <NearestDimension from={[10, 10]} to={to} figure="0.178" chosen taken={[]} pen={pen} />
        </svg>,
      )
    expect(drawn([60, 10]).match(/<path/g)).toHaveLength(3)
    expect(drawn([60, 10])).not.toContain('<circle')
    expect(drawn([12, 10])).toContain('<circle')
    expect(drawn([12, 10])).not.toContain('<path')
  })
})

describe('a nearest pair in a section', () => {
  const cut = sectionViewOf(plainSite(), cutAlong(plainSite(), 'A', 'y', 3, 1), { width: 400 })
  const pair = (from: NearestPair['from'], to: NearestPair['to']): NearestPair => ({
    from,
    to,
    figure: '',
    chosen: true,
  })

  it('is drawn near the cut and across the direction of view', () => {
    expect(isInSection(cut, pair([3, 2, 2.4], [3, 2, 3]))).toBe(true)
    expect(isInSection(cut, pair([3, 2, 2.4], [3.5, 2, 2.4]))).toBe(false)
    expect(isInSection(cut, pair([5, 2, 2.4], [5, 2, 3]))).toBe(false)
  })
})

describe('cautions on the plan', () => {
  const caution = (id: string, kind: PlanCaution['kind'], at: [number, number]): PlanCaution => ({
    kind,
    at,
    subject: { kind: id.startsWith('H') ? 'heater' : 'seat', id },
    sentence: 'Too near above: roof.',
    condition: null,
  })

  it('are one sign for each heater or seat, with every sentence and, at heaters, their kinds as words', () => {
    const all = [caution('H1', 'fire', [2, 2]), caution('H1', 'shock', [2, 2]), caution('S1', 'burn', [5, 2])]
    const placed = placeCautions(all, view, pen, [])
    expect(placed.map(({ words, sentences }) => [words, sentences.length])).toEqual([
      ['fire, shock', 2],
      [null, 1],
    ])
    expect(placed[0]?.sentences[0]).toBe('H1, fire: Too near above: roof.')
  })

  it('keep clear of what is taken and of each other', () => {
    const heaters = Array.from({ length: 6 }, (_, i) => caution(`H${i}`, 'fire', [2 + i * 0.5, 2]))
    const seats = heaters.map(({ at }) => patch(at[0] * 80, 400 - at[1] * 80, 20, 20))
    const placed = placeCautions(heaters, view, pen, seats)
    const signs = placed.map(({ at }) => patch(...at, 11, 11))
    signs.forEach((sign, i) => {
      expect(isClear(sign, seats, 0)).toBe(true)
      expect(signs.slice(i + 1).some((next) => meets(sign, next))).toBe(false)
    })
  })
})
