import type { MarkedPhoto } from '#app/domain/photo/length-in-plane.ts'
import type { PhotoPlane } from '#app/domain/photo/measurements.ts'
import { isRefused, type Refusal } from '#app/domain/photo/refusal.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { pictureOf, type PinHole } from '#tests/support/pin-hole-camera.ts'

/** The picture of a point as a mark. */
export function markOf(camera: PinHole, point: Vec3): [number, number] {
  const [x, y] = pictureOf(camera, point).mark
  return [x, y]
}

/** A photo of a floor: a rectangle of 2 × 1.5 m about the origin, an upright of 2 m and a second one marked. */
export function floorPhoto(camera: PinHole, tolerance = 0, heightTolerance = 0): MarkedPhoto & { plane: PhotoPlane } {
  const mark = (...point: Vec3) => markOf(camera, point)
  const plane: PhotoPlane = {
    id: 'floor',
    name: 'Floor',
    corners: [mark(-1, -0.75, 0), mark(1, -0.75, 0), mark(1, 0.75, 0), mark(-1, 0.75, 0)],
    width: 2,
    depth: 1.5,
    tolerance,
    vertical: {
      known: { foot: mark(-1, 0.75, 0), top: mark(-1, 0.75, 2) },
      height: 2,
      tolerance: heightTolerance,
      other: { foot: mark(1, -0.75, 0), top: mark(1, -0.75, 1.4) },
    },
  }
  return { id: 'photo', plane, marks: { clickSigma: 1, planes: [plane], measurements: [] } }
}

/** The answer where none is refused; throws the refusal's words. */
export function given<T extends object>(answer: T | Refusal): T {
  if (isRefused(answer)) throw new Error(answer.words)
  return answer
}
