import { effectiveAreaShare, projectedAreaFactor, type Posture } from '#app/domain/comfort/projected-area.ts'
import { relativeIntensity, solidAngleOf } from '#app/domain/flux/beam.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { clearStretches, type Obstruction } from '#app/domain/flux/shading.ts'
import { add, dot, scale, subtract, type Vec3 } from '#app/domain/vector.ts'

/** A body that heat falls on: its middle, its posture and the direction in which it looks, rad counter-clockwise from +x. */
export interface Receiver {
  readonly point: Vec3
  readonly posture: Posture
  readonly facing: number
}

/** Gauss-Legendre nodes and weights over ±1, four to an element or to each clear stretch of it. */
const nodes = [
  [-0.8611363115940526, 0.34785484513745385],
  [-0.3399810435848563, 0.6521451548625461],
  [0.3399810435848563, 0.6521451548625461],
  [0.8611363115940526, 0.34785484513745385],
] as const

/** Nearer than this a node lies in the body, and a point on the element's axis, m. */
const nearest = 1e-6

/**
 * Effective radiant field of one emitter before absorption, W/m² of body surface: f_eff Σ f_p · E_n over nodes of its
 * elements, E_n the irradiance of a plane that faces the node (ASHRAE 55 Appendix C). Multiply by the absorptance.
 * Within 0.3 % of the limit of many nodes for elements that are no longer than they are far away.
 */
export function fieldBeforeAbsorption(
  emitter: Emitter,
  receiver: Receiver,
  obstructions: readonly Obstruction[] = [],
): number {
  const sum = emitter.elements.reduce((total, element) => {
    const stretches =
      obstructions.length > 0
        ? clearStretches(obstructions, emitter, element, receiver.point)
        : [{ from: -element.length / 2, to: element.length / 2, transmittance: 1 }]
    return stretches.reduce(
      (part, { from, to, transmittance }) => part + transmittance * projectedFlux(emitter, element, receiver, from, to),
      total,
    )
  }, 0)
  return effectiveAreaShare[receiver.posture] * sum
}

/** Σ f_p · E_n over the nodes of the stretch from … to along an element, W/m². */
function projectedFlux(emitter: Emitter, element: Element, receiver: Receiver, from: number, to: number): number {
  const length = Math.max(element.length, nearest)
  const share = (to - from) / 2 / length
  const strength = (element.radiantPower / solidAngleOf(emitter.beam)) * share
  return nodes.reduce((sum, [place, weight]) => {
    const along = (from + to + (to - from) * place) / 2
    const towards = subtract(add(element.centre, scale(emitter.frame.u, along)), receiver.point)
    const distance2 = dot(towards, towards)
    if (distance2 < nearest * nearest) return sum
    const normal = (strength * weight * intensityTowards(emitter, towards, Math.sqrt(distance2))) / distance2
    return normal === 0 ? sum : sum + normal * projectedAreaTowards(receiver, towards)
  }, 0)
}

/** Relative intensity that a piece of an element sends back along `towards`, the vector from the point to the piece. */
function intensityTowards(emitter: Emitter, towards: Vec3, distance: number): number {
  const { u, v, w } = emitter.frame
  const [across, down] = [-dot(towards, v), -dot(towards, w)]
  if (Math.abs(across) < nearest && Math.abs(down) < nearest) return 0
  const beta = Math.asin(Math.max(-1, Math.min(1, -dot(towards, u) / distance)))
  return relativeIntensity(emitter.beam, Math.atan2(across, down), beta)
}

function projectedAreaTowards({ posture, facing }: Receiver, [x, y, z]: Vec3): number {
  return projectedAreaFactor(posture, Math.atan2(z, Math.hypot(x, y)), Math.atan2(y, x) - facing)
}
