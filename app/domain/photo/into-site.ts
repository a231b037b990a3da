import { moveDimension } from '#app/domain/site/dimension.ts'
import { unusedId } from '#app/domain/site/edits.ts'
import { siteSchema, type Dimension, type Site, type Trace } from '#app/domain/site/site.ts'
import { roundLength } from '#app/domain/units.ts'
import { radians, type Vec2 } from '#app/domain/vector.ts'

/** A length of a photo as the site keeps it. */
export interface PhotoSize {
  readonly label: string
  readonly value: number
  readonly tolerance: number
  readonly photo: NonNullable<Dimension['photo']>
}

const asKept = ({ value, tolerance, photo }: PhotoSize) => ({
  value: roundLength(value),
  tolerance: roundLength(tolerance),
  source: 'photo' as const,
  photo,
})

/** The site with one more size from a photo; it decides nothing that is drawn until it is told what it moves. */
export const addPhotoSize = (site: Site, size: PhotoSize): Site => ({
  ...site,
  dimensions: [
    ...site.dimensions,
    { id: unusedId(site, 'size'), label: size.label, note: null, moves: [], ...asKept(size) },
  ],
})

/**
 * The site with a size replaced by its measurement in a photo: everything that it decides moves along. Null when the
 * size is not there, or when the site could not be like that.
 */
export function replaceByPhotoSize(site: Site, dimensionId: string, size: PhotoSize): Site | null {
  const dimension = site.dimensions.find(({ id }) => id === dimensionId)
  if (!dimension) return null
  const kept = asKept(size)
  const moved = moveDimension(site, dimension, kept.value - dimension.value)
  const dimensions = moved.dimensions.map((each) => (each.id === dimensionId ? { ...each, ...kept } : each))
  const measured = siteSchema.safeParse({ ...moved, dimensions })
  return measured.success ? measured.data : null
}

/** A picture to trace by two of its points: how far they are apart, m, and where the first of them lies in plan. */
interface TraceMarks {
  readonly photoId: string
  readonly height: number
  readonly from: Vec2
  readonly to: Vec2
  readonly length: number
  readonly origin: Vec2
  readonly turnDeg: number
}

/**
 * The trace that puts a picture under the plan, or why not. `at` is its lower left corner; the picture's right side
 * turns counter-clockwise from the plan's x by `turnDeg`.
 */
export function traceOf(marks: TraceMarks): Trace | { readonly error: string } {
  const { photoId, height, from, to, length, origin, turnDeg } = marks
  const apart = Math.hypot(to[0] - from[0], to[1] - from[1])
  if (!(apart >= 10))
    return { error: 'The two points are less than 10 px apart. Take two that are farther from each other.' }
  const metresPerPixel = length / apart
  if (!(metresPerPixel > 0 && metresPerPixel <= 10))
    return { error: 'A pixel may be at most 10 m. Give a smaller length.' }
  const [c, s] = [Math.cos(radians(turnDeg)), Math.sin(radians(turnDeg))]
  const [x, y] = [from[0] * metresPerPixel, (height - from[1]) * metresPerPixel]
  return { photoId, at: [origin[0] - (c * x - s * y), origin[1] - (s * x + c * y)], metresPerPixel, turnDeg }
}
