import { useLayoutEffect, useState, type RefObject } from 'react'

/** Width and height of an element in px, followed as they change; the given size until it is measured. */
export function useSize(element: RefObject<HTMLElement | null>, first: { width: number; height: number }) {
  const [size, setSize] = useState(first)
  useLayoutEffect(() => {
    const box = element.current
    if (!box) return
    const measure = () => {
      const next = { width: Math.round(box.clientWidth), height: Math.round(box.clientHeight) }
      if (next.width > 0 && next.height > 0)
        setSize((old) => (old.width === next.width && old.height === next.height ? old : next))
    }
    measure()
    const observer = new ResizeObserver(measure)
    observer.observe(box)
    return () => observer.disconnect()
  }, [element])
  return size
}
