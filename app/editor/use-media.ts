import { useSyncExternalStore } from 'react'

/** Whether a media query holds; `onServer` until the page is alive. */
export function useMedia(query: string, onServer = false): boolean {
  return useSyncExternalStore(
    (changed) => {
      const list = matchMedia(query)
      list.addEventListener('change', changed)
      return () => list.removeEventListener('change', changed)
    },
    () => matchMedia(query).matches,
    () => onServer,
  )
}

/** How much of the page a device can show: a phone reads, a tablet places by touch, a desk has everything beside. */
export type Room = 'desk' | 'tablet' | 'phone'

/** The room there is: desk from 1280 px, phone under 768 px. */
export function useRoom(): Room {
  const desk = useMedia('(min-width: 80rem)', true)
  const tablet = useMedia('(min-width: 48rem)', true)
  return desk ? 'desk' : tablet ? 'tablet' : 'phone'
}

const never = () => () => undefined

/** Whether the page is alive in a browser; false on the server and in the first moment, so that both draw the same. */
export const useAlive = (): boolean =>
  useSyncExternalStore(
    never,
    () => true,
    () => false,
  )
