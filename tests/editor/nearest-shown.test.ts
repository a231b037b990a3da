import { describe, expect, it } from 'vitest'
import { findingOf, type Found, type Rule } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { layoutOf, heaterAt } from '#tests/support/layouts.ts'
import { editorReducer, editorStateOf } from '#app/editor/editor-state.ts'
import { findChosen, nearestShown } from '#app/editor/nearest-shown.ts'

const made = (rule: string, id: string, found: Partial<Found>, more: Partial<Rule> = {}): Finding =>
  findingOf(
    { rule, weight: 'hard stop', subject: { kind: 'heater', id }, source: 'Manual', unit: 'm', ...more },
    'fails',
    { title: rule, margin: 0.1, tolerance: 0.02, nearest: { from: [0, 0, 2], to: [0, 0, 2.3] }, ...found },
  )

const above = made('clearance-above', 'H1', { margin: 0.05, tolerance: 0.02 })
const beam = made('clearance-front-of-beam', 'H1', { margin: 0.06, tolerance: 0.04 })
const other = made('clearance-above', 'H2', { margin: -1 })

describe('the pairs that are drawn', () => {
  it('are the chosen heater’s tightest by its margin less its tolerance, when no finding is chosen', () => {
    // 0.05 − 0.02 = 0.03 against 0.06 − 0.04 = 0.02.
    const shown = nearestShown([above, beam, other], null, 'H1', 'metric')
    expect(shown.map(({ finding, chosen }) => [finding.rule, chosen])).toEqual([['clearance-front-of-beam', false]])
  })

  it('are the chosen finding’s and the tightest’s, each once', () => {
    expect(nearestShown([above, beam, other], above, 'H1', 'metric').map(({ finding }) => finding)).toEqual([
      above,
      beam,
    ])
    expect(nearestShown([above, beam], beam, 'H1', 'metric')).toHaveLength(1)
  })

  it('carry the length of the pair and the tolerance, in the person’s unit', () => {
    expect(nearestShown([above], above, null, 'metric')[0]?.figure).toBe('0.300 ± 0.020')
    // 0.3 m = 11.811 in, nearest eighth 11 3/4; 0.02 m = 0.787 in, nearest eighth 3/4.
    expect(nearestShown([above], above, null, 'imperial')[0]?.figure).toBe('11 3/4″ ± 3/4″')
    const sure = made('clearance-above', 'H1', { tolerance: 0 })
    expect(nearestShown([sure], sure, null, 'metric')[0]?.figure).toBe('0.300')
  })

  it('leave out what has no pair, and margins that are no lengths', () => {
    const seat = made('head-flux', 'H1', { nearest: null })
    expect(nearestShown([seat], seat, 'H1', 'metric')).toEqual([])
    const watts = made('odd', 'H1', { margin: -5 }, { unit: 'W/m²' })
    expect(nearestShown([watts, above], null, 'H1', 'metric').map(({ finding }) => finding)).toEqual([above])
  })
})

describe('a chosen finding', () => {
  it('is known again when its title or figures changed, and gone with its subject', () => {
    const later = { ...above, title: 'Tight above', margin: 0.2 }
    expect(findChosen([beam, later], above)).toBe(later)
    expect(findChosen([beam, later, above], above)).toBe(above)
    expect(findChosen([beam, other], above)).toBeNull()
    expect(findChosen([above], null)).toBeNull()
  })

  it('brings its heater with it, is let go by Escape and by choosing nothing', () => {
    const start = editorStateOf(layoutOf(heaterAt('H1', 0, 0), heaterAt('H2', 1, 0)))
    const chosen = editorReducer(start, { type: 'finding', finding: other })
    expect([chosen.selected, chosen.finding, chosen.said]).toEqual([['H2'], other, 'H2: clearance-above'])
    expect(editorReducer(chosen, { type: 'let go' }).finding).toBeNull()
    expect(editorReducer(chosen, { type: 'finding', finding: null }).selected).toEqual(['H2'])
  })
})
