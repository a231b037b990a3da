import { useRef, useState, type KeyboardEvent } from 'react'
import { listMarks, moveMark, type MarkPlace } from '#app/domain/photo/mark-places.ts'
import type { PhotoMarks } from '#app/domain/photo/measurements.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { PhotoMarksDrawing } from '#app/drawing/photo/photo-marks.tsx'
import { IconButton } from '#app/components/button.tsx'
import { Magnifier } from '#app/editor/photo/magnifier.tsx'
import type { Mark } from '#app/editor/photo/placing.ts'
import { useMarkGestures } from '#app/editor/photo/use-mark-gestures.ts'
import { usePhotoView } from '#app/editor/photo/use-photo-view.ts'
import { useSize } from '#app/editor/use-size.ts'

interface PhotoSurfaceProps {
  readonly picture: string
  readonly name: string
  readonly width: number
  readonly height: number
  readonly marks: PhotoMarks
  readonly figures: ReadonlyMap<string, string>
  /** The plane or measurement whose marks are shown strongest. */
  readonly strong: string | null
  /** Path of the chosen mark. */
  readonly chosen: string | null
  /** What the next click puts, in words, and what was put before it; null when marks are only moved. */
  readonly asked: { readonly words: string; readonly points: readonly Mark[] } | null
  readonly readOnly: boolean
  readonly onChoose: (path: string | null) => void
  readonly onMove: (path: string, at: Mark) => void
  readonly onPlace: (at: Mark) => void
  readonly onUndo: () => void
  readonly onRedo: () => void
  readonly onCancel: () => void
}

const arrows: Record<string, Vec2> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
}

const clamped = (value: number, most: number): number => Math.min(most, Math.max(0, value))

/** A photo with its marks: moved by pointer, finger and arrows (1 px, with Shift 10), enlarged, with a magnifier. */
export function PhotoSurface(props: PhotoSurfaceProps) {
  const { picture, name, width, height, marks, chosen, asked, readOnly } = props
  const box = useRef<HTMLDivElement>(null)
  const size = useSize(box, { width: 860, height: 645 })
  const view = usePhotoView({ width, height }, size, box)
  const [cross, setCross] = useState<Mark | null>(null)
  const places = listMarks(marks)
  const gestures = useMarkGestures(box, { ...props, view, places, placing: asked !== null })
  const { moved, pointed } = gestures
  const shown = moved ? moveMark(marks, moved.path, moved.at) : marks
  const place = listMarks(shown).find(({ path }) => path === chosen)
  const focus = asked ? (pointed ?? cross) : (moved?.at ?? (place ? place.at : null))

  const step = (to: Mark) => {
    view.reveal(to)
    if (asked) {
      gestures.letGo()
      return setCross(to)
    }
    if (chosen && !readOnly) props.onMove(chosen, to)
  }
  const middle = () => view.toPhoto([size.width / 2, size.height / 2])
  const choose = (by: number) => {
    const at = places.findIndex(({ path }) => path === chosen)
    const next = places[(at + by + places.length) % places.length]
    if (next) props.onChoose(next.path)
    if (next) view.reveal(next.at)
  }
  const key = (event: KeyboardEvent) => {
    const arrow = arrows[event.key]
    const control = event.ctrlKey || event.metaKey
    if (control && event.key.toLowerCase() === 'z') (event.shiftKey ? props.onRedo : props.onUndo)()
    else if (control) return
    else if (arrow) {
      const from = asked ? (focus ?? middle()) : place?.at
      const far = event.shiftKey ? 10 : 1
      if (from) step([clamped(from[0] + arrow[0] * far, width), clamped(from[1] + arrow[1] * far, height)])
    } else if (event.key === 'Enter' && asked) props.onPlace(focus ? [focus[0], focus[1]] : middle())
    else if (event.key === '[' || event.key === ']') choose(event.key === ']' ? 1 : -1)
    else if (event.key === '+' || event.key === '=') view.enlargeAt(1.25)
    else if (event.key === '-') view.enlargeAt(0.8)
    else if (event.key === '0') view.showAll()
    else if (event.key === 'Escape') {
      gestures.letGo()
      if (asked) props.onCancel()
      else props.onChoose(null)
    } else return
    event.preventDefault()
  }

  const [left, top] = view.toScreen([0, 0])
  const far = focus && view.toScreen(focus)
  return (
    <div className="relative">
      <div
        ref={box}
        tabIndex={0}
        role="application"
        aria-label={`Photo ${name}. ${placeWords(asked?.words, place)}`}
        className={`relative h-[72vw] max-h-[calc(100dvh-9rem)] min-h-72 touch-none overflow-hidden rounded-md border border-rule bg-dusk-ground select-none tablet:h-[52vw] wide:h-[44vw] ${asked ? 'cursor-crosshair' : ''}`}
        onKeyDown={key}
        {...gestures.handlers}
      >
        <img
          src={picture}
          alt=""
          draggable={false}
          className="pointer-events-none absolute top-0 left-0 max-w-none origin-top-left"
          style={{ width, height, transform: `translate(${left}px, ${top}px) scale(${view.scale})` }}
        />
        <svg width={size.width} height={size.height} className="pointer-events-none absolute inset-0">
          <PhotoMarksDrawing marks={shown} toScreen={view.toScreen} figures={props.figures} chosen={props.strong} />
          <Handles places={listMarks(shown)} chosen={chosen} toScreen={view.toScreen} />
          {asked?.points.map((point, k) => (
            <Handle key={k} at={view.toScreen(point)} strong />
          ))}
          {asked && focus && <Handle at={view.toScreen(focus)} strong />}
        </svg>
        {focus && far && (
          <Magnifier {...{ picture, width, height }} at={focus} scale={view.scale} left={far[0] > size.width / 2} />
        )}
      </div>
      <p className="absolute right-2 bottom-2 flex rounded-md bg-paper-raised/90 print:hidden">
        <IconButton icon="minus" label="Smaller" onClick={() => view.enlargeAt(0.8)} />
        <IconButton icon="plus" label="Larger" onClick={() => view.enlargeAt(1.25)} />
        <IconButton icon="fit" label="Whole photo" onClick={view.showAll} />
      </p>
    </div>
  )
}

function placeWords(asked: string | undefined, place: MarkPlace | undefined): string {
  if (asked) return `Arrows move the cross, Enter puts the ${asked}.`
  if (!place) return 'Bracket keys choose a mark, plus and minus change the size.'
  const [x, y] = place.at.map(Math.round)
  return `${place.words} chosen, at ${x}, ${y} px: arrows move it by 1 px, with Shift 10 px.`
}

interface HandlesProps {
  readonly places: readonly MarkPlace[]
  readonly chosen: string | null
  readonly toScreen: (mark: Vec2) => Vec2
}

const Handles = ({ places, chosen, toScreen }: HandlesProps) =>
  places.map(({ path, at }) => <Handle key={path} at={toScreen(at)} strong={path === chosen} path={path} />)

function Handle({ at: [x, y], strong, path }: { at: Vec2; strong: boolean; path?: string }) {
  const r = strong ? 8 : 5.5
  return (
    <g data-mark={path} fill="none">
      <circle cx={x} cy={y} r={r} stroke="#0c1322" strokeWidth="4" strokeOpacity="0.75" />
      <circle cx={x} cy={y} r={r} stroke={strong ? '#ffb27a' : '#efe6d6'} strokeWidth="1.8" />
      <circle cx={x} cy={y} r="1" fill={strong ? '#ffb27a' : '#efe6d6'} />
    </g>
  )
}
