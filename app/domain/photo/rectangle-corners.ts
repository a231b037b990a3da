import type { Corners } from '#app/domain/photo/homography.ts'
import { refuse, type Refusal } from '#app/domain/photo/refusal.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** Corners nearer to each other than this, px, are one click made twice. */
const together = 3

/** Twice the area of three corners over the square of the longest distance, below which they count as one line. */
const inLine = 0.004

/** Twice the area of a triangle, positive when its corners run clockwise in a photo (y is down). */
const turn = (a: Vec2, b: Vec2, c: Vec2): number => (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])

const apart = (a: Vec2, b: Vec2): number => Math.hypot(a[0] - b[0], a[1] - b[1])

/**
 * Why four marks cannot be the corners of a rectangle in a photo, one after the other; null when they can. Before the
 * camera a rectangle is always seen as a four-sided figure without a crossing or an inward corner.
 */
export function refuseCorners(corners: Corners): Refusal | null {
  const [a, b, c, d] = corners
  if (!corners.flat().every(Number.isFinite)) return refuse('not finite', 'A corner has no place in the photo.')
  const pairs = [
    ['1 and 2', a, b],
    ['2 and 3', b, c],
    ['3 and 4', c, d],
    ['4 and 1', d, a],
    ['1 and 3', a, c],
    ['2 and 4', b, d],
  ] as const
  for (const [names, one, other] of pairs) {
    if (apart(one, other) < together) {
      return refuse('corners together', `Corners ${names} are in one place. Mark four different corners.`)
    }
  }
  const longest = Math.max(...pairs.map(([, one, other]) => apart(one, other)))
  const turns = [turn(a, b, c), turn(b, c, d), turn(c, d, a), turn(d, a, b)]
  const flat = turns.findIndex((area) => Math.abs(area) < inLine * longest * longest)
  if (flat >= 0) {
    const names = [0, 1, 2].map((step) => ((flat + step) % 4) + 1)
    return refuse(
      'corners in line',
      `Corners ${names[0]}, ${names[1]} and ${names[2]} lie in one line, so the plane is seen edge-on or a corner is wrong.`,
    )
  }
  const clockwise = turns.filter((area) => area > 0).length
  if (clockwise === 2) {
    return refuse('crossed', 'The sides cross. Mark the corners one after the other around the rectangle.')
  }
  if (clockwise !== 0 && clockwise !== 4) {
    return refuse('corner inside', 'One corner lies inside the other three. No photo shows a rectangle like that.')
  }
  return null
}
