import type { Measurement, PhotoMarks, PhotoPlane } from '#app/domain/photo/measurements.ts'

/** An id that nothing in the photo has: the stem with the lowest free number. */
export function unusedMarkId({ planes, measurements }: PhotoMarks, stem: string): string {
  const taken = new Set([...planes, ...measurements].map(({ id }) => id))
  let number = 1
  while (taken.has(`${stem}-${number}`)) number++
  return `${stem}-${number}`
}

/** The marks with one more plane; its id must be unused. */
export const addPlane = (marks: PhotoMarks, plane: PhotoPlane): PhotoMarks => ({
  ...marks,
  planes: [...marks.planes, plane],
})

/** The marks with some facts of one plane replaced. */
export const changePlane = (marks: PhotoMarks, id: string, facts: Partial<Omit<PhotoPlane, 'id'>>): PhotoMarks => ({
  ...marks,
  planes: marks.planes.map((plane) => (plane.id === id ? { ...plane, ...facts } : plane)),
})

const planesOf = (measurement: Measurement): string[] =>
  measurement.kind === 'length' ? [measurement.from.plane, measurement.to.plane] : [measurement.foot.plane]

/** The marks without a plane and without what is measured in it. */
export const removePlane = (marks: PhotoMarks, id: string): PhotoMarks => ({
  ...marks,
  planes: marks.planes.filter((plane) => plane.id !== id),
  measurements: marks.measurements.filter((measurement) => !planesOf(measurement).includes(id)),
})

/** The marks with one more measurement; its id must be unused. */
export const addMeasurement = (marks: PhotoMarks, measurement: Measurement): PhotoMarks => ({
  ...marks,
  measurements: [...marks.measurements, measurement],
})

/** The marks with one measurement as it is now. */
export const changeMeasurement = (marks: PhotoMarks, changed: Measurement): PhotoMarks => ({
  ...marks,
  measurements: marks.measurements.map((each) => (each.id === changed.id ? changed : each)),
})

/** The marks without one measurement. */
export const removeMeasurement = (marks: PhotoMarks, id: string): PhotoMarks => ({
  ...marks,
  measurements: marks.measurements.filter((measurement) => measurement.id !== id),
})
