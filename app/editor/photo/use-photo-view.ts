import { useEffect, useState, type RefObject } from 'react'
import type { Vec2 } from '#app/domain/vector.ts'
import { enlarge, pinch, shift, wholePlan, type ViewTransform } from '#app/editor/view-transform.ts'

interface Size {
  readonly width: number
  readonly height: number
}

/** A photo on the screen: how large it is shown, where, and the ways to change that. */
export interface PhotoView {
  /** Screen px per px of the photo. */
  readonly scale: number
  readonly toScreen: (mark: Vec2) => Vec2
  /** The px of the photo under a place of the screen, within the photo. */
  readonly toPhoto: (screen: Vec2) => [number, number]
  enlargeAt: (factor: number, at?: Vec2) => void
  shiftBy: (dx: number, dy: number) => void
  pinchBy: (before: readonly [Vec2, Vec2], after: readonly [Vec2, Vec2]) => void
  showAll: () => void
  /** Shifts so that a mark can be seen. */
  reveal: (mark: Vec2) => void
}

const within = (value: number, most: number): number => Math.min(most, Math.max(0, value))

/** The view of a photo that fits its frame, enlarged and shifted by wheel, fingers, keys and buttons. */
export function usePhotoView(photo: Size, frame: Size, box: RefObject<HTMLElement | null>): PhotoView {
  const [view, setView] = useState<ViewTransform>(wholePlan)
  const fit = Math.min(frame.width / photo.width, frame.height / photo.height)
  const scale = fit * view.size
  const left = ((frame.width - photo.width * fit) / 2) * view.size + view.x
  const top = ((frame.height - photo.height * fit) / 2) * view.size + view.y
  const middle: Vec2 = [frame.width / 2, frame.height / 2]
  const toScreen = ([x, y]: Vec2): Vec2 => [left + x * scale, top + y * scale]

  useEffect(() => {
    const element = box.current
    const turned = (event: WheelEvent) => {
      event.preventDefault()
      const place = element?.getBoundingClientRect()
      const at: Vec2 = [event.clientX - (place?.left ?? 0), event.clientY - (place?.top ?? 0)]
      if (event.ctrlKey || Math.abs(event.deltaX) < 1) setView((old) => enlarge(old, Math.exp(-event.deltaY / 400), at))
      else setView((old) => shift(old, -event.deltaX, -event.deltaY))
    }
    element?.addEventListener('wheel', turned, { passive: false })
    return () => element?.removeEventListener('wheel', turned)
  }, [box])

  return {
    scale,
    toScreen,
    toPhoto: ([x, y]) => [within((x - left) / scale, photo.width), within((y - top) / scale, photo.height)],
    enlargeAt: (factor, at = middle) => setView((old) => enlarge(old, factor, at)),
    shiftBy: (dx, dy) => setView((old) => shift(old, dx, dy)),
    pinchBy: (before, after) => setView((old) => pinch(old, before, after)),
    showAll: () => setView(wholePlan),
    reveal: (mark) => {
      const [x, y] = toScreen(mark)
      const away = (at: number, size: number) => (at < 24 ? 24 - at : at > size - 24 ? size - 24 - at : 0)
      const [dx, dy] = [away(x, frame.width), away(y, frame.height)]
      if (dx !== 0 || dy !== 0) setView((old) => shift(old, dx, dy))
    },
  }
}
