import { describe, expect, it } from 'vitest'
import { demoMarks } from '#drizzle/seed/demo-photo.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { photoTextSize, placePhotoLabels, type PhotoLabel } from '#app/drawing/photo/photo-labels.ts'
import { textWidth } from '#app/drawing/text/widths.ts'

const marks = demoMarks()
const figures = new Map(marks.measurements.map(({ id, label }) => [id, `${label} 2.650 m ± 0.012`]))
const labelsAt = (scale: number, chosen: string | null = null) =>
  placePhotoLabels(marks, ([x, y]: Vec2) => [x * scale, y * scale], figures, chosen)

/** Left, right, top and bottom of a label's letters, px. */
const boxOf = ({ text, at: [x, y] }: PhotoLabel) => {
  const half = textWidth(text, photoTextSize, 500) / 2
  return { left: x - half, right: x + half, top: y - photoTextSize * 0.75, bottom: y + photoTextSize * 0.2 }
}

function meeting(labels: readonly PhotoLabel[]): [string, string][] {
  const boxes = labels.map(boxOf)
  return labels.flatMap((one, i) =>
    labels.slice(i + 1).flatMap((other, k): [string, string][] => {
      const [a, b] = [boxes[i]!, boxes[i + 1 + k]!]
      const apart = a.right <= b.left || b.right <= a.left || a.bottom <= b.top || b.bottom <= a.top
      return apart ? [] : [[one.text, other.text]]
    }),
  )
}

describe('words over a photo', () => {
  it.each([0.2, 0.25, 0.4, 1])('do not stand upon each other at %d of its size', (scale) => {
    for (const chosen of [null, marks.planes[0]!.id, marks.measurements[0]!.id])
      expect(meeting(labelsAt(scale, chosen))).toEqual([])
  })
  it('are all there where there is room', () => {
    expect(labelsAt(1)).toHaveLength(marks.planes.length + marks.measurements.length)
  })
  it('of what is chosen are there however little room there is', () => {
    for (const { id } of [...marks.measurements, ...marks.planes])
      expect(labelsAt(0.02, id).map(({ of }) => of)).toContain(id)
  })
  it('stay where they are best when nothing is in the way', () => {
    const [only] = marks.measurements
    const alone = placePhotoLabels({ ...marks, planes: [], measurements: [only!] }, (mark) => mark, figures, null)
    const ends = only!.kind === 'length' ? [only!.from.at, only!.to.at] : [only!.foot.at, only!.top]
    expect(alone[0]!.at[0]).toBeCloseTo((ends[0]![0] + ends[1]![0]) / 2, 9)
  })
})
