import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { add, scale, type Vec3 } from '#app/domain/vector.ts'

/** A Gauss-Legendre node over −1 … 1; the weights of a set sum to 2. */
export interface Node {
  readonly place: number
  readonly weight: number
}

const sets = new Map<number, readonly Node[]>()

/** Gauss-Legendre nodes and weights by Newton's method on the Legendre polynomial. */
export function gaussNodes(count: number): readonly Node[] {
  const known = sets.get(count)
  if (known) return known
  const made = Array.from({ length: count }, (_, i): Node => {
    let place = -Math.cos((Math.PI * (i + 0.75)) / (count + 0.5))
    let slope = 1
    for (let turn = 0; turn < 50; turn++) {
      let [before, value] = [1, place]
      for (let k = 2; k <= count; k++) [before, value] = [value, ((2 * k - 1) * place * value - (k - 1) * before) / k]
      slope = (count * (place * value - before)) / (place * place - 1)
      const change = value / slope
      place -= change
      if (Math.abs(change) < 1e-15) break
    }
    return { place, weight: 2 / ((1 - place * place) * slope * slope) }
  })
  sets.set(count, made)
  return made
}

/** Most nodes an element is given; nearer than these serve, the closed form is due. */
export const mostNodes = 24

/**
 * How many nodes an element needs so that the irradiance of a plane farther than `heightByLength` element lengths is
 * right to 0.1 %. The integrand is analytic but for the points ±i·h, so n nodes err by about K ρ^(−2n) with
 * ρ = η + √(1 + η²), η = 2h/L; K grows with the longitudinal exponent. The transverse exponent does not enter: α is the
 * same for the whole element. Proved over exponents and heights in the tests.
 */
export function nodeCount(heightByLength: number, alongExponent: number): number {
  const eta = 2 * heightByLength
  const rho = eta + Math.sqrt(1 + eta * eta)
  const growth = 5 * (alongExponent + 1) * Math.exp(Math.min(6, alongExponent / (4 * eta * eta)))
  const count = Math.ceil(Math.log(growth / 1e-3) / (2 * Math.log(rho)))
  return Math.min(mostNodes, Math.max(2, count))
}

/** Points of an element and the share of its power that each stands for. */
export function nodesOf(emitter: Emitter, element: Element, count: number): { at: Vec3; share: number }[] {
  return gaussNodes(count).map(({ place, weight }) => ({
    at: add(element.centre, scale(emitter.frame.u, (place * element.length) / 2)),
    share: weight / 2,
  }))
}
