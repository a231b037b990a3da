import { addMeasurement, addPlane, changePlane, unusedMarkId } from '#app/domain/photo/edits.ts'
import type { PhotoMarks } from '#app/domain/photo/measurements.ts'

/** A mark in px of the photo. */
export type Mark = [x: number, y: number]

/** What is being marked: what is known of it already; its marks come one after the other. */
export type Placing =
  | {
      readonly kind: 'plane'
      readonly name: string
      readonly width: number
      readonly depth: number
      readonly tolerance: number
    }
  | { readonly kind: 'uprights'; readonly planeId: string; readonly height: number; readonly tolerance: number }
  | { readonly kind: 'length'; readonly label: string; readonly from: string; readonly to: string }
  | { readonly kind: 'height'; readonly label: string; readonly plane: string }
  | { readonly kind: 'trace' }

/** Which marks it takes, in words, in their order. */
export function marksAsked(placing: Placing): readonly string[] {
  switch (placing.kind) {
    case 'plane':
      return [
        `first corner of ${placing.name}`,
        'second corner, at the end of the first side',
        'third corner, around the rectangle',
        'fourth corner',
      ]
    case 'uprights':
      return [
        'foot of the known height',
        'top of the known height',
        'foot of a second upright, well to the side',
        'any higher point of the second upright',
      ]
    case 'length':
      return [`one end of ${placing.label}`, `other end of ${placing.label}`]
    case 'height':
      return [`foot of ${placing.label}, in its plane`, `top of ${placing.label}, straight above the foot`]
    case 'trace':
      return ['first point of the known length', 'second point of the known length']
  }
}

/** The photo's marks once all that it takes are there; unchanged for a trace, whose marks are not the photo's. */
export function placed(marks: PhotoMarks, placing: Placing, points: readonly Mark[]): PhotoMarks {
  const [a = [0, 0], b = [0, 0], c = [0, 0], d = [0, 0]] = points
  switch (placing.kind) {
    case 'plane': {
      const { name, width, depth, tolerance } = placing
      const id = unusedMarkId(marks, 'plane')
      return addPlane(marks, { id, name, corners: [a, b, c, d], width, depth, tolerance, vertical: null })
    }
    case 'uprights': {
      const { planeId, height, tolerance } = placing
      const vertical = { known: { foot: a, top: b }, height, tolerance, other: { foot: c, top: d } }
      return changePlane(marks, planeId, { vertical })
    }
    case 'length': {
      const { label, from, to } = placing
      const ends = { from: { at: a, plane: from }, to: { at: b, plane: to } }
      return addMeasurement(marks, { id: unusedMarkId(marks, 'length'), kind: 'length', label, ...ends })
    }
    case 'height': {
      const { label, plane } = placing
      const foot = { at: a, plane }
      return addMeasurement(marks, { id: unusedMarkId(marks, 'height'), kind: 'height', label, foot, top: b })
    }
    case 'trace':
      return marks
  }
}
