/** Immutable snapshots: what was, what is, what was undone. */
export interface History<T> {
  readonly past: readonly T[]
  readonly present: T
  readonly future: readonly T[]
}

/** Steps kept. */
const longest = 200

/** A history that starts here. */
export const historyOf = <T>(present: T): History<T> => ({ past: [], present, future: [] })

/** One step. The same value again is no step; what was undone is gone. */
export function record<T>(history: History<T>, next: T): History<T> {
  if (Object.is(next, history.present)) return history
  return { past: [...history.past, history.present].slice(-longest), present: next, future: [] }
}

/** One step back; at the start: the same history. */
export function undo<T>(history: History<T>): History<T> {
  const last = history.past.at(-1)
  if (last === undefined) return history
  return { past: history.past.slice(0, -1), present: last, future: [history.present, ...history.future] }
}

/** One step forward again; at the end: the same history. */
export function redo<T>(history: History<T>): History<T> {
  const [next, ...rest] = history.future
  if (next === undefined) return history
  return { past: [...history.past, history.present], present: next, future: rest }
}
