/**
 * Runs work in turn, so that large things are never held twice in memory. Null when `most` wait already: the caller says
 * that it has to be tried again.
 */
export function oneAtATime(most: number): <T>(work: () => Promise<T>) => Promise<T | null> {
  let last: Promise<unknown> = Promise.resolve()
  let waiting = 0
  return async (work) => {
    if (waiting >= most) return null
    waiting++
    const mine = last.then(work)
    last = mine.catch(() => undefined)
    try {
      return await mine
    } finally {
      waiting--
    }
  }
}
