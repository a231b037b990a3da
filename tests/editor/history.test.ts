import { expect, it } from 'vitest'
import { historyOf, record, redo, undo } from '#app/editor/history.ts'

it('goes back and forward through every step, and no further', () => {
  const three = record(record(record(historyOf(0), 1), 2), 3)
  const back = undo(undo(undo(undo(three))))
  expect(back.present).toBe(0)
  expect(redo(redo(redo(redo(back)))).present).toBe(3)
})
it('forgets what was undone once something else is done', () => {
  const branched = record(undo(record(historyOf('a'), 'b')), 'c')
  expect(redo(branched).present).toBe('c')
  expect(undo(branched).present).toBe('a')
})
it('takes no step for the same value', () => {
  const start = historyOf('a')
  expect(record(start, 'a')).toBe(start)
})
it('keeps 200 steps', () => {
  let history = historyOf(0)
  for (let step = 1; step <= 300; step += 1) history = record(history, step)
  for (let step = 0; step < 400; step += 1) history = undo(history)
  expect(history.present).toBe(100)
})
