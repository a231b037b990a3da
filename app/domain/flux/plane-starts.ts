import { add, cross, dot, lengthOf, normalise, scale, type Vec3 } from '#app/domain/vector.ts'

/** How many of the strongest sources are combined, and how many starts are given. */
const mostSources = 24
const mostStarts = 12

/** Sources of less than this share of the strongest part no sets: a climb takes them along. */
const weakest = 0.01

/** Squares of lengths that differ by less than this share are of one sum, found by several pairs. */
const same = 1e-9

/** A hair's breadth that differs from source to source, so that no three directions lie in one plane. */
const hair = (i: number): Vec3 => [Math.sin(12.9898 * i + 1), Math.sin(78.233 * i + 2), Math.sin(37.719 * i + 3)]

/**
 * Directions from which to seek the plane that receives most. A plane sees some of the sources, and what it then
 * receives at best is the length of the sum of their net flux vectors. Sets of sources that a plane can see are parted
 * by the planes through two of them: for each pair the sum of those in front, with and without the two. The longest of
 * these sums come first. `vectors`: net flux of each source, W/m²; beyond the 24 strongest, and under 1 % of the
 * strongest, they join only in the sum of all.
 */
export function planeStarts(vectors: readonly Vec3[]): Vec3[] {
  const whole = vectors.reduce<Vec3>(add, [0, 0, 0])
  const sized = vectors.map((vector) => ({ vector, size: lengthOf(vector) })).sort((a, b) => b.size - a.size)
  const least = (sized[0]?.size ?? 0) * weakest
  const strong = sized
    .filter(({ size }) => size > least)
    .slice(0, mostSources)
    .map(({ vector }) => vector)
  const isNarrow = strong.every((a, i) => strong.every((b, j) => j <= i || dot(a, b) >= 0))
  // Within a right angle of one another every source adds to every sum: none is longer than that of all.
  if (isNarrow) return [whole, ...strong.slice(0, 1)]
  const longest = new Longest(mostStarts)
  for (const [x, y, z] of [whole, ...strong]) longest.offer(x, y, z)
  offerSumsByPairs(strong, longest)
  return longest.found.map(({ sum }) => sum)
}

/** The longest of the sums offered, the longest first; sums as long as one already there are taken for the same. */
class Longest {
  readonly found: { readonly square: number; readonly sum: Vec3 }[] = []

  constructor(private readonly most: number) {}

  offer(x: number, y: number, z: number): void {
    const square = x * x + y * y + z * z
    const last = this.found.length < this.most ? 0 : (this.found[this.most - 1]?.square ?? 0)
    if (square <= last * (1 + same)) return
    let place = this.found.length
    while (place > 0 && (this.found[place - 1]?.square ?? 0) < square * (1 - same)) place--
    if (place > 0 && (this.found[place - 1]?.square ?? 0) <= square * (1 + same)) return
    this.found.splice(place, 0, { square, sum: [x, y, z] })
    if (this.found.length > this.most) this.found.pop()
  }
}

/** For each pair of sources the sums of those on either side of the plane through both, with and without the two. */
function offerSumsByPairs(vectors: readonly Vec3[], longest: Longest): void {
  const directions = vectors.map((vector, i) => add(normalise(vector), scale(hair(i), 1e-6)))
  const flat = Float64Array.from(directions.flat())
  const fluxes = Float64Array.from(vectors.flat())
  const sums = new Float64Array(6)
  for (let i = 0; i < vectors.length; i++) {
    for (let j = i + 1; j < vectors.length; j++) {
      const [a, b] = [vectors[i] ?? none, vectors[j] ?? none]
      sumBeside(flat, fluxes, cross(directions[i] ?? none, directions[j] ?? none), [i, j], sums)
      offerWithEither(longest, sums[0] ?? 0, sums[1] ?? 0, sums[2] ?? 0, a, b)
      offerWithEither(longest, sums[3] ?? 0, sums[4] ?? 0, sums[5] ?? 0, a, b)
    }
  }
}

const none: Vec3 = [0, 0, 0]

function offerWithEither(longest: Longest, x: number, y: number, z: number, a: Vec3, b: Vec3): void {
  longest.offer(x, y, z)
  longest.offer(x + a[0], y + a[1], z + a[2])
  longest.offer(x + b[0], y + b[1], z + b[2])
  longest.offer(x + a[0] + b[0], y + a[1] + b[1], z + a[2] + b[2])
}

/** Sums of the fluxes in front of a plane and behind it into `sums`, without those of two sources that lie in it. */
function sumBeside(
  directions: Float64Array,
  fluxes: Float64Array,
  [nx, ny, nz]: Vec3,
  [i, j]: readonly [number, number],
  sums: Float64Array,
): void {
  let [x, y, z, bx, by, bz] = [0, 0, 0, 0, 0, 0]
  for (let k = 0, at = 0; at < fluxes.length; k++, at += 3) {
    if (k === i || k === j) continue
    const side = (directions[at] ?? 0) * nx + (directions[at + 1] ?? 0) * ny + (directions[at + 2] ?? 0) * nz
    if (side > 0) {
      x += fluxes[at] ?? 0
      y += fluxes[at + 1] ?? 0
      z += fluxes[at + 2] ?? 0
    } else {
      bx += fluxes[at] ?? 0
      by += fluxes[at + 1] ?? 0
      bz += fluxes[at + 2] ?? 0
    }
  }
  sums[0] = x
  sums[1] = y
  sums[2] = z
  sums[3] = bx
  sums[4] = by
  sums[5] = bz
}
