import type { Vec2, Vec3 } from '#app/domain/vector.ts'
import { chance } from '#tests/support/chance.ts'

/** Where a pin-hole camera stands, which point it looks at, its focal length and the middle of its picture, px. */
export interface PinHole {
  readonly at: Vec3
  readonly towards: Vec3
  readonly focal: number
  readonly middle: Vec2
}

/** The picture of a point: x to the right, y down, and how far before the camera it is. */
export function pictureOf({ at, towards, focal, middle }: PinHole, point: Vec3): { mark: Vec2; before: number } {
  const minus = (a: Vec3, b: Vec3): Vec3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]]
  const times = (a: Vec3, b: Vec3) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
  const unit = (a: Vec3): Vec3 => {
    const size = Math.sqrt(times(a, a))
    return [a[0] / size, a[1] / size, a[2] / size]
  }
  const ahead = unit(minus(towards, at))
  const right = unit([ahead[1], -ahead[0], 0])
  const down: Vec3 = [
    ahead[1] * right[2] - ahead[2] * right[1],
    ahead[2] * right[0] - ahead[0] * right[2],
    ahead[0] * right[1] - ahead[1] * right[0],
  ]
  const seen = minus(point, at)
  const before = times(seen, ahead)
  return {
    mark: [middle[0] + (focal * times(seen, right)) / before, middle[1] + (focal * times(seen, down)) / before],
    before,
  }
}

/** Cameras as people hold them: 1.2 to 3 m high, 5 to 10 m from a terrace about the origin, looking down on it. */
export function randomCameras(seed: number, count: number): PinHole[] {
  const next = chance(seed)
  const between = (low: number, high: number) => low + (high - low) * next()
  return Array.from({ length: count }, () => {
    const turn = between(0, 2 * Math.PI)
    const away = between(5, 10)
    return {
      at: [away * Math.cos(turn), away * Math.sin(turn), between(1.2, 3)],
      towards: [between(-0.5, 0.5), between(-0.5, 0.5), between(0.3, 1.2)],
      focal: between(1400, 3000),
      middle: [between(1900, 2100), between(1400, 1600)],
    }
  })
}

/** A normally distributed number of mean 0 and standard deviation 1 (Box and Muller). */
export const normal = (next: () => number): number =>
  Math.sqrt(-2 * Math.log(1 - next())) * Math.cos(2 * Math.PI * next())
