import { useState } from 'react'
import type { PhotoMarks } from '#app/domain/photo/measurements.ts'
import { marksAsked, placed, type Mark, type Placing } from '#app/editor/photo/placing.ts'

/** What is being marked, and how far it is. */
interface Underway {
  readonly placing: Placing
  readonly points: readonly Mark[]
}

/** Marks one after the other; when the last one is put, what they make goes into the photo's marks in one step. */
export function usePlacing(
  onChange: (edit: (marks: PhotoMarks) => PhotoMarks) => void,
  onTrace: (points: readonly Mark[]) => void,
) {
  const [underway, setUnderway] = useState<Underway | null>(null)
  const asked = underway && marksAsked(underway.placing)
  const put = (at: Mark) => {
    if (!underway || !asked) return
    const points = [...underway.points, at]
    if (points.length < asked.length) return setUnderway({ ...underway, points })
    setUnderway(null)
    if (underway.placing.kind === 'trace') onTrace(points)
    else onChange((old) => placed(old, underway.placing, points))
  }
  return {
    asked: underway &&
      asked && {
        words: asked[underway.points.length] ?? '',
        points: underway.points,
        step: underway.points.length + 1,
        of: asked.length,
      },
    start: (placing: Placing) => setUnderway({ placing, points: [] }),
    put,
    /** The last mark again; without one, nothing is marked any more. */
    back: () =>
      setUnderway((old) => (old && old.points.length > 0 ? { ...old, points: old.points.slice(0, -1) } : null)),
    cancel: () => setUnderway(null),
  }
}
