import { describe, expect, it } from 'vitest'
import { cutLength, type SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { endRanges, firstCut, keptCut, moveEnds, parseCut } from '#app/editor/section-line/placed-cut.ts'
import { cutsOf } from '#app/editor/sections.tsx'
import { plainHeater, plainSite } from '#tests/support/plain-site.ts'

const site = plainSite()
const cut: SectionCut = { letter: 'C', from: [1, 1], to: [4, 3], placed: true }

describe('the sections of a layout', () => {
  const layout = { title: 'One', heaters: [plainHeater()] }
  it('run across and along through the heater, and along a person’s own line instead of the second', () => {
    expect(cutsOf(site, layout, [], null)).toEqual([
      { letter: 'A', from: [3, 4], to: [3, 0] },
      { letter: 'B', from: [0, 2], to: [6, 2] },
    ])
    expect(cutsOf(site, layout, [], cut)).toEqual([{ letter: 'A', from: [3, 4], to: [3, 0] }, cut])
  })
  it('are the line alone without heaters, and none without either', () => {
    expect(cutsOf(site, { title: 'None', heaters: [] }, [], cut)).toEqual([cut])
    expect(cutsOf(site, { title: 'None', heaters: [] }, [], null)).toEqual([])
  })
})

describe('a section line of one’s own', () => {
  it('begins askew, on the floor', () => {
    const first = firstCut(site)
    for (const [x, y] of [first.from, first.to]) {
      expect(x).toBeGreaterThan(0)
      expect(x).toBeLessThan(6)
      expect(y).toBeGreaterThan(0)
      expect(y).toBeLessThan(4)
    }
    expect(first.from[0]).not.toBe(first.to[0])
    expect(first.from[1]).not.toBe(first.to[1])
  })
  it('moves by one end or as it is', () => {
    expect(moveEnds(cut, ['from'], [0.5, -0.25], site)).toEqual({ ...cut, from: [1.5, 0.75] })
    expect(moveEnds(cut, ['from', 'to'], [1, 0.1], site)).toEqual({ ...cut, from: [2, 1.1], to: [5, 3.1] })
  })
  it('stays within 2 m around the floor', () => {
    expect(endRanges(site)).toEqual({ x: [-2, 8], y: [-2, 6] })
    expect(moveEnds(cut, ['to'], [90, 90], site).to).toEqual([8, 6])
  })
  it('never closes up to less than 0.3 m', () => {
    expect(moveEnds(cut, ['to'], [-3, -2], site)).toBe(cut)
    expect(cutLength(moveEnds(cut, ['to'], [-2.7, -2], site))).toBeCloseTo(0.3, 9)
  })
  it('is kept and found again', () => expect(parseCut(keptCut(cut))).toEqual(cut))
  it.each([null, '', '1 2 3', '1 2 3 4 5', 'a b c d', '1 1 1 1', '0 0 1e9 1', '0 0 NaN 1'])(
    'is not read from %s',
    (kept) => {
      expect(parseCut(kept)).toBeNull()
    },
  )
})
