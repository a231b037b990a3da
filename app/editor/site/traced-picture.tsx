import type { Trace } from '#app/domain/site/site.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'

interface TracedPictureProps {
  readonly trace: Trace
  readonly view: PlanView
  readonly theme: 'dusk' | 'day'
}

/** The picture to trace, laid over the floor to scale and seen through: its lower left corner stands at the trace's place. */
export function TracedPicture({ trace, view, theme }: TracedPictureProps) {
  const [x, y] = toScreen(view, trace.at)
  return (
    <img
      src={`/api/photos/${trace.photoId}/picture.jpg`}
      alt=""
      draggable={false}
      data-trace=""
      className={`pointer-events-none absolute max-w-none origin-bottom-left ${theme === 'day' ? 'opacity-60 mix-blend-multiply' : 'opacity-35'}`}
      style={{
        left: x,
        bottom: view.height - y,
        transform: `rotate(${-trace.turnDeg}deg) scale(${view.scale * trace.metresPerPixel})`,
      }}
    />
  )
}
