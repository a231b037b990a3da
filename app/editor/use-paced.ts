import { useDeferredValue, useEffect, useState } from 'react'

/** Milliseconds between two beats while something moves. */
const beatEvery = 150

/** Counts the beats of a movement; it does not run at rest. */
export function useBeat(moving: boolean): number {
  const [beat, setBeat] = useState(0)
  useEffect(() => {
    if (!moving) return
    const next = () => setBeat((count) => count + 1)
    const timer = setInterval(next, beatEvery)
    return () => {
      clearInterval(timer)
      next()
    }
  }, [moving])
  return beat
}

/**
 * A value for what may come after the frame: at rest the newest, while something moves the newest at each beat, so that
 * the frames of a drag have the time between.
 */
export function usePaced<T>(value: T, moving: boolean, beat: number): T {
  const [held, setHeld] = useState({ value, beat: -1 })
  if (moving && held.beat !== beat) setHeld({ value, beat })
  return useDeferredValue(moving ? held.value : value)
}
