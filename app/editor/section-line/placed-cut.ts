import { extentOf } from '#app/drawing/plan/plan-view.ts'
import type { Site } from '#app/domain/site/site.ts'
import { roundLength } from '#app/domain/units.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { cutLength, type SectionCut } from '#app/drawing/plan/section-cut.tsx'

/** How far outside the floor's rectangle an end may stand, and the shortest line, m. */
const farthestOut = 2
const shortest = 0.3

/** A first line from a person's own hand: askew across the middle of the floor. */
export function firstCut(site: Site): SectionCut {
  const { x, y } = extentOf(site.floor)
  const at = (u: number, v: number): Vec2 => [roundLength(x[0] + u * (x[1] - x[0])), roundLength(y[0] + v * (y[1] - y[0]))] // prettier-ignore
  return { letter: 'C', from: at(0.15, 0.2), to: at(0.85, 0.8), placed: true }
}

/** The ranges that an end may take, m. */
export function endRanges(site: Site): { readonly x: Vec2; readonly y: Vec2 } {
  const { x, y } = extentOf(site.floor)
  return { x: [x[0] - farthestOut, x[1] + farthestOut], y: [y[0] - farthestOut, y[1] + farthestOut] }
}

/** The cut with ends moved by a way in plan, kept near the floor and apart; unchanged where it would be too short. */
export function moveEnds(cut: SectionCut, ends: readonly ('from' | 'to')[], [dx, dy]: Vec2, site: Site): SectionCut {
  const { x, y } = endRanges(site)
  const within = (value: number, [low, high]: Vec2) => roundLength(Math.max(low, Math.min(high, value)))
  const moved = (end: 'from' | 'to'): Vec2 =>
    ends.includes(end) ? [within(cut[end][0] + dx, x), within(cut[end][1] + dy, y)] : cut[end]
  const next = { ...cut, from: moved('from'), to: moved('to') }
  return cutLength(next) < shortest ? cut : next
}

/** A cut as it was kept; null for anything else. */
export function parseCut(kept: string | null): SectionCut | null {
  if (kept === null) return null
  const numbers = kept.split(' ').map(Number)
  const [x1, y1, x2, y2] = numbers
  if (numbers.length !== 4 || !numbers.every((each) => Number.isFinite(each) && Math.abs(each) <= 1000)) return null
  if (x1 === undefined || y1 === undefined || x2 === undefined || y2 === undefined) return null
  const cut: SectionCut = { letter: 'C', from: [x1, y1], to: [x2, y2], placed: true }
  return cutLength(cut) < shortest ? null : cut
}

/** What is kept of a cut. */
export const keptCut = ({ from, to }: SectionCut): string => [...from, ...to].join(' ')
