import type { Measurement, PhotoMarks } from '#app/domain/photo/measurements.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { isClear, patch, type Patch } from '#app/drawing/plan/occupied.ts'
import { textWidth } from '#app/drawing/text/widths.ts'

/** Size of the words over a photo, px. */
export const photoTextSize = 12

/** Words over a photo, about the middle of their baseline, px of the drawing; `of` is what they name. */
export interface PhotoLabel {
  readonly of: string
  readonly text: string
  readonly at: Vec2
}

interface Wanted {
  readonly of: string
  readonly text: string
  /** Where they may stand, the best first. */
  readonly places: readonly Vec2[]
}

/** From where to where a measurement goes, px of the photo. */
export const endsOf = (measurement: Measurement): readonly [Vec2, Vec2] =>
  measurement.kind === 'length' ? [measurement.from.at, measurement.to.at] : [measurement.foot.at, measurement.top]

const middle = (...points: readonly Vec2[]): Vec2 => [
  points.reduce((sum, [x]) => sum + x, 0) / points.length,
  points.reduce((sum, [, y]) => sum + y, 0) / points.length,
]

/** Along a line, over it before under it, its middle first. */
const besideLine = (from: Vec2, to: Vec2): Vec2[] =>
  [0.5, 0.35, 0.65, 0.2, 0.8].flatMap((share): Vec2[] => {
    const [x, y] = [from[0] + share * (to[0] - from[0]), from[1] + share * (to[1] - from[1])]
    return [
      [x, y - 7],
      [x, y + 16],
    ]
  })

const about = ([x, y]: Vec2): Vec2[] => [0, -18, 18, -36, 36].map((down) => [x, y + down])

/**
 * The words of everything that is marked in a photo, none upon another: the chosen thing's first, then the measurements',
 * then the rectangles'. What finds no room is left out; it stands in the lists beside the photo, and enlarging makes room.
 */
export function placePhotoLabels(
  marks: PhotoMarks,
  toScreen: (mark: Vec2) => Vec2,
  figures: ReadonlyMap<string, string>,
  chosen: string | null,
): PhotoLabel[] {
  const planes = marks.planes.flatMap(({ id, name, corners: [a, b, c, d] }): Wanted[] => {
    const [first, second] = [toScreen(a), toScreen(b)]
    const named = { of: id, text: name, places: about(middle(first, second, toScreen(c), toScreen(d))) }
    return id === chosen ? [named, { of: id, text: 'first side', places: besideLine(first, second) }] : [named]
  })
  const measured = marks.measurements.map((measurement): Wanted => {
    const [from, to] = endsOf(measurement)
    const text = figures.get(measurement.id) ?? measurement.label
    return { of: measurement.id, text, places: besideLine(toScreen(from), toScreen(to)) }
  })
  const all = [...measured, ...planes]
  const taken: Patch[] = []
  return [...all.filter(({ of }) => of === chosen), ...all.filter(({ of }) => of !== chosen)].flatMap((wanted) => {
    const room = ([x, y]: Vec2) => patch(x, y - 4, textWidth(wanted.text, photoTextSize, 500), photoTextSize)
    const at = wanted.places.find((place) => isClear(room(place), taken, 3))
    if (!at) return []
    taken.push(room(at))
    return [{ of: wanted.of, text: wanted.text, at }]
  })
}
