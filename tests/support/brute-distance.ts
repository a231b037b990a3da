// Distances by trying points: shares no formula with the product. A tilted box is written out by its own sines, points of
// a solid are three numbers from 0 to 1, and the best of a grid is looked at again with a finer grid, and again.

export type Point = readonly [number, number, number]

/** A box turned in plan and tilted to the left of its long axis, degrees; half its sizes along, across and down. */
export interface TiltedBox {
  readonly centre: Point
  readonly turn: number
  readonly tilt: number
  readonly half: Point
}

/** Long axis, axis across (to the right when level) and axis out of the open face, each written out. */
export function axesOfBox({ turn, tilt }: TiltedBox): readonly [Point, Point, Point] {
  const [ct, st] = [Math.cos((turn * Math.PI) / 180), Math.sin((turn * Math.PI) / 180)]
  const [ca, sa] = [Math.cos((tilt * Math.PI) / 180), Math.sin((tilt * Math.PI) / 180)]
  return [
    [ct, st, 0],
    [st * ca, -ct * ca, -sa],
    [-st * sa, ct * sa, -ca],
  ]
}

/** The point of a box at three shares from 0 to 1. */
export function pointOfBox(box: TiltedBox, shares: Point): Point {
  const axes = axesOfBox(box)
  const at = [...box.centre]
  axes.forEach((axis, i) => {
    for (const k of [0, 1, 2]) at[k]! += (2 * shares[i]! - 1) * box.half[i]! * axis[k]!
  })
  return [at[0]!, at[1]!, at[2]!]
}

/** How far outside of the box a point is; negative inside: how deep, to the nearest face. */
export function depthInBox(box: TiltedBox): (p: Point) => number {
  const axes = axesOfBox(box)
  const [cx, cy, cz] = box.centre
  return ([x, y, z]) => {
    let [squares, deepest] = [0, -Infinity]
    for (let i = 0; i < 3; i++) {
      const [ax, ay, az] = axes[i]!
      const over = Math.abs((x - cx) * ax + (y - cy) * ay + (z - cz) * az) - box.half[i]!
      if (over > 0) squares += over * over
      if (over > deepest) deepest = over
    }
    return squares > 0 ? Math.sqrt(squares) : deepest
  }
}

const grid = 6
const finest = 1e-7

const clamp = (t: number) => Math.min(1, Math.max(0, t))

/**
 * The least value over three shares from 0 to 1: the best place of a coarse grid, looked at again with ever finer grids
 * until a step is 1e-7 of the whole. Where the value has one valley, what is found differs from the least by less than
 * 1e-6 of its slope over the whole; a solid of several valleys is cut up first.
 */
export function leastOver(value: (at: Point) => number): number {
  let middle: Point = [0.5, 0.5, 0.5]
  let least = Infinity
  for (let reach = 0.5; reach > finest; reach *= 0.55) {
    let best = middle
    for (let i = 0; i <= grid; i++)
      for (let j = 0; j <= grid; j++)
        for (let k = 0; k <= grid; k++) {
          const at: Point = [
            clamp(middle[0] + reach * ((2 * i) / grid - 1)),
            clamp(middle[1] + reach * ((2 * j) / grid - 1)),
            clamp(middle[2] + reach * ((2 * k) / grid - 1)),
          ]
          const found = value(at)
          if (found < least) {
            least = found
            best = at
          }
        }
    middle = best
  }
  return least
}
