import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { settlings } from '#app/domain/doubt/settling.ts'
import { sizeEffects } from '#app/domain/doubt/size-effects.ts'
import { coverMoves, dimension, finish, oneHeater } from '#tests/domain/doubt/small-doubt.ts'

/** The margin over the heater is 0.20 m; these tolerances together make it doubtful. */
const settled = (...tolerances: number[]) => {
  const dimensions = tolerances.map((tolerance, i) => dimension(`d${i}`, 3, tolerance, coverMoves))
  const { made } = finish(sizeEffects(oneHeater(dimensions), false))
  return settlings(made.nominal.checks, made.effects, plainHouseRules.toleranceLaser).find(
    ({ finding }) => finding.rule === 'clearance-above',
  )
}
/** The tolerance left when those of `at` are measured to 5 mm, by hand. */
const left = (tolerances: readonly number[], at: readonly number[]) =>
  Math.hypot(...tolerances.map((tolerance, i) => (at.includes(i) ? 0.005 : tolerance)))

describe('which size settles a check', () => {
  it('is the one without whose doubt the margin is enough', () => {
    expect(left([0.25, 0.1], [0])).toBeLessThan(0.2)
    expect(left([0.25, 0.1], [1])).toBeGreaterThan(0.2)
    expect(settled(0.25, 0.1)).toMatchObject({ alone: ['dimension d0'], together: [] })
  })
  it('is either of two', () => {
    expect(left([0.18, 0.15], [0])).toBeLessThan(0.2)
    expect(left([0.18, 0.15], [1])).toBeLessThan(0.2)
    expect(settled(0.18, 0.15)!.alone).toEqual(['dimension d0', 'dimension d1'])
  })
  it('are the fewest together, the largest first, where none is enough', () => {
    const tolerances = [0.05, 0.28, 0.24]
    for (const one of [0, 1, 2]) expect(left(tolerances, [one])).toBeGreaterThan(0.2)
    expect(left(tolerances, [1, 2])).toBeLessThan(0.2)
    expect(settled(...tolerances)).toMatchObject({ alone: [], together: ['dimension d1', 'dimension d2'] })
  })
  it('is nothing for a check that passes', () => expect(settled(0.1, 0.1)).toBeUndefined())
})
