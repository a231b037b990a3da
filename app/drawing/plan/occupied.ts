import type { Vec2 } from '#app/domain/vector.ts'

/** A turned rectangle on the drawing, px: its middle, half its size and its turn in degrees clockwise. */
export interface Patch {
  readonly x: number
  readonly y: number
  readonly halfWidth: number
  readonly halfHeight: number
  readonly turnDeg: number
}

/** The patch of an upright rectangle. */
export const patch = (x: number, y: number, width: number, height: number, turnDeg = 0): Patch => ({
  x,
  y,
  halfWidth: width / 2,
  halfHeight: height / 2,
  turnDeg,
})

/** The patch of a turned rectangle given by its corners in order. */
export function patchAround(corners: readonly Vec2[]): Patch {
  const [a = [0, 0], b = a, c = b] = corners
  const turnDeg = (Math.atan2(b[1] - a[1], b[0] - a[0]) * 180) / Math.PI
  const [width, height] = [Math.hypot(b[0] - a[0], b[1] - a[1]), Math.hypot(c[0] - b[0], c[1] - b[1])]
  return patch((a[0] + c[0]) / 2, (a[1] + c[1]) / 2, width, height, turnDeg)
}

const axesOf = (p: Patch): readonly [Vec2, Vec2] => {
  const turn = (p.turnDeg * Math.PI) / 180
  return [
    [Math.cos(turn), Math.sin(turn)],
    [-Math.sin(turn), Math.cos(turn)],
  ]
}

const extentAlong = (p: Patch, [ax, ay]: Vec2): number => {
  const [across, down] = axesOf(p)
  return p.halfWidth * Math.abs(across[0] * ax + across[1] * ay) + p.halfHeight * Math.abs(down[0] * ax + down[1] * ay)
}

/** Whether two patches come nearer to each other than `gap` px (separating axes; at corners a little strict). */
export function meets(a: Patch, b: Patch, gap = 0): boolean {
  const reach = Math.hypot(a.halfWidth, a.halfHeight) + Math.hypot(b.halfWidth, b.halfHeight) + gap * 1.5
  if (Math.abs(b.x - a.x) > reach || Math.abs(b.y - a.y) > reach) return false
  return [...axesOf(a), ...axesOf(b)].every((axis) => {
    const apart = Math.abs((b.x - a.x) * axis[0] + (b.y - a.y) * axis[1])
    return apart < extentAlong(a, axis) + extentAlong(b, axis) + gap
  })
}

/** Whether a patch is `gap` px clear of all others. */
export const isClear = (candidate: Patch, others: readonly Patch[], gap: number): boolean =>
  others.every((other) => !meets(candidate, other, gap))
