import { add, cross, dot, lengthOf, normalise, scale, type Vec3 } from '#app/domain/vector.ts'

/** How many of the strongest sources are combined, and how many starts are given. */
const mostSources = 24
const mostStarts = 12

/** A hair's breadth that differs from source to source, so that no three directions lie in one plane. */
const hair = (i: number): Vec3 => [Math.sin(12.9898 * i + 1), Math.sin(78.233 * i + 2), Math.sin(37.719 * i + 3)]

/**
 * Directions from which to seek the plane that receives most. A plane sees some of the sources, and what it then
 * receives at best is the length of the sum of their net flux vectors. Sets of sources that a plane can see are parted
 * by the planes through two of them: for each pair the sum of those in front, with and without the two. The longest of
 * these sums come first. `vectors`: net flux of each source, W/m²; beyond the 24 strongest they join only in the sum of
 * all.
 */
export function planeStarts(vectors: readonly Vec3[]): Vec3[] {
  const whole = vectors.reduce<Vec3>(add, [0, 0, 0])
  const strong = vectors
    .filter((vector) => lengthOf(vector) > 0)
    .toSorted((a, b) => lengthOf(b) - lengthOf(a))
    .slice(0, mostSources)
  const isNarrow = strong.every((a, i) => strong.every((b, j) => j <= i || dot(a, b) >= 0))
  // Within a right angle of one another every source adds to every sum: none is longer than that of all.
  if (isNarrow) return [whole, ...strong.slice(0, 1)]
  const sums = [whole, ...strong, ...sumsByPairs(strong)]
  return sums.toSorted((a, b) => lengthOf(b) - lengthOf(a)).slice(0, mostStarts)
}

function sumsByPairs(vectors: readonly Vec3[]): Vec3[] {
  const directions = vectors.map((vector, i) => add(normalise(vector), scale(hair(i), 1e-6)))
  const found: Vec3[] = []
  vectors.forEach((a, i) => {
    vectors.slice(i + 1).forEach((b, k) => {
      const j = i + 1 + k
      const edge = cross(directions[i] ?? a, directions[j] ?? b)
      for (const normal of [edge, scale(edge, -1)]) {
        const others = sumInFront(vectors, directions, normal, i, j)
        found.push(others, add(others, a), add(others, b), add(add(others, a), b))
      }
    })
  })
  return found
}

/** Sum of the vectors whose directions lie in front of a plane, but for two. */
function sumInFront(vectors: readonly Vec3[], directions: readonly Vec3[], normal: Vec3, i: number, j: number): Vec3 {
  let [x, y, z] = [0, 0, 0]
  for (let k = 0; k < vectors.length; k++) {
    const direction = directions[k]
    const vector = vectors[k]
    if (k === i || k === j || !direction || !vector || dot(direction, normal) <= 0) continue
    x += vector[0]
    y += vector[1]
    z += vector[2]
  }
  return [x, y, z]
}
