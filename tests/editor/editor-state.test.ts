import { expect, it } from 'vitest'
import { moveHeaters } from '#app/domain/layout/edits.ts'
import {
  editorReducer,
  editorStateOf,
  named,
  shownLayout,
  type EditorAction,
  type EditorState,
} from '#app/editor/editor-state.ts'
import { heaterAt, layoutOf } from '#tests/support/layouts.ts'

const start = layoutOf(heaterAt('H1', 1, 1), heaterAt('H2', 2, 2))
const after = (actions: readonly EditorAction[], from: EditorState = editorStateOf(start)) =>
  actions.reduce(editorReducer, from)
const show = (dx: number): EditorAction => ({
  type: 'show',
  step: { layout: moveHeaters(start, ['H1'], dx, 0), reason: null, lines: [] },
})

it('makes one step of a gesture', () => {
  const moved = after([...Array.from({ length: 50 }, (_, i) => show(i / 100)), { type: 'keep shown' }])
  expect(moved.history.past).toHaveLength(1)
  expect(shownLayout(moved).heaters[0]?.x).toBe(1.49)
  expect(shownLayout(editorReducer(moved, { type: 'undo' }))).toBe(start)
})
it('goes back to pointer-down on Escape, without a step', () => {
  const dropped = after([show(0.7), { type: 'let go' }])
  expect(shownLayout(dropped)).toBe(start)
  expect(dropped.history.past).toHaveLength(0)
})
it('lets go in order: gesture, placing, selection', () => {
  const busy = after([{ type: 'select', ids: ['H1'] }, { type: 'placing', model: 'betony-2-0' }, show(0.1)])
  const first = editorReducer(busy, { type: 'let go' })
  expect(first).toMatchObject({ draft: null, placing: 'betony-2-0', selected: ['H1'] })
  const second = editorReducer(first, { type: 'let go' })
  expect(second).toMatchObject({ placing: null, selected: ['H1'] })
  expect(editorReducer(second, { type: 'let go' }).selected).toEqual([])
})
it('pastes what was copied even after the original is gone, and selects the copies', () => {
  const pasted = after([
    { type: 'select', ids: ['H1', 'H2'] },
    { type: 'copy' },
    { type: 'remove' },
    { type: 'paste' },
    { type: 'paste' },
  ])
  expect(shownLayout(pasted).heaters.map((heater) => [heater.x, heater.y])).toEqual([
    [1.5, 0.5],
    [2.5, 1.5],
    [2, 0],
    [3, 1],
  ])
  expect(pasted.selected).toEqual(['H3', 'H4'])
})
it('never selects a heater that undo took away', () => {
  const undone = after([{ type: 'select', ids: ['H1'] }, { type: 'duplicate' }, { type: 'undo' }])
  expect(undone.selected).toEqual([])
})
it('says what it did', () => {
  expect(after([{ type: 'select', ids: ['H1'] }, { type: 'remove' }]).said).toBe('Heater H1 removed')
  expect(named(['H1', 'H2', 'H3', 'H4'])).toBe('Heaters H1, H2 and 2 more')
})
it.each(['paste', 'duplicate', 'remove'] as const)('%s of nothing is no step', (type) => {
  const state = editorStateOf(start)
  expect(after([{ type }], state).history).toBe(state.history)
})
