import { z } from 'zod'

/** Largest side of a kept photo, px. */
export const largestSide = 4096

const id = z.string().min(1).max(40)
const label = z.string().trim().min(1, 'Give it a name.').max(80, 'At most 80 characters.')
const mark = z.tuple([z.number().min(0).max(largestSide), z.number().min(0).max(largestSide)])
const size = z.number().positive().max(100)
const tolerance = z.number().nonnegative().max(10)

/** An upright edge: its foot on the plane, its top. */
const uprightSchema = z.strictObject({ foot: mark, top: mark })
export type Upright = z.infer<typeof uprightSchema>

/**
 * A plane of the photo by a rectangle of known size in it: its corners one after the other, the length from the first to the
 * second, m, and from the second to the third. With it, for heights, two edges that stand plumb on it: one of known height,
 * and another to find where plumb lines meet.
 */
const planeSchema = z.strictObject({
  id,
  name: label,
  corners: z.tuple([mark, mark, mark, mark]),
  width: size,
  depth: size,
  /** ± of both sizes, m. */
  tolerance,
  vertical: z.strictObject({ known: uprightSchema, height: size, tolerance, other: uprightSchema }).nullable(),
})
export type PhotoPlane = z.infer<typeof planeSchema>

/** A mark and the plane that the person says it lies in: a photo does not show it. */
const placedSchema = z.strictObject({ at: mark, plane: id })
export type Placed = z.infer<typeof placedSchema>

const lengthSchema = z.strictObject({ id, kind: z.literal('length'), label, from: placedSchema, to: placedSchema })
const heightSchema = z.strictObject({ id, kind: z.literal('height'), label, foot: placedSchema, top: mark })

/** A length between two marks of one plane, or a height over a plane from its foot in that plane to its top. */
const measurementSchema = z.discriminatedUnion('kind', [lengthSchema, heightSchema])
export type Measurement = z.infer<typeof measurementSchema>

/** Stated maxima of one photo. */
export const mostPlanes = 8
export const mostMeasurements = 60

/** What is marked in a photo, in px from its upper left corner, x to the right and y down. */
export const photoMarksSchema = z.strictObject({
  /** Standard error of every mark, px. */
  clickSigma: z.number().min(0.1).max(20),
  planes: z.array(planeSchema).max(mostPlanes),
  measurements: z.array(measurementSchema).max(mostMeasurements),
})
export type PhotoMarks = z.infer<typeof photoMarksSchema>

/** A photo in which nothing is marked yet. */
export const noMarks: PhotoMarks = { clickSigma: 1, planes: [], measurements: [] }
