import { describe, expect, it } from 'vitest'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import { answerSections } from '#app/drawing/heat/section-answer.ts'
import { cutAlong } from '#app/drawing/plan/section-cut.tsx'
import { site } from '#tests/domain/comfort/terrace.ts'
import { cosine, line } from '#tests/support/emitters.ts'

const there = site([])
const heater = line(cosine(2, 1), { at: [0, 0, 2.4] })
const sections = (emitters: readonly Emitter[], cuts = [cutAlong(there, 'A', 'y', 0, 1)]) =>
  answerSections({ emitters, site: there, cuts, levels: [100], edges: [0, 100] })

describe('the heat in sections', () => {
  it('is a picture for each cut, nothing without a heater', () => {
    expect(sections([heater])[0]!.lines).toHaveLength(1)
    expect(sections([])).toEqual([null])
  })

  it.each([
    ['at most 200', Array.from({ length: 10_000 }, () => heater)],
    ['not finite', [{ ...heater, elements: [{ ...heater.elements[0]!, radiantPower: NaN }] }]],
    ['from 0 to 50', [{ ...heater, beam: cosine(-1, 1) }]],
  ])('refuses what has no meaning before anything is computed: %s', (limit, emitters) => {
    expect(() => sections(emitters)).toThrow(RangeError)
    expect(() => sections(emitters, [])).toThrow(limit)
  })
})
