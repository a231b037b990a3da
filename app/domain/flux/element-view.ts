import { solidAngleOf } from '#app/domain/flux/beam.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { cosineSphere, cosineStretch, type Lengthwise } from '#app/domain/flux/lengthwise.ts'
import { tableSphere, tableStretch } from '#app/domain/flux/table-stretch.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/** An element shorter than this counts as this long, m: a point source to 1e-12. */
const shortest = 1e-6

/** Nearer to an element's axis than this is on the element, m. */
export const onElement = 1e-6

/** One element as one receiver point sees it. Lengths in m. */
export interface ElementView {
  readonly emitter: Emitter
  /** Distance of the point from the element's axis. */
  readonly h: number
  /** The point's coordinates from the element's centre along the emitter's u, v and w. */
  readonly alongElement: number
  readonly acrossBeam: number
  readonly alongBeam: number
  readonly halfLength: number
  /** I0 / (L h), W/(sr m²). */
  readonly strength: number
}

/**
 * Null when the element does not radiate towards the point (behind its beam) or the point lies on its axis. A RangeError
 * for places that are not finite.
 */
export function elementView(emitter: Emitter, element: Element, point: Vec3): ElementView | null {
  const { u, v, w } = emitter.frame
  const x = point[0] - element.centre[0]
  const y = point[1] - element.centre[1]
  const z = point[2] - element.centre[2]
  const alongBeam = x * w[0] + y * w[1] + z * w[2]
  const acrossBeam = x * v[0] + y * v[1] + z * v[2]
  const alongElement = x * u[0] + y * u[1] + z * u[2]
  const h = Math.sqrt(alongBeam * alongBeam + acrossBeam * acrossBeam)
  if (!Number.isFinite(h + alongElement)) {
    throw new RangeError(`figures of heater ${emitter.id} or of the point are not finite`)
  }
  if (!(alongBeam > 0) || h < onElement) return null
  const length = Math.max(element.length, shortest)
  return {
    emitter,
    h,
    alongElement,
    acrossBeam,
    alongBeam,
    halfLength: length / 2,
    strength: element.radiantPower / (solidAngleOf(emitter.beam) * length * h),
  }
}

/** ∫ I cosβ dβ and ∫ I sinβ dβ divided by L h, for the stretch z1 … z2 (z: along u from the element's point to ours). */
export function stretchOf(view: ElementView, z1: number, z2: number): Lengthwise {
  if (!(z2 > z1)) return { cosine: 0, sine: 0 }
  const { beam } = view.emitter
  if (beam.kind === 'table') {
    const alpha = Math.atan2(view.acrossBeam, view.alongBeam)
    const { cosine, sine } = tableStretch(beam, alpha, Math.atan2(z1, view.h), Math.atan2(z2, view.h))
    return { cosine: view.strength * cosine, sine: view.strength * sine }
  }
  const factor = view.strength * (view.alongBeam / view.h) ** beam.across
  const { cosine, sine } = cosineStretch(beam.along, view.h, z1, z2)
  return { cosine: factor * cosine, sine: factor * sine }
}

/** ∫ I dβ divided by L h over a stretch: the scalar irradiance of the stretch, W/m². */
export function scalarOf(view: ElementView, z1: number, z2: number): number {
  if (!(z2 > z1)) return 0
  const { beam } = view.emitter
  if (beam.kind === 'table') {
    const alpha = Math.atan2(view.acrossBeam, view.alongBeam)
    return view.strength * tableSphere(beam, alpha, Math.atan2(z1, view.h), Math.atan2(z2, view.h))
  }
  return view.strength * (view.alongBeam / view.h) ** beam.across * cosineSphere(beam.along, view.h, z1, z2)
}

/** The receiver's normal in the view: n_h towards the element's axis, n_u along u. */
export function normalIn(view: ElementView, normal: Vec3): { towards: number; along: number } {
  const { u, v, w } = view.emitter.frame
  const nv = normal[0] * v[0] + normal[1] * v[1] + normal[2] * v[2]
  const nw = normal[0] * w[0] + normal[1] * w[1] + normal[2] * w[2]
  return {
    towards: -(nv * view.acrossBeam + nw * view.alongBeam) / view.h,
    along: normal[0] * u[0] + normal[1] * u[1] + normal[2] * u[2],
  }
}
