import { combineReadings, type Combined } from '#app/domain/photo/combine.ts'
import type { Estimate } from '#app/domain/photo/estimate.ts'
import { heightOverPlane } from '#app/domain/photo/height-over-plane.ts'
import { lengthInPlane, type MarkedPhoto } from '#app/domain/photo/length-in-plane.ts'
import type { Measurement } from '#app/domain/photo/measurements.ts'
import type { Refusal } from '#app/domain/photo/refusal.ts'

/** What one measurement of a photo gives: a figure, m, or why there is none. */
export const measure = (photo: MarkedPhoto, measurement: Measurement): Estimate | Refusal =>
  measurement.kind === 'length' ? lengthInPlane(photo, measurement) : heightOverPlane(photo, measurement)

/** One reading of a length: in which photo, by which measurement. */
export interface Reading {
  readonly photoId: string
  readonly measurement: Measurement
  readonly estimate: Estimate
}

/** Two measurements are of one thing when they have one name and one kind. */
const sameThing = (a: Measurement, b: Measurement): boolean =>
  a.kind === b.kind && a.label.trim().toLowerCase() === b.label.trim().toLowerCase()

/** Every reading of the thing that a measurement measures, in all photos of a job; those refused are left out. */
export function readingsOf(photos: readonly MarkedPhoto[], measurement: Measurement): Reading[] {
  return photos.flatMap((photo) =>
    photo.marks.measurements
      .filter((each) => sameThing(each, measurement))
      .flatMap((each): Reading[] => {
        const estimate = measure(photo, each)
        return 'refused' in estimate ? [] : [{ photoId: photo.id, measurement: each, estimate }]
      }),
  )
}

/** The mean of all readings of the thing that a measurement measures; null without a reading. */
export const combinedOf = (photos: readonly MarkedPhoto[], measurement: Measurement): Combined | null =>
  combineReadings(readingsOf(photos, measurement).map(({ estimate }) => estimate))
