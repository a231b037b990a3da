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

/** Rings no longer or wider than this, m, are drawn round: a peak that a few points trace has no corners. */
const small = 0.8

const isSmall = (ring: Ring): boolean =>
  [0, 1].every((k) => {
    const places = ring.map((point) => point[k] ?? 0)
    return Math.max(...places) - Math.min(...places) <= small
  })

const place = ([x, y]: Vec2): string => `${figure(x)} ${figure(y)}`

const middle = (a: Vec2, b: Vec2): Vec2 => [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2]

/** A small ring as curves that touch the middle of each of its sides. */
function roundPath(points: readonly Vec2[]): string {
  const curves = points.map((point, i) => `Q${place(point)} ${place(middle(point, points[(i + 1) % points.length] ?? point))}`) // prettier-ignore
  const [first, last] = [points[0], points.at(-1)]
  return first && last ? `M${place(middle(last, first))}${curves.join('')}Z` : ''
}

/** SVG path of closed rings, to the millimetre. */
export const pathOfRings = (rings: readonly Ring[]): string =>
  rings
    .map((ring) => {
      const points = ring.slice(0, -1)
      return isSmall(points) ? roundPath(points) : `M${points.map(place).join('L')}Z`
    })
    .join('')
