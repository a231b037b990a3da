/** A point or direction in plan, m. x and y as the site's own axes say. */
export type Vec2 = readonly [x: number, y: number]

/** A point or direction in space, m; z up from the finished floor. */
export type Vec3 = readonly [x: number, y: number, z: number]

export const add = (a: Vec3, b: Vec3): Vec3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]]
export const subtract = (a: Vec3, b: Vec3): Vec3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]]
export const scale = (a: Vec3, k: number): Vec3 => [a[0] * k, a[1] * k, a[2] * k]
export const dot = (a: Vec3, b: Vec3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
export const cross = (a: Vec3, b: Vec3): Vec3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
]
export const lengthOf = (a: Vec3): number => Math.hypot(a[0], a[1], a[2])

/** The direction of a non-zero vector; a zero vector gives zeros. */
export const normalise = (a: Vec3): Vec3 => {
  const length = lengthOf(a)
  return length === 0 ? [0, 0, 0] : scale(a, 1 / length)
}

export const radians = (degrees: number): number => (degrees * Math.PI) / 180
export const degrees = (angle: number): number => (angle * 180) / Math.PI
