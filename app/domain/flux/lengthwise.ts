import { cosineTable, ratioAt } from '#app/domain/flux/cosine-integral.ts'

/**
 * ∫ g(β) cosβ dβ and ∫ g(β) sinβ dβ over a stretch of an element: g the relative intensity lengthwise, β the angle of
 * emission along the element, positive towards u.
 */
export interface Lengthwise {
  readonly cosine: number
  readonly sine: number
}

const root = (sign: 1 | -1) => Math.sqrt(5 + sign * 2 * Math.sqrt(10 / 7)) / 3
const gauss5 = [
  [-root(1), (322 - 13 * Math.sqrt(70)) / 900],
  [-root(-1), (322 + 13 * Math.sqrt(70)) / 900],
  [0, 128 / 225],
  [root(-1), (322 + 13 * Math.sqrt(70)) / 900],
  [root(1), (322 - 13 * Math.sqrt(70)) / 900],
] as const

/** Both integrals by five Gauss-Legendre nodes: for stretches over which g hardly bends. */
export function integralByNodes(from: number, to: number, intensity: (beta: number) => number): Lengthwise {
  const middle = (from + to) / 2
  const half = (to - from) / 2
  let cosine = 0
  let sine = 0
  for (const [node, weight] of gauss5) {
    const beta = middle + half * node
    const value = weight * half * intensity(beta)
    cosine += value * Math.cos(beta)
    sine += value * Math.sin(beta)
  }
  return { cosine, sine }
}

/** The angle that a stretch subtends at the receiver, exact for short and distant ones too. */
const subtended = (h: number, z1: number, z2: number) => Math.atan2(h * (z2 - z1), h * h + z1 * z2)

/** Whether the difference of two long integrals would lose digits over this stretch. */
function isShort(p: number, h: number, z1: number, z2: number): boolean {
  return subtended(h, z1, z2) * (1 + (p * Math.max(Math.abs(z1), Math.abs(z2))) / h) < 0.02
}

function shortStretch(b: number, h: number, z1: number, z2: number): Lengthwise {
  const half = subtended(h, z1, z2) / 2
  const middle = Math.atan2(z1, h) + half
  return integralByNodes(middle - half, middle + half, (beta) => Math.cos(beta) ** b)
}

/** ∫ cos^p from z1 to z2, p = b + 1, and the powers of the cosine at both ends, from the table of D_p. */
function longStretch(p: number, h: number, z1: number, z2: number) {
  const table = cosineTable(p)
  const cosine1 = h / Math.sqrt(h * h + z1 * z1)
  const cosine2 = h / Math.sqrt(h * h + z2 * z2)
  const power1 = cosine1 ** p
  const power2 = cosine2 ** p
  const beyond1 = power1 * cosine1 * ratioAt(table, Math.atan2(h, Math.abs(z1)))
  const beyond2 = power2 * cosine2 * ratioAt(table, Math.atan2(h, Math.abs(z2)))
  if (z1 >= 0) return { integral: beyond1 - beyond2, power1, power2 }
  if (z2 <= 0) return { integral: beyond2 - beyond1, power1, power2 }
  return { integral: 2 * ratioAt(table, Math.PI / 2) - beyond1 - beyond2, power1, power2 }
}

/**
 * Both integrals for g = cos^b, b from 0 to 50, real. The receiver lies at distance h > 0 from the element's axis; z is
 * the distance along u from a point of the element to the receiver, from z1 to z2. About 1e-9 of the value.
 */
export function cosineStretch(b: number, h: number, z1: number, z2: number): Lengthwise {
  const p = b + 1
  if (isShort(p, h, z1, z2)) return shortStretch(b, h, z1, z2)
  const { integral, power1, power2 } = longStretch(p, h, z1, z2)
  return { cosine: integral, sine: (power1 - power2) / p }
}

/** ∫ cos^b β dβ over the same stretch. */
export function cosineSphere(b: number, h: number, z1: number, z2: number): number {
  if (isShort(b, h, z1, z2)) {
    return shortStretch(b - 1, h, z1, z2).cosine
  }
  return longStretch(b, h, z1, z2).integral
}
