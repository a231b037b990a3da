import { useRef, useState, type PointerEvent, type RefObject } from 'react'
import type { MarkPlace } from '#app/domain/photo/mark-places.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import type { Mark } from '#app/editor/photo/placing.ts'
import type { PhotoView } from '#app/editor/photo/use-photo-view.ts'

interface MarkHand {
  readonly view: PhotoView
  readonly places: readonly MarkPlace[]
  readonly placing: boolean
  /** Path of the chosen mark: where several lie on each other, it is the one that is taken. */
  readonly chosen: string | null
  readonly readOnly: boolean
  readonly onChoose: (path: string | null) => void
  readonly onMove: (path: string, at: Mark) => void
  readonly onPlace: (at: Mark) => void
}

type Active =
  | { readonly kind: 'mark'; readonly path: string; readonly grip: Vec2; carried: boolean }
  | { readonly kind: 'place' }
  | { readonly kind: 'pan' | 'pinch' }

/** How near to a mark a pointer takes it, px of the screen. */
const reach = { mouse: 12, pen: 16, touch: 26 }
/** How far a mouse moves before a click on the photo shifts it instead, px. */
const slack = 4

const reachOf = (type: string): number => (type === 'touch' ? reach.touch : type === 'pen' ? reach.pen : reach.mouse)

/** The mark under a pointer and where the pointer is; the mark follows the pointer's way, so a finger need not hide it. */
export function useMarkGestures(box: RefObject<HTMLElement | null>, hand: MarkHand) {
  const { view, places, placing, chosen, readOnly, onChoose, onMove, onPlace } = hand
  const [moved, setMoved] = useState<{ path: string; at: Mark } | null>(null)
  const [pointed, setPointed] = useState<Mark | null>(null)
  const active = useRef<Active | null>(null)
  const fingers = useRef(new Map<number, Vec2>())
  const downAt = useRef<Vec2>([0, 0])

  const screenOf = (event: PointerEvent): Vec2 => {
    if (!box.current) return [0, 0]
    const { left, top } = box.current.getBoundingClientRect()
    return [event.clientX - left - box.current.clientLeft, event.clientY - top - box.current.clientTop]
  }
  const nearest = (screen: Vec2, type: string): MarkPlace | null => {
    const away = (place: MarkPlace) => {
      const [x, y] = view.toScreen(place.at)
      return Math.hypot(x - screen[0], y - screen[1])
    }
    const near = places.filter((place) => away(place) <= reachOf(type)).toSorted((a, b) => away(a) - away(b))
    return near.find(({ path }) => path === chosen) ?? near[0] ?? null
  }
  /** Where a mark that is held goes when the pointer is there. */
  const carriedTo = (screen: Vec2, grip: Vec2): Mark => view.toPhoto([screen[0] + grip[0], screen[1] + grip[1]])
  const begin = (event: PointerEvent, screen: Vec2): Active => {
    if (event.button === 1) return { kind: 'pan' }
    if (placing) return { kind: 'place' }
    const hit = nearest(screen, event.pointerType)
    onChoose(hit?.path ?? null)
    if (!hit || readOnly) return { kind: 'pan' }
    const at = view.toScreen(hit.at)
    return { kind: 'mark', path: hit.path, grip: [at[0] - screen[0], at[1] - screen[1]], carried: false }
  }

  const onPointerDown = (event: PointerEvent<HTMLElement>) => {
    if (event.button === 2) return
    const screen = screenOf(event)
    fingers.current.set(event.pointerId, screen)
    box.current?.setPointerCapture(event.pointerId)
    downAt.current = screen
    if (fingers.current.size > 1) {
      active.current = { kind: 'pinch' }
      setMoved(null)
      return setPointed(null)
    }
    active.current = begin(event, screen)
    if (active.current.kind === 'place') setPointed(view.toPhoto(screen))
  }
  const onPointerMove = (event: PointerEvent<HTMLElement>) => {
    const screen = screenOf(event)
    const before = fingers.current.get(event.pointerId)
    if (!before) return setPointed(placing && event.pointerType !== 'touch' ? view.toPhoto(screen) : null)
    const now = active.current
    const far = Math.hypot(screen[0] - downAt.current[0], screen[1] - downAt.current[1]) > slack
    if (now?.kind === 'pinch') {
      const other = [...fingers.current].find(([id]) => id !== event.pointerId)?.[1]
      if (other) view.pinchBy([before, other], [screen, other])
    } else if (now?.kind === 'pan') view.shiftBy(screen[0] - before[0], screen[1] - before[1])
    else if (now?.kind === 'mark' && (far || now.carried)) {
      now.carried = true
      setMoved({ path: now.path, at: carriedTo(screen, now.grip) })
    } else if (now?.kind === 'place') {
      if (far && event.pointerType === 'mouse') active.current = { kind: 'pan' }
      setPointed(view.toPhoto(screen))
    }
    fingers.current.set(event.pointerId, screen)
  }
  const onPointerUp = (event: PointerEvent<HTMLElement>) => {
    if (!fingers.current.delete(event.pointerId) || fingers.current.size > 0) return
    const now = active.current
    active.current = null
    // From where the finger left: its last way may not have been drawn yet.
    if (now?.kind === 'mark' && now.carried) onMove(now.path, carriedTo(screenOf(event), now.grip))
    if (now?.kind === 'place') onPlace(view.toPhoto(screenOf(event)))
    setMoved(null)
    if (event.pointerType === 'touch') setPointed(null)
  }
  const letGo = () => {
    const was = active.current !== null
    active.current = null
    fingers.current.clear()
    setMoved(null)
    setPointed(null)
    return was
  }
  return {
    /** A mark on its way, not kept yet. */
    moved,
    /** Where a mark would be put. */
    pointed,
    letGo,
    handlers: {
      onPointerDown,
      onPointerMove,
      onPointerUp,
      onPointerCancel: letGo,
      onPointerLeave: () => setPointed(null),
    },
  }
}
