import { elementView, normalIn, stretchOf, type ElementView } from '#app/domain/flux/element-view.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import { add, dot, lengthOf, normalise, scale, type Vec3 } from '#app/domain/vector.ts'

/** What one element alone sends to a point, kept so that planes of any direction can be tried on it cheaply. */
export interface NetFlux {
  /** Net flux vector towards the element, W/m²: its product with a normal is the irradiance of a plane that sees it all. */
  readonly vector: Vec3
  /** Directions to the element's two ends (of any length): a plane sees the whole element when it sees both. */
  readonly ends: readonly [Vec3, Vec3]
  readonly view: ElementView
}

/** Net flux of an emitter of one element at a point, unshaded; null behind its beam and on its axis. */
export function netFluxOf(emitter: Emitter, point: Vec3): NetFlux | null {
  const element = emitter.elements[0]
  const view = element && elementView(emitter, element, point)
  if (!view) return null
  const { alongElement, halfLength } = view
  const end = (z: number) => add(scale(towardsAxis(view), view.h), scale(emitter.frame.u, -z))
  const [z1, z2] = [alongElement - halfLength, alongElement + halfLength]
  return { vector: stretchVector(view, z1, z2), ends: [end(z1), end(z2)], view }
}

/** Unit vector from the point to the nearest point of the element's axis. */
function towardsAxis({ emitter, acrossBeam, alongBeam, h }: ElementView): Vec3 {
  return add(scale(emitter.frame.v, -acrossBeam / h), scale(emitter.frame.w, -alongBeam / h))
}

function stretchVector(view: ElementView, z1: number, z2: number): Vec3 {
  const { cosine, sine } = stretchOf(view, z1, z2)
  return add(scale(towardsAxis(view), cosine), scale(view.emitter.frame.u, -sine))
}

/** Net flux vector of the part of the element that lies in front of a plane. */
export function vectorInFront(flux: NetFlux, normal: Vec3): Vec3 {
  const [first, last] = [dot(flux.ends[0], normal), dot(flux.ends[1], normal)]
  if (first >= 0 && last >= 0) return flux.vector
  if (first <= 0 && last <= 0) return [0, 0, 0]
  const { towards, along } = normalIn(flux.view, normal)
  const horizon = (flux.view.h * towards) / along
  const { alongElement, halfLength } = flux.view
  return first > 0
    ? stretchVector(flux.view, alongElement - halfLength, horizon)
    : stretchVector(flux.view, horizon, alongElement + halfLength)
}

/** How many of the strongest elements the search starts from, besides the whole. */
const starts = 24

/**
 * Direction of the plane that receives most, from what the elements send; up without any. Irradiance is a convex
 * function of the normal and its gradient is the net flux in front, so turning the plane to that vector never lowers it;
 * repeated from the whole flux and from the strongest elements. As `largestIrradianceAt`, from fluxes already reckoned.
 */
export function largestDirection(fluxes: readonly (NetFlux | null)[]): Vec3 {
  const lit = fluxes.filter((flux) => flux !== null)
  const vectors = lit.map(({ vector }) => vector)
  const strongest =
    vectors.length > starts ? vectors.toSorted((a, b) => lengthOf(b) - lengthOf(a)).slice(0, starts) : vectors
  const whole = vectors.reduce<Vec3>(add, [0, 0, 0])
  let best: { size: number; direction: Vec3 } = { size: 0, direction: [0, 0, 1] }
  for (const start of [whole, ...strongest]) {
    const found = climb(lit, normalise(start))
    if (found.size > best.size) best = found
  }
  return best.direction
}

/** Turns a plane to the net flux in front of it until it receives no more. */
function climb(fluxes: readonly NetFlux[], start: Vec3): { size: number; direction: Vec3 } {
  let direction = start
  let size = 0
  for (let turn = 0; turn < 100; turn++) {
    let [x, y, z] = [0, 0, 0]
    for (const flux of fluxes) {
      const vector = vectorInFront(flux, direction)
      x += vector[0]
      y += vector[1]
      z += vector[2]
    }
    const next = Math.sqrt(x * x + y * y + z * z)
    if (next <= size * (1 + 1e-12)) break
    size = next
    direction = [x / next, y / next, z / next]
  }
  return { size, direction }
}
