import { areaOf, crossingEdges, nearestOnSegment } from '#app/domain/site/geometry.ts'
import { parseLength } from '#app/domain/length-parser.ts'
import { roundLength, type DisplayUnits } from '#app/domain/units.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** Corners of an outline, at least and at most. */
export const outlineCorners = { least: 3, most: 200 } as const

/** An outline encloses at least this, m². */
const leastArea = 0.01
/** Points nearer than this are one point, m. */
const onePoint = 1e-3

const cornerAt = (outline: readonly Vec2[], i: number): Vec2 =>
  outline[((i % outline.length) + outline.length) % outline.length] ?? [0, 0]

/** Why an outline cannot be one, with the limit: too few or many corners, corners in one point, edges that meet, no area. */
export function outlineFault(outline: readonly Vec2[]): string | null {
  const count = outline.length
  if (count < outlineCorners.least) return `An outline needs ${outlineCorners.least} corners; here are ${count}.`
  if (count > outlineCorners.most)
    return `An outline has at most ${outlineCorners.most} corners; here are ${count.toLocaleString('en')}.`
  const same = outline.findIndex((a, i) => distance(a, cornerAt(outline, i + 1)) < onePoint)
  if (same >= 0) return `Corners ${same + 1} and ${((same + 1) % count) + 1} are the same point.`
  const crossing = crossingEdges(outline)
  if (crossing) return `Edges ${crossing[0] + 1} and ${crossing[1] + 1} cross. An outline may not cross itself.`
  if (Math.abs(areaOf(outline)) < leastArea) return `The corners enclose no area; at least ${leastArea} m².`
  const touching = touchingCorner(outline)
  return touching === null ? null : `Corner ${touching + 1} lies on another edge. An outline may not touch itself.`
}

const distance = (a: Vec2, b: Vec2): number => Math.hypot(a[0] - b[0], a[1] - b[1])

/** The first corner that lies on an edge which does not end in it; null when there is none. */
function touchingCorner(outline: readonly Vec2[]): number | null {
  const found = outline.findIndex((corner, i) =>
    outline.some((from, k) => {
      const ends = k === i || (k + 1) % outline.length === i
      return !ends && nearestOnSegment(from, cornerAt(outline, k + 1), corner[0], corner[1]).distance < onePoint
    }),
  )
  return found < 0 ? null : found
}

const rounded = ([x, y]: Vec2): [number, number] => [roundLength(x), roundLength(y)]

/** The outline with one corner at another place. */
export const withCornerAt = (outline: readonly Vec2[], corner: number, at: Vec2): [number, number][] =>
  outline.map((old, i) => rounded(i === corner ? at : old))

/** The outline with a new corner in the middle of an edge, or at a place of its own; it follows the edge's first corner. */
export function withCornerAdded(outline: readonly Vec2[], edge: number, at?: Vec2): [number, number][] {
  const [a, b] = [cornerAt(outline, edge), cornerAt(outline, edge + 1)]
  const added = at ?? [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2]
  return [...outline.slice(0, edge + 1), added, ...outline.slice(edge + 1)].map(rounded)
}

/** The outline without one corner. */
export const withoutCorner = (outline: readonly Vec2[], corner: number): [number, number][] =>
  outline.filter((_, i) => i !== corner).map(rounded)

/** Length of the edge that starts at a corner, m. */
export const edgeLength = (outline: readonly Vec2[], edge: number): number =>
  distance(cornerAt(outline, edge), cornerAt(outline, edge + 1))

/** Which end of an edge moves when its length is typed. */
export type MovedEnd = 'first' | 'last'

/** The outline with an edge of the given length, m: the named end moves along the edge, everything else stays. */
export function withEdgeLength(
  outline: readonly Vec2[],
  edge: number,
  length: number,
  moved: MovedEnd,
): [number, number][] {
  const last = (edge + 1) % outline.length
  const [fixed, moving] = moved === 'last' ? [edge, last] : [last, edge]
  const [from, to] = [cornerAt(outline, fixed), cornerAt(outline, moving)]
  const by = length / (distance(from, to) || 1)
  return withCornerAt(outline, moving, [from[0] + (to[0] - from[0]) * by, from[1] + (to[1] - from[1]) * by])
}

/** The two halves of a line: at a semicolon or tab, else at the comma before a space, else at its only comma. */
function pairIn(line: string): string[] {
  const mark = [/[;\t]/, /,\s+/, /,/].find((each) => each.test(line.trim()))
  return mark ? line.trim().split(mark) : [line]
}

/** Corners as a person types or pastes them: one a line, x and y with a comma, semicolon or tab between. */
export function parseOutline(text: string, units: DisplayUnits): { outline: [number, number][] } | { error: string } {
  const lines = text.split(/\r?\n/).filter((line) => line.trim() !== '')
  if (lines.length > outlineCorners.most)
    return {
      error: `An outline has at most ${outlineCorners.most} corners; here are ${lines.length.toLocaleString('en')} lines.`,
    }
  const outline: [number, number][] = []
  for (const [i, line] of lines.entries()) {
    const parts = pairIn(line)
    const [x, y] = parts.map((part) => parseLength(part, units))
    if (parts.length !== 2 || !x || !y)
      return { error: `Line ${i + 1}, “${line.trim().slice(0, 40)}”, is not read as x, y. Such as 0, 3.1 m.` }
    if ('error' in x) return { error: `Line ${i + 1}, x: ${x.error}` }
    if ('error' in y) return { error: `Line ${i + 1}, y: ${y.error}` }
    outline.push([x.metres, y.metres])
  }
  const fault = outlineFault(outline)
  return fault ? { error: fault } : { outline }
}
