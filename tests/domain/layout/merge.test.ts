import { expect, it } from 'vitest'
import { moveHeaters, placeHeater, removeHeaters } from '#app/domain/layout/edits.ts'
import { mergeLayouts, sameLayout, takeTheirs } from '#app/domain/layout/merge.ts'
import { heaterAt, layoutOf } from '#tests/support/layouts.ts'

const base = layoutOf(heaterAt('H1', 1, 1), heaterAt('H2', 2, 2), heaterAt('H3', 3, 3))
const xs = (layout: typeof base) => Object.fromEntries(layout.heaters.map((heater) => [heater.id, heater.x]))

it('takes each change that only one side made', () => {
  const mine = moveHeaters(base, ['H1'], 0.5, 0)
  const theirs = removeHeaters(moveHeaters(base, ['H2'], 0.25, 0), ['H3'])
  const { merged, conflicts } = mergeLayouts(base, mine, theirs)
  expect(conflicts).toEqual([])
  expect(xs(merged)).toEqual({ H1: 1.5, H2: 2.25 })
})
it('shows both values where both changed one heater, and can take either', () => {
  const mine = moveHeaters(base, ['H2'], 1, 0)
  const theirs = moveHeaters(base, ['H2'], 0.1, 0)
  const { merged, conflicts } = mergeLayouts(base, mine, theirs)
  expect(conflicts).toMatchObject([{ id: 'H2', mine: { x: 3 }, theirs: { x: 2.1 } }])
  expect(xs(merged)['H2']).toBe(3)
  const [conflict] = conflicts
  if (!conflict) throw new Error('no conflict')
  expect(xs(takeTheirs(merged, conflict))['H2']).toBe(2.1)
})
it('does not lose a heater that one side moved and the other removed', () => {
  const mine = removeHeaters(base, ['H2'])
  const theirs = moveHeaters(base, ['H2'], 0.1, 0)
  const { merged, conflicts } = mergeLayouts(base, mine, theirs)
  expect(conflicts).toMatchObject([{ id: 'H2', mine: null, theirs: { x: 2.1 } }])
  const [conflict] = conflicts
  if (!conflict) throw new Error('no conflict')
  expect(xs(takeTheirs(merged, conflict))).toMatchObject({ H1: 1, H2: 2.1, H3: 3 })
})
it('tells apart two new heaters of one name', () => {
  const mine = placeHeater(base, heaterAt('', 7, 7)).layout
  const theirs = placeHeater(base, heaterAt('', 8, 8)).layout
  expect(mergeLayouts(base, mine, theirs).conflicts).toMatchObject([{ id: 'H4', mine: { x: 7 }, theirs: { x: 8 } }])
})
it('knows the same layout by its values', () => {
  expect(sameLayout(base, structuredClone(base))).toBe(true)
  expect(sameLayout(base, moveHeaters(base, ['H1'], 0.0001, 0))).toBe(false)
  expect(sameLayout(base, { ...base, title: 'Other' })).toBe(false)
})
