import type { Cells } from '#app/domain/flux/cells.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import {
  clearMarks,
  emptyMarks,
  markShadow,
  type Hider,
  type RowMarks,
  type Shadow,
} from '#app/domain/flux/shade-marks.ts'
import { emptyPatterns, patternBehind, type ShadePatterns } from '#app/domain/flux/shade-patterns.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import { drawOutline, endIn, firstIn } from '#app/domain/flux/silhouette.ts'
import { addSpan, emptySpans, type Spans } from '#app/domain/flux/spans.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/**
 * Shade on a map. Each obstruction's silhouettes from a heater mark the cells in its shade. Where the shadow moves along
 * the elements these are taken in pieces, about six for a whole heater: those of several elements are cut at places
 * between one another's, so that together they tell sixths. Each cell is then given only what it sees: cells behind a
 * thing from all pieces cost nothing, those at its rim the stretches that are left.
 */

/** Pieces of each element, by how many there are. */
const piecesOf = (elements: number): number => [6, 3, 2][elements - 1] ?? 2

/** Where element `i` of so many is cut, with its ends: 0 … 1. */
function cutsOf(i: number, elements: number): number[] {
  const pieces = piecesOf(elements)
  const places = Array.from({ length: pieces }, (_, k) => (k + i / elements) / pieces)
  return [0, ...places.filter((place) => place > 0), 1]
}

/** Patterns above which they are begun anew. */
const mostPatterns = 4096

const marks = emptyMarks()
/** What hides something from the cell that a sweep has come to, the first so many in the order of the things. */
const active: Hider[] = []
let actives = 0

/** The patterns of each element, by how many there are. */
const known = new Map<number, ShadePatterns[]>()

function patternsOf(elements: number): readonly ShadePatterns[] {
  const found = known.get(elements)
  if (found?.every(({ list }) => list.length < mostPatterns)) return found
  const made = Array.from({ length: elements }, (_, i) => emptyPatterns(cutsOf(i, elements)))
  known.set(elements, made)
  return made
}

const whole = emptyPatterns([0, 1])
/** A row without shadows. */
const clear: RowMarks = { count: 0, columns: new Int32Array(), shadows: new Int32Array() }

/**
 * What the cells see of each element of an emitter past the obstructions. Cells whose centres lie outside the outline,
 * when one is given, are left out. Elements that are not over the plane of the cells are seen whole.
 */
export function seenOf(
  cells: Cells,
  emitter: Emitter,
  obstructions: readonly Obstruction[],
  outline: readonly Vec2[] | null = null,
): readonly Spans[] {
  const elements = emitter.elements.filter(({ centre }) => centre[2] > cells.z)
  const patterns = patternsOf(elements.length)
  const source = { elements, cuts: patterns.map(({ cuts }) => cuts), u: emitter.frame.u }
  clearMarks(marks, elements.length, cells.rows)
  obstructions.forEach((obstruction, thing) => {
    const isOther = obstruction.heaterId !== emitter.id && obstruction.transmittance < 1
    if (isOther) markShadow(marks, cells, source, obstruction, thing)
  })
  const { silhouette } = marks
  if (outline) drawOutline(silhouette, cells, outline)
  const [firstRow, lastRow] = outline ? [silhouette.firstRow, silhouette.lastRow] : [0, cells.rows - 1]
  return emitter.elements.map((element) => {
    const spans = emptySpans()
    const own = elements.indexOf(element)
    const rows = marks.elements[own]
    for (let row = firstRow; row <= lastRow; row++) {
      const first = outline ? firstIn(silhouette, cells, row) : 0
      const end = outline ? endIn(silhouette, cells, row) : cells.columns
      sweepRow(patterns[own] ?? whole, rows?.[row] ?? clear, row, first, end, spans)
    }
    return spans
  })
}

/** Goes along a row, between two columns, from place to place where what is hidden changes. */
function sweepRow(
  patterns: ShadePatterns,
  { count, columns, shadows }: RowMarks,
  row: number,
  start: number,
  end: number,
  spans: Spans,
): void {
  let number = 0
  let first = start
  for (let i = 0; i < count;) {
    const column = columns[i] ?? 0
    for (; i < count && columns[i] === column; i++) {
      const shadow = marks.shadows[shadows[i] ?? 0]
      if (shadow) toggle(shadow)
    }
    const next = numberBehind(patterns)
    if (next === number) continue
    const last = Math.min(column, end)
    if (last > first) addSeen(patterns, number, row, first, last, spans)
    number = next
    first = Math.max(first, column)
  }
  if (end > first) addSeen(patterns, number, row, first, end, spans)
}

/** Begins a shadow, or ends it. */
function toggle({ hider, mask }: Shadow): void {
  const before = hider.hidden
  hider.hidden = before ^ mask
  if (before === 0) {
    let i = actives++
    for (; i > 0 && (active[i - 1]?.thing ?? 0) > hider.thing; i--) active[i] = active[i - 1] ?? hider
    active[i] = hider
  } else if (hider.hidden === 0) {
    let i = active.indexOf(hider)
    for (actives--; i < actives; i++) active[i] = active[i + 1] ?? hider
  }
}

/** Number of the pattern behind all that is active: opaque things hide together, others one after another. */
function numberBehind(patterns: ShadePatterns): number {
  let number = 0
  let opaque = 0
  for (let i = 0; i < actives;) {
    const hider = active[i]
    if (!hider) break
    let mask = hider.hidden
    for (i++; i < actives && active[i]?.thing === hider.thing; i++) mask |= active[i]?.hidden ?? 0
    if (hider.transmittance === 0) opaque |= mask
    else number = patternBehind(patterns, number, mask, hider.transmittance)
  }
  return opaque === 0 ? number : patternBehind(patterns, number, opaque, 0)
}

/** Adds the stretches that are seen under a pattern from neighbouring cells. */
function addSeen({ list }: ShadePatterns, number: number, row: number, first: number, end: number, spans: Spans): void {
  const seen = list[number]?.seen ?? []
  for (let k = 0; k < seen.length; k += 3)
    addSpan(spans, row, first, end, seen[k] ?? 0, seen[k + 1] ?? 1, seen[k + 2] ?? 1)
}
