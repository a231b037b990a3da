import { useSyncExternalStore } from 'react'
import type { Vec2 } from '#app/domain/vector.ts'

/** What the pointer or the keyboard focus is at: a place on the plan in m, with where that is on screen in px. */
export interface Pointed {
  readonly at: Vec2
  readonly screen: Vec2
  /** A seat under it or focused. */
  readonly seatId: string | null
  readonly by: 'pointer' | 'focus'
}

/** Holds what is pointed at apart from the editor's state, so that only the tag and the scale are drawn anew. */
export interface PointedStore {
  set: (pointed: Pointed | null) => void
  get: () => Pointed | null
  subscribe: (listener: () => void) => () => void
}

/** A store that points at nothing yet. */
export function pointedStore(): PointedStore {
  let pointed: Pointed | null = null
  const listeners = new Set<() => void>()
  return {
    set(next) {
      if (next === pointed) return
      pointed = next
      for (const listener of listeners) listener()
    },
    get: () => pointed,
    subscribe(listener) {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
  }
}

/** What is pointed at now. */
export const usePointed = (store: PointedStore): Pointed | null =>
  useSyncExternalStore(store.subscribe, store.get, () => null)
