import {
  elementView,
  normalIn,
  onElement,
  scalarOf,
  stretchOf,
  type ElementView,
} from '#app/domain/flux/element-view.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { planeStarts } from '#app/domain/flux/plane-starts.ts'
import { clearStretches, type Obstruction } from '#app/domain/flux/shading.ts'
import { add, dot, lengthOf, normalise, subtract, type Vec3 } from '#app/domain/vector.ts'

/**
 * Irradiance of a one-sided plane from the stretch z1 … z2 of an element, W/m². Tubular element of any transverse beam:
 * E = I0 f(α) / (L h) · ∫ g(β) (n_h cosβ − n_u sinβ) dβ over the part in front of the plane, β the angle of emission.
 */
function stretchIrradiance(
  view: ElementView,
  normal: { towards: number; along: number },
  z1: number,
  z2: number,
): number {
  const { towards, along } = normal
  const horizon = (view.h * towards) / along
  if (along === 0 && towards <= 0) return 0
  const from = along < 0 ? Math.max(z1, horizon) : z1
  const to = along > 0 ? Math.min(z2, horizon) : z2
  const { cosine, sine } = stretchOf(view, from, to)
  return Math.max(0, towards * cosine - along * sine)
}

function elementIrradiance(
  emitter: Emitter,
  element: Element,
  point: Vec3,
  normal: Vec3,
  obstructions: readonly Obstruction[] | undefined,
): number {
  const view = elementView(emitter, element, point)
  if (!view) return 0
  const plane = normalIn(view, normal)
  const centre = view.alongElement
  if (!obstructions?.length) return stretchIrradiance(view, plane, centre - view.halfLength, centre + view.halfLength)
  return clearStretches(obstructions, emitter, element, point).reduce(
    (sum, { from, to, transmittance }) =>
      sum + transmittance * stretchIrradiance(view, plane, centre - to, centre - from),
    0,
  )
}

/** Sum over the elements of an emitter; a RangeError when a figure is not finite, so that no NaN leaves the engine. */
function sumOver(emitter: Emitter, partOf: (element: Element) => number): number {
  const sum = emitter.elements.reduce((total, element) => total + partOf(element), 0)
  if (!Number.isFinite(sum)) throw new RangeError(`figures of heater ${emitter.id} or of the point are not finite`)
  return sum
}

/** Whether a point lies on an element of the emitter (within `onElement`), where irradiance has no meaning. */
export function touchesElement(emitter: Emitter, point: Vec3): boolean {
  return emitter.elements.some((element) => {
    const fromCentre = subtract(point, element.centre)
    const along = dot(fromCentre, emitter.frame.u)
    const beyond = Math.max(0, Math.abs(along) - element.length / 2)
    const across = Math.hypot(dot(fromCentre, emitter.frame.v), dot(fromCentre, emitter.frame.w))
    return Math.hypot(across, beyond) < onElement
  })
}

/**
 * Irradiance of a one-sided plane at a point from one emitter, W/m²; the normal need not be of unit length. Closed form
 * for any real exponents from 0 to 50 and for tables, to 1e-6 of the value. 0 for a zero normal, behind the beam and on
 * an element's axis. Valid outside about one reflector width of the housing. Throws a RangeError for figures that are
 * not finite.
 */
export function irradianceAt(
  emitter: Emitter,
  point: Vec3,
  normal: Vec3,
  obstructions?: readonly Obstruction[],
): number {
  const unit = normalise(normal)
  return sumOver(emitter, (element) => elementIrradiance(emitter, element, point, unit, obstructions))
}

/** Irradiance of the same plane from each emitter, W/m², in the order of the emitters. */
export function irradianceByEmitter(
  emitters: readonly Emitter[],
  point: Vec3,
  normal: Vec3,
  obstructions?: readonly Obstruction[],
): number[] {
  return emitters.map((emitter) => irradianceAt(emitter, point, normal, obstructions))
}

/** Mean irradiance of a small sphere at a point from one emitter, W/m²: I0 f(α) / (4 L h) · ∫ g dβ. */
export function sphereMeanAt(emitter: Emitter, point: Vec3, obstructions?: readonly Obstruction[]): number {
  return sumOver(emitter, (element) => {
    const view = elementView(emitter, element, point)
    if (!view) return 0
    return clearStretches(obstructions ?? [], emitter, element, point).reduce(
      (sum, { from, to, transmittance }) =>
        sum + (transmittance * scalarOf(view, view.alongElement - to, view.alongElement - from)) / 4,
      0,
    )
  })
}

