import { elementView, normalIn, stretchOf, type ElementView } from '#app/domain/flux/element-view.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import { planeStarts } from '#app/domain/flux/plane-starts.ts'
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

/** Irradiance of a plane by its unit normal, from what the elements send, W/m². */
export function irradianceByNormal(fluxes: readonly (NetFlux | null)[]): (normal: Vec3) => number {
  const lit = fluxes.filter((flux) => flux !== null)
  const rows = rowsOf(lit)
  return (normal) => dot(fluxInFront(lit, rows, normal), normal)
}

/** With more elements than this the weakest join only for the last climb. */
const mostStrong = 24

/** Share of all flux that they may give together. */
const leftOut = 1e-3

/**
 * Direction of the plane that receives most, from what the elements send; up without any. Irradiance is a convex
 * function of the normal and its gradient is the net flux in front, so turning the plane to that vector never lowers it;
 * repeated from the starts of `largestIrradianceAt`, heater by heater, from fluxes already reckoned. With more than 24 elements the
 * weakest, 0.1 % of the flux together, join only for the last climb: where two directions are equal to that share, the
 * result may be the lesser.
 */
export function largestDirection(fluxes: readonly (NetFlux | null)[]): Vec3 {
  const lit = fluxes.filter((flux) => flux !== null)
  const strong = lit.length > mostStrong ? strongestOf(lit) : lit
  const rows = rowsOf(strong)
  let best: Found = { size: 0, direction: [0, 0, 1] }
  for (const start of planeStarts(vectorsByHeater(lit))) {
    const found = climb(strong, rows, normalise(start))
    if (found.size > best.size) best = found
  }
  return strong === lit ? best.direction : climb(lit, rowsOf(lit), best.direction).direction
}

/** Net flux of the elements of each heater together: elements side by side share a frame, and planes see them alike. */
function vectorsByHeater(fluxes: readonly NetFlux[]): Vec3[] {
  const sums = new Map<unknown, Vec3>()
  for (const { vector, view } of fluxes) {
    const { frame } = view.emitter
    sums.set(frame, add(sums.get(frame) ?? [0, 0, 0], vector))
  }
  return [...sums.values()]
}

/** The strongest elements first, without the weakest that together give less than `leftOut`. */
function strongestOf(fluxes: readonly NetFlux[]): NetFlux[] {
  const sized = fluxes.map((flux) => ({ flux, size: lengthOf(flux.vector) })).sort((a, b) => b.size - a.size)
  let left = leftOut * sized.reduce((sum, { size }) => sum + size, 0)
  let count = sized.length
  while (count > 1) {
    left -= sized[count - 1]?.size ?? 0
    if (left < 0) break
    count--
  }
  return sized.slice(0, count).map(({ flux }) => flux)
}

/** Both ends and the net flux vector of each element, nine numbers in a row: the search runs over them many times. */
function rowsOf(fluxes: readonly NetFlux[]): Float64Array {
  const rows = new Float64Array(fluxes.length * 9)
  let to = 0
  for (const { ends, vector } of fluxes) {
    for (const [x, y, z] of [ends[0], ends[1], vector]) {
      rows[to++] = x
      rows[to++] = y
      rows[to++] = z
    }
  }
  return rows
}

/** A direction and the irradiance of the plane that faces it. */
interface Found {
  readonly size: number
  readonly direction: Vec3
}

/** Turns a plane to the net flux in front of it until it receives no more. */
function climb(fluxes: readonly NetFlux[], rows: Float64Array, start: Vec3): Found {
  let direction = start
  let size = 0
  for (let turn = 0; turn < 100; turn++) {
    const [x, y, z] = fluxInFront(fluxes, rows, direction)
    const next = Math.sqrt(x * x + y * y + z * z)
    if (next <= size * (1 + 1e-12)) break
    size = next
    direction = [x / next, y / next, z / next]
  }
  return { size, direction }
}

/** Net flux of all that lies in front of a plane. */
function fluxInFront(fluxes: readonly NetFlux[], rows: Float64Array, normal: Vec3): Vec3 {
  const [nx, ny, nz] = normal
  const at = (i: number) => rows[i] ?? 0
  let [x, y, z] = [0, 0, 0]
  for (let row = 0, i = 0; row < rows.length; row += 9, i++) {
    const first = at(row) * nx + at(row + 1) * ny + at(row + 2) * nz
    const last = at(row + 3) * nx + at(row + 4) * ny + at(row + 5) * nz
    if (first >= 0 && last >= 0) {
      x += at(row + 6)
      y += at(row + 7)
      z += at(row + 8)
    } else if (first > 0 || last > 0) {
      const flux = fluxes[i]
      const [cx, cy, cz] = flux ? vectorInFront(flux, normal) : [0, 0, 0]
      x += cx
      y += cy
      z += cz
    }
  }
  return [x, y, z]
}
