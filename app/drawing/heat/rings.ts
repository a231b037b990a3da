import type { Vec2 } from '#app/domain/vector.ts'

/** A closed line; the last point repeats the first. */
export type Ring = readonly Vec2[]

/** Distance of p from the line through a and b, m. */
function distanceToLine(p: Vec2, a: Vec2, b: Vec2): number {
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]]
  const length = Math.sqrt(dx * dx + dy * dy)
  if (length === 0) return Math.hypot(p[0] - a[0], p[1] - a[1])
  return Math.abs((p[0] - a[0]) * dy - (p[1] - a[1]) * dx) / length
}

/** Most points left out between two that stay. */
const longestRun = 12

/** The ring without the points that lie within `tolerance` m of the line between those that stay. */
export function thinRing(ring: Ring, tolerance: number): Ring {
  const [first] = ring
  if (!first) return ring
  const kept: Vec2[] = [first]
  for (let last = 0, i = 1; i < ring.length; i++) {
    if (i - last <= longestRun && liesOnChord(ring, last, i + 1, tolerance)) continue
    kept.push(ring[i] ?? first)
    last = i
  }
  return kept
}

/** Whether all points between two of a ring lie within `tolerance` m of the line through these. */
function liesOnChord(ring: Ring, from: number, to: number, tolerance: number): boolean {
  const [a, b] = [ring[from], ring[to]]
  if (!a || !b) return false
  for (let i = from + 1; i < to; i++) {
    if (distanceToLine(ring[i] ?? a, a, b) > tolerance) return false
  }
  return true
}

/** The decimals of every millimetre, without trailing noughts: "", ".001" … ".999". */
const decimals = Array.from({ length: 1000 }, (_, i) => String(i / 1000).slice(1))

/** A length to the millimetre, as `String` writes it, in a tenth of the time. */
function figure(metres: number): string {
  const millimetres = Math.round(Math.abs(metres) * 1000)
  const sign = metres < 0 && millimetres > 0 ? '-' : ''
  return `${sign}${Math.floor(millimetres / 1000)}${decimals[millimetres % 1000] ?? ''}`
}

/** SVG path of closed rings, to the millimetre. */
export const pathOfRings = (rings: readonly Ring[]): string =>
  rings
    .map(
      (ring) =>
        `M${ring
          .slice(0, -1)
          .map(([x, y]) => `${figure(x)} ${figure(y)}`)
          .join('L')}Z`,
    )
    .join('')