/** Scalar irradiance at a point from all emitters, W/m²: what arrives from all directions, four times the sphere mean. */
export function scalarIrradianceAt(
  emitters: readonly Emitter[],
  point: Vec3,
  obstructions?: readonly Obstruction[],
): number {
  return emitters.reduce((sum, emitter) => sum + 4 * sphereMeanAt(emitter, point, obstructions), 0)
}

/** An unshaded stretch of an element as a point sees it, for planes that may look anywhere. */
interface Source {
  readonly view: ElementView
  readonly from: number
  readonly to: number
  readonly transmittance: number
  /** Net flux vector of the whole stretch, towards it, W/m². */
  readonly vector: Vec3
}

/** The net flux vector of a stretch: its product with a normal is the irradiance when all of it is in front. */
function netVector(view: ElementView, z1: number, z2: number, transmittance: number): Vec3 {
  const { cosine, sine } = stretchOf(view, z1, z2)
  const { u, v, w } = view.emitter.frame
  const across = (-transmittance * cosine * view.acrossBeam) / view.h
  const down = (-transmittance * cosine * view.alongBeam) / view.h
  const along = -transmittance * sine
  return [
    along * u[0] + across * v[0] + down * w[0],
    along * u[1] + across * v[1] + down * w[1],
    along * u[2] + across * v[2] + down * w[2],
  ]
}

function sourcesAt(emitter: Emitter, point: Vec3, obstructions: readonly Obstruction[]): Source[] {
  return emitter.elements.flatMap((element) => {
    const view = elementView(emitter, element, point)
    if (!view) return []
    return clearStretches(obstructions, emitter, element, point)
      .filter(({ transmittance }) => transmittance > 0)
      .map(({ from, to, transmittance }) => {
        const z1 = view.alongElement - to
        const z2 = view.alongElement - from
        return { view, from: z1, to: z2, transmittance, vector: netVector(view, z1, z2, transmittance) }
      })
  })
}

/** Sum of the net flux vectors of what lies in front of a plane. */
function vectorInFront(sources: readonly Source[], normal: Vec3): Vec3 {
  return sources.reduce<Vec3>(
    (sum, { view, from, to, transmittance, vector }) => {
      const { towards, along } = normalIn(view, normal)
      const first = towards * view.h - along * from
      const last = towards * view.h - along * to
      if (first <= 0 && last <= 0) return sum
      if (first >= 0 && last >= 0) return add(sum, vector)
      const horizon = (view.h * towards) / along
      return add(sum, netVector(view, first > 0 ? from : horizon, first > 0 ? horizon : to, transmittance))
    },
    [0, 0, 0],
  )
}

/** Irradiance of a one-sided plane at a point from all emitters, by its unit normal: for many planes at one point, W/m². */
export function irradianceByNormalAt(
  emitters: readonly Emitter[],
  point: Vec3,
  obstructions: readonly Obstruction[] = [],
): (normal: Vec3) => number {
  const sources = emitters.flatMap((emitter) => sourcesAt(emitter, point, obstructions))
  return (normal) => dot(vectorInFront(sources, normal), normal)
}

/**
 * The largest irradiance over all directions of a one-sided plane at a point, W/m², and the direction it then looks.
 * Irradiance is a convex function of the normal whose gradient is the net flux vector in front of the plane; turning
 * the plane to that vector therefore never lowers it. Repeated from the longest sums of net flux that a plane can see
 * (`planeStarts`). Without radiation: 0, looking up.
 */
export function largestIrradianceAt(
  emitters: readonly Emitter[],
  point: Vec3,
  obstructions: readonly Obstruction[] = [],
): { irradiance: number; direction: Vec3 } {
  const groups = emitters.map((emitter) => sourcesAt(emitter, point, obstructions))
  const sources = groups.flat()
  const vectors = groups.map((group) => group.reduce<Vec3>((sum, { vector }) => add(sum, vector), [0, 0, 0]))
  const whole = vectors.reduce<Vec3>(add, [0, 0, 0])
  if (!Number.isFinite(lengthOf(whole))) throw new RangeError('figures of a heater or of the point are not finite')
  let best: { irradiance: number; direction: Vec3 } = { irradiance: 0, direction: [0, 0, 1] }
  for (const start of planeStarts(vectors)) {
    let direction = normalise(start)
    for (let turn = 0, before = 0; turn < 100; turn++) {
      const vector = vectorInFront(sources, direction)
      const irradiance = lengthOf(vector)
      direction = normalise(vector)
      if (irradiance > best.irradiance) best = { irradiance, direction }
      if (irradiance <= before * (1 + 1e-12)) break
      before = irradiance
    }
  }
  return best
}
